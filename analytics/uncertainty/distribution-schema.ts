import { z } from "zod";

const finite = z.number().refine(Number.isFinite, "must be a finite number");

/** Bounds that physics sets. The distribution is conditioned on lying inside them; the lost mass is reported. */
const truncation = { minimum: finite.optional(), maximum: finite.optional() };

/**
 * How an uncertain input is described. P90 is the low case (90 % chance of at least this much), P10 the high case.
 * The shape only; `distribution.ts` refuses parameters that make no distribution (low above high, negative spread).
 */
export const distributionSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("constant"), value: finite }).strict(),
  z.object({ kind: z.literal("uniform"), low: finite, high: finite, ...truncation }).strict(),
  z
    .object({
      kind: z.literal("triangular"),
      low: finite,
      mode: finite,
      high: finite,
      ...truncation,
    })
    .strict(),
  z
    .object({ kind: z.literal("pert"), low: finite, mode: finite, high: finite, ...truncation })
    .strict(),
  z
    .object({ kind: z.literal("normal"), mean: finite, standardDeviation: finite, ...truncation })
    .strict(),
  /** `mu` and `sigma` are the mean and standard deviation of the natural logarithm */
  z.object({ kind: z.literal("lognormal"), mu: finite, sigma: finite, ...truncation }).strict(),
  z.object({ kind: z.literal("normalP90P10"), p90: finite, p10: finite, ...truncation }).strict(),
  z
    .object({ kind: z.literal("lognormalP90P10"), p90: finite, p10: finite, ...truncation })
    .strict(),
]);

export type Distribution = z.infer<typeof distributionSchema>;
export type DistributionKind = Distribution["kind"];
