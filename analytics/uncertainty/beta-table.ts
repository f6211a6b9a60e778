import { logBeta } from "../numerics/beta";

/** Panels of the table. 256 keep the error of a probability below 1e-9 for shapes of 1 to 5. */
const PANELS = 256;

/** A panel's direct cubic is used where it is off by less than this share of the range. */
const DIRECT_TOLERANCE = 1e-8;

/**
 * Quantiles of a beta distribution by table, for sampling. With x = sin^2 theta the density in theta is
 *
 *     g(theta) = 2 sin^(2a-1)(theta) cos^(2b-1)(theta) / B(a, b),   0 < theta < pi/2
 *
 * which is smooth at both ends where the density in x need not be. The distribution function at 257 equal steps of
 * theta comes from Gauss quadrature of g; between steps it is the cubic with the right values and slopes, solved for
 * theta by Newton's method. Where x itself, as a function of probability, is close enough to a cubic between two
 * steps, that cubic is used directly: it holds all but the far tails, and costs three multiplications.
 *
 * Valid for shapes of at least 1 (so g is 0 at both ends). Quantiles agree with Newton's method on the incomplete
 * beta function to 1e-7 of the range.
 */
export interface BetaTable {
  /**
   * @param probabilities  ascending, strictly between 0 and 1: the table is walked once
   * @param low            lower end of the range the beta variable is stretched to
   * @param width          length of that range
   */
  fillQuantiles(
    probabilities: Float64Array,
    count: number,
    low: number,
    width: number,
    out: Float64Array,
  ): void;
}

interface Panels {
  readonly a: number;
  readonly b: number;
  /** distribution function at the panel ends */
  readonly cumulative: Float64Array;
  /** its slope there, per panel */
  readonly slopes: Float64Array;
}

export function createBetaTable(a: number, b: number): BetaTable {
  const panels = tabulate(a, b);
  const { cumulative } = panels;
  const cubics = directCubics(panels);

  return {
    fillQuantiles(probabilities, count, low, width, out) {
      let panel = 0;
      let start = 0;
      let end = cumulative[1];
      for (let i = 0; i < count; i += 1) {
        const p = probabilities[i];
        while (p > end && panel < PANELS - 1) {
          panel += 1;
          start = end;
          end = cumulative[panel + 1];
        }
        const at = 4 * panel;
        const d = p - start;
        const x = cubics[at] + d * (cubics[at + 1] + d * (cubics[at + 2] + d * cubics[at + 3]));
        out[i] = low + width * (x === x ? x : solvePanel(panels, panel, p));
      }
    },
  };
}

function tabulate(a: number, b: number): Panels {
  const step = Math.PI / 2 / PANELS;
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
  return { a, b, cumulative, slopes };
}

/** Half the three-point Gauss node, for a panel of unit length. */
const GAUSS_NODE = Math.sqrt(0.6) / 2;

/** x = sin^2 theta at the panel ends, and dx per panel. */
const EDGE_X = Float64Array.from({ length: PANELS + 1 }, (_, k) => sineSquared(k));
const EDGE_SLOPE = Float64Array.from(
  { length: PANELS + 1 },
  (_, k) => Math.sin((Math.PI * k) / PANELS) * (Math.PI / 2 / PANELS),
);

function sineSquared(panels: number): number {
  const sine = Math.sin((panels * Math.PI) / 2 / PANELS);
  return sine * sine;
}

/** Coefficients of x in p - cumulative[panel], four a panel; NaN where the cubic is not close enough. */
function directCubics(panels: Panels): Float64Array {
  const { cumulative, slopes } = panels;
  const cubics = new Float64Array(4 * PANELS).fill(NaN);
  for (let panel = 1; panel < PANELS - 1; panel += 1) {
    const rise = cumulative[panel + 1] - cumulative[panel];
    // A panel with less is hardly ever sampled, and its slope is lost in rounding.
    if (rise < 1e-9) continue;
    const x0 = EDGE_X[panel];
    const chord = (EDGE_X[panel + 1] - x0) / rise;
    const m0 = EDGE_SLOPE[panel] / slopes[panel];
    const m1 = EDGE_SLOPE[panel + 1] / slopes[panel + 1];
    const c2 = (3 * chord - 2 * m0 - m1) / rise;
    const c3 = (m0 + m1 - 2 * chord) / (rise * rise);
    const isClose = [0.25, 0.5, 0.75].every((share) => {
      const d = share * rise;
      const direct = x0 + d * (m0 + d * (c2 + d * c3));
      const solved = solvePanel(panels, panel, cumulative[panel] + d);
      return Math.abs(direct - solved) < DIRECT_TOLERANCE;
    });
    if (isClose) cubics.set([x0, m0, c2, c3], 4 * panel);
  }
  return cubics;
}

/** x at probability p, which lies in the panel. In the first and last panel g is a power of the distance to the end. */
function solvePanel({ a, b, cumulative, slopes }: Panels, panel: number, p: number): number {
  const start = cumulative[panel];
  const end = cumulative[panel + 1];
  if (panel === 0) return sineSquared((p / end) ** (1 / (2 * a)));
  if (panel === PANELS - 1) return sineSquared(PANELS - ((1 - p) / (1 - start)) ** (1 / (2 * b)));
  return sineSquared(panel + solveCubic(p - start, end - start, slopes[panel], slopes[panel + 1]));
}

/**
 * Solves h(t) = target on [0, 1] for the cubic with h(0) = 0, h(1) = rise and the given end slopes, all positive, by
 * Newton's method from the chord. The panels are so short that four steps leave less than 1e-12.
 */
function solveCubic(target: number, rise: number, s0: number, s1: number): number {
  const c2 = 3 * rise - 2 * s0 - s1;
  const c3 = s0 + s1 - 2 * rise;
  let t = target / rise;
  for (let k = 0; k < 4; k += 1) {
    const change = (((c3 * t + c2) * t + s0) * t - target) / ((3 * c3 * t + 2 * c2) * t + s0);
    t -= change;
    if (change < 1e-9 && change > -1e-9) break;
  }
  return t;
}
