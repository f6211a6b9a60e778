/** How trials are drawn, what each way needs, and what is typed about it. */
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import { FEWEST_SOBOL_TRIALS, TRIALS_RANGE } from "@/analytics/volumetrics/trial-counts";

export const samplingLabels: Record<SamplingMethod, string> = {
  latinHypercube: "Latin hypercube",
  sobol: "Sobol points",
};

export const samplingNotes: Record<SamplingMethod, string> = {
  latinHypercube:
    "Each input's range is cut into as many equally likely slices as there are trials, and one value is taken from each slice. Any number of trials will do.",
  sobol:
    "A sequence of points that fills the space of all inputs evenly, scrambled at random. It does so in powers of two only: 1,024 trials, 2,048, 4,096 and so on.",
};

export const seedNote =
  "The same seed draws the same trials again, digit for digit. Leave it as it is from revision to revision, and what moves is the inputs, not the dice.";

/** Fewest and most trials of an estimate. */
export const ESTIMATE_TRIALS = [1_000, TRIALS_RANGE[1]] as const;

/** Numbers of trials that Sobol points come in, ascending. */
export function sobolTrials(): number[] {
  const numbers: number[] = [];
  for (let trials = FEWEST_SOBOL_TRIALS; trials <= TRIALS_RANGE[1]; trials *= 2) {
    numbers.push(trials);
  }
  return numbers;
}

/** The power of two that is nearest by ratio: 10,000 becomes 8,192. */
export function nearestSobolTrials(trials: number): number {
  const distance = (candidate: number) => Math.abs(Math.log(candidate / trials));
  return sobolTrials().reduce((best, next) => (distance(next) < distance(best) ? next : best));
}

/** Reads a whole number as people group it; the reason in words when it is none. */
export function readWhole(text: string, [low, high]: readonly [number, number]): number | string {
  const digits = text.trim().replace(/[,'’ \u00a0\u2009\u202f]/g, "");
  const value = Number(digits);
  if (!/^\d+$/.test(digits) || value < low || value > high) {
    return `A whole number from ${low.toLocaleString("en-US")} to ${high.toLocaleString("en-US")}.`;
  }
  return value;
}

export const MOST_SEED = 2_147_483_647;
