import { z } from "zod";
import { fluidTypes } from "@/analytics/fluid/fluid-type";
import { separatorTestSchema } from "@/analytics/fluid/separator-test-schema";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { simulationSummarySchema } from "@/analytics/volumetrics/results-schema";
import { meteredRateSchema } from "@/analytics/volumetrics/rates";
import { warningSchema } from "@/analytics/warnings";

/**
 * The stateless calculations: nothing is stored, the same question always gets the same answer. Gas volumes are scf at
 * 14.696 psia and 60 degF unless a separator test states its own base pressure; fractions run from 0 to 1.
 */

const fraction = z.number().min(0).max(1);
const impurities = {
  nitrogen: fraction.default(0).describe("mole fraction"),
  carbonDioxide: fraction.default(0).describe("mole fraction"),
  hydrogenSulphide: fraction.default(0).describe("mole fraction"),
};
const reservoirState = {
  pressurePsia: z.number().positive().describe("psia"),
  temperatureDegF: z.number().describe("°F"),
};

// Gas properties, shared by z-factor and wellstream

export const gasPropertiesSchema = z.object({
  pseudocriticalTemperatureDegR: z.number(),
  pseudocriticalPressurePsia: z.number(),
  reducedTemperature: z.number(),
  reducedPressure: z.number(),
  zFactor: z.number(),
  formationVolumeFactorCfPerScf: z.number(),
  formationVolumeFactorRbPerMscf: z.number(),
  densityLbPerCubicFoot: z.number(),
  viscosityCp: z.number(),
  warnings: z.array(warningSchema),
});

// z-factor

export const zFactorRequestSchema = z
  .object({
    gasGravity: z.number().positive().describe("of the whole gas, air = 1"),
    ...reservoirState,
    ...impurities,
  })
  .strict();
export type ZFactorRequest = z.infer<typeof zFactorRequestSchema>;

export const zFactorResponseSchema = gasPropertiesSchema;
export type ZFactorResponse = z.infer<typeof zFactorResponseSchema>;

// wellstream

export const wellstreamRequestSchema = z
  .object({
    separatorTest: separatorTestSchema,
    reservoir: z
      .object(reservoirState)
      .strict()
      .nullable()
      .default(null)
      .describe("state for z and the formation volume factor; null leaves them out"),
    metered: meteredRateSchema
      .nullable()
      .default(null)
      .describe("one metered stream of a day, for all streams and the voidage; needs reservoir"),
  })
  .strict()
  .refine(({ reservoir, metered }) => metered === null || reservoir !== null, {
    path: ["reservoir"],
    message: "is needed for the voidage of a metered rate",
  });
export type WellstreamRequest = z.infer<typeof wellstreamRequestSchema>;

/** What comes out of one stock-tank barrel's wellstream, and where the moles of it go. */
export const balanceStreams = [
  "primary_separator",
  "second_separator",
  "stock_tank",
  "unmeasured",
  "condensate",
] as const;

export const wellstreamResponseSchema = z.object({
  /** of the first separator alone */
  primarySeparatorGasOilRatioScfPerStb: z.number(),
  /** all stages, per stock-tank barrel, at 14.696 psia and 60 degF */
  surfaceGasOilRatioScfPerStb: z.number(),
  surfaceGasGravity: z.number(),
  condensateSpecificGravity: z.number(),
  condensateMolecularWeight: z.number(),
  condensateMolecularWeightMethod: z.enum(["laboratory", "cragoe"]),
  vapourEquivalentScfPerStb: z.number(),
  wellstreamScfPerStb: z.number(),
  wellstreamGravity: z.number(),
  wellstreamMolecularWeight: z.number(),
  dryGasFraction: z.number(),
  condensateYieldStbPerMmscf: z.number(),
  condensateYieldStbPerMmscfWellstream: z.number(),
  /** low-pressure gas that was not measured and is estimated; null when every stage was measured */
  unmeasuredVapourScfPerStb: z.number().nullable(),
  /** streams in the order of the stages; shares add up to 1 */
  balance: z.array(
    z.object({
      stream: z.enum(balanceStreams),
      scfPerStb: z.number(),
      moleShare: z.number(),
      /** of the stream as a gas, air = 1; null for gas that is only estimated */
      gravity: z.number().nullable(),
    }),
  ),
  pseudocritical: z.object({ temperatureDegR: z.number(), pressurePsia: z.number() }),
  atReservoir: gasPropertiesSchema.nullable(),
  /** of the metered day; null when no rate was given */
  rates: z
    .object({
      surfaceGasScfPerDay: z.number(),
      condensateStbPerDay: z.number(),
      wetGasScfPerDay: z.number(),
      voidageRbPerDay: z.number(),
    })
    .nullable(),
  fluidType: z.enum(fluidTypes),
  warnings: z.array(warningSchema),
});
export type WellstreamResponse = z.infer<typeof wellstreamResponseSchema>;

// in-place

export const inPlaceRequestSchema = z
  .object({
    areaAcres: z.number().positive(),
    netThicknessFt: z.number().positive(),
    porosity: fraction,
    waterSaturation: fraction,
    ...reservoirState,
    separatorTest: separatorTestSchema,
    zFactor: z
      .number()
      .positive()
      .nullable()
      .default(null)
      .describe("a measured z; null lets the correlation give it"),
    condensateYieldStbPerMmscf: z
      .number()
      .positive()
      .nullable()
      .default(null)
      .describe("STB per MMscf of surface gas; null takes the separator test's own"),
  })
  .strict();
export type InPlaceRequest = z.infer<typeof inPlaceRequestSchema>;

export const inPlaceResponseSchema = z.object({
  hydrocarbonPoreVolumeCubicFeet: z.number(),
  /** null when z was given */
  reducedPressure: z.number().nullable(),
  reducedTemperature: z.number().nullable(),
  zFactor: z.number(),
  gasFormationVolumeFactorCfPerScf: z.number(),
  wellstreamGravity: z.number(),
  condensateYieldStbPerMmscf: z.number(),
  dryGasFraction: z.number(),
  wetGasInPlaceScf: z.number(),
  dryGasInPlaceScf: z.number(),
  condensateInPlaceStb: z.number(),
  wetGasPerAcreFootScf: z.number(),
  dryGasPerAcreFootScf: z.number(),
  condensatePerAcreFootStb: z.number(),
  warnings: z.array(warningSchema),
});
export type InPlaceResponse = z.infer<typeof inPlaceResponseSchema>;

// simulation

/** Enough for a thousandth of precision, and few enough that a preview cannot occupy the pool for long. */
export const MAXIMUM_PREVIEW_TRIALS = 20_000;

export const simulationRequestSchema = z
  .object({
    inputs: estimateInputsSchema,
    trials: z.number().int().min(100).max(MAXIMUM_PREVIEW_TRIALS).default(2_000),
    seed: z.number().int().min(0).max(2_147_483_647).default(1),
    /** scrambled Sobol points need a power of two of trials, at least 1,024 */
    sampling: z.enum(samplingMethods).default("latinHypercube"),
  })
  .strict();
export type SimulationRequest = z.infer<typeof simulationRequestSchema>;

export const simulationResponseSchema = simulationSummarySchema;
export type SimulationResponse = z.infer<typeof simulationResponseSchema>;
