/** Real roots of the Peng-Robinson cubic, to the last digits, in the dense and in the dilute limit. */

export interface CubicRoots {
  /** smallest root above B, the liquid's */
  low: number;
  /** largest root, the gas's; equal to `low` when there is one root */
  high: number;
}

const MAXIMUM_ITERATIONS = 60;

/**
 * Roots above B of
 *
 *     z3 - (1 - B) z2 + (A - 2B - 3B2) z - (AB - B2 - B3) = 0
 *
 * The outer root on the far side of the inflection point is found by Halley's method from beyond it, from where the
 * iteration is monotone; the other two are those of the quadratic that is left.
 *
 * @param a  A = a p / (R T)2, > 0
 * @param b  B = b p / (R T), > 0
 * @see U. K. Deiters, R. Macias-Salinas, Ind. Eng. Chem. Res. 53 (2014) 2529-2536 (the start values)
 */
export function cubicRoots(a: number, b: number, roots: CubicRoots): void {
  const c2 = b - 1;
  const c1 = a - b * (2 + 3 * b);
  const c0 = b * (b * (1 + b) - a);
  const inflection = -c2 / 3;
  const atInflection = ((inflection + c2) * inflection + c1) * inflection + c0;
  // With t = z - inflection the cubic is t3 - s2 t + atInflection, where s2 = (c2^2 - 3 c1) / 3.
  const s2 = (c2 * c2 - 3 * c1) / 3;
  const side = atInflection > 0 ? -1 : 1;
  let reach = Math.cbrt(Math.abs(atInflection));
  if (s2 > 0) {
    const s = Math.sqrt(s2);
    // Three roots: none lies farther than 2 s / sqrt3. One root: none farther than the sum of both terms.
    reach =
      atInflection * atInflection <= (4 / 27) * s2 * s2 * s2 ? (2 / Math.sqrt(3)) * s : reach + s;
  }
  const outer = halley(inflection + side * reach, c2, c1, c0);
  // What is left of the cubic, z2 + p z + q: a large root is divided out from the constant term up, a small one from
  // the leading term down, or the small roots of a dilute gas would drown in the rounding of the large one.
  const q = outer === 0 ? c1 : -c0 / outer;
  const p = side > 0 ? (q - c1) / outer : c2 + outer;
  const discriminant = p * p - 4 * q;
  let low = outer;
  let high = outer;
  if (discriminant > 0) {
    const larger = -0.5 * (p + (p > 0 ? 1 : -1) * Math.sqrt(discriminant));
    const first = polish(larger, c2, c1, c0);
    const second = polish(larger === 0 ? 0 : q / larger, c2, c1, c0);
    low = Math.min(outer, first, second);
    high = Math.max(outer, first, second);
  }
  // The cubic is negative at z = B, so the roots below B, if any, come in pairs.
  roots.high = high;
  roots.low = low > b ? low : high;
}

function halley(start: number, c2: number, c1: number, c0: number): number {
  let z = start;
  for (let iteration = 0; iteration < MAXIMUM_ITERATIONS; iteration += 1) {
    const value = ((z + c2) * z + c1) * z + c0;
    const slope = (3 * z + 2 * c2) * z + c1;
    const bend = 3 * z + c2;
    const bottom = slope * slope - value * bend;
    if (value === 0 || bottom === 0) return z;
    const change = (value * slope) / bottom;
    z -= change;
    if (Math.abs(change) <= 1e-15 * Math.abs(z)) return z;
  }
  return z;
}

/** One Newton step, unless the root is a double one. */
function polish(z: number, c2: number, c1: number, c0: number): number {
  const value = ((z + c2) * z + c1) * z + c0;
  const slope = (3 * z + 2 * c2) * z + c1;
  const change = value / slope;
  return Math.abs(change) < 1e-6 * Math.abs(z) ? z - change : z;
}
