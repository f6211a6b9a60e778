import type { z } from "zod";
import { changeRequestSchema, changeResponseSchema } from "@/app/api/v1/calculations/change/schema";
import {
  correlationsRequestSchema,
  correlationsResponseSchema,
} from "@/app/api/v1/calculations/correlations/schema";
import {
  sensitivityRequestSchema,
  sensitivityResponseSchema,
} from "@/app/api/v1/calculations/sensitivity/schema";
import {
  distributionRequestSchema,
  distributionResponseSchema,
} from "@/app/api/v1/calculations/distribution/schema";
import {
  inPlaceRequestSchema,
  inPlaceResponseSchema,
  simulationRequestSchema,
  simulationResponseSchema,
  wellstreamRequestSchema,
  wellstreamResponseSchema,
  zFactorRequestSchema,
  zFactorResponseSchema,
} from "@/app/api/v1/calculations/schema";
import type { Calculation } from "./calculation";

/** Requests of the guide: typed by the schemas they document, and sent through them by the tests. */

const separatorTest: z.input<typeof wellstreamRequestSchema>["separatorTest"] = {
  basePressurePsia: 14.696,
  primarySeparator: {
    pressurePsia: 514.696,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 12000,
    gasGravity: 0.68,
  },
  secondSeparator: null,
  stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 1.15 },
  condensateApi: 56,
  condensateMolecularWeight: null,
  nitrogen: 0.01,
  carbonDioxide: 0.02,
  hydrogenSulphide: 0,
  dewPointPsia: 5200,
};

export const zFactorExample: z.input<typeof zFactorRequestSchema> = {
  gasGravity: 0.914,
  pressurePsia: 6500,
  temperatureDegF: 260,
  carbonDioxide: 0.02,
};

export const wellstreamExample: z.input<typeof wellstreamRequestSchema> = {
  separatorTest,
  reservoir: { pressurePsia: 6500, temperatureDegF: 260 },
  metered: { stream: "primary-separator-gas", scfPerDay: 24e6 },
};

export const inPlaceExample: z.input<typeof inPlaceRequestSchema> = {
  areaAcres: 2500,
  netThicknessFt: 80,
  porosity: 0.15,
  waterSaturation: 0.25,
  pressurePsia: 6500,
  temperatureDegF: 260,
  separatorTest,
};

export const distributionExample: z.input<typeof distributionRequestSchema> = {
  distribution: { kind: "lognormalP90P10", p90: 1520, p10: 3350 },
  points: 5,
};

export const correlationsExample: z.input<typeof correlationsRequestSchema> = {
  correlations: [
    { a: "areaAcres", b: "netThicknessFt", rank: 0.9 },
    { a: "areaAcres", b: "porosity", rank: 0.7 },
    { a: "netThicknessFt", b: "porosity", rank: -0.9 },
  ],
};

export const simulationExample: z.input<typeof simulationRequestSchema> = {
  inputs: {
    schemaVersion: 1,
    uncertain: {
      areaAcres: { distribution: { kind: "lognormalP90P10", p90: 1520, p10: 3350 } },
      netThicknessFt: { distribution: { kind: "lognormalP90P10", p90: 60, p10: 120 } },
      porosity: { distribution: { kind: "normalP90P10", p90: 0.13, p10: 0.17 } },
      waterSaturation: { distribution: { kind: "normalP90P10", p90: 0.2, p10: 0.3 } },
      pressurePsia: { distribution: { kind: "constant", value: 6500 } },
      temperatureDegF: { distribution: { kind: "constant", value: 260 } },
      condensateYieldStbPerMmscf: {
        distribution: { kind: "lognormalP90P10", p90: 74, p10: 87 },
        source: "Separator test",
      },
      gasRecovery: { distribution: { kind: "pert", low: 0.65, mode: 0.75, high: 0.85 } },
      condensateRecovery: { distribution: { kind: "pert", low: 0.3, mode: 0.42, high: 0.52 } },
      salesGasFraction: { distribution: { kind: "constant", value: 0.94 } },
    },
    correlations: [{ a: "areaAcres", b: "netThicknessFt", rank: 0.3 }],
    fluid: separatorTest,
    depthFt: 12450,
  },
  trials: 2000,
  seed: 1,
};

export const sensitivityExample: z.input<typeof sensitivityRequestSchema> = {
  inputs: simulationExample.inputs,
  seed: 1,
  trials: 2000,
  sampling: "latinHypercube",
  result: "condensateRecoverableStb",
  chosen: { from: 0.9, to: 1 },
};

const { inputs: exampleInputs } = simulationExample;
const exampleRun = { seed: 1, trials: 2000, sampling: "latinHypercube" } as const;

export const changeExample: z.input<typeof changeRequestSchema> = {
  from: { ...exampleRun, inputs: exampleInputs },
  to: {
    ...exampleRun,
    inputs: {
      ...exampleInputs,
      uncertain: {
        ...exampleInputs.uncertain,
        areaAcres: { distribution: { kind: "lognormalP90P10", p90: 1900, p10: 3500 } },
        porosity: { distribution: { kind: "normalP90P10", p90: 0.12, p10: 0.16 } },
      },
    },
  },
  result: "condensateRecoverableStb",
  percentile: "p50",
};

/** The stateless calculations, in the order in which an estimate needs them. */
export const calculations: readonly Calculation[] = [
  {
    name: "wellstream",
    title: "Wellstream of a separator test",
    purpose: "Recombines a two- or three-stage test into what the reservoir holds.",
    request: wellstreamRequestSchema,
    response: wellstreamResponseSchema,
    example: wellstreamExample,
  },
  {
    name: "z-factor",
    title: "Properties of a gas",
    purpose: "z factor, formation volume factor, density and viscosity of a gas of known gravity.",
    request: zFactorRequestSchema,
    response: zFactorResponseSchema,
    example: zFactorExample,
  },
  {
    name: "in-place",
    title: "Volumes in place",
    purpose: "Wet gas, dry gas and condensate in place with single values.",
    request: inPlaceRequestSchema,
    response: inPlaceResponseSchema,
    example: inPlaceExample,
  },
  {
    name: "distribution",
    title: "A range",
    purpose:
      "Percentiles, moments and a drawable density of a distribution, and how well it fits what was given: the residual at each percentile, two tests of measured values. P90 is the low case.",
    request: distributionRequestSchema,
    response: distributionResponseSchema,
    example: distributionExample,
  },
  {
    name: "correlations",
    title: "Rank correlations",
    purpose:
      "Whether rank correlations between inputs are possible together, and the nearest set that is. Nothing is changed.",
    request: correlationsRequestSchema,
    response: correlationsResponseSchema,
    example: correlationsExample,
  },
  {
    name: "simulation",
    title: "A simulation",
    purpose:
      "All results of an estimate’s inputs. The same inputs, trials and seed give the same answer.",
    request: simulationRequestSchema,
    response: simulationResponseSchema,
    example: simulationExample,
  },
  {
    name: "sensitivity",
    title: "What drives a result",
    purpose:
      "Rank regression, variance-based shares, what each input is worth knowing, and what the trials between two chances share.",
    request: sensitivityRequestSchema,
    response: sensitivityResponseSchema,
    example: sensitivityExample,
  },
  {
    name: "change",
    title: "What explains a change",
    purpose:
      "How much each difference between two estimates explains of the move of a percentile, averaged over the orders of making the changes.",
    request: changeRequestSchema,
    response: changeResponseSchema,
    example: changeExample,
  },
];
