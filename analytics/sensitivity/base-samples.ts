import { createRandom, fillPermutation, streamOf } from "../numerics/random";
import { fillStrata } from "../uncertainty/latin-hypercube";

/**
 * Fills columns of uniform numbers for two independent samples of one replicate: a Latin hypercube over all of them, from
 * streams of their own, so that they have nothing to do with the trials of the estimate.
 *
 * @param seed     a safe integer, 0 or more
 * @param columns  overwritten; all of one length
 */
export function fillUniforms(
  seed: number,
  replicate: number,
  columns: readonly Float64Array[],
): void {
  const count = columns[0]?.length ?? 0;
  const words = new Uint32Array(count);
  const order = new Uint32Array(count);
  const strata = new Float64Array(count);
  columns.forEach((column, i) => {
    const random = createRandom(seed, streamOf(`variance shares ${replicate} ${i}`));
    fillPermutation(random, order, count, words);
    fillStrata(random, count, strata, words);
    for (let t = 0; t < count; t += 1) column[t] = strata[order[t]];
  });
}
