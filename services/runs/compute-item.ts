import type { Transaction } from "sequelize";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { Simulation } from "@/analytics/volumetrics/simulate";
import type { Estimate } from "@/models/estimate";
import { findEstimate } from "@/models/queries/estimates";
import type { ClaimedItem } from "@/models/queries/run-leases";
import { findUser } from "@/models/queries/users";
import type { Run } from "@/models/run";
import type { RunOutcome, RunStep } from "@/models/run-item";
import { runSimulation, runUntilSettled } from "../compute/pool";
import { ConflictError, ForbiddenError, NotFoundError, StaleVersionError } from "../errors";
import { storeResults, toResults } from "../estimate-runs";
import { authorise, type Action, type Actor } from "../policy";
import { movedStandardErrors } from "./moved";

/** How an item ends. */
export type Ending =
  | {
      state: "done";
      outcome: RunOutcome;
      steps: RunStep[] | null;
      /** writes the results to the estimate, as part of the transaction that ends the item */
      store: ((transaction: Transaction) => Promise<unknown>) | null;
    }
  | { state: "failed" | "passedOver"; reason: string };

export interface ItemOptions {
  /** breaks the computation off, with its reason */
  signal: AbortSignal;
  /** of a run until settled: all steps so far */
  onSteps: (steps: RunStep[]) => void;
}

/**
 * Compute one estimate of a run. What is approved or lies with a reviewer is compared with what is stored and never
 * written to; what is open gets its results, in the name of the person who asked, who is looked up as they are now.
 *
 * @throws whatever is neither the estimate's nor the person's fault: such an item may be tried again
 */
export async function computeItem(
  run: Run,
  item: ClaimedItem,
  options: ItemOptions,
): Promise<Ending> {
  try {
    return await computed(run, item, options);
  } catch (error) {
    const ending = endingOf(error);
    if (ending === null) throw error;
    return ending;
  }
}

/** How an item ends after an error that would come again, or null when it might not. */
export function endingOf(error: unknown): Ending | null {
  if (error instanceof DomainError || error instanceof ConvergenceError) {
    return { state: "failed", reason: error.message };
  }
  if (error instanceof ForbiddenError) return { state: "failed", reason: error.message };
  if (error instanceof StaleVersionError || error instanceof ConflictError) {
    return { state: "passedOver", reason: changedMeanwhile };
  }
  if (error instanceof NotFoundError) return { state: "passedOver", reason: gone };
  return null;
}

const changedMeanwhile =
  "Changed, submitted or decided after the run was asked for. What was changed is run by whoever changed it.";
const gone = "Discarded after the run was asked for.";

async function computed(run: Run, item: ClaimedItem, options: ItemOptions): Promise<Ending> {
  const estimate = await findEstimate(item.estimateId);
  if (!estimate) return { state: "passedOver", reason: gone };
  if (estimate.version !== item.estimateVersion) {
    return { state: "passedOver", reason: changedMeanwhile };
  }
  const isOpen = estimate.state === "draft" || estimate.state === "returned";
  const needed: Action = isOpen ? "estimate.run" : "run.create";
  await actorOf(run.createdBy, needed);

  const { simulation, settled, steps } = await simulated(run, estimate, options);
  const results = toResults(simulation);
  const outcome = { ...compared(estimate.summary, simulation.summary), settled };
  if (!isOpen) return { state: "done", outcome, steps, store: null };

  // The person may have been made inactive while this was computed.
  const store = async (transaction: Transaction) => {
    const actor = await actorOf(run.createdBy, needed, transaction);
    await storeResults(actor, estimate.id, item.estimateVersion, results, transaction);
  };
  return { state: "done", outcome, steps, store };
}

/** @throws {ForbiddenError} when the person, as they are now, may not do this */
async function actorOf(userId: string, action: Action, transaction?: Transaction): Promise<Actor> {
  const user = await findUser(userId, { transaction });
  if (!user?.active) {
    throw new ForbiddenError(
      "The person who asked for this is no longer active, so nothing is computed in their name.",
    );
  }
  const { id, name, email, role } = user;
  const actor = { id, name, email, role };
  authorise(actor, action);
  return actor;
}

interface Computed {
  simulation: Simulation;
  settled: boolean | null;
  steps: RunStep[] | null;
}

async function simulated(
  { kind, options: asked }: Run,
  { inputs, trials, sampling, seed }: Estimate,
  { signal, onSteps }: ItemOptions,
): Promise<Computed> {
  const { tolerance, mostTrials } = asked;
  if (kind !== "untilSettled" || tolerance === undefined || mostTrials === undefined) {
    const simulation = await runSimulation(inputs, { trials, sampling, seed }, { signal });
    return { simulation, settled: null, steps: null };
  }
  const steps: RunStep[] = [];
  return runUntilSettled(
    inputs,
    { seed, sampling, tolerance, mostTrials },
    {
      signal,
      onStep: (step) => {
        steps.push(step);
        onSteps([...steps]);
      },
    },
  );
}

function compared(
  stored: SimulationSummary | null,
  { trials, engineVersion, results }: SimulationSummary,
): Omit<RunOutcome, "settled"> {
  const before = stored?.results.condensateRecoverableStb;
  const after = results.condensateRecoverableStb;
  return {
    trials,
    engineVersion,
    before: before ? rangeOf(before) : null,
    after: rangeOf(after),
    standardErrors: rangeOf(after.standardErrors),
    movedStandardErrors: before ? movedStandardErrors(before, after) : null,
  };
}

function rangeOf({ p90, p50, p10, mean }: RunOutcome["after"]): RunOutcome["after"] {
  return { p90, p50, p10, mean };
}
