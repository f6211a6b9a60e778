/**
 * Fields' trials in the order of the portfolio, kept in memory that calculation threads share: once a field is here,
 * any total with it is a sum. What goes in is part of the key, so nothing has to be thrown away by hand: a field comes
 * anew when one of its revisions is approved or computed again, or when a dependence set changes how it moves.
 */
import { createHash } from "node:crypto";
import type { FactorLoading } from "@/analytics/portfolio/factor-model";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { bytesOfFieldTrials, type ReservoirTrials } from "@/analytics/portfolio/field-trials";
import type { FieldFigures } from "@/analytics/portfolio/ledger";
import { planField } from "@/analytics/portfolio/roll-up";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import {
  listTrialVectors,
  type PortfolioFieldRow,
  type PortfolioReservoirRow,
} from "@/models/queries/portfolio";
import { MAXIMUM_QUEUE, runAlignment, type SharedFieldPiece } from "../compute/pool";
import { decodeVector } from "../trial-vectors";
import { Turns } from "../turns";
import { ByteBoundedCache } from "./cache";

/** A reservoir that is in the figures, with the field it belongs to. */
export interface CountedReservoir {
  field: PortfolioFieldRow;
  reservoir: PortfolioReservoirRow & { estimateId: string; trials: number; computedAt: Date };
}

export interface AlignedField {
  /** what went in; the same text means the same bytes */
  key: string;
  /** of `bytesOfFieldTrials(trials)` */
  buffer: SharedArrayBuffer;
  figures: FieldFigures;
}

/** Changes when the same trials would be put in another order. */
const ALIGNMENT_VERSION = 1;
/** Fixed, so that a total moves only when something that went into it did. */
const SEED = 2027;
/** Stored trials read in one statement and handed to a thread at once: 40 revisions of 10,000 trials. */
const BATCH_BYTES = 8 * 1024 * 1024;
/** What the fields of one book may come to; a total of more fields takes fewer trials. */
const BOOK_BYTES = 192 * 1024 * 1024;
/** Room for a book on several bases, or on several dependence sets. */
const CACHE_BYTES = 320 * 1024 * 1024;

const holder = globalThis as typeof globalThis & {
  dewledgerAlignedFields?: ByteBoundedCache<AlignedField>;
  dewledgerFieldLoads?: Turns;
};
/**
 * One total at a time reads what it lacks, and keeps its turn until it is done: however many ask for however many sets,
 * there is at most one book in memory beside the cache.
 */
const loads = (holder.dewledgerFieldLoads ??= new Turns(1, MAXIMUM_QUEUE));
/** One a process, kept across hot reloads in development. */
const cache = (holder.dewledgerAlignedFields ??= new ByteBoundedCache<AlignedField>(
  CACHE_BYTES,
  ({ buffer }) => buffer.byteLength,
));

/** Halves a number of trials until so many fields fit in the memory that a book may take. */
export function trialsThatFit(trials: number, fields: number): number {
  let fitting = trials;
  while (fitting > 1 && bytesOfFieldTrials(fitting) * fields > BOOK_BYTES) {
    fitting = Math.ceil(fitting / 2);
  }
  return fitting;
}

/** A field that is wanted, with all of its reservoirs that count. */
interface Request {
  key: string;
  field: PortfolioFieldRow;
  loadings: FactorLoading[];
  counted: CountedReservoir[];
  trials: number;
}

interface Waiting {
  request: Request;
  settle: (aligned: AlignedField) => void;
  fail: (reason: unknown) => void;
}

/**
 * Does something with the fields of some reservoirs in the order of totals of so many trials. What is not in memory is
 * read from the database and put in order on a thread, when nobody else is doing so.
 *
 * @param counted  all counted reservoirs of every field among them
 * @param work     gets them by field id; what it keeps of them afterwards is not accounted for
 * @throws {DomainError} with the input `dependence`, as `loadingsOf`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function withAlignedFields<Result>(
  counted: readonly CountedReservoir[],
  trials: number,
  dependence: Dependence,
  work: (fields: ReadonlyMap<string, AlignedField>) => Promise<Result>,
): Promise<Result> {
  const requests = requestsOf(counted, trials, dependence);
  const whole = async () => work(await findOrLoad(requests));
  // Whoever has to wait takes nothing out of the cache before, so that nothing is held while waiting.
  return requests.every(({ key }) => cache.has(key)) ? whole() : loads.take(whole);
}

/** The fields themselves, by id, as `withAlignedFields`: for a few of them. */
export const alignFields = (
  counted: readonly CountedReservoir[],
  trials: number,
  dependence: Dependence,
): Promise<ReadonlyMap<string, AlignedField>> =>
  withAlignedFields(counted, trials, dependence, async (fields) => fields);

