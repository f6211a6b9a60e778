import { DomainError } from "../errors";
import { sampleMonotone } from "../numerics/monotone-interpolation";
import type { RecoveryCurve, RecoveryPoint } from "./recovery-curve-schema";

/** Intervals of the grid: 3 psi for a dew point of 3,000. Between its points the curve is a straight line. */
const INTERVALS = 1024;
/** Shares of a laboratory's curve miss each other by their rounding and its mole balance; more is a wrong curve. */
const BALANCE_TOLERANCE = 0.01;
/** The first point is the dew point; sheets round it. */
const DEW_POINT_TOLERANCE_PSI = 1;
/** Rounding of a computed curve. */
const NOTHING = 1e-9;

/** Columns of a curve over pressure, on equal steps from the lowest pressure to the dew point. */
export interface FineCurve {
  readonly lowestPsia: number;
  readonly dewPointPsia: number;
  readonly stepsPerPsi: number;
  readonly intervals: number;
  /** shares of what was there at the dew point */
  readonly gasProduced: Float64Array;
  readonly condensateProduced: Float64Array;
  readonly wellstreamProduced: Float64Array;
  /** share of the condensate not produced that is liquid in the rock; the rest is in the gas phase */
  readonly liquidShare: Float64Array;
  /** share of the surface gas not produced that is in the gas phase; the rest is dissolved in the liquid */
  readonly gasPhaseShare: Float64Array;
  /** fraction of the hydrocarbon pore volume */
  readonly liquidSaturation: Float64Array;
}

/**
 * Puts a depletion curve on a fine grid by monotone interpolation, so that a trial looks it up in two multiplications.
 *
 * What is not produced is split, not interpolated by itself: condensate into liquid and gas phase, surface gas into gas
 * phase and dissolved, by shares between 0 and 1. So the shares add up to one at every pressure, and production never
 * falls with falling pressure.
 *
 * The surface gas of the gas phase follows from its condensate and from the yield of the gas that is being produced,
 * which is the gas phase: G = (condensate in gas) Y0 / Y, of the initial surface gas.
 *
 * @throws {DomainError} with `input` such as `curve.points.3.pressurePsia` when pressures do not fall, production falls,
 *   the first point is not the untouched dew point, or more is accounted for than there is
 */
export function fineCurve(curve: RecoveryCurve): FineCurve {
  checkCurve(curve);
  const points = [...curve.points].reverse();
  const pressures = points.map(({ pressurePsia }) => pressurePsia);
  const initialYield = curve.points[0].producingYieldStbPerMmscf;
  const column = (of: (point: RecoveryPoint) => number) =>
    sampleMonotone(pressures, points.map(of), INTERVALS + 1);
  const [lowestPsia] = pressures;
  const dewPointPsia = pressures[pressures.length - 1];
  return {
    lowestPsia,
    dewPointPsia,
    stepsPerPsi: INTERVALS / (dewPointPsia - lowestPsia),
    intervals: INTERVALS,
    gasProduced: column((point) => point.gasProduced),
    condensateProduced: column((point) => point.condensateProduced),
    wellstreamProduced: column((point) => point.wellstreamProduced),
    liquidShare: column(liquidShareOf),
    gasPhaseShare: column((point) => gasPhaseShareOf(point, initialYield)),
    liquidSaturation: column((point) => point.liquidSaturation),
  };
}

/** @throws {DomainError} as `fineCurve` */
export function checkCurve(curve: RecoveryCurve): void {
  curve.points.forEach((point, i) => checkPoint(curve, point, i));
}

function checkPoint({ dewPointPsia, points }: RecoveryCurve, point: RecoveryPoint, i: number) {
  const refuse = (name: keyof RecoveryPoint, message: string) => {
    throw new DomainError(message, { input: `curve.points.${i}.${name}`, value: point[name] });
  };
  const at = `at ${point.pressurePsia} psia`;
  const accounted = point.condensateProduced + point.condensateInGas;
  if (accounted > 1 + BALANCE_TOLERANCE) {
    refuse(
      "condensateInGas",
      `The depletion curve accounts for more condensate than there is ${at}: ${accounted.toFixed(3)} of it produced ` +
        "or in the gas.",
    );
  }
  const gas = point.gasProduced + gasInGasOf(point, points[0].producingYieldStbPerMmscf);
  if (gas > 1 + BALANCE_TOLERANCE) {
    refuse(
      "producingYieldStbPerMmscf",
      `The depletion curve accounts for more gas than there is ${at}: ${gas.toFixed(3)} of it produced, or in the gas ` +
        "phase by the condensate there and the producing yield.",
    );
  }
  if (i === 0) {
    if (Math.abs(point.pressurePsia - dewPointPsia) > DEW_POINT_TOLERANCE_PSI) {
      refuse(
        "pressurePsia",
        `The depletion curve begins ${at}, not at its dew point of ${dewPointPsia} psia.`,
      );
    }
    for (const name of ["wellstreamProduced", "gasProduced", "condensateProduced"] as const) {
      if (point[name] > NOTHING) refuse(name, `Nothing is produced yet at the dew point, ${at}.`);
    }
    return;
  }
  const before = points[i - 1];
  if (!(point.pressurePsia < before.pressurePsia)) {
    refuse(
      "pressurePsia",
      `Pressures of a depletion curve fall from point to point; ${point.pressurePsia} psia follows ` +
        `${before.pressurePsia}.`,
    );
  }
  if (!(point.wellstreamProduced > before.wellstreamProduced)) {
    refuse(
      "wellstreamProduced",
      `Production of a depletion curve rises as the pressure falls; ${at} it does not.`,
    );
  }
  for (const name of ["gasProduced", "condensateProduced"] as const) {
    if (!(point[name] >= before[name])) {
      refuse(name, `Production of a depletion curve never falls with the pressure; ${at} it does.`);
    }
  }
}

/** Where rounding makes it negative it counts as nil: `checkPoint` has seen that it is no more than rounding. */
function liquidShareOf({ condensateProduced, condensateInGas }: RecoveryPoint): number {
  const left = 1 - condensateProduced;
  return left > 0 ? Math.max(0, 1 - condensateInGas / left) : 0;
}

/** As `liquidShareOf`. A gas that yields nothing has no liquid beside it: all of it is gas phase. */
function gasPhaseShareOf(point: RecoveryPoint, initialYield: number): number {
  const left = 1 - point.gasProduced;
  if (!(point.producingYieldStbPerMmscf > 0 && left > 0)) return 1;
  return Math.min(1, gasInGasOf(point, initialYield) / left);
}

/** Surface gas of the gas phase; a gas that yields nothing does not tell. */
function gasInGasOf(point: RecoveryPoint, initialYield: number): number {
  const { condensateInGas, producingYieldStbPerMmscf } = point;
  return producingYieldStbPerMmscf > 0
    ? (condensateInGas * initialYield) / producingYieldStbPerMmscf
    : 0;
}
