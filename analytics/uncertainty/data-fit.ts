import { DomainError } from "../errors";
import type { DataShape } from "./distribution-schema";
import { empiricalFamily } from "./empirical";
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
 * @throws {DomainError} when the values are all the same, one is not a number, or a lognormal has a value of 0 or below;
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
  if (shape === "empirical") return { family: empiricalFamily(values), parameters: null };
  if (shape === "normal") {
    const parameters = likeliest(values);
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
  const parameters = likeliest(values.map((value) => Math.log(value)));
  return {
    family: lognormalFamily(parameters.mean, parameters.standardDeviation),
    parameters,
  };
}

/** Mean, and standard deviation with divisor n. */
function likeliest(values: readonly number[]) {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, standardDeviation: Math.sqrt(squares / values.length) };
}
