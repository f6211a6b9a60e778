import { DomainError } from "../errors";
import { halfWidth95, replicatesOf } from "../uncertainty/replicates";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import type { EstimateInputs } from "./inputs-schema";
import type { Range, SimulationSummary } from "./results-schema";
import { simulate, type Simulation } from "./simulate";
import { FEWEST_SOBOL_TRIALS } from "./trial-counts";

export interface SettleOptions {
  seed: number;
  sampling: SamplingMethod;
  /** half-width of the 95 % interval of P90, P50 and P10 of gas and of condensate, as a share of each */
  tolerance: number;
  /** stop here even if they are not that well known */
  mostTrials: number;
  /** called after every doubling, the last one too */
  onStep?: (step: SettleStep) => void;
}

/** What is known after one doubling. */
export interface SettleStep {
  trials: number;
  /** largest half-width of a 95 % interval over its percentile, of the percentiles that count */
  worst: number;
  condensateRecoverableStb: Range;
  /** of the condensate */
  standardErrors: Range;
}

export interface SettledSimulation {
  simulation: Simulation;
  /** whether the percentiles are as well known as was asked */
  settled: boolean;
  steps: SettleStep[];
}

/**
 * Twice as many trials, from 1,024 on, until the percentiles of wet gas in place and recoverable condensate are known to
 * the tolerance: until the half-width of the 95 % interval of each is at most that share of it. The result is exactly the
 * plain run with that number of trials.
 *
 * To stop because an error looks small favours errors that look smaller than they are, so the chance that all six
 * percentiles lie within the tolerance is below 95 %; doubling, which looks at few errors, keeps that small. One run at a
 * time is held in memory, about 200 bytes a trial.
 *
 * @see A. M. Law, Simulation Modeling and Analysis, 5th ed. (2015), section 9.4.1 (relative precision, doubling); Y. S.
 *      Chow, H. Robbins, On the asymptotic theory of fixed-width sequential confidence intervals for the mean, Ann.
 *      Math. Stat. 36 (1965) 457-462 (why it is right in the limit)
 * @throws {DomainError} as `simulate`, and when the tolerance is not above 0 or there is no room for the first run
 */
export function simulateUntilSettled(
  inputs: EstimateInputs,
  { seed, sampling, tolerance, mostTrials, onStep }: SettleOptions,
): SettledSimulation {
  if (!(tolerance > 0)) {
    throw new DomainError(`The tolerance is above 0; ${tolerance} is not.`, {
      input: "tolerance",
      value: tolerance,
    });
  }
  if (!(mostTrials >= FEWEST_SOBOL_TRIALS)) {
    throw new DomainError(`At least ${FEWEST_SOBOL_TRIALS} trials are needed to begin.`, {
      input: "mostTrials",
      value: mostTrials,
    });
  }
  const steps: SettleStep[] = [];
  for (let trials = FEWEST_SOBOL_TRIALS; ; trials *= 2) {
    const simulation = simulate(inputs, { trials, seed, sampling });
    const step = stepOf(simulation.summary);
    steps.push(step);
    onStep?.(step);
    const settled = step.worst <= tolerance;
    if (settled || trials * 2 > mostTrials) return { simulation, settled, steps };
  }
}

function stepOf({ trials, results }: SimulationSummary): SettleStep {
  const halfWidth = halfWidth95(replicatesOf(trials));
  const widths = [results.wetGasInPlaceScf, results.condensateRecoverableStb].flatMap((result) =>
    (["p90", "p50", "p10"] as const).map((name) => {
      const error = result.standardErrors[name];
      // A result that is always 0 is known.
      return error === 0 ? 0 : (halfWidth * error) / Math.abs(result[name]);
    }),
  );
  const { p90, p50, p10, mean, standardErrors } = results.condensateRecoverableStb;
  return {
    trials,
    worst: Math.max(...widths),
    condensateRecoverableStb: { p90, p50, p10, mean },
    standardErrors,
  };
}
