/** Lines of equal liquid share by volume inside the phase envelope. */
import type { CurvePoint } from "./curve-tracer";
import { DiagramLine, HIGHEST_PSIA, LOWEST_DEGR, LOWEST_PSIA, isAcross } from "./diagram-line";
import type { Flasher } from "./flash";
import { qualitySystem } from "./saturation-curve";

/** A line ends where its ln K are all below this: at the critical point. */
const NEAR_CRITICAL = 0.1;
const LN_PRESSURE_STEP = 0.1;
/** How close to the share the first point is brought before Newton's method takes over, relative. */
const FIRST_TOLERANCE = 1e-3;

/**
 * One line of equal liquid share, as unknowns of the tracer: ln K_i, ln T, ln p, V. From 14.696 psia, or from -130 degF
 * where the share is reached below that at 14.696 psia, to the critical point, which comes last where the line gets
 * there.
 *
 * @param lnWarm    ln T of the dew point at 14.696 psia
 * @param critical  unknowns at the critical point; null when it lies outside the diagram
 * @returns         empty where the diagram has none of the line
 */
export function qualityLine(
  flasher: Flasher,
  z: Float64Array,
  liquidVolumeFraction: number,
  lnWarm: number,
  critical: Float64Array | null,
): Float64Array[] {
  const n = z.length;
  const line = new DiagramLine(qualitySystem(flasher.equation, z, liquidVolumeFraction), n);
  const first = firstPoint(flasher, z, line, liquidVolumeFraction, lnWarm);
  if (!first) return [];
  const isNearCritical = (point: CurvePoint) =>
    isAcross(first, point, n) ||
    point.at.subarray(0, n).every((lnK, i) => z[i] === 0 || Math.abs(lnK) < NEAR_CRITICAL);
  line.follow(first, (point, last) => isNearCritical(point) || line.isLeaving(point, last));
  const points = line.points.filter((point) => !isAcross(first, point, n)).map(({ at }) => at);
  return critical && isNearCritical(line.points[line.points.length - 1])
    ? [...points, critical]
    : points;
}

/** At 14.696 psia the temperature, or at -130 degF the first pressure, at which the liquid has its share. */
function firstPoint(
  flasher: Flasher,
  z: Float64Array,
  line: DiagramLine,
  liquidVolumeFraction: number,
  lnWarm: number,
): CurvePoint | null {
  const n = z.length;
  const lnLow = Math.log(LOWEST_PSIA);
  const lnCold = Math.log(LOWEST_DEGR);
  const share = (lnT: number, lnP: number) => liquidShare(flasher, z, lnT, lnP);
  const correct = (lnT: number, lnP: number, held: number) => {
    const guess = new Float64Array(n + 3);
    guess.set(flasher.split.lnK);
    guess.set([lnT, lnP, flasher.split.vapourFraction], n);
    return line.tracer.correct(guess, held, guess[held]);
  };
  if (share(lnCold, lnLow) > liquidVolumeFraction) {
    const lnT = bisect(Math.max(lnWarm, lnCold), lnCold, liquidVolumeFraction, (value) =>
      share(value, lnLow),
    );
    return lnT === null ? null : correct(lnT, lnLow, n + 1);
  }
  for (let lnP = lnLow; lnP < Math.log(HIGHEST_PSIA); lnP += LN_PRESSURE_STEP) {
    if (share(lnCold, lnP + LN_PRESSURE_STEP) < liquidVolumeFraction) continue;
    const found = bisect(lnP, lnP + LN_PRESSURE_STEP, liquidVolumeFraction, (value) =>
      share(lnCold, value),
    );
    return found === null ? null : correct(lnCold, found, n);
  }
  return null;
}

/** @returns where the share is reached between `less` and `more`, flashed last; null where it jumps past it */
function bisect(
  less: number,
  more: number,
  target: number,
  share: (at: number) => number,
): number | null {
  for (let i = 0; i < 50; i += 1) {
    const middle = 0.5 * (less + more);
    const value = share(middle);
    if (Math.abs(value - target) < FIRST_TOLERANCE * target) return middle;
    if (value < target) less = middle;
    else more = middle;
  }
  return null;
}

function liquidShare(flasher: Flasher, z: Float64Array, lnT: number, lnP: number): number {
  const { liquid, vapour, vapourFraction } = flasher.flash(z, {
    temperatureDegR: Math.exp(lnT),
    pressurePsia: Math.exp(lnP),
  });
  const liquidVolume = liquid ? (1 - vapourFraction) * liquid.molarVolumeFt3PerLbmol : 0;
  const gasVolume = vapour ? vapourFraction * vapour.molarVolumeFt3PerLbmol : 0;
  return liquidVolume / (liquidVolume + gasVolume);
}
