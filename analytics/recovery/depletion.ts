import type { FineCurve } from "./fine-curve";

/** What a depletion needs to know of one reservoir besides its fluid's curve. */
export interface Reservoir {
  initialPressurePsia: number;
  /** p / z at the initial pressure */
  initialPressureOverZ: number;
  /** p / z at the dew point, by the same z method; not looked at in a reservoir that begins below it */
  dewPointPressureOverZ: number;
  /** of the plan: multiplies the curve's condensate recovery */
  condensateCurveFactor: number;
}

/** Where the gas and the condensate of a reservoir are at one pressure, as shares of what was in place at first. */
export interface Contents {
  /** moles still in the reservoir */
  wellstreamLeft: number;
  condensateProduced: number;
  condensateInGas: number;
  /** liquid in the rock */
  condensateInRock: number;
  gasProduced: number;
  gasInGas: number;
  /** gas phase, fraction of the hydrocarbon pore volume */
  gasSaturation: number;
  pressurePsia: number;
}

export function createContents(): Contents {
  return {
    wellstreamLeft: 0,
    condensateProduced: 0,
    condensateInGas: 0,
    condensateInRock: 0,
    gasProduced: 0,
    gasInGas: 0,
    gasSaturation: 0,
    pressurePsia: 0,
  };
}

/**
 * Produced by expansion of the gas from the initial pressure to the dew point, a share of everything in place: nothing
 * changes its composition on the way.
 *
 *     n0 = 1 - (pd / zd) / (pi / zi)
 *
 * zi and zd come from the same method, so that n0 is zero for a reservoir at its dew point; a reservoir that begins
 * below the curve's dew point has none.
 *
 * @see C. H. Whitson, S. B. Torp, Evaluating constant-volume depletion data, J. Pet. Technol. 35 (March 1983) 610-620
 */
export function producedAboveDewPoint(curve: FineCurve, reservoir: Reservoir): number {
  return reservoir.initialPressurePsia > curve.dewPointPsia
    ? 1 - reservoir.dewPointPressureOverZ / reservoir.initialPressureOverZ
    : 0;
}

/**
 * How far a reservoir's pressures are stretched onto the curve's. A reservoir that begins below the dew point of its
 * sample is taken as just saturated at its own pressure, with the volumetrics' fluid in place, and the curve is read at
 * the same fraction of the dew point.
 */
export function pressureScale(curve: FineCurve, reservoir: Reservoir): number {
  return Math.max(1, curve.dewPointPsia / reservoir.initialPressurePsia);
}

/**
 * Contents of a reservoir depleted to a pressure at or below its dew point.
 *
 *     gas produced = n0 + (1 - n0) Rg(p)        condensate produced = n0 + (1 - n0) f Rc(p)
 *
 * with R the curve's recoveries and f the plan's factor. What is not produced is split between gas phase and liquid as
 * on the curve.
 *
 * @param pressurePsia  between the end of the curve and the dew point; outside, everything is NaN
 * @param into          overwritten
 */
export function contentsBelowDewPoint(
  curve: FineCurve,
  reservoir: Reservoir,
  pressurePsia: number,
  into: Contents,
): void {
  const onCurve = pressurePsia * pressureScale(curve, reservoir);
  fillFromCurve(curve, reservoir, (onCurve - curve.lowestPsia) * curve.stepsPerPsi, into);
  into.pressurePsia = pressurePsia;
}

/** Contents of a reservoir at or above its dew point, where all that is left is one gas. */
export function contentsAboveDewPoint(
  pressurePsia: number,
  wellstreamLeft: number,
  into: Contents,
): void {
  into.wellstreamLeft = wellstreamLeft;
  into.condensateProduced = 1 - wellstreamLeft;
  into.condensateInGas = wellstreamLeft;
  into.condensateInRock = 0;
  into.gasProduced = 1 - wellstreamLeft;
  into.gasInGas = wellstreamLeft;
  into.gasSaturation = 1;
  into.pressurePsia = pressurePsia;
}

/**
 * Contents below the dew point with the moles left given instead of the pressure.
 *
 * @param wellstreamLeft  share of the initial moles; past the end of the curve everything is NaN
 */
export function contentsAtMoles(
  curve: FineCurve,
  reservoir: Reservoir,
  wellstreamLeft: number,
  into: Contents,
): void {
  const below = 1 - producedAboveDewPoint(curve, reservoir);
  const position = positionOf(curve, 1 - wellstreamLeft / below);
  fillFromCurve(curve, reservoir, position, into);
  into.pressurePsia =
    (curve.lowestPsia + position / curve.stepsPerPsi) / pressureScale(curve, reservoir);
}

/** Place on the grid at which the curve has produced this share of its moles; NaN past its end. */
function positionOf({ wellstreamProduced, intervals }: FineCurve, produced: number): number {
  if (!(produced >= 0 && produced <= wellstreamProduced[0])) return NaN;
  let low = 0;
  let high = intervals;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (wellstreamProduced[middle] >= produced) low = middle;
    else high = middle;
  }
  const step = wellstreamProduced[low] - wellstreamProduced[high];
  return low + (wellstreamProduced[low] - produced) / step;
}

function fillFromCurve(
  curve: FineCurve,
  reservoir: Reservoir,
  position: number,
  into: Contents,
): void {
  const { intervals } = curve;
  // A reservoir abandoned exactly where the curve ends or begins may miss it by a rounding.
  const inside = position > -1e-9 && position < intervals + 1e-9;
  const i = inside ? Math.max(0, Math.min(position | 0, intervals - 1)) : 0;
  const u = inside ? position - i : NaN;
  const above = producedAboveDewPoint(curve, reservoir);
  const below = 1 - above;
  const condensate = reservoir.condensateCurveFactor * at(curve.condensateProduced, i, u);
  const gas = at(curve.gasProduced, i, u);
  const condensateLeft = below * (1 - condensate);
  const liquidShare = at(curve.liquidShare, i, u);
  into.wellstreamLeft = below * (1 - at(curve.wellstreamProduced, i, u));
  into.condensateProduced = above + below * condensate;
  into.condensateInRock = condensateLeft * liquidShare;
  into.condensateInGas = condensateLeft * (1 - liquidShare);
  into.gasProduced = above + below * gas;
  into.gasInGas = below * (1 - gas) * at(curve.gasPhaseShare, i, u);
  into.gasSaturation = 1 - at(curve.liquidSaturation, i, u);
}

function at(column: Float64Array, i: number, u: number): number {
  return column[i] + u * (column[i + 1] - column[i]);
}
