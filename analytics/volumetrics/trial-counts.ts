import { DomainError } from "../errors";
import type { SamplingMethod } from "../uncertainty/sampling-schema";

/** Fewer say nothing about a P90; more need more memory than a request should take. */
export const TRIALS_RANGE = [100, 1_048_576] as const;

/** A net of fewer points, cut into the replicates that its error is read from, is not worth its name. */
export const FEWEST_SOBOL_TRIALS = 1_024;

/**
 * What a new estimate gets unless somebody says otherwise: the fewest Sobol points that know P90 and P10 of gas in place
 * and of recoverable condensate to about half a per cent. A Latin hypercube needs four times as many.
 */
export const DEFAULT_SAMPLING: SamplingMethod = "sobol";
export const DEFAULT_TRIALS = 16_384;

/** Whether scrambled Sobol points can be this many: a power of two, at least 1,024. */
export function suitsSobol(trials: number): boolean {
  return (
    Number.isInteger(trials) &&
    trials >= FEWEST_SOBOL_TRIALS &&
    trials <= TRIALS_RANGE[1] &&
    (trials & (trials - 1)) === 0
  );
}

/** The default method where it can have this many trials, else a Latin hypercube, which can have any number. */
export function samplingFor(trials: number): SamplingMethod {
  return suitsSobol(trials) ? DEFAULT_SAMPLING : "latinHypercube";
}

/**
 * @throws {DomainError} unless the trials are a whole number from 100 to 1,048,576, and a power of two from 1,024 for
 *   scrambled Sobol points, which fill space evenly in powers of two only
 */
export function checkTrials(trials: number, sampling: SamplingMethod): void {
  const [fewest, most] = TRIALS_RANGE;
  if (!Number.isInteger(trials) || trials < fewest || trials > most) {
    throw new DomainError(
      `The number of trials is a whole number from ${fewest} to ${most.toLocaleString("en-GB")}; ${trials} is not.`,
      { input: "trials", value: trials },
    );
  }
  if (sampling === "sobol" && !suitsSobol(trials)) {
    throw new DomainError(
      `Sobol points come in powers of two from ${FEWEST_SOBOL_TRIALS.toLocaleString("en-GB")}: 1,024, 2,048, 4,096 ` +
        `and so on; ${trials.toLocaleString("en-GB")} is not one of them.`,
      { input: "trials", value: trials },
    );
  }
}
