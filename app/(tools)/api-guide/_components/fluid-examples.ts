import type { z } from "zod";
import {
  compositionRequestSchema,
  compositionResponseSchema,
  depletionRequestSchema,
  depletionResponseSchema,
  equationOfStateRequestSchema,
  equationOfStateResponseSchema,
  labSheetRequestSchema,
  labSheetResponseSchema,
  tuningRequestSchema,
  tuningResponseSchema,
} from "@/app/api/v1/calculations/fluid-schema";
import {
  nearWellRequestSchema,
  nearWellResponseSchema,
  recoveryRequestSchema,
  recoveryResponseSchema,
} from "@/app/api/v1/calculations/recovery-schema";
import {
  materialBalanceRequestSchema,
  materialBalanceResponseSchema,
} from "@/app/api/v1/calculations/material-balance-schema";
import type { Calculation } from "./calculation";
import { simulationExample } from "./examples";

/** One invented fluid through every calculation, so that the answers belong together. */

type Sheet = z.input<typeof compositionRequestSchema>["sheet"];
type Table = z.input<typeof depletionRequestSchema>["table"];

const sheet: Sheet = {
  kind: "wellstream",
  stream: {
    light: {
      N2: 0.6,
      CO2: 1.9,
      C1: 74.2,
      C2: 8.1,
      C3: 4.1,
      iC4: 0.8,
      nC4: 1.5,
      iC5: 0.7,
      nC5: 0.7,
      C6: 1.1,
    },
    plus: { carbonNumber: 7, molePercent: 6.3, molecularWeight: 150, specificGravity: 0.785 },
  },
};

const stages = [
  { pressurePsia: 614.7, temperatureDegF: 85 },
  { pressurePsia: 14.7, temperatureDegF: 60 },
];

const characterisation: z.input<typeof equationOfStateRequestSchema>["characterisation"] = {
  split: { kind: "gamma", fractions: 3 },
  criticals: "keslerLee",
  adjustments: {
    heavyCriticalTemperatureFactor: 1,
    heavyCriticalPressureFactor: 1,
    heavyAcentricFactorFactor: 1,
    methaneHeavyInteractionFactor: 1,
    heavyVolumeShiftFactor: 1,
  },
};

const table: Table = {
  temperatureDegF: 255,
  dewPointPsia: 4808,
  rows: [
    {
      pressurePsia: 4808,
      liquidPercent: 0,
      cumulativeProducedMolePercent: 0,
      gasZ: 0.986,
      twoPhaseZ: 0.986,
      viscosityCp: null,
      producedGas: sheet.stream,
    },
    {
      pressurePsia: 4000,
      liquidPercent: 11.4,
      cumulativeProducedMolePercent: 11.71,
      gasZ: 0.925,
      twoPhaseZ: 0.929,
      viscosityCp: null,
      producedGas: {
        light: {
          N2: 0.63,
          CO2: 1.92,
          C1: 76.31,
          C2: 8.09,
          C3: 4.01,
          iC4: 0.77,
          nC4: 1.43,
          iC5: 0.65,
          nC5: 0.65,
          C6: 0.99,
        },
        plus: { carbonNumber: 7, molePercent: 4.55, molecularWeight: 137, specificGravity: 0.773 },
      },
    },
    {
      pressurePsia: 2500,
      liquidPercent: 14.1,
      cumulativeProducedMolePercent: 39.83,
      gasZ: 0.878,
      twoPhaseZ: 0.852,
      viscosityCp: null,
      producedGas: {
        light: {
          N2: 0.65,
          CO2: 1.97,
          C1: 78.46,
          C2: 8.18,
          C3: 3.95,
          iC4: 0.74,
          nC4: 1.36,
          iC5: 0.6,
          nC5: 0.58,
          C6: 0.83,
        },
        plus: { carbonNumber: 7, molePercent: 2.68, molecularWeight: 121, specificGravity: 0.756 },
      },
    },
    {
      pressurePsia: 1000,
      liquidPercent: 11.8,
      cumulativeProducedMolePercent: 73.64,
      gasZ: 0.916,
      twoPhaseZ: 0.778,
      viscosityCp: null,
      producedGas: {
        light: {
          N2: 0.63,
          CO2: 2.01,
          C1: 78.56,
          C2: 8.47,
          C3: 4.16,
          iC4: 0.78,
          nC4: 1.43,
          iC5: 0.62,
          nC5: 0.6,
          C6: 0.79,
        },
        plus: { carbonNumber: 7, molePercent: 1.95, molecularWeight: 115, specificGravity: 0.75 },
      },
    },
  ],
};

