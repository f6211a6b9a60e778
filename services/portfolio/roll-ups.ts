/**
 * From stored trials to totals: which revision stands for each reservoir on a basis, and what fields, basins and the
 * portfolio come to. Prices are applied afterwards: one flat realised price for all fields multiplies every trial, and
 * with it every percentile and the mean, so a change of deck needs no new roll-up.
 */
import { createHash } from "node:crypto";
import type { Ledger, LedgerMember } from "@/analytics/portfolio/ledger";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import {
  listPortfolioFields,
  listPortfolioReservoirs,
  listTrialVectors,
  type PortfolioFieldRow,
  type PortfolioReservoirRow,
} from "@/models/queries/portfolio";
import { runLedger } from "../compute/pool";
import { decodeVector } from "../trial-vectors";
import type { PortfolioBasis } from "./basis";
import { ByteBoundedCache } from "./cache";

type VolumeBasis = Pick<PortfolioBasis, "estimates" | "interest" | "risk">;

/** A reservoir that is in the figures, with the field it belongs to. */
export interface CountedReservoir {
  field: PortfolioFieldRow;
  reservoir: PortfolioReservoirRow & { estimateId: string; trials: number; computedAt: Date };
}

/** The whole book on a basis, before any figures. */
export interface Book {
  fields: PortfolioFieldRow[];
  reservoirs: PortfolioReservoirRow[];
  /** number of trials that totals are made of: the commonest one; 0 when nothing has been computed */
  trials: number;
  counted: CountedReservoir[];
}

/** Changes when the same trials would give other totals; part of what a total is remembered by. */
const ROLL_UP_VERSION = 2;
/** Fixed, so that a total moves only when something that went into it did. */
const ROLL_UP_SEED = 2027;
/** Revisions whose trials are read in one statement: 16 x 5 x 10,000 floats are 3 MB. */
const BATCH = 16;
const CACHE_BYTES = 32 * 1024 * 1024;

const holder = globalThis as typeof globalThis & {
  dewledgerLedgers?: ByteBoundedCache<Ledger>;
};
/** One a process, kept across hot reloads in development. A ledger is plain numbers, about as long as its JSON. */
const ledgers = (holder.dewledgerLedgers ??= new ByteBoundedCache<Ledger>(
  CACHE_BYTES,
  (ledger) => JSON.stringify(ledger).length,
));

/** Fields and reservoirs, and which of them are in the figures of a basis. */
export async function loadBook(choice: PortfolioBasis["estimates"]): Promise<Book> {
  const [fields, reservoirs] = await Promise.all([
    listPortfolioFields(),
    listPortfolioReservoirs(choice),
  ]);
  const trials = commonest(reservoirs.flatMap((reservoir) => reservoir.trials ?? []));
  const byId = new Map(fields.map((field) => [field.id, field]));
  const counted = reservoirs.flatMap((reservoir): CountedReservoir[] => {
    const field = byId.get(reservoir.fieldId);
    const { estimateId, computedAt } = reservoir;
    if (!field || estimateId === null || computedAt === null || reservoir.trials !== trials) {
      return [];
    }
    return [{ field, reservoir: { ...reservoir, estimateId, computedAt, trials } }];
  });
  return { fields, reservoirs, trials, counted };
}

/**
 * What the counted reservoirs of some fields come to, added up trial by trial.
 *
 * @param fieldIds  leave out for all of them
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
  return ledgers.get(keyOf(counted, basis), async () => {
    const members = await loadMembers(counted, basis);
    return runLedger(members, {
      seed: ROLL_UP_SEED,
      basinRankCorrelations: Object.fromEntries(
        counted.map(({ field }) => [field.basinId, field.basinRankCorrelation]),
      ),
    });
  });
}

/** The company's share on this basis, 0 to 1. */
export const interestOf = (field: PortfolioFieldRow, { interest }: VolumeBasis) =>
  interest === "net" ? field.netRevenueInterest : 1;
/** What every trial is multiplied by for risk on this basis, 0 to 1. */
export const chanceOf = (field: PortfolioFieldRow, { risk }: VolumeBasis) =>
  risk === "risked" ? field.chanceOfCommerciality : 1;

/** A hash of everything that the result depends on; the trials of an open revision change with `computedAt`. */
function keyOf(counted: readonly CountedReservoir[], basis: VolumeBasis): string {
  const parts = counted
    .map(({ field, reservoir }) => [
      reservoir.id,
      reservoir.estimateId,
      reservoir.computedAt.getTime(),
      field.id,
      field.basinId,
      field.basinRankCorrelation,
      field.prmsClass,
      interestOf(field, basis),
      chanceOf(field, basis),
    ])
    .sort(([a], [b]) => (String(a) < String(b) ? -1 : 1));
  return createHash("sha256")
    .update(JSON.stringify([ROLL_UP_VERSION, ROLL_UP_SEED, parts]))
    .digest("base64");
}

async function loadMembers(
  counted: readonly CountedReservoir[],
  basis: VolumeBasis,
): Promise<LedgerMember[]> {
  const members: LedgerMember[] = [];
  for (let start = 0; start < counted.length; start += BATCH) {
    const batch = counted.slice(start, start + BATCH);
    const rows = await listTrialVectors(
      batch.map(({ reservoir }) => reservoir.estimateId),
      vectorNames,
    );
    const byEstimate = new Map(rows.map((row) => [row.estimateId, row]));
    for (const { field, reservoir } of batch) {
      const row = byEstimate.get(reservoir.estimateId);
      if (!row) throw new Error(`estimate ${reservoir.estimateId} has a summary but no trials`);
      members.push({
        id: `${field.slug}/${reservoir.slug}`,
        fieldId: field.id,
        basinId: field.basinId,
        basinSlug: field.basinSlug,
        classId: field.prmsClass,
        interest: interestOf(field, basis),
        chance: chanceOf(field, basis),
        vectors: {
          wetGasInPlaceScf: decodeVector(row.wetGasInPlaceScf),
          dryGasInPlaceScf: decodeVector(row.dryGasInPlaceScf),
          condensateInPlaceStb: decodeVector(row.condensateInPlaceStb),
          salesGasScf: decodeVector(row.salesGasScf),
          condensateRecoverableStb: decodeVector(row.condensateRecoverableStb),
        },
      });
    }
  }
  return members;
}

/** The value that occurs most often, the larger one of two that occur equally; 0 for none. */
function commonest(values: readonly number[]): number {
  const counts = new Map<number, number>();
  for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
  return [...counts].reduce(
    (best, [value, count]) =>
      count > best.count || (count === best.count && value > best.value) ? { value, count } : best,
    { value: 0, count: 0 },
  ).value;
}
