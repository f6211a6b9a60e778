import { zFactor } from "@/analytics/gas/z-factor";

/**
 * Share of everything in place that the gas gives by expanding from the initial pressure to the dew point, with both z
 * from the wellstream's gravity, as estimates take them:
 *
 *     1 - (pd / zd) / (pi / zi)
 *
 * @param pseudocritical  of the wellstream
 * @returns  0 for a reservoir that begins at or below its dew point; `null` while something is unknown
 */
export function producedBeforeDewPoint(
  pseudocritical: { temperatureDegR: number; pressurePsia: number } | null,
  reservoir: { pressurePsia: number; temperatureDegF: number } | null,
  dewPointPsia: number,
): number | null {
  if (!pseudocritical || !reservoir) return null;
  if (reservoir.pressurePsia <= dewPointPsia) return 0;
  const reducedTemperature = (reservoir.temperatureDegF + 459.67) / pseudocritical.temperatureDegR;
  const pressureOverZ = (pressurePsia: number) =>
    pressurePsia / zFactor(pressurePsia / pseudocritical.pressurePsia, reducedTemperature);
  return 1 - pressureOverZ(dewPointPsia) / pressureOverZ(reservoir.pressurePsia);
}
