import { DomainError } from "../errors";

/** A model of many trials at once: columns of inputs in, one value a trial out, in an array that may be reused. */
export type ColumnModel = (columns: readonly Float64Array[], count: number) => Float64Array;

export interface Estimated {
  value: number;
  /** one standard error */
  standardError: number;
}

export interface SobolStudy {
  /** columns of one sample of the inputs */
  readonly columns: number;
  /** columns that are exchanged together: one independent input, or several that depend on each other */
  readonly factors: readonly (readonly number[])[];
  readonly model: ColumnModel;
  /**
   * Fills two samples of the inputs, independent of each other, for one of the replicates. Columns that depend on each
   * other belong to one factor.
   */
  readonly fillSamples: (
    replicate: number,
    a: readonly Float64Array[],
    b: readonly Float64Array[],
  ) => void;
  /** trials of each sample in one replicate, 2 or more */
  readonly runsPerReplicate: number;
  /** independent repetitions, from which the standard errors come; 2 or more */
  readonly replicates: number;
}

export interface SobolIndices {
  /** trials of each of the two samples that were used, all replicates together */
  baseRuns: number;
  /** trials that the model was evaluated on: those of a sample x (factors + 2) */
  evaluations: number;
  /** in the order of the factors */
  indices: { first: Estimated; total: Estimated }[];
}

/**
 * Variance-based shares of independent factors: the share of the result's variance that goes when the factor alone is
 * known (first order), and the share that stays when everything but the factor is known (total).
 *
 *     S_i = mean of f(B) (f(A_B^i) - f(A)) / V         ST_i = mean of (f(A) - f(A_B^i))^2 / (2 V)
 *
 * where A_B^i is the sample A with the factor's columns from B, and f has been centred on its mean, which the formula for
 * S_i allows and which lowers its error. A value slightly below 0 is sampling error and is given as it came. Where the
 * result does not vary all shares are 0.
 *
 * Standard errors come from leaving out one replicate at a time (jackknife).
 *
 * A trial without a finite value in one of the samples is left out of all of them: far out in the tails there may be
 * combinations that the inputs' own trials never met.
 *
 * @throws {DomainError} when more than one trial in a thousand has to be left out
 * @see A. Saltelli et al., Variance based sensitivity analysis of model output, Comput. Phys. Commun. 181 (2010) 259-270,
 *      table 2 (b) and (f); M. J. W. Jansen, Analysis of variance designs for model output, Comput. Phys. Commun. 117
 *      (1999) 35-43; B. Efron, The Jackknife, the Bootstrap and Other Resampling Plans (1982), chapter 3
 */
export function sobolIndices(study: SobolStudy): SobolIndices {
  const { factors, runsPerReplicate, replicates } = study;
  const results = evaluateReplicates(study);
  const baseRuns = results.reduce((sum, { a }) => sum + a.length, 0);
  refuseMany(runsPerReplicate * replicates - baseRuns, runsPerReplicate * replicates);
  const centre = results.reduce((sum, { a, b }) => sum + sumOf(a) + sumOf(b), 0) / (2 * baseRuns);
  const sums = results.map((result) => sumsOf(result, centre));
  const whole = addUp(sums);
  const shares = sharesOf(whole);
  const without = sums.map((left) => sharesOf(subtract(whole, left)));
  const estimated = (value: number, of: (shares: Shares) => number): Estimated => ({
    value,
    standardError: jackknifeError(without.map(of)),
  });
  return {
    baseRuns,
    evaluations: runsPerReplicate * replicates * (factors.length + 2),
    indices: factors.map((_, i) => ({
      first: estimated(shares.first[i], ({ first }) => first[i]),
      total: estimated(shares.total[i], ({ total }) => total[i]),
    })),
  };
}

interface ReplicateResult {
  a: Float64Array;
  b: Float64Array;
  /** by factor: A with the factor's columns from B */
  exchanged: Float64Array[];
}

