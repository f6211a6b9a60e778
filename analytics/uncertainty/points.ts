import { fillNormalProbabilities, fillNormalQuantiles } from "../numerics/normal-table";
import { createRandom, fillPermutation, type RandomStream } from "../numerics/random";
import { rankByCounting, type RankingWorkspace } from "../numerics/ranking";
import { fillByRank, fillStrata } from "./latin-hypercube";
import { combineScores, correlateScores, type CorrelationBlock } from "./rank-correlation";
import type { SamplingMethod } from "./sampling-schema";
import { fillScrambled, toProbability } from "./sobol";

/** Arrays as long as the longest replicate. */
export interface PointsWorkspace {
  readonly words: Uint32Array;
  readonly order: Uint32Array;
  readonly points: Uint32Array;
  /** one for every dimension that can be correlated */
  readonly scoreColumns: readonly Float64Array[];
  readonly counting: RankingWorkspace;
  /** of the dimension drawn last: the stratum that each trial lies in, 0 to count - 1 */
  readonly ranks: Uint32Array;
  /** of the dimension drawn last: the probability in each stratum, ascending */
  readonly probabilities: Float64Array;
}

/** Draws replicate after replicate; each continues the random streams where the last one left them. */
export interface PointSource<Name extends string> {
  /** Fills `ranks` and `probabilities` with one dimension that depends on no other. */
  fill(dimension: number, count: number): void;
  /** Draws dimensions that are correlated, and says for one after the other that `ranks` and `probabilities` are its. */
  fillCorrelated(
    block: CorrelationBlock<Name>,
    dimensionOf: (name: Name) => number,
    count: number,
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

/** Replicates shorter than this many trials an input are left with the correlations that chance gave them. */
const TRIALS_PER_INPUT = 5;

/**
 * Latin hypercubes: in each dimension one draw from each of `count` strata, in random order.
 *
 * Correlated dimensions are normal scores of such draws, whole draws and not their ranks: exchanging ranks would leave
 * the places within strata independent, and with them the farthest tails, where the top stratum of a short replicate is
 * wide. Chance correlations between the columns are taken out first (Iman and Conover). The first dimension of a block
 * keeps its strata; the others, mixed from several, are about as even, not exactly so.
 */
function hypercubePoints<Name extends string>(
  seed: number,
  workspace: PointsWorkspace,
): PointSource<Name> {
  const { ranks, probabilities, words } = workspace;
  const within = streams(seed, 0);
  const order = streams(seed, 1);
  const fill = (dimension: number, count: number) => {
    fillPermutation(order(dimension), ranks, count, words);
    fillStrata(within(dimension), count, probabilities, words);
  };
  return {
    fill,
    fillCorrelated({ names, factor }, dimensionOf, count, filled) {
      const columns = workspace.scoreColumns.slice(0, names.length);
      names.forEach((name, i) => {
        fill(dimensionOf(name), count);
        fillByRank(probabilities, ranks, count, columns[i]);
        fillNormalQuantiles(columns[i], count, columns[i]);
      });
      if (count < TRIALS_PER_INPUT * names.length) combineScores(columns, count, factor);
      else correlateScores(columns, count, factor);
      placeScores(names, count, workspace, filled);
    },
  };
}

/** Turns the scores of one dimension after the other back into ranks and probabilities, and says whose they are. */
function placeScores<Name extends string>(
  names: readonly Name[],
  count: number,
  { ranks, probabilities, scoreColumns, counting, order }: PointsWorkspace,
  filled: (name: Name) => void,
): void {
  names.forEach((name, i) => {
    rankByCounting(scoreColumns[i], count, counting, ranks, order);
    fillNormalProbabilities(scoreColumns[i], order, count, probabilities);
    filled(name);
  });
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
  const { points, ranks, probabilities, scoreColumns } = workspace;
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
    fillCorrelated({ names, factor }, dimensionOf, count, filled) {
      const columns = scoreColumns.slice(0, names.length);
      names.forEach((name, i) => {
        draw(dimensionOf(name), count);
        for (let t = 0; t < count; t += 1) columns[i][t] = toProbability(points[t]);
        fillNormalQuantiles(columns[i], count, columns[i]);
      });
      combineScores(columns, count, factor);
      placeScores(names, count, workspace, filled);
    },
  };
}