/** The curve that the depletion above comes to, rounded. */
const curve: z.input<typeof recoveryRequestSchema>["plans"][number]["curve"] = {
  route: "laboratory",
  temperatureDegF: 255,
  dewPointPsia: 4808,
  points: [
    {
      pressurePsia: 4808,
      wellstreamProduced: 0,
      gasProduced: 0,
      condensateProduced: 0,
      condensateInGas: 1,
      liquidSaturation: 0,
      gasZ: 0.986,
      twoPhaseZ: 0.986,
      producingYieldStbPerMmscf: 121.7,
    },
    {
      pressurePsia: 4000,
      wellstreamProduced: 0.1171,
      gasProduced: 0.12,
      condensateProduced: 0.0813,
      condensateInGas: 0.5453,
      liquidSaturation: 0.114,
      gasZ: 0.925,
      twoPhaseZ: 0.9291,
      producingYieldStbPerMmscf: 82.5,
    },
    {
      pressurePsia: 2500,
      wellstreamProduced: 0.3983,
      gasProduced: 0.4158,
      condensateProduced: 0.1909,
      condensateInGas: 0.1956,
      liquidSaturation: 0.141,
      gasZ: 0.878,
      twoPhaseZ: 0.8521,
      producingYieldStbPerMmscf: 45.1,
    },
    {
      pressurePsia: 1000,
      wellstreamProduced: 0.7364,
      gasProduced: 0.775,
      condensateProduced: 0.2879,
      condensateInGas: 0.0566,
      liquidSaturation: 0.118,
      gasZ: 0.916,
      twoPhaseZ: 0.778,
      producingYieldStbPerMmscf: 32.8,
    },
  ],
};

export const compositionExample: z.input<typeof compositionRequestSchema> = {
  sheet,
  reservoir: { pressurePsia: 6500, temperatureDegF: 255 },
};

export const equationOfStateExample: z.input<typeof equationOfStateRequestSchema> = {
  sheet,
  characterisation,
  temperatureDegF: 255,
  measuredDewPointPsia: 4808,
  stages,
};

export const depletionExample: z.input<typeof depletionRequestSchema> = {
  sheet,
  table,
  stages,
  characterisation,
};

export const tuningExample: z.input<typeof tuningRequestSchema> = {
  sheet,
  characterisation,
  table,
  tunables: ["heavyCriticalTemperatureFactor", "methaneHeavyInteractionFactor"],
};

export const recoveryExample: z.input<typeof recoveryRequestSchema> = {
  inputs: simulationExample.inputs,
  plans: [
    {
      concept: "depletion",
      curve,
      abandonmentPressurePsia: {
        distribution: { kind: "pert", low: 1000, mode: 1200, high: 1600 },
      },
      condensateCurveFactor: { distribution: { kind: "normalP90P10", p90: 0.95, p10: 1.05 } },
      criticalSaturation: { low: 0.1, high: 0.2 },
      waterDrive: { kind: "none" },
      cycling: null,
    },
  ],
  seed: 1,
  trials: 1000,
};

export const nearWellExample: z.input<typeof nearWellRequestSchema> = {
  sheet,
  characterisation,
  temperatureDegF: 255,
  reservoirPressurePsia: 4500,
  flowingPressurePsia: 2500,
  relativePermeability: {
    gasExponent: 2.5,
    condensateExponent: 3,
    criticalCondensateSaturation: 0.15,
    residualGasSaturation: 0.2,
  },
};