async function findOrLoad(requests: readonly Request[]): Promise<Map<string, AlignedField>> {
  const waiting: Waiting[] = [];
  const wanted = requests.map((request) => ({
    id: request.field.id,
    aligned: cache.get(
      request.key,
      () => new Promise<AlignedField>((settle, fail) => waiting.push({ request, settle, fail })),
    ),
  }));
  // Whoever waits for a field hears of a failure there; here it would only be heard twice.
  const loading = load(waiting).catch((reason: unknown) => {
    for (const { fail } of waiting) fail(reason);
  });
  const found = await Promise.all(
    wanted.map(async ({ id, aligned }) => [id, await aligned] as const),
  );
  await loading;
  return new Map(found);
}

/** Names a reservoir's draws. */
const addressOf = ({ field, reservoir }: CountedReservoir) => `${field.slug}/${reservoir.slug}`;

function requestsOf(
  counted: readonly CountedReservoir[],
  trials: number,
  dependence: Dependence,
): Request[] {
  const fields = new Map<string, CountedReservoir[]>();
  for (const one of counted) {
    const known = fields.get(one.field.id);
    if (known) known.push(one);
    else fields.set(one.field.id, [one]);
  }
  return [...fields.values()].map((reservoirs) => {
    const [{ field }] = reservoirs;
    const { loadings, reservoirs: inOrder } = planField(
      field,
      reservoirs.map((member) => ({ id: addressOf(member), member })),
      dependence,
    );
    const parts = inOrder.map(({ member: { reservoir } }) => [
      reservoir.slug,
      reservoir.estimateId,
      reservoir.computedAt.getTime(),
    ]);
    const key = createHash("sha256")
      .update(
        JSON.stringify([
          ALIGNMENT_VERSION,
          SEED,
          trials,
          field.slug,
          field.chanceOfCommerciality,
          loadings,
          parts,
        ]),
      )
      .digest("base64");
    return { key, field, loadings, counted: inOrder.map(({ member }) => member), trials };
  });
}

/** Reads the next batch while a thread puts the last one in order. */
async function load(waiting: readonly Waiting[]): Promise<void> {
  if (waiting.length === 0) return;
  const { trials } = waiting[0].request;
  const buffers = new Map(
    waiting.map(({ request }) => [
      request.key,
      new SharedArrayBuffer(bytesOfFieldTrials(request.trials)),
    ]),
  );
  let working: Promise<void> = Promise.resolve();
  for (const batch of batchesOf(waiting)) {
    const reading = readPieces(batch, buffers);
    const [pieces] = await Promise.all([reading, working]);
    working = align(batch, pieces, trials);
  }
  await working;
}

/** One reservoir on its way, with the last one of its field marked. */
interface Step {
  waiting: Waiting;
  member: CountedReservoir;
  isLast: boolean;
}

function batchesOf(waiting: readonly Waiting[]): Step[][] {
  const batches: Step[][] = [];
  let room = 0;
  for (const one of waiting) {
    const { counted } = one.request;
    counted.forEach((member, index) => {
      const bytes = member.reservoir.trials * vectorNames.length * Float32Array.BYTES_PER_ELEMENT;
      if (batches.length === 0 || bytes > room) {
        batches.push([]);
        room = BATCH_BYTES;
      }
      room -= bytes;
      const isLast = index === counted.length - 1;
      batches[batches.length - 1].push({ waiting: one, member, isLast });
    });
  }
  return batches;
}

async function readPieces(
  batch: readonly Step[],
  buffers: ReadonlyMap<string, SharedArrayBuffer>,
): Promise<SharedFieldPiece[]> {
  const rows = await listTrialVectors(
    batch.map(({ member }) => member.reservoir.estimateId),
    vectorNames,
  );
  const byEstimate = new Map(rows.map((row) => [row.estimateId, row]));
  return batch.map(({ waiting: { request }, member, isLast }) => {
    const { reservoir } = member;
    const row = byEstimate.get(reservoir.estimateId);
    const buffer = buffers.get(request.key);
    if (!row || !buffer) {
      throw new Error(`estimate ${reservoir.estimateId} has a summary but no trials`);
    }
    const trials: ReservoirTrials = {
      id: addressOf(member),
      vectors: {
        wetGasInPlaceScf: decodeVector(row.wetGasInPlaceScf),
        dryGasInPlaceScf: decodeVector(row.dryGasInPlaceScf),
        condensateInPlaceStb: decodeVector(row.condensateInPlaceStb),
        salesGasScf: decodeVector(row.salesGasScf),
        condensateRecoverableStb: decodeVector(row.condensateRecoverableStb),
      },
    };
    return {
      slug: request.field.slug,
      chance: request.field.chanceOfCommerciality,
      loadings: request.loadings,
      buffer,
      reservoirs: [trials],
      isLast,
    };
  });
}

async function align(
  batch: readonly Step[],
  pieces: SharedFieldPiece[],
  trials: number,
): Promise<void> {
  const figures = await runAlignment(pieces, { trials, seed: SEED });
  batch.forEach(({ waiting: { request, settle } }, index) => {
    const own = figures[index];
    if (own) settle({ key: request.key, buffer: pieces[index].buffer, figures: own });
  });
}
