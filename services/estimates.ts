import { isDeepStrictEqual } from "node:util";
import type { Transaction } from "sequelize";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import { requirePossibleInputs } from "@/analytics/volumetrics/check-inputs";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { checkTrials, DEFAULT_TRIALS, samplingFor } from "@/analytics/volumetrics/trial-counts";
import type { Estimate } from "@/models/estimate";
import {
  createEstimateRow,
  deleteTrials,
  findApprovedEstimate,
  findEstimate,
  findEstimateWithPeople,
  findLatestRevision,
  findOpenEstimate,
  listEstimatesPage,
  type EstimateFilter,
} from "@/models/queries/estimates";
import { findFluidSample } from "@/models/queries/fluid-samples";
import { findReservoirWithField } from "@/models/queries/reservoirs";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { ConflictError, InvalidInputError, NotFoundError, refuseImpossible } from "./errors";
import { assertPossible } from "./estimate-states";
import { toPage, type Page, type PageRequest } from "./paging";
import { authorise, type Actor } from "./policy";
import { seedOf } from "./seeds";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

/** What a person sets in a draft. */
export interface EstimatePatch {
  inputs?: EstimateInputs;
  /** naming a sample copies its sheet into the inputs as it is now; null cuts the tie and leaves the sheet */
  fluidSampleId?: string | null;
  note?: string;
  /** 0 to 2^31 - 1 */
  seed?: number;
  /** 100 to 1,048,576; a power of two, at least 1,024, for Sobol points */
  trials?: number;
  /** the approved estimate's unless given, else what suits the number of trials */
  sampling?: SamplingMethod;
}

export async function listEstimates(
  actor: Actor,
  filter: EstimateFilter,
  page: PageRequest,
): Promise<Page<Estimate>> {
  authorise(actor, "estimate.read");
  return toPage(await listEstimatesPage(filter, page), page);
}

/** One revision whole, with its people, sample, reservoir, field and basin. */
export async function getEstimate(actor: Actor, id: string): Promise<Estimate> {
  authorise(actor, "estimate.read");
  return reload(id);
}

export async function reload(id: string, transaction?: Transaction): Promise<Estimate> {
  const estimate = await findEstimateWithPeople(id, { transaction });
  if (!estimate) throw new NotFoundError("estimate");
  return estimate;
}

/**
 * The row, held until the transaction ends, at the version that the person was looking at.
 *
 * @throws {NotFoundError}
 * @throws {StaleVersionError} with the whole estimate as it is now
 */
export async function lockEstimate(
  id: string,
  expectedVersion: number,
  transaction: Transaction,
): Promise<Estimate> {
  const estimate = await findEstimate(id, { transaction, lock: true });
  if (!estimate) throw new NotFoundError("estimate");
  if (estimate.version !== expectedVersion) {
    assertVersion(await reload(id, transaction), expectedVersion);
  }
  return estimate;
}

/**
 * Begin the next revision of a reservoir: from the inputs given, or else as a copy of the approved one.
 *
 * @throws {ConflictError} when a revision is open already, or when there is nothing to copy
 */
export async function createDraft(
  actor: Actor,
  reservoirId: string,
  input: EstimatePatch = {},
): Promise<Estimate> {
  authorise(actor, "estimate.create");
  return inTransaction(async (transaction) => {
    const reservoir = await findReservoirWithField(reservoirId, { transaction });
    if (!reservoir?.field) throw new NotFoundError("reservoir");
    if (await findOpenEstimate(reservoirId, { transaction })) {
      throw new ConflictError("This reservoir has an open estimate already.", "already_exists");
    }
    const approved = await findApprovedEstimate(reservoirId, { transaction });
    const start = input.inputs ?? approved?.inputs;
    if (!start) {
      throw new ConflictError(
        "This reservoir has no approved estimate to begin from. Give the inputs.",
        "nothing_to_copy",
      );
    }
    const inherited = input.inputs ? null : (approved?.fluidSampleId ?? null);
    const inputs = await withSampleSheet(start, input.fluidSampleId, reservoirId, transaction);
    refuseImpossible("inputs", () => requirePossibleInputs(inputs));
    const trials = input.trials ?? approved?.trials ?? DEFAULT_TRIALS;
    const sampling = input.sampling ?? approved?.sampling ?? samplingFor(trials);
    refuseImpossible("", () => checkTrials(trials, sampling));
    const at = now();
    const values = {
      reservoirId,
      revision: (await findLatestRevision(reservoirId, transaction)) + 1,
      state: "draft" as const,
      inputs,
      schemaVersion: inputs.schemaVersion,
      fluidSampleId: input.fluidSampleId === undefined ? inherited : input.fluidSampleId,
      // The same seed for every revision: what moves between two is then the inputs, not the dice.
      seed: input.seed ?? approved?.seed ?? seedOf(reservoir.field.slug, reservoir.slug),
      trials,
      sampling,
      note: input.note ?? "",
      createdBy: actor.id,
    };
    const estimate = await createEstimateRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: "estimate.created",
        entity: "estimate",
        entityId: estimate.id,
        after: values,
      },
      transaction,
    );
    return reload(estimate.id, transaction);
  });
}

