import { z } from "zod";
import { DomainError } from "../errors";
import type { Wellstream } from "../fluid/wellstream";
import { CUBIC_FEET_PER_BARREL } from "../units/conversions";

/** Which stream was metered, at 14.696 psia and 60 degF; condensate in STB. */
export const meteredRateSchema = z.discriminatedUnion("stream", [
  z
    .object({ stream: z.literal("primary-separator-gas"), scfPerDay: z.number().nonnegative() })
    .strict(),
  z.object({ stream: z.literal("surface-gas"), scfPerDay: z.number().nonnegative() }).strict(),
  z.object({ stream: z.literal("condensate"), stbPerDay: z.number().nonnegative() }).strict(),
]);
export type MeteredRate = z.infer<typeof meteredRateSchema>;

export interface WellstreamRates {
  readonly surfaceGasScfPerDay: number;
  readonly condensateStbPerDay: number;
  readonly wetGasScfPerDay: number;
  /** reservoir volume that leaves each day */
  readonly voidageRbPerDay: number;
}

/**
 * All streams of a producing day from the one that was metered, by the ratios of the recombined wellstream.
 *
 *     condensate = metered gas / its gas-oil ratio     wet gas = condensate (sum R + Veq)
 *     voidage = wet gas x Bg / 5.614583
 *
 * Holds while the reservoir produces the wellstream that was tested: before liquid drops out.
 *
 * @param formationVolumeFactorCfPerScf  of the wellstream at reservoir conditions
 * @throws {DomainError} when a rate is negative or the formation volume factor is not positive
 * @example wellstreamRates({ stream: "condensate", stbPerDay: 100 }, { primarySeparatorGasOilRatioScfPerStb: 12000,
 *   surfaceGasOilRatioScfPerStb: 12450, wellstreamScfPerStb: 13275.781 }, 0.00350679).voidageRbPerDay // => 829.187
 */
export function wellstreamRates(
  metered: MeteredRate,
  wellstream: Pick<
    Wellstream,
    "primarySeparatorGasOilRatioScfPerStb" | "surfaceGasOilRatioScfPerStb" | "wellstreamScfPerStb"
  >,
  formationVolumeFactorCfPerScf: number,
): WellstreamRates {
  const rate = metered.stream === "condensate" ? metered.stbPerDay : metered.scfPerDay;
  if (!(rate >= 0 && rate < Infinity)) {
    throw new DomainError(`A rate is not negative: ${rate} a day`, { input: "rate", value: rate });
  }
  if (!(formationVolumeFactorCfPerScf > 0 && formationVolumeFactorCfPerScf < Infinity)) {
    throw new DomainError(
      `A formation volume factor is above zero, not ${formationVolumeFactorCfPerScf} cf/scf`,
      { input: "formationVolumeFactorCfPerScf", value: formationVolumeFactorCfPerScf },
    );
  }
  const condensateStbPerDay = rate / ratioTo(metered.stream, wellstream);
  const wetGasScfPerDay = condensateStbPerDay * wellstream.wellstreamScfPerStb;
  return {
    surfaceGasScfPerDay: condensateStbPerDay * wellstream.surfaceGasOilRatioScfPerStb,
    condensateStbPerDay,
    wetGasScfPerDay,
    voidageRbPerDay: (wetGasScfPerDay * formationVolumeFactorCfPerScf) / CUBIC_FEET_PER_BARREL,
  };
}

function ratioTo(
  stream: MeteredRate["stream"],
  wellstream: Pick<
    Wellstream,
    "primarySeparatorGasOilRatioScfPerStb" | "surfaceGasOilRatioScfPerStb"
  >,
): number {
  switch (stream) {
    case "primary-separator-gas":
      return wellstream.primarySeparatorGasOilRatioScfPerStb;
    case "surface-gas":
      return wellstream.surfaceGasOilRatioScfPerStb;
    case "condensate":
      return 1;
  }
}
