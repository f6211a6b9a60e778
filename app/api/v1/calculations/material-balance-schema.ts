import { z } from "zod";
import { separatorTestSchema } from "@/analytics/fluid/separator-test-schema";
import { recoveryCurveSchema } from "@/analytics/recovery/recovery-curve-schema";
import { warningSchema } from "@/analytics/warnings";

/** Pressures that one line may have: a reading a month over sixteen years. */
export const MOST_RECORDS = 200;

export const materialBalanceRequestSchema = z
  .object({
    /** in the order of production; three at least give a line */
    records: z
      .array(
        z
          .object({
            /** static, of the reservoir at its datum */
            pressurePsia: z.number().positive(),
            /** cumulative, of all separators and the tank, scf at 14.696 psia and 60 degF */
            surfaceGasScf: z.number().nonnegative(),
            /** cumulative */
            condensateStb: z.number().nonnegative(),
          })
          .strict(),
      )
      .min(1)
      .max(MOST_RECORDS),
    /** of the fluid that was there at first */
    separatorTest: separatorTestSchema,
    temperatureDegF: z.number(),
    /** two-phase z below the dew point; null takes the gas's own everywhere */
    curve: recoveryCurveSchema.nullable().default(null),
    /** of the pressures' datum, ft; null leaves the pressure gradient unjudged */
    depthFt: z.number().positive().max(40_000).nullable().default(null),
  })
  .strict();
export type MaterialBalanceRequest = z.infer<typeof materialBalanceRequestSchema>;

export const materialBalanceResponseSchema = z.object({
  wellstreamInPlaceScf: z.number(),
  dryGasInPlaceScf: z.number(),
  condensateInPlaceStb: z.number(),
  line: z.object({
    /** where nothing was produced, psia */
    initialPressureOverZ: z.number(),
    rSquared: z.number(),
  }),
  /** share of the wellstream in place, at the last record */
  producedFraction: z.number(),
  /** of the curve, else of the separator test */
  dewPointPsia: z.number().nullable(),
  vapourEquivalentScfPerStb: z.number(),
  points: z.array(
    z.object({
      pressurePsia: z.number(),
      wellstreamProducedScf: z.number(),
      /** of gas and liquid together below the dew point */
      z: z.number(),
      pressureOverZ: z.number(),
      /** of the line, at the same production */
      linePressureOverZ: z.number(),
      gasZ: z.number(),
      gasPressureOverZ: z.number(),
      isBelowDewPoint: z.boolean(),
    }),
  ),
  /** what the gas's own z below the dew point would have given; null where it makes no difference, or no line */
  withGasZ: z
    .object({
      wellstreamInPlaceScf: z.number(),
      initialPressureOverZ: z.number(),
      rSquared: z.number(),
      /** over the wellstream in place, less 1 */
      bias: z.number(),
    })
    .nullable(),
  warnings: z.array(warningSchema),
});
export type MaterialBalanceResponse = z.infer<typeof materialBalanceResponseSchema>;
