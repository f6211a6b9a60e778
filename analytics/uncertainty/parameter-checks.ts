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
