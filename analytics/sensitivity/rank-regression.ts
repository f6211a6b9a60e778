import { DomainError } from "../errors";

/** One column of a sample with a name; element t of each belongs to the same trial. */
export interface RankedColumn<Name extends string> {
  name: Name;
  /** ranks with ties averaged */
  ranks: Float64Array;
}

export interface RankRegression<Name extends string> {
  /** share of the variance of the result's ranks that the regression explains, 0 to 1 */
  rSquared: number;
  /** standard deviations of rank that the result moves by for one of the input, the others held; largest first */
  coefficients: { input: Name; coefficient: number }[];
  /** inputs that vary but whose ranks follow from those of others, and why */
  leftOut: { input: Name; reason: string }[];
}

/**
 * An input is taken to follow from others when they leave no more than this share of its ranks' variance: a variance
 * inflation of 20, where coefficients are made of how the others miss the input rather than of the input. Common
 * practice warns from 5 or 10 on; 20 keeps correlations that people enter, up to 0.97.
 */
const LEAST_OWN_VARIANCE = 0.05;

/**
 * Standardised rank regression: least squares of the result's ranks on the ranks of all inputs at once, everything scaled
 * to unit variance, so that a coefficient is the input's own effect with the others held. Right for results that rise or
 * fall with each input; `rSquared` says how far that is so. Inputs without spread have no coefficient.
 *
 * Inputs are taken in the order of their correlation with the result; one whose ranks follow from those taken before
 * all but wholly (the cases of one set, for instance) would share their effect with it in a way that means nothing, and
 * is left out, with the reason: the coefficients of those others hold its effect.
 *
 * @param labelOf  what reasons call a name
 * @throws {DomainError} when there are fewer than 3 trials more than inputs
 * @see R. L. Iman, W. J. Conover, The use of the rank transform in regression, Technometrics 21 (1979) 499-509;
 *      A. Saltelli et al., Sensitivity Analysis (2000), section 6.6.5
 */
export function rankRegression<Name extends string>(
  inputs: readonly RankedColumn<Name>[],
  result: Float64Array,
  labelOf: (name: Name) => string = (name) => name,
): RankRegression<Name> {
  if (result.length < inputs.length + 3) {
    throw new DomainError(
      `${result.length} trials are too few for a regression on ${inputs.length} inputs.`,
      { input: "trials", value: result.length },
    );
  }
  const y = standardised(result);
  const columns = inputs.flatMap(({ name, ranks }) => {
    const values = standardised(ranks);
    return values ? [{ name, values, withResult: y ? dot(values, y) : 0 }] : [];
  });
  columns.sort((a, b) => Math.abs(b.withResult) - Math.abs(a.withResult));
  const { taken, factor, leftOut } = takeIndependent(columns, labelOf);
  const beta = solveFactored(
    factor,
    taken.map(({ withResult }) => withResult),
  );
  const coefficients = taken
    .map(({ name }, i) => ({ input: name, coefficient: beta[i] }))
    .sort((a, b) => Math.abs(b.coefficient) - Math.abs(a.coefficient));
  const rSquared = taken.reduce((sum, { withResult }, i) => sum + beta[i] * withResult, 0);
  return { rSquared, coefficients, leftOut };
}

/** Inputs that share no more than this of another's variance are not why it is left out. */
const LEAST_NAMED = 0.01;

/** Less than this is what rounding leaves of no variance. */
const EXACT = 1e-6;

interface Column<Name> {
  name: Name;
  values: Float64Array;
  withResult: number;
}

/** Grows the Cholesky factor of the correlations row by row, and passes over inputs that would add nothing to it. */
function takeIndependent<Name extends string>(
  columns: readonly Column<Name>[],
  labelOf: (name: Name) => string,
) {
  const taken: Column<Name>[] = [];
  const factor: number[][] = [];
  const leftOut: RankRegression<Name>["leftOut"] = [];
  for (const column of columns) {
    const row: number[] = [];
    taken.forEach((before, i) => {
      const known = factor[i].slice(0, i).reduce((sum, entry, k) => sum + entry * row[k], 0);
      row.push((dot(column.values, before.values) - known) / factor[i][i]);
    });
    const own = 1 - row.reduce((sum, entry) => sum + entry * entry, 0);
    if (own > LEAST_OWN_VARIANCE) {
      taken.push(column);
      factor.push([...row, Math.sqrt(own)]);
      continue;
    }
    const others = taken
      .filter((_, i) => row[i] ** 2 > LEAST_NAMED)
      .map(({ name }) => labelOf(name));
    leftOut.push({
      input: column.name,
      reason: `Its ranks follow ${own > EXACT ? `to ${Math.floor(100 * (1 - own))} % ` : ""}from those of ${others.join(", ")}, so that their effects cannot be told apart.`,
    });
  }
  return { taken, factor, leftOut };
}

/** Solves L L' x = b. */
function solveFactored(factor: readonly (readonly number[])[], b: readonly number[]): number[] {
  const x = [...b];
  for (let row = 0; row < x.length; row += 1) {
    for (let k = 0; k < row; k += 1) x[row] -= factor[row][k] * x[k];
    x[row] /= factor[row][row];
  }
  for (let row = x.length - 1; row >= 0; row -= 1) {
    for (let k = row + 1; k < x.length; k += 1) x[row] -= factor[k][row] * x[k];
    x[row] /= factor[row][row];
  }
  return x;
}

/** The values with mean 0 and sum of squares 1; null when they are all the same. */
function standardised(values: Float64Array): Float64Array | null {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  if (!(squares > 0)) return null;
  const scale = 1 / Math.sqrt(squares);
  return values.map((value) => (value - mean) * scale);
}

function dot(x: Float64Array, y: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i += 1) sum += x[i] * y[i];
  return sum;
}
