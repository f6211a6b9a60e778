import { createOrderWorkspace } from "../numerics/order-statistics";
import { summariseSample, type SampleSummary } from "../uncertainty/summary";
import { vectorNames, type VectorName } from "../volumetrics/results-schema";
import type { FieldTrials } from "./field-trials";

/**
 * Percentiles, moments and curve of each quantity of a field, gross and unrisked.
 *
 * @param field  its trials in the order of the portfolio
 */
export function summariseField({ volumes }: FieldTrials): Record<VectorName, SampleSummary> {
  const trials = volumes.condensateRecoverableStb.length;
  const counting = createOrderWorkspace(trials);
  return Object.fromEntries(
    vectorNames.map((name) => [name, summariseSample(volumes[name], trials, counting)]),
  ) as Record<VectorName, SampleSummary>;
}
