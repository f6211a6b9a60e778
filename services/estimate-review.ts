import { ENGINE_VERSION } from "@/analytics/volumetrics/simulate";
import type { Estimate } from "@/models/estimate";
import { findApprovedEstimateToSupersede } from "@/models/queries/estimates";
import { recordAudit } from "./audit";
import { now, today } from "./clock";
import { ConflictError, InvalidInputError } from "./errors";
import { tellAuthors, tellReviewers } from "./estimate-letters";
import { headlineOf } from "./estimate-runs";
import { assertPossible } from "./estimate-states";
import { lockEstimate, reload } from "./estimates";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { saveVersioned } from "./versions";

/**
 * Hand an estimate to the reviewers. It must have been run as it stands, by the present engine.
 *
 * @param note  why this revision exists; replaces the draft's note when given
 */
export async function submitEstimate(
  actor: Actor,
  id: string,
  input: { note?: string },
  expectedVersion: number,
): Promise<Estimate> {
  authorise(actor, "estimate.submit");
  return inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    assertPossible("estimate.submit", estimate);
    if (!estimate.summary) {
      throw new ConflictError("Run the estimate before you submit it.", "not_run");
    }
    if (estimate.engineVersion !== ENGINE_VERSION) {
      throw new ConflictError(
        `These results are from engine ${estimate.engineVersion}; run again on ${ENGINE_VERSION}.`,
        "engine_changed",
      );
    }
    const before = { state: estimate.state, note: estimate.note };
    estimate.set({
      state: "submitted",
      note: input.note ?? estimate.note,
      submittedBy: actor.id,
      submittedAt: now(),
      decidedBy: null,
      decidedAt: null,
      decisionNote: "",
    });
    await saveVersioned(estimate, transaction);
    await recordAudit(
      {
        actor,
        action: "estimate.submitted",
        entity: "estimate",
        entityId: id,
        before,
        after: { state: "submitted", note: estimate.note, ...headlineOf(estimate.summary) },
      },
      transaction,
    );
    const submitted = await reload(id, transaction);
    await tellReviewers(actor, submitted, transaction);
    return submitted;
  });
}

/**
 * Make a submitted estimate the reservoir's approved one; the one before is superseded in the same moment.
 *
 * @param input.effectiveOn  the business date from which it counts, `YYYY-MM-DD`; today when not given
 * @throws {InvalidInputError} when that date is still to come, or before the approved estimate's own
 */
export async function approveEstimate(
  actor: Actor,
  id: string,
  input: { note?: string; effectiveOn?: string },
  expectedVersion: number,
): Promise<Estimate> {
  authorise(actor, "estimate.approve");
  return inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    authorise(actor, "estimate.approve", estimate);
    assertPossible("estimate.approve", estimate);

    const previous = await findApprovedEstimateToSupersede(estimate.reservoirId, transaction);
    if (input.effectiveOn !== undefined) assertInOrder(input.effectiveOn, previous);
    if (previous) {
      previous.state = "superseded";
      await saveVersioned(previous, transaction);
      await recordAudit(
        {
          actor,
          action: "estimate.superseded",
          entity: "estimate",
          entityId: previous.id,
          before: { state: "approved" },
          after: { state: "superseded", by: id },
        },
        transaction,
      );
    }
    estimate.set({
      state: "approved",
      decidedBy: actor.id,
      decidedAt: now(),
      decisionNote: input.note ?? "",
      effectiveOn: input.effectiveOn ?? today(),
    });
    await saveVersioned(estimate, transaction);
    await recordAudit(
      {
        actor,
        action: "estimate.approved",
        entity: "estimate",
        entityId: id,
        before: { state: "submitted" },
        after: {
          state: "approved",
          note: estimate.decisionNote,
          effectiveOn: estimate.effectiveOn,
          supersedes: previous?.id ?? null,
        },
      },
      transaction,
    );
    const approved = await reload(id, transaction);
    await tellAuthors(actor, approved, "approved", transaction);
    return approved;
  });
}

/** Dates of a reservoir's approved estimates follow one another, so that any past day has one estimate that counted. */
function assertInOrder(effectiveOn: string, previous: Estimate | null): void {
  const refuse = (detail: string) => {
    throw new InvalidInputError([{ pointer: "#/effectiveOn", detail }]);
  };
  if (effectiveOn > today()) {
    refuse("is still to come: approve on the day from which the estimate counts, or later");
  }
  if (previous?.effectiveOn && effectiveOn < previous.effectiveOn) {
    refuse(`is before ${previous.effectiveOn}, from which the present approved estimate counts`);
  }
}

/** Send a submitted estimate back. The note says what to do about it, so there must be one. */
export async function returnEstimate(
  actor: Actor,
  id: string,
  input: { note: string },
  expectedVersion: number,
): Promise<Estimate> {
  authorise(actor, "estimate.return");
  const note = input.note.trim();
  if (note === "") {
    throw new InvalidInputError([{ pointer: "#/note", detail: "Say what should change." }]);
  }
  return inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    authorise(actor, "estimate.return", estimate);
    assertPossible("estimate.return", estimate);
    estimate.set({
      state: "returned",
      decidedBy: actor.id,
      decidedAt: now(),
      decisionNote: note,
    });
    await saveVersioned(estimate, transaction);
    await recordAudit(
      {
        actor,
        action: "estimate.returned",
        entity: "estimate",
        entityId: id,
        before: { state: "submitted" },
        after: { state: "returned", note },
      },
      transaction,
    );
    const returned = await reload(id, transaction);
    await tellAuthors(actor, returned, "returned", transaction);
    return returned;
  });
}
