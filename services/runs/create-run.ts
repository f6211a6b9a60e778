import type { Transaction } from "sequelize";
import { findEstimateWithPeople } from "@/models/queries/estimates";
import {
  addRunItems,
  createRunRow,
  findUnfinishedRecalculation,
  findUnfinishedSettling,
  lockRuns,
} from "@/models/queries/runs";
import type { Run } from "@/models/run";
import { openEstimateStates, type EstimateState, type RunScope } from "@/models/vocabulary";
import { recordAudit } from "../audit";
import { now } from "../clock";
import { ConflictError, NotFoundError } from "../errors";
import { assertPossible } from "../estimate-states";
import { authorise, type Actor } from "../policy";
import { inTransaction } from "../transaction";
import { sendLanes } from "./lanes";

/** What a person can ask for; imports begin their runs themselves. */
export type NewRun =
  | { kind: "recalculation"; scope: RunScope }
  | { kind: "untilSettled"; estimateId: string; tolerance: number; mostTrials: number };

const statesOf: Record<RunScope, readonly EstimateState[]> = {
  approved: ["approved"],
  open: openEstimateStates,
  both: ["approved", ...openEstimateStates],
};

const scopeWords: Record<RunScope, string> = {
  approved: "approved estimates",
  open: "open estimates",
  both: "approved and open estimates",
};

/** Scopes that have estimates in common with one. */
const overlapping: Record<RunScope, readonly RunScope[]> = {
  approved: ["approved", "both"],
  open: ["open", "both"],
  both: ["approved", "open", "both"],
};

/**
 * Begin a run: its row, its items and the lanes that work on them, all or nothing.
 *
 * @returns its id
 * @throws {ForbiddenError} when results would be stored in the name of somebody who may not run estimates
 * @throws {ConflictError} when such a run is under way (with its id), or there is nothing to compute
 */
export async function createRun(actor: Actor, asked: NewRun): Promise<string> {
  authorise(actor, "run.create");
  if (asked.kind === "untilSettled" || asked.scope !== "approved") {
    authorise(actor, "estimate.run");
  }
  return inTransaction(async (transaction) => {
    await lockRuns(transaction);
    return asked.kind === "recalculation"
      ? createRecalculation(actor, asked.scope, transaction)
      : createUntilSettled(actor, asked, transaction);
  });
}

async function createRecalculation(
  actor: Actor,
  scope: RunScope,
  transaction: Transaction,
): Promise<string> {
  await refuseOverlap({ kind: "recalculation", options: { scope } }, transaction);
  const title = `Recalculation of ${scopeWords[scope]}`;
  return beginRun(
    actor,
    { kind: "recalculation", title, options: { scope } },
    { states: statesOf[scope] },
    transaction,
  );
}

async function createUntilSettled(
  actor: Actor,
  { estimateId, tolerance, mostTrials }: Extract<NewRun, { kind: "untilSettled" }>,
  transaction: Transaction,
): Promise<string> {
  const estimate = await findEstimateWithPeople(estimateId, { transaction });
  if (!estimate?.reservoir?.field) throw new NotFoundError("estimate");
  assertPossible("estimate.run", estimate);
  const existing = await findUnfinishedSettling(estimateId, transaction);
  if (existing) {
    throw new ConflictError(
      "This estimate is being run until it is settled already.",
      "already_running",
      existing.id,
    );
  }
  const place = `${estimate.reservoir.field.name}, ${estimate.reservoir.name}`;
  const percent = Number((tolerance * 100).toPrecision(3));
  const title = `${place}, revision ${estimate.revision}: until settled within ${percent} %`;
  return beginRun(
    actor,
    { kind: "untilSettled", title, options: { tolerance, mostTrials } },
    { estimateIds: [estimateId] },
    transaction,
  );
}

/**
 * The run of the estimates that an import made or changed. Part of the import's own unit of work.
 *
 * @returns its id
 */
export async function createImportRun(
  actor: Actor,
  {
    importId,
    fileName,
    estimateIds,
  }: { importId: string; fileName: string; estimateIds: string[] },
  transaction: Transaction,
): Promise<string> {
  authorise(actor, "import.create");
  return beginRun(
    actor,
    { kind: "import", title: `Import of ${fileName}`, importId },
    { estimateIds },
    transaction,
  );
}

type RunValues = Pick<Run, "kind" | "title"> & Partial<Pick<Run, "options" | "importId">>;

async function beginRun(
  actor: Actor,
  values: RunValues,
  which: Parameters<typeof addRunItems>[1],
  transaction: Transaction,
): Promise<string> {
  const at = now();
  const times = { createdAt: at, updatedAt: at };
  const run = await createRunRow({ ...values, createdBy: actor.id, ...times }, { transaction });
  const items = await addRunItems(run.id, which, transaction);
  if (items === 0) throw new ConflictError("There is nothing to compute.", "nothing_to_do");
  await recordAudit(
    {
      actor,
      action: "run.created",
      entity: "run",
      entityId: run.id,
      after: { ...values, items },
    },
    transaction,
  );
  await sendLanes(run, items, transaction);
  return run.id;
}

/**
 * Two recalculations of the same estimates at the same time would do everything twice.
 *
 * @throws {ConflictError} with the id of the run that is under way
 */
export async function refuseOverlap(
  { kind, options }: Pick<Run, "kind" | "options">,
  transaction: Transaction,
): Promise<void> {
  if (kind !== "recalculation" || options.scope === undefined) return;
  const scopes = overlapping[options.scope];
  const existing = await findUnfinishedRecalculation(scopes, transaction);
  if (!existing) return;
  throw new ConflictError(
    `A ${existing.title.replace(/^R/, "r")} is under way already.`,
    "already_running",
    existing.id,
  );
}
