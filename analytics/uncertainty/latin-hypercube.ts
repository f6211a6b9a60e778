import { TWO_TO_MINUS_32, type RandomStream } from "../numerics/random";

/**
 * The probabilities of a Latin hypercube sample of one input, ascending: one draw, uniform inside its stratum, from
 * each of `count` strata of equal probability.
 *
 *     p[i] = (i + u[i]) / count
 *
 * Which trial gets which stratum is a permutation drawn elsewhere, so a stratum's number is also the input's rank.
 *
 * @param words  scratch, at least `count` long
 * @see M. D. McKay, R. J. Beckman, W. J. Conover, A comparison of three methods for selecting values of input
 *      variables in the analysis of output from a computer code, Technometrics 21 (1979) 239-245
 */
export function fillStrata(
  random: RandomStream,
  count: number,
  probabilities: Float64Array,
  words: Uint32Array,
): void {
  random.fill(words, count);
  const width = 1 / count;
  for (let i = 0; i < count; i += 1) {
    probabilities[i] = (i + (words[i] + 0.5) * TWO_TO_MINUS_32) * width;
  }
}

/** Gives each trial its stratum's value: `out[t] = sorted[ranks[t]]`. */
export function fillByRank(
  sorted: Float64Array,
  ranks: Uint32Array,
  count: number,
  out: Float64Array,
): void {
  for (let trial = 0; trial < count; trial += 1) out[trial] = sorted[ranks[trial]];
}
