import { DomainError } from "../errors";
import { normalScoreCorrelation } from "../uncertainty/rank-correlation";
import type { Dependence } from "./dependence-schema";

/** A field where it lies, in the words of the screen. */
export interface PlacedField {
  id: string;
  name: string;
  basinId: string;
  basinName: string;
}

/** A common factor that a reservoir follows. */
export interface FactorLoading {
  /** names the factor's random stream: the same on every installation that holds the same book */
  factor: string;
  /** share of the variance of the reservoir's normal score that comes from this factor, 0 to 1 */
  share: number;
}

/** What is wrong with a set, and where in it. */
export interface DependenceProblem {
  /** path into the set: `sharedFactors.0.fieldIds` */
  input: string;
  message: string;
}

/** Sums of shares may miss 1 by rounding. */
const TOLERANCE = 1e-9;

/**
 * The correlation of normal scores under which two normal-copula variables have a wanted rank correlation:
 * rho = 2 sin(pi r / 6), 0 to 1.
 *
 * @param rankCorrelation  Spearman's, 0 to 1
 * @throws {DomainError} outside that range
 * @see K. Pearson, On further methods of determining correlation, Drapers' Company Research Memoirs, Biometric Series
 *      IV (1907)
 * @example scoreCorrelation(0.5) // => 0.517638
 */
export function scoreCorrelation(rankCorrelation: number): number {
  if (!(rankCorrelation >= 0 && rankCorrelation <= 1)) {
    throw new DomainError(
      `A rank correlation between reservoirs lies between 0 and 1; ${rankCorrelation} does not.`,
      { input: "rankCorrelation", value: rankCorrelation },
    );
  }
  return normalScoreCorrelation(rankCorrelation);
}

/** The rank correlation that two reservoirs of a basin have by a set, shared factors aside. */
export const basinRankOf = (
  { basinRanks, otherBasinsRank }: Pick<Dependence, "basinRanks" | "otherBasinsRank">,
  basinId: string,
): number => basinRanks[basinId] ?? otherBasinsRank;

/**
 * The common factors that reservoirs of a field follow. Their normal scores are
 *
 *     s = sqrt(rho_p) P + sqrt(rho_b - rho_p) B + sum_k sqrt(rho_k) S_k + sqrt(1 - rho_b - sum_k rho_k) e
 *
 * with P common to the portfolio, B to the basin, S_k to the fields of a shared factor and e the reservoir's own, so
 * that two scores correlate by the sum of the shares of the factors they have in common: rho_p in different basins,
 * rho_b in one, plus rho_k for each shared factor. Each rho comes from its rank correlation by `scoreCorrelation`.
 *
 * @returns factors with a share above 0; the rest up to 1 is the reservoir's own
 * @throws {DomainError} when the basin's rank is below the portfolio's, or the shares come to more than 1
 * @see A. J. McNeil, R. Frey, P. Embrechts, Quantitative Risk Management, 2nd ed. (2015), sections 6.4 (factor models)
 *      and 7.3 (Gauss copula)
 */
export function loadingsOf(
  dependence: Dependence,
  { fieldId, basinId, basinSlug }: { fieldId: string; basinId: string; basinSlug: string },
): FactorLoading[] {
  const portfolio = scoreCorrelation(dependence.portfolioRank);
  const basin = scoreCorrelation(basinRankOf(dependence, basinId)) - portfolio;
  const loadings = [
    { factor: "portfolio", share: portfolio },
    { factor: `group ${basinSlug}`, share: basin },
    ...dependence.sharedFactors
      .filter(({ fieldIds }) => fieldIds.includes(fieldId))
      .map(({ name, rank }) => ({
        factor: `shared ${name.toLowerCase()}`,
        share: scoreCorrelation(rank),
      })),
  ];
  const total = loadings.reduce((sum, { share }) => sum + share, 0);
  if (basin < -TOLERANCE || total > 1 + TOLERANCE) {
    throw new DomainError(
      `Reservoirs of ${basinSlug} cannot follow their factors: the shares come to ${total.toFixed(3)}, of which ` +
        `${basin.toFixed(3)} is the basin's own.`,
      { input: "dependence", basin: basinSlug, total },
    );
  }
  return loadings.filter(({ share }) => share > 0);
}

/**
 * Whether a set can be had by the fields of a book: no basin below the portfolio, no name twice, and no field that
 * would have to share more than all of its variance.
 *
 * @param fields  every field of the book
 * @returns       problems in words, with their places; none when the set can be used
 */
export function checkDependence(
  dependence: Dependence,
  fields: readonly PlacedField[],
): DependenceProblem[] {
  const { portfolioRank, basinRanks, otherBasinsRank, sharedFactors } = dependence;
  const problems: DependenceProblem[] = [];
  const basinNames = new Map(fields.map(({ basinId, basinName }) => [basinId, basinName]));
  for (const [basinId, rank] of Object.entries(basinRanks)) {
    if (rank < portfolioRank) {
      const name = basinNames.get(basinId) ?? "A basin";
      problems.push({
        input: `basinRanks.${basinId}`,
        message: `${name} has ${rank}, below the ${portfolioRank} between any two reservoirs of the portfolio.`,
      });
    }
  }
  if (otherBasinsRank < portfolioRank) {
    problems.push({
      input: "otherBasinsRank",
      message: `The other basins have ${otherBasinsRank}, below the ${portfolioRank} between any two reservoirs of the portfolio.`,
    });
  }
  const names = new Set<string>();
  sharedFactors.forEach(({ name, fieldIds }, index) => {
    const key = name.toLowerCase();
    if (names.has(key)) {
      problems.push({
        input: `sharedFactors.${index}.name`,
        message: `There is another factor called ${name}.`,
      });
    }
    names.add(key);
    if (new Set(fieldIds).size < fieldIds.length) {
      problems.push({
        input: `sharedFactors.${index}.fieldIds`,
        message: `${name} names a field twice.`,
      });
    }
  });
  return [...problems, ...overloaded(dependence, fields)];
}

/** Fields whose basin and factors together ask for more than there is to share. */
function overloaded(dependence: Dependence, fields: readonly PlacedField[]): DependenceProblem[] {
  return fields.flatMap(({ id, name, basinId, basinName }) => {
    const followed = dependence.sharedFactors.flatMap((factor, index) =>
      factor.fieldIds.includes(id) ? [{ ...factor, index }] : [],
    );
    if (followed.length === 0) return [];
    const basin = scoreCorrelation(basinRankOf(dependence, basinId));
    const total = followed.reduce((sum, { rank }) => sum + scoreCorrelation(rank), basin);
    if (total <= 1 + TOLERANCE) return [];
    const ownRank = basinRankOf(dependence, basinId);
    const ranks = [ownRank, ...followed.map(({ rank }) => rank)];
    const counts = [...new Set(ranks)]
      .map((rank) => `${rank} counts ${scoreCorrelation(rank).toFixed(2)}`)
      .join(", ");
    const factors = followed.map((factor) => `${factor.name} (${factor.rank})`).join(", ");
    return [
      {
        input: `sharedFactors.${followed[followed.length - 1].index}.fieldIds`,
        message:
          `${name} would share more than all of its spread: basin ${basinName} (${ownRank}) with ${factors} comes to ` +
          `${total.toFixed(2)}, and 1 is the most. Rank correlations are added up as the slightly larger ` +
          `correlations of normal scores: ${counts}.`,
      },
    ];
  });
}