function evaluateReplicates(study: SobolStudy): ReplicateResult[] {
  const { columns, factors, model, runsPerReplicate: runs, replicates } = study;
  const fresh = () => Array.from({ length: columns }, () => new Float64Array(runs));
  const a = fresh();
  const b = fresh();
  const evaluate = (sample: readonly Float64Array[]) => model(sample, runs).slice(0, runs);
  return Array.from({ length: replicates }, (_, replicate) => {
    study.fillSamples(replicate, a, b);
    const values = [
      evaluate(a),
      evaluate(b),
      ...factors.map((factor) =>
        evaluate(a.map((column, i) => (factor.includes(i) ? b[i] : column))),
      ),
    ];
    const [inA, inB, ...exchanged] = withoutImpossible(values);
    return { a: inA, b: inB, exchanged };
  });
}

/** The trials that have a finite value in each of the samples. */
function withoutImpossible(samples: Float64Array[]): Float64Array[] {
  if (samples.every((values) => values.every(Number.isFinite))) return samples;
  const isPossible = samples[0].map((_, t) =>
    samples.every((values) => Number.isFinite(values[t])) ? 1 : 0,
  );
  return samples.map((values) => values.filter((_, t) => isPossible[t] === 1));
}

/** Above this share what is left is another question than the one that was asked. */
const MOST_LEFT_OUT = 1e-3;

function refuseMany(leftOut: number, runs: number): void {
  if (leftOut <= MOST_LEFT_OUT * runs) return;
  throw new DomainError(
    `${leftOut} of ${runs} combinations of the inputs have no possible result. Narrow the ranges of pressure, ` +
      "temperature, condensate yield or of what the recovery plan assumes.",
    { input: "uncertain", value: leftOut, trials: runs },
  );
}

/** Sums over trials, of centred values. */
interface Sums {
  runs: number;
  /** of the values of A and B, and of their squares */
  linear: number;
  squares: number;
  products: number[];
  differences: number[];
  squaredDifferences: number[];
}

function sumsOf({ a, b, exchanged }: ReplicateResult, centre: number): Sums {
  const sums: Sums = {
    runs: a.length,
    linear: 0,
    squares: 0,
    products: [],
    differences: [],
    squaredDifferences: [],
  };
  for (let t = 0; t < a.length; t += 1) {
    const inA = a[t] - centre;
    const inB = b[t] - centre;
    sums.linear += inA + inB;
    sums.squares += inA * inA + inB * inB;
  }
  for (const values of exchanged) {
    let [product, difference, squared] = [0, 0, 0];
    for (let t = 0; t < a.length; t += 1) {
      const moved = values[t] - a[t];
      product += (b[t] - centre) * moved;
      difference += moved;
      squared += moved * moved;
    }
    sums.products.push(product);
    sums.differences.push(difference);
    sums.squaredDifferences.push(squared);
  }
  return sums;
}

function combine(x: Sums, y: Sums, sign: 1 | -1): Sums {
  const each = (left: number[], right: number[]) => left.map((value, i) => value + sign * right[i]);
  return {
    runs: x.runs + sign * y.runs,
    linear: x.linear + sign * y.linear,
    squares: x.squares + sign * y.squares,
    products: each(x.products, y.products),
    differences: each(x.differences, y.differences),
    squaredDifferences: each(x.squaredDifferences, y.squaredDifferences),
  };
}

const addUp = (sums: readonly Sums[]) => sums.reduce((whole, part) => combine(whole, part, 1));
const subtract = (whole: Sums, part: Sums) => combine(whole, part, -1);

interface Shares {
  first: number[];
  total: number[];
}

function sharesOf(sums: Sums): Shares {
  const { runs } = sums;
  const mean = sums.linear / (2 * runs);
  const variance = (sums.squares - 2 * runs * mean * mean) / (2 * runs - 1);
  const share = (value: number) => (variance > 0 ? value / variance : 0);
  return {
    first: sums.products.map((product, i) => share((product - mean * sums.differences[i]) / runs)),
    total: sums.squaredDifferences.map((squared) => share(squared / (2 * runs))),
  };
}

function jackknifeError(without: readonly number[]): number {
  const count = without.length;
  const mean = without.reduce((sum, value) => sum + value, 0) / count;
  const squares = without.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return Math.sqrt(((count - 1) / count) * squares);
}

function sumOf(values: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i += 1) sum += values[i];
  return sum;
}
