/**
 * From stored trials to totals: which revision stands for each reservoir on a basis, and what fields, basins and the
 * portfolio come to. Prices are applied afterwards: one flat realised price for all fields multiplies every trial, and
 * with it every percentile and the mean, so a change of deck needs no new roll-up.
 */
import { createHash } from "node:crypto";
import { DomainError } from "@/analytics/errors";
import { checkDependence } from "@/analytics/portfolio/factor-model";
import type { Ledger } from "@/analytics/portfolio/ledger";
import { DEFAULT_TRIALS } from "@/analytics/volumetrics/trial-counts";
import {
  listPortfolioFields,
  listPortfolioReservoirs,
  type PortfolioFieldRow,
  type PortfolioReservoirRow,
} from "@/models/queries/portfolio";
import { runLedger } from "../compute/pool";
import type { LedgerTask } from "../compute/worker";
import { ConflictError } from "../errors";
import {
  trialsThatFit,
  withAlignedFields,
  type AlignedField,
  type CountedReservoir,
} from "./aligned-fields";
import type { PortfolioBasis } from "./basis";
import { ByteBoundedCache } from "./cache";
import { findChosenDependence, type ChosenDependence } from "./dependence";

type VolumeBasis = Pick<PortfolioBasis, "interest" | "risk">;

/** The whole book on a basis, before any figures. */
export interface Book {
  fields: PortfolioFieldRow[];
  reservoirs: PortfolioReservoirRow[];
  /**
   * Trials that totals are made of: `DEFAULT_TRIALS`, halved while a book so large would not fit in memory. Revisions
   * with another number join by their ranks. 0 when nothing has been computed.
   */
  trials: number;
  counted: CountedReservoir[];
  dependence: ChosenDependence;
}

/** Changes when the same trials in the same order would give other totals. */
const ROLL_UP_VERSION = 4;
const CACHE_BYTES = 32 * 1024 * 1024;

const holder = globalThis as typeof globalThis & {
  dewledgerLedgers?: ByteBoundedCache<Ledger>;
};
/** One a process, kept across hot reloads in development. A ledger is plain numbers, about as long as its JSON. */
const ledgers = (holder.dewledgerLedgers ??= new ByteBoundedCache<Ledger>(
  CACHE_BYTES,
  (ledger) => JSON.stringify(ledger).length,
));

/**
 * Fields and reservoirs, and which of them are in the figures of a basis.
 *
 * @throws {NotFoundError} when the basis names a dependence set that is not there
 */
export async function loadBook(
  basis: Pick<PortfolioBasis, "estimates" | "dependence">,
): Promise<Book> {
  const [fields, reservoirs, dependence] = await Promise.all([
    listPortfolioFields(),
    listPortfolioReservoirs(basis.estimates),
    findChosenDependence(basis),
  ]);
  const byId = new Map(fields.map((field) => [field.id, field]));
  const counted = reservoirs.flatMap((reservoir): CountedReservoir[] => {
    const field = byId.get(reservoir.fieldId);
    return field && isCounted(reservoir) ? [{ field, reservoir }] : [];
  });
  const fieldsCounted = new Set(counted.map(({ field }) => field.id)).size;
  const trials = fieldsCounted > 0 ? trialsThatFit(DEFAULT_TRIALS, fieldsCounted) : 0;
  return { fields, reservoirs, trials, counted, dependence };
}

/** Is there a computed revision for it on this basis? */
export const isCounted = (
  reservoir: PortfolioReservoirRow,
): reservoir is CountedReservoir["reservoir"] =>
  reservoir.estimateId !== null && reservoir.computedAt !== null && reservoir.trials !== null;

/**
 * What the counted reservoirs of some fields come to, added up trial by trial.
 *
 * @param fieldIds  leave out for all of them; only then are fields placed among each other
 * @returns         null when none of them is in the figures
 */
