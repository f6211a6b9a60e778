import { z } from "zod";
import { compositionSheetSchema } from "@/analytics/composition/composition-schema";
import { characterisationSchema } from "@/analytics/equation-of-state/characterisation-schema";
import {
  reservoirPressureSchema,
  reservoirTemperatureSchema,
} from "@/analytics/fluid/reservoir-state-schema";
import { recoveryPlanSchema } from "@/analytics/recovery/recovery-plan-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { rangeSchema, recoverySummarySchema } from "@/analytics/volumetrics/results-schema";
import { warningSchema } from "@/analytics/warnings";
import { tunedBy } from "./fluid-schema";

/** What each way of producing brings to the tank, and what a well loses to the liquid around it. Nothing is stored. */

// recovery: what each way of producing brings to the tank

export const recoveryRequestSchema = z
  .object({
    inputs: estimateInputsSchema,
    /** one for every concept to be set side by side; `inputs.recoveryPlan` is not looked at */
    plans: z.array(recoveryPlanSchema).min(1).max(3),
    seed: z.number().int().min(0).max(2_147_483_647),
    trials: z.number().int().min(100).max(20_000).default(4_000),
  })
  .strict();
export type RecoveryRequest = z.infer<typeof recoveryRequestSchema>;

export const recoveryResponseSchema = z.object({
  concepts: z.array(
    z.object({
      concept: recoverySummarySchema.shape.concept,
      route: recoverySummarySchema.shape.route,
      condensateInPlaceStb: rangeSchema,
      condensateRecoverableStb: rangeSchema,
      salesGasScf: rangeSchema,
      /** fractions of what is in place */
      condensateRecovery: rangeSchema,
      gasRecovery: rangeSchema,
      /** means over the trials; they add up to 1 */
      shares: recoverySummarySchema.shape.shares,
      /** in order; means over the trials, shares of what is in place */
      phases: recoverySummarySchema.shape.phases,
      /** mean volumes; only for cycling */
      gasBalance: recoverySummarySchema.shape.gasBalance,
      warnings: z.array(warningSchema),
    }),
  ),
});
export type RecoveryResponse = z.infer<typeof recoveryResponseSchema>;

// near-well: how much a well loses to liquid around it

export const nearWellRequestSchema = z
  .object({
    sheet: compositionSheetSchema,
    characterisation: characterisationSchema,
    temperatureDegF: reservoirTemperatureSchema,
    reservoirPressurePsia: reservoirPressureSchema,
    flowingPressurePsia: reservoirPressureSchema,
    /** Corey: exponents and end points of gas and condensate */
    relativePermeability: z
      .object({
        gasExponent: z.number().min(1).max(6),
        condensateExponent: z.number().min(1).max(6),
        criticalCondensateSaturation: z.number().min(0).max(0.8),
        residualGasSaturation: z.number().min(0).max(0.5),
      })
      .strict(),
    ...tunedBy,
  })
  .strict();
export type NearWellRequest = z.infer<typeof nearWellRequestSchema>;

export const nearWellResponseSchema = z.object({
  /** rate with liquid over rate of the same gas without, at the same drawdown; 0 to 1 */
  productivityRatio: z.number(),
  points: z.array(
    z.object({
      pressurePsia: z.number(),
      gasViscosityCp: z.number(),
      condensateViscosityCp: z.number().nullable(),
      liquidSaturation: z.number(),
      gasRelativePermeability: z.number(),
    }),
  ),
  warnings: z.array(warningSchema),
});
export type NearWellResponse = z.infer<typeof nearWellResponseSchema>;
