import type { Ledger, VolumeRanges } from "@/analytics/portfolio/ledger";
import {
  matchesFilter,
  sortFields,
  type LeftOut,
  type RankedField,
  type RankingFilter,
  type SortDirection,
} from "@/analytics/portfolio/ranking";
import { rankingColumn, type RankingSortId } from "@/analytics/portfolio/ranking-columns";
import { leastTrusted } from "@/analytics/recovery/recovery-curve-schema";
import type { PortfolioFieldRow, PortfolioReservoirRow } from "@/models/queries/portfolio";
import { InvalidInputError } from "../errors";
import { authorise, type Actor } from "../policy";
import { findPrices, type ChosenPrices, type PortfolioBasis } from "./basis";
import { describeDependence } from "./dependence";
import { totalOf, withValues } from "./group-total";
import { isCounted, loadBook, rollUpFields, type Book } from "./roll-ups";

/** Every field with its figures on a basis, and what they were computed from. */
export interface RankedBook {
  book: Book;
  prices: ChosenPrices | null;
  /** largest mean liquid value first; without an estimate last */
  fields: RankedField[];
  /** of the whole portfolio; null when nothing is in the figures */
  ledger: Ledger | null;
}

/** The whole ranking on a basis. Every screen and file of the portfolio starts from this. */
export async function loadRanking(basis: PortfolioBasis): Promise<RankedBook> {
  const [book, prices] = await Promise.all([loadBook(basis), findPrices(basis)]);
  const ledger = await rollUpFields(book, basis);
  const reservoirs = new Map<string, PortfolioReservoirRow[]>();
  for (const reservoir of book.reservoirs) {
    reservoirs.set(reservoir.fieldId, [...(reservoirs.get(reservoir.fieldId) ?? []), reservoir]);
  }
  const unranked = book.fields.map((field) =>
    describeField(field, reservoirs.get(field.id) ?? [], ledger, prices),
  );
  const fields = sortFields(
    unranked,
    ({ ranges }) => ranges?.condensateRecoverableStb.mean ?? null,
    "descending",
  ).map((field, index) => ({ ...field, rank: field.ranges === null ? null : index + 1 }));
  return { book, prices, fields, ledger };
}

export interface RankingRequest {
  basis: PortfolioBasis;
  filter: RankingFilter;
  sort: RankingSortId;
  direction: SortDirection;
}

/** The rows of the ranking that a person looks at, in their order, with the total of all of them. */
export async function selectRanking({ basis, filter, sort, direction }: RankingRequest) {
  const ranked = await loadRanking(basis);
  const matching = ranked.fields.filter((field) => matchesFilter(field, filter));
  const rows = sortFields(matching, rankingColumn(sort).value, direction);
  return { ...ranked, rows, totals: await totalOf(ranked, basis, matching) };
}

/** GET /api/v1/fields */
export async function listRanking(
  actor: Actor,
  request: RankingRequest & { limit: number; offset: number },
) {
  authorise(actor, "portfolio.read");
  const selected = await selectRanking(request);
  const { rows, fields, prices, totals, book } = selected;
  const { limit, offset } = request;
  const known = rows.flatMap(({ ranges }) => ranges?.liquidValue ?? []);
  return {
    items: rows.slice(offset, offset + limit),
    total: rows.length,
    limit,
    offset,
    fieldsInAll: fields.length,
    totals,
    prices,
    dependence: describeDependence(book.dependence),
    leader: leaderOf(selected),
    scale:
      known.length === 0
        ? null
        : {
            low: Math.min(...known.map(({ p90 }) => p90)),
            high: Math.max(
              ...known.map(({ p10 }) => p10),
              totals?.trialByTrial.liquidValue?.p10 ?? 0,
            ),
          },
    choices: choicesOf(fields),
    engine: engineOf(book),
  };
}

/**
 * GET /api/v1/fields/together: what some chosen fields come to.
 *
 * @throws {InvalidInputError} naming fields that are not there; fields without figures are left out
 */
export async function totalTogether(
  actor: Actor,
  request: { basis: PortfolioBasis; fieldIds: readonly string[] },
) {
  authorise(actor, "portfolio.read");
  const ranked = await loadRanking(request.basis);
  const known = new Set(ranked.fields.map(({ id }) => id));
  const unknown = request.fieldIds.filter((id) => !known.has(id));
  if (unknown.length > 0) {
    throw new InvalidInputError(
      unknown.map((id) => ({ pointer: "#/ids", detail: `There is no field ${id}.` })),
    );
  }
  const chosen = ranked.fields.filter(({ id }) => request.fieldIds.includes(id));
  return {
    total: await totalOf(ranked, request.basis, chosen),
    prices: ranked.prices,
    dependence: describeDependence(ranked.book.dependence),
  };
}