export async function rollUpFields(
  book: Book,
  basis: VolumeBasis,
  fieldIds?: ReadonlySet<string>,
): Promise<Ledger | null> {
  const counted = fieldIds
    ? book.counted.filter(({ field }) => fieldIds.has(field.id))
    : book.counted;
  if (counted.length === 0) return null;
  const withRanks = counted.length === book.counted.length;
  const key = keyOf(counted, book, basis, withRanks);
  return ledgers.get(key, () => computeTotals(counted, book, basis, withRanks));
}

async function computeTotals(
  counted: readonly CountedReservoir[],
  book: Book,
  basis: VolumeBasis,
  withRanks: boolean,
): Promise<Ledger> {
  const { trials, dependence } = book;
  try {
    return await withAlignedFields(counted, trials, dependence.dependence, (aligned) =>
      addUp(counted, aligned, basis, { trials, risk: basis.risk, withRanks }),
    );
  } catch (error) {
    if (!(error instanceof DomainError) || error.details.input !== "dependence") throw error;
    throw impossibleSet(book, error);
  }
}

/** The set in words: everything that stands on it waits for somebody to change it. */
function impossibleSet({ fields, dependence }: Book, error: DomainError): ConflictError {
  const [problem] = checkDependence(dependence.dependence, fields);
  return new ConflictError(
    `Totals cannot stand on the dependence set “${dependence.name}”. ${problem?.message ?? error.message} ` +
      "Change the set, or choose another one.",
    "impossible_dependence",
  );
}

async function addUp(
  counted: readonly CountedReservoir[],
  aligned: ReadonlyMap<string, AlignedField>,
  basis: VolumeBasis,
  options: LedgerTask["options"],
): Promise<Ledger> {
  const sourceTrials = new Map<string, number>();
  for (const { field, reservoir } of counted) {
    const known = sourceTrials.get(field.id) ?? Infinity;
    sourceTrials.set(field.id, Math.min(known, reservoir.trials));
  }
  const fields = new Map(counted.map(({ field }) => [field.id, field]));
  return runLedger(
    [...fields.values()].flatMap((field) => {
      const own = aligned.get(field.id);
      if (!own) return [];
      return [
        {
          id: field.id,
          slug: field.slug,
          basinId: field.basinId,
          classId: field.prmsClass,
          buffer: own.buffer,
          figures: own.figures,
          interest: interestOf(field, basis),
          chance: field.chanceOfCommerciality,
          sourceTrials: sourceTrials.get(field.id) ?? options.trials,
        },
      ];
    }),
    options,
  );
}

/** The company's share on this basis, 0 to 1. */
export const interestOf = (field: PortfolioFieldRow, { interest }: VolumeBasis) =>
  interest === "net" ? field.netRevenueInterest : 1;
/** What a mean is multiplied by for risk on this basis, 0 to 1: on average a yes or no comes to the chance, too. */
export const chanceOf = (field: PortfolioFieldRow, { risk }: VolumeBasis) =>
  risk === "unrisked" ? 1 : field.chanceOfCommerciality;

/** A hash of everything that the result depends on; the trials of an open revision change with `computedAt`. */
function keyOf(
  counted: readonly CountedReservoir[],
  { trials, dependence }: Book,
  basis: VolumeBasis,
  withRanks: boolean,
): string {
  const parts = counted
    .map(({ field, reservoir }) => [
      reservoir.id,
      reservoir.estimateId,
      reservoir.computedAt.getTime(),
      field.id,
      field.basinId,
      field.prmsClass,
      interestOf(field, basis),
      field.chanceOfCommerciality,
    ])
    .sort(([a], [b]) => (String(a) < String(b) ? -1 : 1));
  return createHash("sha256")
    .update(
      JSON.stringify([
        ROLL_UP_VERSION,
        trials,
        basis.risk,
        withRanks,
        dependence.dependence,
        parts,
      ]),
    )
    .digest("base64");
}
