import type { Atom } from "./compiled-distribution";
import type { Family } from "./families";

/**
 * The distribution of measured values themselves: order statistics x_1 <= ... <= x_n joined by straight lines,
 *
 *     x(p) = x_j + (h - j)(x_(j+1) - x_j),   h = (n - 1) p + 1,   j = floor(h)
 *
 * which is type 7 of Hyndman and Fan. It begins at the smallest and ends at the largest value, so it says nothing of
 * what was not sampled. Between two neighbours the density is 1 / ((n - 1)(x_(j+1) - x_j)); k equal values have a
 * chance of (k - 1) / (n - 1) of their own.
 *
 * @param values  at least two, not all the same, in any order
 * @see R. J. Hyndman, Y. Fan, Sample quantiles in statistical packages, Am. Stat. 50 (1996) 361-365
 */
export function empiricalFamily(values: readonly number[]): Family {
  const sorted = Float64Array.from(values).sort();
  const last = sorted.length - 1;
  const at = (p: number) => {
    const h = p * last;
    const j = Math.min(Math.floor(h), last - 1);
    return sorted[j] + (h - j) * (sorted[j + 1] - sorted[j]);
  };
  return {
    minimum: sorted[0],
    maximum: sorted[last],
    atoms: tiesOf(sorted),
    quantile: at,
    cdf(x) {
      if (x < sorted[0]) return 0;
      if (x >= sorted[last]) return 1;
      const j = lastAtMost(sorted, x);
      return (j + (x - sorted[j]) / (sorted[j + 1] - sorted[j])) / last;
    },
    pdf(x) {
      if (x < sorted[0] || x > sorted[last]) return 0;
      let j = Math.min(lastAtMost(sorted, x), last - 1);
      while (sorted[j] === sorted[j + 1]) j -= 1;
      return 1 / (last * (sorted[j + 1] - sorted[j]));
    },
    momentsBetween: (low, high) => momentsOf(sorted, low, high),
    fillQuantiles(probabilities, count, out) {
      for (let i = 0; i < count; i += 1) out[i] = at(probabilities[i]);
    },
  };
}

/** Index of the last of the sorted values that is at most x; x is at least the first. */
function lastAtMost(sorted: Float64Array, x: number): number {
  let low = 0;
  let high = sorted.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (sorted[middle] <= x) low = middle;
    else high = middle;
  }
  return low;
}

function tiesOf(sorted: Float64Array): Atom[] {
  const ties: Atom[] = [];
  for (let i = 0; i < sorted.length; ) {
    let next = i + 1;
    while (next < sorted.length && sorted[next] === sorted[i]) next += 1;
    if (next - i > 1) {
      ties.push({ value: sorted[i], probability: (next - i - 1) / (sorted.length - 1) });
    }
    i = next;
  }
  return ties;
}

/** Each pair of neighbours carries the same chance, evenly between them; bounds cut the pairs they fall into. */
function momentsOf(sorted: Float64Array, low: number, high: number) {
  const centre = (Math.max(low, sorted[0]) + Math.min(high, sorted[sorted.length - 1])) / 2;
  let mass = 0;
  let first = 0;
  let second = 0;
  for (let i = 0; i + 1 < sorted.length; i += 1) {
    const from = Math.max(sorted[i], low);
    const to = Math.min(sorted[i + 1], high);
    if (to < from) continue;
    const gap = sorted[i + 1] - sorted[i];
    const share = gap > 0 ? (to - from) / gap : 1;
    const [a, b] = [from - centre, to - centre];
    mass += share;
    first += (share * (a + b)) / 2;
    second += (share * (a * a + a * b + b * b)) / 3;
  }
  const shift = first / mass;
  return { mean: centre + shift, variance: Math.max(0, second / mass - shift * shift) };
}
