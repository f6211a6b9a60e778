import { normalQuantile } from "@/analytics/numerics/normal";
import { createRandom, fillPermutation } from "@/analytics/numerics/random";
import { fillStrata } from "@/analytics/uncertainty/latin-hypercube";

/** Columns of independent standard normal numbers: a Latin hypercube. */
export function normalColumns(count: number, trials: number): Float64Array[] {
  const words = new Uint32Array(trials);
  const order = new Uint32Array(trials);
  const strata = new Float64Array(trials);
  return Array.from({ length: count }, (_, i) => {
    const random = createRandom(1, i);
    fillPermutation(random, order, trials, words);
    fillStrata(random, trials, strata, words);
    return Float64Array.from(order, (stratum) => normalQuantile(strata[stratum]));
  });
}

/** Column by column sums. */
export function combine(...terms: [weight: number, column: Float64Array][]): Float64Array {
  return terms[0][1].map((_, t) => terms.reduce((sum, [w, column]) => sum + w * column[t], 0));
}