/** The same fluid out of about 100 Bscf of wellstream, begun above its dew point. */
export const materialBalanceExample: z.input<typeof materialBalanceRequestSchema> = {
  records: [
    { pressurePsia: 6500, surfaceGasScf: 0, condensateStb: 0 },
    { pressurePsia: 5900, surfaceGasScf: 3.4e9, condensateStb: 410_000 },
    { pressurePsia: 5200, surfaceGasScf: 8.0e9, condensateStb: 980_000 },
    { pressurePsia: 4500, surfaceGasScf: 14.7e9, condensateStb: 1_650_000 },
    { pressurePsia: 3900, surfaceGasScf: 22.3e9, condensateStb: 2_210_000 },
    { pressurePsia: 3200, surfaceGasScf: 33.3e9, condensateStb: 2_710_000 },
    { pressurePsia: 2600, surfaceGasScf: 42.8e9, condensateStb: 3_140_000 },
  ],
  separatorTest: {
    basePressurePsia: 14.696,
    primarySeparator: {
      pressurePsia: 614.7,
      temperatureDegF: 85,
      gasOilRatioScfPerStb: 7800,
      gasGravity: 0.72,
    },
    secondSeparator: null,
    stockTankGas: { gasOilRatioScfPerStb: 420, gasGravity: 1.12 },
    condensateApi: 55,
    condensateMolecularWeight: 128,
    nitrogen: 0.006,
    carbonDioxide: 0.019,
    hydrogenSulphide: 0,
    dewPointPsia: 4808,
  },
  temperatureDegF: 255,
  curve,
  depthFt: 13_800,
};

export const labSheetExample: z.input<typeof labSheetRequestSchema> = {
  text: "composition\ncomponent,mol %\nC1,90\nC2,10\n",
};

/** The stateless calculations on fluids, from the sheet to what a well brings. */
export const fluidCalculations: readonly Calculation[] = [
  {
    name: "lab-sheet",
    title: "A laboratory's sheet",
    purpose:
      "Reads a CSV, or cells pasted from a spreadsheet, into the shapes below; /api/v1/calculations/lab-sheet-template.csv shows the layout. What could not be read is listed cell by cell.",
    request: labSheetRequestSchema,
    response: labSheetResponseSchema,
    example: labSheetExample,
  },
  {
    name: "composition",
    title: "A composition",
    purpose: "Normalises a sheet, and says gravity, type of fluid, z and dew point by correlation.",
    request: compositionRequestSchema,
    response: compositionResponseSchema,
    example: compositionExample,
  },
  {
    name: "equation-of-state",
    title: "Phase behaviour",
    purpose:
      "Saturation pressures, phase envelope, separators and simulated depletion. Untuned, compare the dew point first.",
    request: equationOfStateRequestSchema,
    response: equationOfStateResponseSchema,
    example: equationOfStateExample,
  },
  {
    name: "depletion",
    title: "A depletion study",
    purpose: "Checks a laboratory's table against itself, and takes it to the surface.",
    request: depletionRequestSchema,
    response: depletionResponseSchema,
    example: depletionExample,
  },
  {
    name: "tuning",
    title: "A tuning",
    purpose: "Factors on the heavy end that bring dew point and liquid to the laboratory's.",
    request: tuningRequestSchema,
    response: tuningResponseSchema,
    example: tuningExample,
  },
  {
    name: "recovery",
    title: "Ways of producing",
    purpose: "What depletion, compression and cycling bring to the tank, on the same trials.",
    request: recoveryRequestSchema,
    response: recoveryResponseSchema,
    example: recoveryExample,
  },
  {
    name: "material-balance",
    title: "Gas in place from pressures",
    purpose:
      "The straight line of p/z against the wellstream produced, with the two-phase z of a depletion curve below the dew point, and what the gas's own z would have given.",
    request: materialBalanceRequestSchema,
    response: materialBalanceResponseSchema,
    example: materialBalanceExample,
  },
  {
    name: "near-well",
    title: "Liquid around a well",
    purpose: "The share of its rate that a well keeps beside the liquid that collects around it.",
    request: nearWellRequestSchema,
    response: nearWellResponseSchema,
    example: nearWellExample,
  },
];
