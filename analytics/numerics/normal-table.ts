import { normalCdf, normalPdf, normalQuantileUnchecked } from "./normal";

/** Panels on [0, 1]; the table serves probabilities from 1/64 to 63/64. */
const PANELS = 2048;
const FIRST = PANELS / 64;
const LAST = PANELS - FIRST;

let table: Float64Array | null = null;

/** Four coefficients a panel of the cubic with the right values and slopes at both ends. */
function panelCubics(): Float64Array {
  if (table) return table;
  const cubics = new Float64Array(4 * PANELS);
  for (let panel = FIRST; panel < LAST; panel += 1) {
    const z0 = normalQuantileUnchecked(panel / PANELS);
    const z1 = normalQuantileUnchecked((panel + 1) / PANELS);
    const m0 = 1 / (PANELS * normalPdf(z0));
    const m1 = 1 / (PANELS * normalPdf(z1));
    cubics.set([z0, m0, 3 * (z1 - z0) - 2 * m0 - m1, m0 + m1 - 2 * (z1 - z0)], 4 * panel);
  }
  table = cubics;
  return cubics;
}

/**
 * Standard normal quantiles of many probabilities, for sampling: a table of cubics between 1/64 and 63/64, absolute
 * error below 1e-8 there, and algorithm AS 241 in the tails. Fastest when the probabilities ascend.
 *
 * @param probabilities strictly between 0 and 1
 */
export function fillNormalQuantiles(
  probabilities: Float64Array,
  count: number,
  out: Float64Array,
): void {
  const cubics = panelCubics();
  for (let i = 0; i < count; i += 1) {
    const p = probabilities[i];
    const position = p * PANELS;
    const panel = position | 0;
    if (panel >= FIRST && panel < LAST) {
      const t = position - panel;
      const at = 4 * panel;
      out[i] = cubics[at] + t * (cubics[at + 1] + t * (cubics[at + 2] + t * cubics[at + 3]));
    } else {
      out[i] = normalQuantileUnchecked(p);
    }
  }
}

/** The table of probabilities serves scores from -6 to 6, in panels this long. */
const SCORE_STEP = 1 / 64;
const FARTHEST_SCORE = 6;

let probabilityTable: Float64Array | null = null;

function probabilityCubics(): Float64Array {
  if (probabilityTable) return probabilityTable;
  const panels = (2 * FARTHEST_SCORE) / SCORE_STEP;
  const cubics = new Float64Array(4 * panels);
  for (let panel = 0; panel < panels; panel += 1) {
    const z = panel * SCORE_STEP - FARTHEST_SCORE;
    const p0 = normalCdf(z);
    const rise = normalCdf(z + SCORE_STEP) - p0;
    const m0 = SCORE_STEP * normalPdf(z);
    const m1 = SCORE_STEP * normalPdf(z + SCORE_STEP);
    cubics.set([p0, m0, 3 * rise - 2 * m0 - m1, m0 + m1 - 2 * rise], 4 * panel);
  }
  probabilityTable = cubics;
  return cubics;
}

/** Half of the smallest step of a 32-bit fraction: the farthest out that a probability of sampling lies. */
const NEAREST_END = 2 ** -33;

/**
 * Standard normal probabilities of scores, for sampling: a table of cubics, absolute error below 1e-9, and Cody's
 * functions beyond 6. None is nearer to 0 or 1 than a 32-bit random fraction can be, so that each has a quantile.
 *
 * @param order  which score each result belongs to: `out[i]` is the probability of `scores[order[i]]`
 */
export function fillNormalProbabilities(
  scores: Float64Array,
  order: Uint32Array,
  count: number,
  out: Float64Array,
): void {
  const cubics = probabilityCubics();
  for (let i = 0; i < count; i += 1) {
    const z = scores[order[i]];
    if (z > -FARTHEST_SCORE && z < FARTHEST_SCORE) {
      const position = (z + FARTHEST_SCORE) * (1 / SCORE_STEP);
      const panel = position | 0;
      const t = position - panel;
      const at = 4 * panel;
      out[i] = cubics[at] + t * (cubics[at + 1] + t * (cubics[at + 2] + t * cubics[at + 3]));
    } else {
      out[i] = Math.min(Math.max(normalCdf(z), NEAREST_END), 1 - NEAREST_END);
    }
  }
}
