import { DomainError } from "../errors";
import type { DataShape } from "./distribution-schema";
import { empiricalFamily } from "./empirical";
import { requireHonestSigma } from "./parameter-checks";
import { lognormalFamily, normalFamily, type Family } from "./families";

export interface DataFit {
  readonly family: Family;
  /** of the values (normal) or of their natural logarithms (lognormal); null for the values themselves */
  readonly parameters: { readonly mean: number; readonly standardDeviation: number } | null;
}

/**
 * A distribution from measured values: the values themselves, or the normal or lognormal distribution of maximum
 * likelihood, whose mean and standard deviation (divisor n) are those of the values or of their logarithms.
 *
 * @throws {DomainError} when the values are all the same to nine digits or too large or small for a deviation, one is not a number, or a lognormal has a value of 0 or below;
 *   `input` is `values` or a path such as `values.3`
 */
export function fitData(shape: DataShape, values: readonly number[]): DataFit {
  values.forEach((value, i) => {
    if (Number.isFinite(value)) return;
    throw new DomainError(`Value ${i + 1} must be a number.`, { input: `values.${i}`, value });
  });
  if (values.every((value) => value === values[0])) {
    throw new DomainError(
      `All ${values.length} values are ${values[0]}. For a value without uncertainty use a constant.`,
      { input: "values", value: values[0] },
    );
  }
  const parameters = likeliest(values);
  requireSpread(values, parameters.standardDeviation);
  if (shape === "empirical") return { family: empiricalFamily(values), parameters: null };
  if (shape === "normal") {
    return {
      family: normalFamily(parameters.mean, parameters.standardDeviation),
      parameters,
    };
  }
  const wrong = values.findIndex((value) => !(value > 0));
  if (wrong >= 0) {
    throw new DomainError(
      `A lognormal distribution lies above 0 throughout; value ${wrong + 1} is ${values[wrong]}.`,
      { input: `values.${wrong}`, value: values[wrong] },
    );
  }
  const ofLogs = likeliest(values.map((value) => Math.log(value)));
  requireHonestSigma("values", ofLogs.standardDeviation);
  return {
    family: lognormalFamily(ofLogs.mean, ofLogs.standardDeviation),
    parameters: ofLogs,
  };
}

/** Measured values that differ by less, relative to the largest, differ by rounding alone. */
const LEAST_SPREAD = 1e-9;

/** What passes has logarithms that vary as well: they differ by at least the difference over the larger value. */
function requireSpread(values: readonly number[], standardDeviation: number): void {
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  if (!Number.isFinite(standardDeviation) || !(largest > Number.MIN_VALUE / Number.EPSILON)) {
    throw new DomainError("The values are too large or too small to be measured values.", {
      input: "values",
      value: largest,
    });
  }
  if (standardDeviation > LEAST_SPREAD * largest) return;
  throw new DomainError(
    `The ${values.length} values differ by less than a billionth of the largest, ${largest}, which is rounding. For a ` +
      "value without uncertainty use a constant.",
    { input: "values", value: largest },
  );
}

/** Mean, and standard deviation with divisor n. */
function likeliest(values: readonly number[]) {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, standardDeviation: Math.sqrt(squares / values.length) };
}
