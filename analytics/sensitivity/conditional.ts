import { DomainError } from "../errors";
import { rangeOfSorted, type SampleRange } from "../uncertainty/summary";
import type { Ranking } from "./average-ranks";

export interface RankedInput<Name extends string> {
  name: Name;
  values: Float64Array;
  ranking: Ranking;
}

export interface ConditionalView<Name extends string> {
  /** cumulative probabilities of the result, 0 to 1 */
  from: number;
  to: number;
  /** how many trials lie between */
  trials: number;
  result: SampleRange;
  inputs: {
    input: Name;
    all: SampleRange;
    chosen: SampleRange;
    /** mean rank of the chosen trials, 0 to 1; 0.5 for an input that does not matter */
    meanRank: number;
  }[];
}

/**
 * The trials whose result lies between two chances, and what their inputs have in common: 0.9 to 1 are the trials above
 * P10. Chosen by rank, trials ceil(n from) to ceil(n to) counted from the smallest, so that neighbouring intervals share
 * none.
 *
 * @param result   the result's trials
 * @param ranking  of the result
 * @returns        inputs whose mean rank is farthest from the middle first
 * @throws {DomainError} when no trial lies between the two
 */
export function conditionalView<Name extends string>(
  inputs: readonly RankedInput<Name>[],
  result: Float64Array,
  ranking: Ranking,
  { from, to }: { from: number; to: number },
): ConditionalView<Name> {
  const count = result.length;
  // A chance such as 0.9 of 10,000 trials is 9,000 whatever its last binary digit.
  const position = (chance: number) => Math.ceil(count * chance - 1e-9 * count);
  const chosen = ranking.order.subarray(position(from), position(to));
  if (chosen.length === 0) {
    throw new DomainError(`None of ${count} trials lies between ${from} and ${to}.`, {
      input: "chosen",
      value: to - from,
    });
  }
  const rangeOf = (values: Float64Array, order: Uint32Array) =>
    rangeOfSorted(
      Float64Array.from(order, (t) => values[t]),
      order.length,
    );
  return {
    from,
    to,
    trials: chosen.length,
    result: rangeOf(result, chosen),
    inputs: inputs
      .map(({ name, values, ranking: { order, ranks } }) => ({
        input: name,
        all: rangeOf(values, order),
        chosen: rangeOf(
          values,
          chosen.slice().sort((a, b) => values[a] - values[b]),
        ),
        meanRank: chosen.reduce((sum, t) => sum + (ranks[t] - 0.5) / count, 0) / chosen.length,
      }))
      .sort((a, b) => Math.abs(b.meanRank - 0.5) - Math.abs(a.meanRank - 0.5)),
  };
}
