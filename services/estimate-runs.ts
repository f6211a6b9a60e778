import type { Transaction } from "sequelize";
import { DomainError } from "@/analytics/errors";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { Simulation } from "@/analytics/volumetrics/simulate";
import type { Estimate } from "@/models/estimate";
import { replaceTrials } from "@/models/queries/estimates";
import { changesBetween, recordAudit } from "./audit";
import { now } from "./clock";
import { runSimulation } from "./compute/pool";
import { InvalidInputError, toPointer } from "./errors";
import { assertPossible } from "./estimate-states";
import { lockEstimate, reload } from "./estimates";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { encodeVectors, type StoredVectors } from "./trial-vectors";
import { assertVersion, saveVersioned } from "./versions";

/**
 * Simulate an open estimate on the thread pool and keep the summary with every trial. No row is held while it computes;
 * if somebody changed the inputs meanwhile the results are dropped rather than put beside them.
 *
 * @throws {InvalidInputError} when the inputs are impossible
 * @throws {StaleVersionError} when the estimate is, or has become, another version
 */
export async function runEstimate(
  actor: Actor,
  id: string,
  expectedVersion: number,
): Promise<Estimate> {
  authorise(actor, "estimate.run");
  const asked = await reload(id);
  assertVersion(asked, expectedVersion);
  assertPossible("estimate.run", asked);
  const results = toResults(await simulated(asked));
  return inTransaction((transaction) =>
    storeResults(actor, id, expectedVersion, results, transaction),
  );
}

async function simulated({ inputs, trials, sampling, seed }: Estimate): Promise<Simulation> {
  try {
    return await runSimulation(inputs, { trials, sampling, seed });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new InvalidInputError([
      { pointer: toPointer(error.details.input, "inputs"), detail: error.message },
    ]);
  }
}

/** What is kept of a simulation. */
export interface Results {
  summary: SimulationSummary;
  vectors: StoredVectors;
}

/** @throws {RangeError} when a trial has no value */
export function toResults({ summary, vectors }: Simulation): Results {
  return { summary, vectors: encodeVectors(vectors) };
}

/**
 * The one way in which results come to an open estimate. With another number of trials or another method than the
 * estimate had, those become the estimate's own, so that what is shown always belongs to what is written.
 *
 * @throws {StaleVersionError} when the estimate has become another version
 * @throws {ConflictError} when it is no longer open
 */
export async function storeResults(
  actor: Actor,
  id: string,
  expectedVersion: number,
  { summary, vectors }: Results,
  transaction: Transaction,
): Promise<Estimate> {
  authorise(actor, "estimate.run");
  const estimate = await lockEstimate(id, expectedVersion, transaction);
  assertPossible("estimate.run", estimate);
  const { trials, sampling } = estimate;
  const changes = changesBetween(
    { trials, sampling },
    { trials: summary.trials, sampling: summary.sampling ?? sampling },
  );
  await replaceTrials({ estimateId: id, trials: summary.trials, ...vectors }, { transaction });
  estimate.set({
    ...changes.after,
    summary,
    engineVersion: summary.engineVersion,
    computedAt: now(),
  });
  await saveVersioned(estimate, transaction);
  const subject = { actor, entity: "estimate", entityId: id } as const;
  if (Object.keys(changes.after).length > 0) {
    await recordAudit({ ...subject, action: "estimate.updated", ...changes }, transaction);
  }
  await recordAudit(
    { ...subject, action: "estimate.computed", after: headlineOf(summary) },
    transaction,
  );
  return reload(id, transaction);
}

/** Enough of the results for a reader of the audit trail to see what moved. */
export function headlineOf(summary: SimulationSummary) {
  const { engineVersion, seed, trials, sampling, results } = summary;
  const range = ({
    p90,
    p50,
    p10,
    mean,
  }: {
    p90: number;
    p50: number;
    p10: number;
    mean: number;
  }) => ({
    p90,
    p50,
    p10,
    mean,
  });
  return {
    engineVersion,
    seed,
    trials,
    sampling,
    wetGasInPlaceScf: range(results.wetGasInPlaceScf),
    condensateRecoverableStb: range(results.condensateRecoverableStb),
  };
}
