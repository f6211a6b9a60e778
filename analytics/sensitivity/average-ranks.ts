import { rankByCounting, type RankingWorkspace } from "../numerics/ranking";

/** Values from smallest to largest, and what rank each has. */
export interface Ranking {
  /** positions of the values, smallest first */
  readonly order: Uint32Array;
  /** 1 for the smallest; equal values share the mean of their ranks, so that it does not matter in which order they stand */
  readonly ranks: Float64Array;
}

/**
 * Ranks 1..n, ties averaged.
 *
 * @param values     finite numbers; not changed
 * @param workspace  made for at least as many values
 * @example averageRanks(Float64Array.of(10, 30, 20, 20), workspace).ranks // => [1, 4, 2.5, 2.5]
 * @see M. G. Kendall, The treatment of ties in ranking problems, Biometrika 33 (1945) 239-251
 */
export function averageRanks(values: Float64Array, workspace: RankingWorkspace): Ranking {
  const count = values.length;
  const order = new Uint32Array(count);
  rankByCounting(values, count, workspace, new Uint32Array(count), order);
  const ranks = new Float64Array(count);
  for (let first = 0; first < count; ) {
    let end = first + 1;
    while (end < count && values[order[end]] === values[order[first]]) end += 1;
    for (let i = first; i < end; i += 1) ranks[order[i]] = (first + 1 + end) / 2;
    first = end;
  }
  return { order, ranks };
}
