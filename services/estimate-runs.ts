import { DomainError } from "@/analytics/errors";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { Estimate } from "@/models/estimate";
import { replaceTrials } from "@/models/queries/estimates";
import { recordAudit } from "./audit";
import { now } from "./clock";
import { runSimulation } from "./compute/pool";
import { InvalidInputError, toPointer } from "./errors";
import { assertPossible } from "./estimate-states";
import { lockEstimate, reload } from "./estimates";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { encodeVectors } from "./trial-vectors";
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
  const { summary, vectors } = await simulated(asked);
  const stored = encodeVectors(vectors);

  return inTransaction(async (transaction) => {
    const estimate = await lockEstimate(id, expectedVersion, transaction);
    assertPossible("estimate.run", estimate);
    await replaceTrials({ estimateId: id, trials: summary.trials, ...stored }, { transaction });
    estimate.set({ summary, engineVersion: summary.engineVersion, computedAt: now() });
    await saveVersioned(estimate, transaction);
    await recordAudit(
      {
        actor,
        action: "estimate.computed",
        entity: "estimate",
        entityId: id,
        after: headlineOf(summary),
      },
      transaction,
    );
    return reload(id, transaction);
  });
}

async function simulated({ inputs, trials, sampling, seed }: Estimate) {
  try {
    return await runSimulation(inputs, { trials, sampling, seed });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new InvalidInputError([
      { pointer: toPointer(error.details.input, "inputs"), detail: error.message },
    ]);
  }
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
