import type { Mixture } from "./scenarios";

/** Quantiles of a mixture for sampling. */
export interface MixtureTable {
  /** @param probabilities  ascending, strictly between 0 and 1: the table is walked once */
  fillQuantiles(probabilities: Float64Array, count: number, out: Float64Array): void;
}

/** Quantiles of each case whose values become nodes: close together in the tails, where quantiles bend. */
const NODES_PER_CASE = 128;

/** A panel's cubic is used where it is off by less than this share of the range. */
const TOLERANCE = 1e-8;

interface Panel {
  /** chances at its ends */
  readonly from: number;
  readonly to: number;
  /** values at its ends */
  readonly low: number;
  readonly high: number;
  /** coefficients of x in p - from; null where there is no density to make a cubic of */
  readonly cubic: readonly [number, number, number, number] | null;
  /** whether the cubic is the quantile, or only where Newton's method starts */
  readonly isClose: boolean;
}

/**
 * Tabulates a mixture's distribution function at quantiles of its cases. Between two nodes the quantile is the cubic
 * with the right values and slopes, where it is within 1e-8 of the range in the middle and at the quarters; elsewhere it
 * is where Newton's method starts, and in a gap between cases the quantile is solved for. A value with a chance of its own is a flat panel.
 *
 * @param solve  the quantile itself
 */
export function createMixtureTable(mixture: Mixture, solve: (p: number) => number): MixtureTable {
  const panels = panelsOf(mixture);
  const tolerance =
    panels.length > 0 ? TOLERANCE * (panels[panels.length - 1].high - panels[0].low) : 0;
  return {
    fillQuantiles(probabilities, count, out) {
      let at = 0;
      let previous = -Infinity;
      for (let i = 0; i < count; i += 1) {
        const p = probabilities[i];
        while (at < panels.length && p > panels[at].to) at += 1;
        const panel = at < panels.length && p >= panels[at].from ? panels[at] : null;
        const x = (panel && quantileWithin(panel, p, mixture, tolerance)) ?? solve(p);
        // Two neighbouring panels agree only to the tolerance; the order is kept.
        out[i] = x < previous ? previous : x;
        previous = out[i];
      }
    },
  };
}

/** Newton steps from a cubic that is not close enough; more are not worth it beside the solution itself. */
const MOST_STEPS = 6;

/** Null where the panel leads to no quantile. */
function quantileWithin(
  { from, low, high, cubic, isClose }: Panel,
  p: number,
  { cdf, pdf }: Mixture,
  tolerance: number,
): number | null {
  if (cubic === null) return null;
  const [c0, c1, c2, c3] = cubic;
  const d = p - from;
  let x = c0 + d * (c1 + d * (c2 + d * c3));
  if (isClose) return x;
  for (let step = 0; step < MOST_STEPS; step += 1) {
    if (!(x >= low && x <= high)) return null;
    const change = (cdf(x) - p) / pdf(x);
    x -= change;
    if (Math.abs(change) < tolerance) return x;
  }
  return null;
}

function panelsOf(mixture: Mixture): Panel[] {
  const { cases, cdf, pdf, atoms } = mixture;
  const values = new Set<number>();
  for (const { compiled } of cases) {
    for (let i = 0; i <= NODES_PER_CASE; i += 1) {
      const p = 0.5 - 0.5 * Math.cos((Math.PI * i) / NODES_PER_CASE);
      const x = compiled.quantile(p);
      if (Number.isFinite(x)) values.add(x);
    }
  }
  const nodes = [...values].sort((a, b) => a - b);
  const chanceOf = new Map(atoms.map(({ value, probability }) => [value, probability]));
  const width = nodes[nodes.length - 1] - nodes[0];
  const panels: Panel[] = [];
  let last: { x: number; p: number; density: number } | null = null;
  for (const x of nodes) {
    const upTo = cdf(x);
    const jump = chanceOf.get(x) ?? 0;
    const below = upTo - jump;
    const density = pdf(x);
    if (last && below > last.p) {
      const end = { x, p: below, density };
      panels.push({
        from: last.p,
        to: below,
        low: last.x,
        high: x,
        ...cubicBetween(last, end, TOLERANCE * width, mixture),
      });
    }
    if (jump > 0) {
      const value = { low: x, high: x, cubic: [x, 0, 0, 0] as const, isClose: true };
      panels.push({ from: below, to: upTo, ...value });
    }
    last = { x, p: upTo, density };
  }
  return panels;
}

interface Node {
  readonly x: number;
  readonly p: number;
  readonly density: number;
}

function cubicBetween(
  start: Node,
  end: Node,
  tolerance: number,
  { cdf, pdf }: Mixture,
): Pick<Panel, "cubic" | "isClose"> {
  const rise = end.p - start.p;
  // A panel with less is hardly ever sampled, and its slope is lost in rounding.
  if (rise < 1e-9 || !(start.density > 0) || !(end.density > 0)) {
    return { cubic: null, isClose: false };
  }
  const chord = (end.x - start.x) / rise;
  const m0 = 1 / start.density;
  const m1 = 1 / end.density;
  const c2 = (3 * chord - 2 * m0 - m1) / rise;
  const c3 = (m0 + m1 - 2 * chord) / (rise * rise);
  const isClose = [0.25, 0.5, 0.75].every((share) => {
    const d = share * rise;
    const x = start.x + d * (m0 + d * (c2 + d * c3));
    // The error in chance over the density is the error in x.
    return Math.abs(cdf(x) - start.p - d) < tolerance * pdf(x);
  });
  return { cubic: [start.x, m0, c2, c3], isClose };
}
