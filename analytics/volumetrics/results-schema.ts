import { z } from "zod";
import { warningSchema } from "../warnings";
import { recoveryRoutes } from "../recovery/recovery-curve-schema";
import { samplingMethods } from "../uncertainty/sampling-schema";
import { planInputNames, producingConcepts } from "../recovery/recovery-plan-schema";
import { inputNames, inputNameSchema } from "./inputs-schema";

/** Quantities stored trial by trial with a revision. Gas in scf at 14.696 psia and 60 degF, condensate in STB. */
export const vectorNames = [
  "wetGasInPlaceScf",
  "dryGasInPlaceScf",
  "condensateInPlaceStb",
  "salesGasScf",
  "condensateRecoverableStb",
] as const;
export type VectorName = (typeof vectorNames)[number];

/** Quantities summarised for one reservoir; `condensateLeftStb` is in place less recoverable, trial by trial. */
export const resultNames = [...vectorNames, "condensateLeftStb"] as const;
export type ResultName = (typeof resultNames)[number];

/** Derived fluid and rock quantities, summarised without a curve. */
export const derivedNames = [
  "zFactor",
  "gasFormationVolumeFactorCfPerScf",
  "wellstreamGravity",
  "dryGasFraction",
  "condensateYieldStbPerMmscfWellstream",
  "wetGasPerAcreFootScf",
  "condensatePerAcreFootStb",
] as const;
export type DerivedName = (typeof derivedNames)[number];

/** Recoveries as fractions of dry gas and condensate in place: sampled without a recovery plan, worked out with one. */
export const recoveryNames = ["gasRecovery", "condensateRecovery"] as const;
export type RecoveryName = (typeof recoveryNames)[number];

/** What a result can be driven by: the sampled inputs, and those of a recovery plan. */
export const driverNames = [...inputNames, ...planInputNames] as const;
export type DriverName = (typeof driverNames)[number];

/** P90 is the low case: 90 % of trials are at least this. Quantiles use the R-7 method (Hyndman and Fan 1996). */
export const rangeSchema = z.object({
  p90: z.number(),
  p50: z.number(),
  p10: z.number(),
  mean: z.number(),
});
export type Range = z.infer<typeof rangeSchema>;

export const quantitySummarySchema = rangeSchema.extend({
  standardDeviation: z.number(),
  /** where values are densest; summaries of engines before 2.0.0 lack it */
  mode: z.number().optional(),
  minimum: z.number(),
  maximum: z.number(),
  /** sampling error of each percentile and of the mean (one standard error) */
  standardErrors: rangeSchema,
  /** equal bins from `low` to `high` */
  histogram: z.object({ low: z.number(), high: z.number(), counts: z.array(z.number()) }),
  /** `values[i]` is exceeded (or reached) with chance `probabilities[i]`, from 1 down to 0 */
  exceedance: z.object({ values: z.array(z.number()), probabilities: z.array(z.number()) }),
});
export type QuantitySummary = z.infer<typeof quantitySummarySchema>;

/** What one input does to one result. */
export const driverSchema = z.object({
  input: z.enum(driverNames),
  /** Spearman rank correlation of the input with the result over the trials */
  rankCorrelation: z.number(),
  /** squared rank correlation over the sum of them; 0 for a constant. Shares of correlated inputs overlap */
  shareOfSpread: z.number(),
  /** the result with this input at its P90 and at its P10, the others at their P50 */
  swing: z.object({ atP90: z.number(), atP10: z.number() }),
});
export type Driver = z.infer<typeof driverSchema>;

/** In order of time. `cycling` counts gas net of fuel and of what was bought or put back, so it can be below zero. */
export const recoveryPhaseNames = [
  "aboveDewPoint",
  "belowDewPoint",
  "cycling",
  "blowdown",
] as const;
export type RecoveryPhaseName = (typeof recoveryPhaseNames)[number];

/** What a recovery plan did over the trials. Shares are mean volumes over the mean volume in place. */
export const recoverySummarySchema = z.object({
  concept: z.enum(producingConcepts),
  route: z.enum(recoveryRoutes),
  /** percentiles of the plan's inputs as sampled; those that the concept does not use are left out */
  inputs: z.partialRecord(z.enum(planInputNames), rangeSchema),
  /** of the condensate in place; they add up to 1 */
  shares: z.object({ toTank: z.number(), leftInRock: z.number(), leftInGas: z.number() }),
  /** they add up to the recoveries; phases that do not happen are left out */
  phases: z.array(
    z.object({
      name: z.enum(recoveryPhaseNames),
      condensateShare: z.number(),
      gasShare: z.number(),
    }),
  ),
  /** mean volumes; null without cycling */
  gasBalance: z
    .object({
      injectedScf: z.number(),
      producedWhileCyclingScf: z.number(),
      fuelScf: z.number(),
      makeUpScf: z.number(),
      /** mean reservoir pressure when injection ends, psia */
      pressureAtEndPsia: z.number(),
    })
    .nullable(),
  /** share of the trials whose initial pressure is below the curve's dew point */
  saturatedShare: z.number(),
});
export type RecoverySummary = z.infer<typeof recoverySummarySchema>;

export const simulationSummarySchema = z.object({
  engineVersion: z.string(),
  seed: z.number().int(),
  trials: z.number().int(),
  /** summaries of engines before 2.0.0 lack these two; they were one Latin hypercube */
  sampling: z.enum(samplingMethods).optional(),
  /** independent repetitions that the trials are made of, from which the standard errors come */
  replicates: z.number().int().optional(),
  /**
   * percentiles of the sampled inputs (after truncation), so a screen can show what was actually sampled. With a
   * recovery plan, the two recoveries are those that were worked out
   */
  inputs: z.record(inputNameSchema, rangeSchema),
  results: z.record(z.enum(resultNames), quantitySummarySchema),
  derived: z
    .record(z.enum(derivedNames), rangeSchema)
    .and(z.partialRecord(z.enum(recoveryNames), rangeSchema)),
  /** ranked by share of the spread, largest first */
  drivers: z.object({
    wetGasInPlaceScf: z.array(driverSchema),
    condensateRecoverableStb: z.array(driverSchema),
  }),
  /** the results with every input at its P50 */
  deterministic: z.record(z.enum(resultNames), z.number()),
  /** null without a recovery plan; summaries stored before plans lack it */
  recovery: recoverySummarySchema.nullable().default(null),
  warnings: z.array(warningSchema),
});
export type SimulationSummary = z.infer<typeof simulationSummarySchema>;

export type TrialVectors = Record<VectorName, Float64Array>;