/** How often the field with the largest mean also comes first in a trial. */
function leaderOf({ fields, ledger }: RankedBook) {
  const leader = fields.find(({ ranges }) => ranges !== null);
  const ranks = leader && ledger?.ranks?.[leader.id];
  return ranks ? { name: leader.name, chance: ranks.chanceFirst } : null;
}

/** What made the figures, for the foot of a page. */
export function engineOf({ counted, trials }: Book) {
  if (counted.length === 0) return null;
  const versions = counted.flatMap(({ reservoir }) => reservoir.engineVersion ?? []);
  return { versions: [...new Set(versions)].sort(), trials };
}

function choicesOf(fields: readonly RankedField[]) {
  const byName = <Item extends { name: string }>(items: Iterable<Item>) =>
    [...items].sort((a, b) => a.name.localeCompare(b.name, "en"));
  const yields = fields.flatMap((field) => field.condensateYieldStbPerMmscf ?? []);
  return {
    basins: byName(
      new Map(
        fields.map(({ basin }) => [basin.slug, { slug: basin.slug, name: basin.name }]),
      ).values(),
    ),
    engineers: byName(
      new Map(
        fields.flatMap(({ engineer }) => (engineer ? [[engineer.id, engineer]] : [])),
      ).values(),
    ),
    yieldStbPerMmscf:
      yields.length === 0 ? null : { low: Math.min(...yields), high: Math.max(...yields) },
  };
}

function describeField(
  field: PortfolioFieldRow,
  reservoirs: readonly PortfolioReservoirRow[],
  ledger: Ledger | null,
  prices: ChosenPrices | null,
): RankedField {
  const entry = ledger?.fields[field.id];
  const ranks = ledger?.ranks?.[field.id];
  const counted: readonly PortfolioReservoirRow[] = reservoirs.filter(isCounted);
  return {
    id: field.id,
    slug: field.slug,
    name: field.name,
    basin: { id: field.basinId, slug: field.basinSlug, name: field.basinName },
    operator: field.operator,
    prmsClass: field.prmsClass,
    prmsSubClass: field.prmsSubClass,
    workingInterest: field.workingInterest,
    netRevenueInterest: field.netRevenueInterest,
    chanceOfCommerciality: field.chanceOfCommerciality,
    engineer:
      field.engineerId !== null && field.engineerName !== null
        ? { id: field.engineerId, name: field.engineerName }
        : null,
    condensateYieldStbPerMmscf: entry ? yieldOf(entry.ranges) : null,
    hydrogenSulphide:
      counted.length === 0
        ? null
        : Math.max(...counted.map(({ hydrogenSulphide }) => hydrogenSulphide ?? 0)),
    cautions: [...new Set(counted.flatMap(({ cautionCodes }) => cautionCodes))].sort(),
    recoveryRoute: leastTrusted(counted.map(({ recoveryRoute }) => recoveryRoute)),
    chosen: counted.map(toChosen),
    leftOut: reservoirs.filter((reservoir) => !counted.includes(reservoir)).map(toLeftOut),
    open: reservoirs.flatMap(toOpen),
    ranges: entry ? withValues(entry.ranges, prices) : null,
    rank: null,
    rankRange: ranks ? { low: ranks.low, high: ranks.high } : null,
  };
}

/** Ratio of the means, so that a field of several reservoirs has the yield of what it would produce together. */
function yieldOf({ condensateInPlaceStb, dryGasInPlaceScf }: VolumeRanges): number | null {
  return dryGasInPlaceScf.mean > 0
    ? (condensateInPlaceStb.mean / dryGasInPlaceScf.mean) * 1e6
    : null;
}

function toChosen(reservoir: PortfolioReservoirRow): RankedField["chosen"][number] {
  const { estimateId, revision, state, seed, trials } = reservoir;
  if (
    estimateId === null ||
    revision === null ||
    state === null ||
    seed === null ||
    trials === null
  )
    throw new Error(`reservoir ${reservoir.id} was counted without an estimate`);
  return {
    estimateId,
    reservoirName: reservoir.name,
    reservoirSlug: reservoir.slug,
    revision,
    state,
    effectiveOn: reservoir.effectiveOn,
    engineVersion: reservoir.engineVersion,
    seed,
    trials,
    recoveryRoute: reservoir.recoveryRoute,
    producingConcept: reservoir.producingConcept,
  };
}

const toLeftOut = ({ name }: PortfolioReservoirRow): LeftOut => ({ reservoirName: name });

function toOpen({ name, slug, openRevision, openState }: PortfolioReservoirRow) {
  if (openRevision === null) return [];
  if (openState !== "draft" && openState !== "submitted" && openState !== "returned") return [];
  return [
    { reservoirName: name, reservoirSlug: slug, revision: openRevision, state: openState } as const,
  ];
}
