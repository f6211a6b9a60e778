import { DomainError } from "../errors";
import { choleskyFactor, invertLower } from "../numerics/cholesky";
import { normalQuantile } from "../numerics/normal";

export interface CorrelatedPair<Name extends string> {
  a: Name;
  b: Name;
  /** Spearman's rank correlation, -1 to 1 */
  rank: number;
}

/** Inputs that are tied to one another, directly or through others, and the correlations between their scores. */
export interface CorrelationBlock<Name extends string> {
  readonly names: readonly Name[];
  /** lower Cholesky factor of the normal-score correlations, row by row */
  readonly factor: Float64Array;
}

/**
 * Splits correlated inputs into blocks that are independent of each other, and checks that each is possible.
 *
 * The rank correlation r of a pair becomes the correlation 2 sin(pi r / 6) of their normal scores, which is what
 * gives a joint normal distribution the rank correlation r (Pearson 1907). An impossible set is refused, never
 * repaired: a repair would change a number that somebody entered.
 *
 * @param order    every name, in the order that fixes the blocks' columns
 * @param labelOf  what messages call a name
 * @throws {DomainError} when a pair is given twice, ties an input to itself or exactly, or when the correlations
 *   contradict each other (no joint distribution has them all); the message names the pairs
 */
export function correlationBlocks<Name extends string>(
  order: readonly Name[],
  pairs: readonly CorrelatedPair<Name>[],
  labelOf: (name: Name) => string = (name) => name,
): CorrelationBlock<Name>[] {
  const known = new Map<string, number>();
  for (const pair of pairs) {
    checkPair(pair, known, labelOf);
    known.set(keyOf(pair.a, pair.b), pair.rank);
  }
  const between = (a: Name, b: Name) =>
    a === b ? 1 : normalScoreCorrelation(known.get(keyOf(a, b)) ?? 0);
  return components(order, pairs).map((names) => {
    const n = names.length;
    const target = Float64Array.from({ length: n * n }, (_, i) =>
      between(names[Math.floor(i / n)], names[i % n]),
    );
    const factor = choleskyFactor(target, n);
    if (factor === null) throw contradiction(names, pairs, between, labelOf);
    return { names, factor };
  });
}

function keyOf(a: string, b: string): string {
  return a < b ? `${a}|${b}` : `${b}|${a}`;
}

/** The correlation of normal scores that gives two normal-copula variables a rank correlation: 2 sin(pi r / 6), -1 to 1. */
export function normalScoreCorrelation(rank: number): number {
  return 2 * Math.sin((Math.PI / 6) * rank);
}

function checkPair<Name extends string>(
  { a, b, rank }: CorrelatedPair<Name>,
  known: ReadonlyMap<string, number>,
  labelOf: (name: Name) => string,
): void {
  const pair = `${labelOf(a)} with ${labelOf(b)}`;
  const details = { input: "correlations", value: rank, pairs: [`${pair} ${rank}`] };
  if (a === b)
    throw new DomainError(`The correlation of ${pair} ties an input to itself.`, details);
  if (known.has(keyOf(a, b))) {
    throw new DomainError(`The correlation of ${pair} is given twice.`, details);
  }
  if (!(Math.abs(rank) < 1)) {
    throw new DomainError(
      `The rank correlation of ${pair} is ${rank}; it must lie between -1 and 1. Exactly 1 or -1 would make ` +
        "one input follow from the other: use at most 0.999.",
      details,
    );
  }
}

function components<Name extends string>(
  order: readonly Name[],
  pairs: readonly CorrelatedPair<Name>[],
): Name[][] {
  const leader = new Map<Name, Name>();
  const find = (name: Name): Name => {
    const parent = leader.get(name) ?? name;
    return parent === name ? name : find(parent);
  };
  for (const { a, b } of pairs) leader.set(find(a), find(b));
  const tied = new Set(pairs.flatMap(({ a, b }) => [a, b]));
  const groups = new Map<Name, Name[]>();
  for (const name of order) {
    if (!tied.has(name)) continue;
    const group = groups.get(find(name)) ?? [];
    group.push(name);
    groups.set(find(name), group);
  }
  return [...groups.values()];
}

function contradiction<Name extends string>(
  names: readonly Name[],
  pairs: readonly CorrelatedPair<Name>[],
  between: (a: Name, b: Name) => number,
  labelOf: (name: Name) => string,
): DomainError {
  const culprits = contradictoryTriple(names, between) ?? names;
  const named = pairs
    .filter(({ a, b }) => culprits.includes(a) && culprits.includes(b))
    .map(({ a, b, rank }) => `${labelOf(a)} with ${labelOf(b)} ${rank}`);
  return new DomainError(
    `These rank correlations contradict each other, no set of values can have them all: ${named.join("; ")}. ` +
      "Pairs that are not listed count as 0.",
    { input: "correlations", pairs: named },
  );
}

