/** Checks of a distribution's parameters, with the words of their refusals. */
import { DomainError } from "../errors";

const NAMES: Record<string, string> = {
  p10: "P10 (the high case)",
  p90: "P90 (the low case)",
  high: "high value",
  low: "low value",
  maximum: "maximum",
  minimum: "minimum",
};

export function requireFinite(input: string, value: number): number {
  if (!Number.isFinite(value)) {
    throw new DomainError(`The ${input} must be a number.`, { input, value });
  }
  return value;
}

/**
 * Largest standard deviation of the logarithm of one input: its P10 is then 168 times its P90, and one value in a
 * hundred is above 100 times its P50. A wider one says that the input is not known at all, and its mean comes from values
 * that nobody has thought of. Common practice, no source.
 */
export const MOST_SIGMA = 2;

/** @param sigma  of a lognormal distribution, > 0 */
export function requireHonestSigma(input: string, sigma: number): void {
  // A P90 and a P10 that were worked out from the largest sigma come back with their last digits rounded.
  if (sigma <= MOST_SIGMA * (1 + 1e-6)) return;
  throw new DomainError(
    `The logarithm would have a standard deviation of ${Number(sigma.toPrecision(4))}; no input is so uncertain that it ` +
      `has more than ${MOST_SIGMA} (a P10 of 168 times the P90). Its mean would rest on values that nobody has thought of.`,
    { input, value: sigma },
  );
}

export function requireAbove(input: string, value: number, other: string, bound: number): void {
  requireFinite(input, value);
  requireFinite(other, bound);
  if (value > bound) return;
  const advice = value === bound ? " For a value without uncertainty use a constant." : "";
  throw new DomainError(
    `The ${NAMES[input]}, ${value}, must be greater than the ${NAMES[other]}, ${bound}.${advice}`,
    { input, value },
  );
}

export function requireMode(d: { low: number; mode: number; high: number }): void {
  if (requireFinite("mode", d.mode) >= d.low && d.mode <= d.high) return;
  throw new DomainError(
    `The most likely value, ${d.mode}, must lie between the low value, ${d.low}, and the high value, ${d.high}.`,
    { input: "mode", value: d.mode },
  );
}

export function requirePositive(input: string, name: string, value: number): void {
  if (requireFinite(input, value) > 0) return;
  throw new DomainError(`${name} must be greater than 0; ${value} is not.`, { input, value });
}

export function requireProbability(p: number): void {
  if (p >= 0 && p <= 1) return;
  throw new DomainError(`A probability lies between 0 and 1; ${p} does not.`, {
    input: "p",
    value: p,
  });
}
