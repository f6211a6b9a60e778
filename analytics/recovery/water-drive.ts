import type { Contents } from "./depletion";
import type { WaterDrive } from "./recovery-plan-schema";

/**
 * Share of the gas phase that water has pushed out by abandonment, besides what depletion produced.
 *
 *     w = E (1 - Sgt / Sg)        0 when Sgt >= Sg
 *
 * Water has swept the fraction E of the pore space at the abandonment pressure p and left the trapped saturation Sgt
 * behind, at that pressure; retrograde liquid it passes by. For a dry gas the recovery becomes the known
 *
 *     RF = 1 - (p / z) / (pi / zi) [1 - E + E Sgt / Sg]
 *
 * Simple: influx keeps the pressure up, so a stronger aquifer is a higher abandonment pressure, which the plan states by
 * itself. Gas trapped early, at a higher pressure, is more than this counts.
 *
 * @see R. G. Agarwal, R. Al-Hussainy, H. J. Ramey, The importance of water influx in gas reservoirs, J. Pet. Technol.
 *      17 (November 1965) 1336-1342 (the dry-gas form, from memory)
 * @example sweptByWater({ kind: "influx", invadedFraction: 0.5, trappedGasSaturation: 0.3 }, { gasSaturation: 1 }) // => 0.35
 */
export function sweptByWater(
  drive: WaterDrive,
  { gasSaturation }: Pick<Contents, "gasSaturation">,
): number {
  if (drive.kind === "none") return 0;
  const { invadedFraction, trappedGasSaturation } = drive;
  if (trappedGasSaturation >= gasSaturation) return 0;
  return invadedFraction * (1 - trappedGasSaturation / gasSaturation);
}
