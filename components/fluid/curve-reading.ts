import type { RecoveryCurve, RecoveryPoint } from "@/analytics/recovery/recovery-curve-schema";

/** State of the depletion at a pressure, as shares of what was there at the dew point. */
export type CurveState = Omit<RecoveryPoint, "twoPhaseZ" | "gasZ">;

const between = (from: RecoveryPoint, to: RecoveryPoint, share: number): CurveState => {
  const at = (name: keyof CurveState) => from[name] + (to[name] - from[name]) * share;
  return {
    pressurePsia: at("pressurePsia"),
    wellstreamProduced: at("wellstreamProduced"),
    gasProduced: at("gasProduced"),
    condensateProduced: at("condensateProduced"),
    condensateInGas: at("condensateInGas"),
    liquidSaturation: at("liquidSaturation"),
    producingYieldStbPerMmscf: at("producingYieldStbPerMmscf"),
  };
};

/**
 * Reads a curve at any pressure, in straight lines between its points.
 *
 * @returns  the first point above the dew point; `null` below the lowest pressure, where nothing is known
 */
export function curveAt(curve: RecoveryCurve, pressurePsia: number): CurveState | null {
  const { points } = curve;
  if (pressurePsia >= points[0].pressurePsia) return { ...points[0], pressurePsia };
  for (let i = 1; i < points.length; i += 1) {
    const [from, to] = [points[i - 1], points[i]];
    if (pressurePsia < to.pressurePsia) continue;
    const span = from.pressurePsia - to.pressurePsia;
    return between(from, to, span === 0 ? 1 : (from.pressurePsia - pressurePsia) / span);
  }
  return null;
}

/**
 * Condensate that another 100 psi of depletion brings, as a share of what was there at the dew point; at the end of the
 * curve, what the last 100 psi brought.
 */
export function gainPer100Psi(curve: RecoveryCurve, pressurePsia: number): number | null {
  const lowest = curve.points[curve.points.length - 1].pressurePsia;
  const from = Math.max(pressurePsia, lowest + 100);
  const [here, lower] = [curveAt(curve, from), curveAt(curve, from - 100)];
  return here && lower ? lower.condensateProduced - here.condensateProduced : null;
}

/** Where the liquid in the pores is largest. */
export const mostLiquid = (curve: RecoveryCurve): RecoveryPoint =>
  curve.points.reduce((most, point) =>
    point.liquidSaturation > most.liquidSaturation ? point : most,
  );

/** Whether liquid turns to vapour again below the pressure of its largest share, by more than half a point. */
export function revaporised(curve: RecoveryCurve): number | null {
  const most = mostLiquid(curve);
  const last = curve.points[curve.points.length - 1];
  const back = most.liquidSaturation - last.liquidSaturation;
  return back > 0.005 ? back : null;
}
