import { z } from "zod";
import { distributionSchema } from "../uncertainty/distribution-schema";
import { recoveryCurveSchema } from "./recovery-curve-schema";

/** Ways of producing a gas-condensate reservoir. Compression is depletion to a lower abandonment pressure. */
export const producingConcepts = ["depletion", "compression", "cycling"] as const;
export type ProducingConcept = (typeof producingConcepts)[number];

const uncertain = z
  .object({
    distribution: distributionSchema,
    source: z.string().max(500).default(""),
    /** why this range and not another, in the expert's words */
    reason: z.string().max(2_000).optional(),
  })
  .strict();

/** Water entering or gas being trapped behind it: simple options, stated. `none` is a closed volume. */
export const waterDriveSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("none") }).strict(),
  z
    .object({
      kind: z.literal("influx"),
      /** share of the initial hydrocarbon pore volume that water has taken at abandonment */
      invadedFraction: z.number().min(0).max(0.95),
      /** gas saturation trapped behind the water, fraction of the invaded hydrocarbon pore volume */
      trappedGasSaturation: z.number().min(0).max(0.6),
    })
    .strict(),
]);
export type WaterDrive = z.infer<typeof waterDriveSchema>;

/** Gas cycling, then blowdown. */
export const cyclingSchema = z
  .object({
    /** reservoir pressure at which injection begins, psia; at or below initial */
    pressurePsia: z.number().positive(),
    /** `maintained`: voidage is replaced, make-up gas is bought; `declining`: only produced gas goes back */
    pressure: z.enum(["maintained", "declining"]),
    /** invaded share of the hydrocarbon pore volume (areal times vertical) */
    sweepEfficiency: uncertain,
    /** share of the swept vapour's condensate that is displaced */
    displacementEfficiency: uncertain,
    /** injected volume, hydrocarbon pore volumes at reservoir conditions */
    injectedPoreVolumes: z.number().positive().max(5),
    /** share of produced surface gas used as fuel or lost before injection */
    fuelFraction: z.number().min(0).max(0.5),
    /**
     * how near injected gas comes to taking up all the liquid it could of what has dropped out in the swept part: 0, on
     * the safe side, unless given; 1 is a simulator without any delay
     */
    revaporisation: z.number().min(0).max(1).optional(),
  })
  .strict();
export type Cycling = z.infer<typeof cyclingSchema>;

/**
 * How recoveries follow from the fluid in an estimate: with a plan, the gas and condensate recovery of every trial are
 * worked out from the depletion curve instead of being sampled. The curve is copied in, so that a later change of the
 * sample changes nothing.
 */
export const recoveryPlanSchema = z
  .object({
    concept: z.enum(producingConcepts),
    curve: recoveryCurveSchema,
    /** reservoir pressure at the end, psia */
    abandonmentPressurePsia: uncertain,
    /** how far the true condensate recovery below the dew point may lie from the curve's: a factor around 1 */
    condensateCurveFactor: uncertain,
    /** retrograde liquid is immobile below this saturation: low and high end of the band, fractions of pore space */
    criticalSaturation: z
      .object({ low: z.number().min(0).max(1), high: z.number().min(0).max(1) })
      .strict(),
    waterDrive: waterDriveSchema,
    /** only for the concept `cycling` */
    cycling: cyclingSchema.nullable(),
  })
  .strict();
export type RecoveryPlan = z.infer<typeof recoveryPlanSchema>;

/** Uncertain inputs of a plan, in the order in which screens list them and trials draw them. */
export const planInputNames = [
  "abandonmentPressurePsia",
  "condensateCurveFactor",
  "sweepEfficiency",
  "displacementEfficiency",
] as const;
export type PlanInputName = (typeof planInputNames)[number];
