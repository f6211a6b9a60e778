import { createOrderWorkspace } from "../numerics/order-statistics";
import type { Dependence } from "./dependence-schema";
import { loadingsOf, type FactorLoading } from "./factor-model";
import {
  bytesOfFieldTrials,
  createAligner,
  viewFieldTrials,
  type AlignmentOptions,
  type ReservoirTrials,
} from "./field-trials";
import {
  computeLedger,
  figuresOf,
  type FieldFigures,
  type Ledger,
  type LedgerField,
  type LedgerOptions,
} from "./ledger";

/** A field with the stored trials of its reservoirs. */
export interface RollUpField extends Omit<LedgerField, "trials" | "figures" | "sourceTrials"> {
  /** the basin's address, for its draws */
  basinSlug: string;
  reservoirs: readonly ReservoirTrials[];
}

export interface RollUpOptions extends AlignmentOptions, LedgerOptions {
  dependence: Dependence;
}

/** Some reservoirs of a field, on their way into its trials. */
export interface FieldPiece {
  slug: string;
  chance: number;
  loadings: readonly FactorLoading[];
  /** of `bytesOfFieldTrials(trials)`, zeros before the first piece; shared when threads fill it */
  buffer: ArrayBufferLike;
  /** pieces of one field come in one order, so that the same bytes come out */
  reservoirs: readonly ReservoirTrials[];
  isLast: boolean;
}

/**
 * Adds pieces to their fields' trials, and sums a field up when its last piece is in.
 *
 * @returns one entry a piece: the field's own ranges, or null when more of it is to come
 * @throws {DomainError} as `createAligner`
 */
export function alignPieces(
  pieces: readonly FieldPiece[],
  options: AlignmentOptions,
): (FieldFigures | null)[] {
  const aligner = createAligner(options);
  const counting = createOrderWorkspace(options.trials);
  return pieces.map(({ slug, chance, loadings, buffer, reservoirs, isLast }) => {
    const trials = viewFieldTrials(buffer, options.trials);
    for (const reservoir of reservoirs) aligner.addReservoir(reservoir, loadings, trials);
    if (!isLast) return null;
    aligner.drawSuccess(slug, chance, trials);
    return figuresOf(trials, counting);
  });
}

/**
 * How a field comes into the portfolio's order: the factors that its reservoirs follow, and the reservoirs in the order
 * in which they are added.
 *
 * @throws {DomainError} as `loadingsOf`
 */
export function planField<Reservoir extends Pick<ReservoirTrials, "id">>(
  { id, basinId, basinSlug }: Pick<RollUpField, "id" | "basinId" | "basinSlug">,
  reservoirs: readonly Reservoir[],
  dependence: Dependence,
): { loadings: FactorLoading[]; reservoirs: Reservoir[] } {
  return {
    loadings: loadingsOf(dependence, { fieldId: id, basinId, basinSlug }),
    reservoirs: [...reservoirs].sort((a, b) => (a.id < b.id ? -1 : 1)),
  };
}

/** Fields with their trials in the portfolio's order, ready for any sum of them, all in one go. */
export function alignFields(
  fields: readonly RollUpField[],
  { dependence, ...options }: AlignmentOptions & { dependence: Dependence },
): LedgerField[] {
  const pieces = fields.map((field) => ({
    slug: field.slug,
    chance: field.chance,
    buffer: new ArrayBuffer(bytesOfFieldTrials(options.trials)),
    isLast: true,
    ...planField(field, field.reservoirs, dependence),
  }));
  const figures = alignPieces(pieces, options);
  return fields.flatMap(({ reservoirs, basinSlug: _, ...field }, index) => {
    const own = figures[index];
    if (own === null) return [];
    const lengths = reservoirs.map(({ vectors }) => vectors.condensateRecoverableStb.length);
    return [
      {
        ...field,
        trials: viewFieldTrials(pieces[index].buffer, options.trials),
        figures: own,
        sourceTrials: Math.min(...lengths),
      },
    ];
  });
}

/**
 * The whole way at once: reservoirs' trials into the portfolio's order, and the fields' sums. Same fields, options and
 * seed give the same bytes whatever the order of fields and reservoirs.
 *
 * @throws {DomainError} as `loadingsOf`, `createAligner` and `computeLedger`
 */
export function rollUp(
  fields: readonly RollUpField[],
  { dependence, trials, seed, ...options }: RollUpOptions,
): Ledger {
  return computeLedger(alignFields(fields, { dependence, trials, seed }), options);
}