/**
 * Change a draft or a returned estimate. New inputs, seed, trials or sampling take the results away: what is shown always
 * belongs to what is written.
 */
export async function updateDraft(
  actor: Actor,
  id: string,
  patch: EstimatePatch,
  expectedVersion: number,
): Promise<Estimate> {
  authorise(actor, "estimate.update");
  return inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    assertPossible("estimate.update", estimate);

    const inputs = await withSampleSheet(
      patch.inputs ?? estimate.inputs,
      patch.fluidSampleId,
      estimate.reservoirId,
      transaction,
    );
    const { fluidSampleId, note, seed, trials, sampling } = estimate;
    // A sheet edited by hand is no longer the laboratory's.
    const isEdited = !isDeepStrictEqual(inputs.fluid, estimate.inputs.fluid);
    const source =
      patch.fluidSampleId ?? (patch.fluidSampleId === null || isEdited ? null : fluidSampleId);
    const changes = changesBetween<Required<EstimatePatch>>(
      { inputs: estimate.inputs, fluidSampleId, note, seed, trials, sampling },
      { ...patch, inputs, fluidSampleId: source },
    );
    if (changes.after.inputs) refuseImpossible("inputs", () => requirePossibleInputs(inputs));

    const { after } = changes;
    refuseImpossible("", () => checkTrials(after.trials ?? trials, after.sampling ?? sampling));
    const voidsResults = (["inputs", "seed", "trials", "sampling"] as const).some(
      (name) => after[name] !== undefined,
    );
    estimate.set(after);
    if (voidsResults) {
      estimate.set({ summary: null, computedAt: null, engineVersion: null });
      await deleteTrials(id, { transaction });
    }
    await saveVersioned(estimate, transaction);
    await recordAudit(
      { actor, action: "estimate.updated", entity: "estimate", entityId: id, ...changes },
      transaction,
    );
    return reload(id, transaction);
  });
}

/** Throw a draft away that was never submitted; the audit trail keeps what it held. */
export async function discardDraft(
  actor: Actor,
  id: string,
  expectedVersion: number,
): Promise<void> {
  authorise(actor, "estimate.discard");
  await inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    assertPossible("estimate.discard", estimate);
    const { reservoirId, revision, inputs, note } = estimate;
    await estimate.destroy({ transaction });
    await recordAudit(
      {
        actor,
        action: "estimate.discarded",
        entity: "estimate",
        entityId: id,
        before: { reservoirId, revision, inputs, note },
      },
      transaction,
    );
  });
}

/** The inputs with the sheet of the sample that was named, if one was. */
async function withSampleSheet(
  inputs: EstimateInputs,
  fluidSampleId: string | null | undefined,
  reservoirId: string,
  transaction: Transaction,
): Promise<EstimateInputs> {
  if (!fluidSampleId) return inputs;
  const sample = await findFluidSample(fluidSampleId, { transaction });
  if (sample?.reservoirId !== reservoirId) {
    throw new InvalidInputError([
      { pointer: "#/fluidSampleId", detail: "must be a sample of this reservoir" },
    ]);
  }
  return { ...inputs, fluid: sample.separatorTest };
}
