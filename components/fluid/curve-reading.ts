import { sampleMonotone } from "@/analytics/numerics/monotone-interpolation";
import type { RecoveryCurve, RecoveryPoint } from "@/analytics/recovery/recovery-curve-schema";

/** State of the depletion at a pressure, as shares of what was there at the dew point. */
export interface CurveState {
  pressurePsia: number;
  gasProduced: number;
  condensateProduced: number;
  condensateInGas: number;
  liquidSaturation: number;
  producingYieldStbPerMmscf: number;
}

/** Enough that a step is a fraction of a pixel. */
const INTERVALS = 400;
const names = [
  "gasProduced",
  "condensateProduced",
  "condensateInGas",
  "liquidSaturation",
  "producingYieldStbPerMmscf",
] as const;

/**
 * The curve from its lowest pressure to the dew point on equal steps, by the same monotone interpolation that an
 * estimate reads it with.
 */
export function fineStates({ points }: RecoveryCurve): CurveState[] {
  const rising = points.toReversed();
  const pressures = rising.map(({ pressurePsia }) => pressurePsia);
  const columns = names.map((name) =>
    sampleMonotone(
      pressures,
      rising.map((point) => point[name]),
      INTERVALS + 1,
    ),
  );
  const [lowest] = pressures;
  const span = pressures[pressures.length - 1] - lowest;
  return Array.from({ length: INTERVALS + 1 }, (_, step) => ({
    pressurePsia: lowest + (span * step) / INTERVALS,
    gasProduced: columns[0][step],
    condensateProduced: columns[1][step],
    condensateInGas: columns[2][step],
    liquidSaturation: columns[3][step],
    producingYieldStbPerMmscf: columns[4][step],
  }));
}

/**
 * Reads a curve at any pressure.
 *
 * @param states  of `fineStates`
 * @returns  the untouched fluid above the dew point; `null` below the lowest pressure, where nothing is known
 */
export function stateAt(states: readonly CurveState[], pressurePsia: number): CurveState | null {
  const lowest = states[0].pressurePsia;
  const top = states[states.length - 1];
  if (pressurePsia >= top.pressurePsia) return { ...top, pressurePsia };
  const position = ((pressurePsia - lowest) / (top.pressurePsia - lowest)) * (states.length - 1);
  if (!(position >= -1e-9)) return null;
  const index = Math.min(Math.max(0, Math.floor(position)), states.length - 2);
  const share = position - index;
  const at = (name: keyof CurveState) =>
    states[index][name] + (states[index + 1][name] - states[index][name]) * share;
  return {
    pressurePsia,
    gasProduced: at("gasProduced"),
    condensateProduced: at("condensateProduced"),
    condensateInGas: at("condensateInGas"),
    liquidSaturation: at("liquidSaturation"),
    producingYieldStbPerMmscf: at("producingYieldStbPerMmscf"),
  };
}

/**
 * Condensate that another 100 psi of depletion brings, as a share of what was there at the dew point; near the end of
 * the curve, what its last 100 psi bring. `null` for a curve shorter than that.
 */
export function gainPer100Psi(states: readonly CurveState[], pressurePsia: number): number | null {
  const from = Math.max(pressurePsia, states[0].pressurePsia + 100);
  const [here, lower] = [stateAt(states, from), stateAt(states, from - 100)];
  const top = states[states.length - 1].pressurePsia;
  return here && lower && from <= top ? lower.condensateProduced - here.condensateProduced : null;
}

/** Where the liquid in the pores is largest, among the curve's own points. */
export const mostLiquid = (curve: RecoveryCurve): RecoveryPoint =>
  curve.points.reduce((most, point) =>
    point.liquidSaturation > most.liquidSaturation ? point : most,
  );

/** How much liquid turns to vapour again below the pressure of its largest share; `null` below half a point. */
export function revaporised(curve: RecoveryCurve): number | null {
  const last = curve.points[curve.points.length - 1];
  const back = mostLiquid(curve).liquidSaturation - last.liquidSaturation;
  return back > 0.005 ? back : null;
}
