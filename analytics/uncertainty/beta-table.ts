import { logBeta } from "../numerics/beta";

/** Panels of the table. 256 keep the error of a probability below 1e-9 for shapes of 1 to 5. */
const PANELS = 256;

/**
 * Quantiles of a beta distribution by table, for sampling. With x = sin^2 theta the density in theta is
 *
 *     g(theta) = 2 sin^(2a-1)(theta) cos^(2b-1)(theta) / B(a, b),   0 < theta < pi/2
 *
 * which is smooth at both ends where the density in x need not be. The distribution function at 257 equal steps of
 * theta comes from Gauss quadrature of g; between steps it is the cubic with the right values and slopes, solved for
 * theta by Newton's method. Ascending probabilities walk the table once.
 *
 * Valid for shapes of at least 1 (so g is 0 at both ends). Quantiles agree with Newton's method on the incomplete
 * beta function to 1e-7 of the range.
 */
export interface BetaTable {
  fillQuantiles(
    probabilities: Float64Array,
    count: number,
    low: number,
    width: number,
    out: Float64Array,
  ): void;
}

export function createBetaTable(a: number, b: number): BetaTable {
  const step = Math.PI / 2 / PANELS;
  const { cumulative, slopes } = tabulate(a, b, step);

  return {
    fillQuantiles(probabilities, count, low, width, out) {
      let panel = 0;
      let start = 0;
      let end = cumulative[1];
      let guess = 0.5;
      for (let i = 0; i < count; i += 1) {
        const p = probabilities[i];
        while (p > end && panel < PANELS - 1) {
          panel += 1;
          start = end;
          end = cumulative[panel + 1];
          guess = 0;
        }
        let t: number;
        if (panel === 0) t = (p / end) ** (1 / (2 * a));
        else if (panel === PANELS - 1) t = 1 - ((1 - p) / (1 - start)) ** (1 / (2 * b));
        else {
          t = solveCubic(p - start, end - start, slopes[panel], slopes[panel + 1], guess);
          guess = t;
        }
        const sine = Math.sin((panel + t) * step);
        out[i] = low + width * sine * sine;
      }
    },
  };
}

/** Distribution function at the panel ends (257) and its slope per panel there. */
function tabulate(a: number, b: number, step: number) {
  const logNorm = Math.LN2 - logBeta(a, b);
  const density = (theta: number) =>
    Math.exp(
      logNorm + (2 * a - 1) * Math.log(Math.sin(theta)) + (2 * b - 1) * Math.log(Math.cos(theta)),
    );
  const cumulative = new Float64Array(PANELS + 1);
  const slopes = new Float64Array(PANELS + 1);
  for (let panel = 0; panel < PANELS; panel += 1) {
    const middle = (panel + 0.5) * step;
    const sum =
      (5 * (density(middle - GAUSS_NODE * step) + density(middle + GAUSS_NODE * step)) +
        8 * density(middle)) /
      18;
    cumulative[panel + 1] = cumulative[panel] + sum * step;
    if (panel > 0) slopes[panel] = density(panel * step) * step;
  }
  // What quadrature leaves is below 1e-8; dividing by the total makes the last entry exactly 1.
  const total = cumulative[PANELS];
  for (let i = 0; i <= PANELS; i += 1) {
    cumulative[i] /= total;
    slopes[i] /= total;
  }
  return { cumulative, slopes };
}

/** Half the three-point Gauss node, for a panel of unit length. */
const GAUSS_NODE = Math.sqrt(0.6) / 2;

/**
 * Solves h(t) = target on [0, 1] for the cubic with h(0) = 0, h(1) = rise and the given end slopes, all positive.
 * Newton's method from `guess`; the panels are so short that three steps leave less than 1e-12.
 */
function solveCubic(target: number, rise: number, s0: number, s1: number, guess: number): number {
  const c2 = 3 * rise - 2 * s0 - s1;
  const c3 = s0 + s1 - 2 * rise;
  let t = guess > 0 ? guess : target / rise;
  for (let k = 0; k < 4; k += 1) {
    const change = (((c3 * t + c2) * t + s0) * t - target) / ((3 * c3 * t + 2 * c2) * t + s0);
    t -= change;
    if (change < 1e-9 && change > -1e-9) break;
  }
  return t;
}
