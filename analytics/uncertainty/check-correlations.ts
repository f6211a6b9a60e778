import { DomainError } from "../errors";
import { nearestCorrelation } from "../numerics/nearest-correlation";
import { correlationBlocks, normalScoreCorrelation, type CorrelatedPair } from "./rank-correlation";
import { symmetricEigen } from "../numerics/symmetric-eigen";

export interface CorrelationCheck<Name extends string> {
  readonly possible: boolean;
  /** of the normal-score correlations of the names that are in a pair; 1 without pairs */
  readonly smallestEigenvalue: number;
  /** why not, in words; null when it is possible */
  readonly reason: string | null;
  /** null when it is possible */
  readonly nearest: {
    readonly correlations: CorrelatedPair<Name>[];
    /** largest change of one rank correlation */
    readonly largestChange: number;
    /** pairs that were not listed and are no longer 0 */
    readonly added: number;
  } | null;
}

/** Least eigenvalue of what is proposed: above what rounding to four decimals can take away from ten inputs. */
const FLOOR = 2e-3;
const DECIMALS = 4;

/**
 * Whether a set of rank correlations is possible, and the nearest one that is: nearest in the correlations of normal
 * scores, 2 sin(pi r / 6), by least squares over all of them. Nothing is changed; the proposal is somebody's to take.
 *
 * @param order    every name there is
 * @param labelOf  what messages call a name
 * @throws {DomainError} when a pair ties an input to itself or is given twice: there is no matrix to check then
 * @see N. J. Higham, IMA J. Numer. Anal. 22 (2002) 329-343
 */
export function checkCorrelations<Name extends string>(
  order: readonly Name[],
  pairs: readonly CorrelatedPair<Name>[],
  labelOf: (name: Name) => string,
): CorrelationCheck<Name> {
  requireDistinct(pairs, labelOf);
  const names = order.filter((name) => pairs.some(({ a, b }) => a === name || b === name));
  const n = names.length;
  if (n === 0) return { possible: true, smallestEigenvalue: 1, reason: null, nearest: null };
  const given = (a: Name, b: Name) =>
    pairs.find((pair) => (pair.a === a && pair.b === b) || (pair.a === b && pair.b === a))?.rank;
  const scores = Float64Array.from({ length: n * n }, (_, i) => {
    const [row, column] = [Math.floor(i / n), i % n];
    return row === column ? 1 : normalScoreCorrelation(given(names[row], names[column]) ?? 0);
  });
  const smallestEigenvalue = symmetricEigen(scores, n).values[0];
  const reason = refusalOf(order, pairs, labelOf);
  if (reason === null) return { possible: true, smallestEigenvalue, reason, nearest: null };
  const { matrix } = nearestCorrelation(scores, n, { floor: FLOOR });
  const correlations: CorrelatedPair<Name>[] = [];
  let largestChange = 0;
  let added = 0;
  // Listed pairs first, in their order, so that a table shows the change of each beside what was typed.
  const listed = pairs.map(({ a, b }) => [a, b] as const);
  const others = names.flatMap((a, i) =>
    names.slice(i + 1).flatMap((b) => (given(a, b) === undefined ? [[a, b] as const] : [])),
  );
  for (const [a, b] of [...listed, ...others]) {
    const rank = rankOf(matrix[names.indexOf(a) * n + names.indexOf(b)]);
    const before = given(a, b);
    if (before === undefined && rank === 0) continue;
    if (before === undefined) added += 1;
    largestChange = Math.max(largestChange, Math.abs(rank - (before ?? 0)));
    correlations.push({ a, b, rank });
  }
  return {
    possible: false,
    smallestEigenvalue,
    reason,
    nearest: { correlations, largestChange, added },
  };
}

/** The rank correlation behind a correlation of normal scores, rounded to four decimals: 6 asin(rho / 2) / pi. */
function rankOf(scoreCorrelation: number): number {
  const rounded = Number(((6 / Math.PI) * Math.asin(scoreCorrelation / 2)).toFixed(DECIMALS));
  return rounded === 0 ? 0 : rounded;
}

function requireDistinct<Name extends string>(
  pairs: readonly CorrelatedPair<Name>[],
  labelOf: (name: Name) => string,
): void {
  const seen = new Set<string>();
  pairs.forEach(({ a, b }, i) => {
    const pair = `${labelOf(a)} with ${labelOf(b)}`;
    const details = { input: `correlations.${i}` };
    if (a === b) {
      throw new DomainError(`The correlation of ${pair} ties an input to itself.`, details);
    }
    const key = [a, b].sort().join("|");
    if (seen.has(key)) throw new DomainError(`The correlation of ${pair} is given twice.`, details);
    seen.add(key);
  });
}

/** Why a simulation would refuse them; null when it would not. */
function refusalOf<Name extends string>(
  order: readonly Name[],
  pairs: readonly CorrelatedPair<Name>[],
  labelOf: (name: Name) => string,
): string | null {
  try {
    correlationBlocks(order, pairs, labelOf);
    return null;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return error.message;
  }
}
