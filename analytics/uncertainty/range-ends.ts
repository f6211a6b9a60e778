import { DomainError } from "../errors";
import { betaQuantile } from "../numerics/beta";
import { findRoot } from "../numerics/root";
import type { RangeEnds } from "./distribution-schema";

/** A range by its most likely value and where it ends, in the unit of the quantity. */
export interface Limits {
  readonly low: number;
  readonly mode: number;
  readonly high: number;
}

/** Most-likely shapes: both have one shape number, the place of the mode within the limits. */
export type ModeFamily = "triangular" | "pert";

const NAMES: Record<ModeFamily, string> = { triangular: "triangular", pert: "PERT" };

/** Chance below the low figure, and above the high one. */
const TAILS: Record<Exclude<RangeEnds, "limits">, number> = { p90p10: 0.1, p95p05: 0.05 };
const FIGURES: Record<Exclude<RangeEnds, "limits">, readonly [string, string]> = {
  p90p10: ["P90", "P10"],
  p95p05: ["P95", "P05"],
};

/**
 * Quantile of the family between 0 and 1 with its mode at `share`, 0 to 1.
 *
 * Triangular: sqrt(p share) below the mode, 1 - sqrt((1 - p)(1 - share)) above. PERT: beta with shapes 1 + 4 share and
 * 5 - 4 share.
 */
export function unitQuantile(family: ModeFamily, p: number, share: number): number {
  if (family === "pert") return betaQuantile(p, 1 + 4 * share, 5 - 4 * share);
  return p < share ? Math.sqrt(p * share) : 1 - Math.sqrt((1 - p) * (1 - share));
}

/**
 * The limits of a triangular or PERT distribution with a given mode whose low and high are its ends, its P90 and P10,
 * or its P95 and P05. With q1 and q2 the family's unit quantiles at the two chances, the place t of the mode solves
 *
 *     (t - q1(t)) / (q2(t) - q1(t)) = (mode - low) / (high - low)
 *
 * whose left side rises with t; the width of the limits then follows from high - low.
 *
 * @throws {DomainError} when the mode lies so far outside low to high that no such distribution has them; `input` is
 *   `mode`
 */
export function limitsOf(range: Limits & { kind: ModeFamily; ends?: RangeEnds }): Limits {
  const { kind, ends = "limits", low, mode, high } = range;
  if (ends === "limits") return { low, mode, high };
  const tail = TAILS[ends];
  const place = (share: number) => {
    const q1 = unitQuantile(kind, tail, share);
    return (share - q1) / (unitQuantile(kind, 1 - tail, share) - q1);
  };
  const wanted = (mode - low) / (high - low);
  if (!Number.isFinite(mode) || wanted < place(0) || wanted > place(1)) {
    const width = high - low;
    const [lowName, highName] = FIGURES[ends];
    const figure = (value: number) => Number(value.toPrecision(5));
    throw new DomainError(
      `No ${NAMES[kind]} distribution with its most likely value at ${mode} has its ${lowName} at ${low} and its ` +
        `${highName} at ${high}. The most likely value must lie between ${figure(low + place(0) * width)} and ` +
        `${figure(low + place(1) * width)}.`,
      { input: "mode", value: mode },
    );
  }
  const share = findRoot((t) => place(t) - wanted, 0, 1);
  const q1 = unitQuantile(kind, tail, share);
  const width = (high - low) / (unitQuantile(kind, 1 - tail, share) - q1);
  // From the mode rather than from low, so that the mode stays inside whatever the rounding.
  return { low: mode - share * width, mode, high: mode + (1 - share) * width };
}