/** The first three names whose own 3 x 3 matrix is already impossible; most mistakes are of this kind. */
function contradictoryTriple<Name extends string>(
  names: readonly Name[],
  between: (a: Name, b: Name) => number,
): Name[] | null {
  for (let i = 0; i < names.length; i += 1) {
    for (let j = i + 1; j < names.length; j += 1) {
      for (let k = j + 1; k < names.length; k += 1) {
        const triple = [names[i], names[j], names[k]];
        const [x, y, z] = [
          between(triple[0], triple[1]),
          between(triple[0], triple[2]),
          between(triple[1], triple[2]),
        ];
        if (1 + 2 * x * y * z - x * x - y * y - z * z <= 1e-10) return triple;
      }
    }
  }
  return null;
}

/**
 * Normal scores of van der Waerden: quantiles of i / (n + 1), i = 1..n, ascending and scaled to unit variance.
 */
export function normalScores(count: number): Float64Array {
  const scores = Float64Array.from({ length: count }, (_, i) =>
    normalQuantile((i + 1) / (count + 1)),
  );
  const meanSquare = scores.reduce((sum, score) => sum + score * score, 0) / count;
  const scale = meanSquare > 0 ? 1 / Math.sqrt(meanSquare) : 1;
  return scores.map((score) => score * scale);
}

/**
 * Gives columns of scores the wanted correlations: T = M F^-1 C of Iman and Conover, with F'F the columns' own
 * correlations and the target C'C. The first column stays as it is; the columns are overwritten.
 *
 * Where columns are not of unit variance, each keeps about its own: to make them so would pull in whichever far draw the
 * tails happen to hold, and with it the variance of what is computed.
 *
 * @param columns  k columns of n scores with mean about 0 and variance about 1
 * @param factor   lower Cholesky factor of the target, k x k
 * @throws {DomainError} when n is too small for k columns (their own correlations are then singular)
 * @see R. L. Iman, W. J. Conover, A distribution-free approach to inducing rank correlation among input variables,
 *      Commun. Stat. Simul. Comput. 11 (1982) 311-334
 */
export function correlateScores(
  columns: readonly Float64Array[],
  count: number,
  factor: Float64Array,
): void {
  const k = columns.length;
  const lengths = columns.map((column) => Math.sqrt(dot(column, column, count)));
  const own = new Float64Array(k * k);
  for (let i = 0; i < k; i += 1) {
    own[i * k + i] = 1;
    for (let j = 0; j < i; j += 1) {
      own[i * k + j] = dot(columns[i], columns[j], count) / (lengths[i] * lengths[j]);
    }
  }
  const ownFactor = choleskyFactor(own, k);
  if (ownFactor === null) {
    throw new DomainError(`${count} trials are too few to correlate ${k} inputs.`, {
      input: "trials",
      value: count,
    });
  }
  combineScores(columns, count, product(factor, invertLower(ownFactor, k), k));
}

/**
 * Gives independent columns of scores the correlations of a lower triangular factor L: each trial's row z becomes L z.
 * The columns are overwritten.
 */
export function combineScores(
  columns: readonly Float64Array[],
  count: number,
  factor: Float64Array,
): void {
  const k = columns.length;
  // From the last column up: each needs the untouched columns before it.
  for (let j = k - 1; j >= 0; j -= 1) {
    const column = columns[j];
    scale(column, factor[j * k + j], count);
    for (let i = 0; i < j; i += 1) addScaled(column, columns[i], factor[j * k + i], count);
  }
}

function dot(x: Float64Array, y: Float64Array, count: number): number {
  let sum = 0;
  for (let i = 0; i < count; i += 1) sum += x[i] * y[i];
  return sum;
}

function scale(x: Float64Array, factor: number, count: number): void {
  if (factor === 1) return;
  for (let i = 0; i < count; i += 1) x[i] *= factor;
}

function addScaled(x: Float64Array, y: Float64Array, factor: number, count: number): void {
  if (factor === 0) return;
  for (let i = 0; i < count; i += 1) x[i] += factor * y[i];
}

function product(left: Float64Array, right: Float64Array, n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i += 1) {
    for (let j = 0; j < n; j += 1) {
      let sum = 0;
      for (let m = 0; m < n; m += 1) sum += left[i * n + m] * right[m * n + j];
      out[i * n + j] = sum;
    }
  }
  return out;
}
