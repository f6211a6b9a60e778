import { DomainError } from "../errors";
import { createRandom, fillPermutation, streamOf } from "../numerics/random";
import { fillStrata } from "../uncertainty/latin-hypercube";
import { fillScrambled, SOBOL_DIMENSIONS, toProbability } from "../uncertainty/sobol";

/**
 * Fills columns of uniform numbers for the two independent samples of one replicate: scrambled Sobol points, a dimension
 * a column, from streams of their own, so that they have nothing to do with the trials of the estimate. Columns beyond
 * the dimensions that there are direction numbers for are those of a Latin hypercube.
 *
 * @param seed     a safe integer, 0 or more
 * @param columns  overwritten; all of one length, a power of two
 * @throws {DomainError} for another length
 */
export function fillUniforms(
  seed: number,
  replicate: number,
  columns: readonly Float64Array[],
): void {
  const count = columns[0]?.length ?? 1;
  const log2 = 31 - Math.clz32(count);
  if (1 << log2 !== count) {
    throw new DomainError(`The runs of a replicate are a power of two; ${count} is not.`, {
      input: "runs",
      value: count,
    });
  }
  const words = new Uint32Array(count);
  const order = new Uint32Array(count);
  const strata = new Float64Array(count);
  columns.forEach((column, i) => {
    const random = createRandom(seed, streamOf(`variance shares ${replicate} ${i}`));
    if (i < SOBOL_DIMENSIONS) {
      fillScrambled(i, random, log2, words);
      for (let t = 0; t < count; t += 1) column[t] = toProbability(words[t]);
      return;
    }
    fillPermutation(random, order, count, words);
    fillStrata(random, count, strata, words);
    for (let t = 0; t < count; t += 1) column[t] = strata[order[t]];
  });
}
