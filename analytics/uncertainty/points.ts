import { fillNormalProbabilities, fillNormalQuantiles } from "../numerics/normal-table";
import { rankByCounting } from "../numerics/order-statistics";
import { createRandom, fillPermutation, type RandomStream } from "../numerics/random";
import { fillStrata } from "./latin-hypercube";
import {
  combineScores,
  fillCorrelatedRanks,
  type CorrelationBlock,
  type RankWorkspace,
} from "./rank-correlation";
import type { SamplingMethod } from "./sampling-schema";
import { fillScrambled, toProbability } from "./sobol";

/** Arrays as long as the longest replicate. */
export interface PointsWorkspace extends RankWorkspace {
  readonly points: Uint32Array;
  /** of the dimension drawn last: the stratum that each trial lies in, 0 to count - 1 */
  readonly ranks: Uint32Array;
  /** of the dimension drawn last: the probability in each stratum, ascending */
  readonly probabilities: Float64Array;
  readonly rankColumns: readonly Uint32Array[];
}

/** Draws replicate after replicate; each continues the random streams where the last one left them. */
export interface PointSource<Name extends string> {
  /** Fills `ranks` and `probabilities` with one dimension that depends on no other. */
  fill(dimension: number, count: number): void;
  /**
   * Draws dimensions that are correlated, and says for one after the other that `ranks` and `probabilities` are its.
   *
   * @param scores  normal scores of `count` trials
   */
  fillCorrelated(
    block: CorrelationBlock<Name>,
    dimensionOf: (name: Name) => number,
    count: number,
    scores: Float64Array,
    filled: (name: Name) => void,
  ): void;
}

/** Where one input's random numbers come from, whatever the other inputs are. */
function streams(seed: number, offset: number): (dimension: number) => RandomStream {
  const made = new Map<number, RandomStream>();
  return (dimension) => {
    const stream = made.get(dimension) ?? createRandom(seed, offset + 2 * dimension);
    made.set(dimension, stream);
    return stream;
  };
}

export function createPoints<Name extends string>(
  sampling: SamplingMethod,
  seed: number,
  workspace: PointsWorkspace,
): PointSource<Name> {
  return sampling === "sobol" ? sobolPoints(seed, workspace) : hypercubePoints(seed, workspace);
}

/**
 * Latin hypercubes: in each dimension one draw from each of `count` strata, in random order; the order of correlated
 * dimensions after Iman and Conover.
 */
function hypercubePoints<Name extends string>(
  seed: number,
  workspace: PointsWorkspace,
): PointSource<Name> {
  const { ranks, probabilities, words, rankColumns } = workspace;
  const within = streams(seed, 0);
  const order = streams(seed, 1);
  return {
    fill(dimension, count) {
      fillPermutation(order(dimension), ranks, count, words);
      fillStrata(within(dimension), count, probabilities, words);
    },
    fillCorrelated({ names, factor }, dimensionOf, count, scores, filled) {
      const own = rankColumns.slice(0, names.length);
      const randoms = names.map((name) => order(dimensionOf(name)));
      fillCorrelatedRanks(factor, randoms, count, scores, workspace, own);
      names.forEach((name, i) => {
        for (let t = 0; t < count; t += 1) ranks[t] = own[i][t];
        fillStrata(within(dimensionOf(name)), count, probabilities, words);
        filled(name);
      });
    },
  };
}

/** Streams of scrambles, apart from those of hypercubes. */
const SCRAMBLES = 1_000;

/**
 * Scrambled Sobol points, a scramble of its own for every replicate and dimension. Correlated dimensions are normal
 * scores of such points, multiplied by the Cholesky factor and turned back into probabilities, which keeps their low
 * discrepancy (re-ordering them as for a hypercube would not).
 */
function sobolPoints<Name extends string>(
  seed: number,
  workspace: PointsWorkspace,
): PointSource<Name> {
  const { points, ranks, probabilities, scoreColumns, counting, order } = workspace;
  const scrambles = streams(seed, SCRAMBLES);
  const draw = (dimension: number, count: number) => {
    const log2 = 31 - Math.clz32(count);
    fillScrambled(dimension, scrambles(dimension), log2, points);
    return log2;
  };
  const fill = (dimension: number, count: number) => {
    const unused = 32 - draw(dimension, count);
    for (let t = 0; t < count; t += 1) {
      const stratum = points[t] >>> unused;
      ranks[t] = stratum;
      probabilities[stratum] = toProbability(points[t]);
    }
  };
  return {
    fill,
    fillCorrelated({ names, factor }, dimensionOf, count, _scores, filled) {
      const columns = scoreColumns.slice(0, names.length);
      names.forEach((name, i) => {
        draw(dimensionOf(name), count);
        for (let t = 0; t < count; t += 1) columns[i][t] = toProbability(points[t]);
        fillNormalQuantiles(columns[i], count, columns[i]);
      });
      combineScores(columns, count, factor);
      names.forEach((name, i) => {
        rankByCounting(columns[i], count, counting, ranks, order);
        fillNormalProbabilities(columns[i], order, count, probabilities);
        filled(name);
      });
    },
  };
}
