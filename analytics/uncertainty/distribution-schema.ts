import { z } from "zod";

const finite = z.number().refine(Number.isFinite, "must be a finite number");

/** Bounds that physics sets. The distribution is conditioned on lying inside them; the lost mass is reported. */
const truncation = { minimum: finite.optional(), maximum: finite.optional() };

/**
 * What the low and the high figure of a most-likely/low/high range mean: the ends of what is possible, or values that
 * are exceeded with a chance of 90 % and 10 %, or 95 % and 5 %. Left out they are the ends.
 */
export const rangeEnds = ["limits", "p90p10", "p95p05"] as const;
export type RangeEnds = (typeof rangeEnds)[number];
const ends = { ends: z.enum(rangeEnds).optional() };

/** Families that are fitted through stated percentiles; the last three need three of them. */
export const percentileFamilies = [
  "normal",
  "lognormal",
  "shiftedLognormal",
  "triangular",
  "pert",
] as const;
export type PercentileFamily = (typeof percentileFamilies)[number];

/**
 * Chances that a stated percentile may have. Nobody knows what is exceeded once in 10,000 times, and a figure further out
 * would set the whole distribution by the part of it that is known least.
 */
export const EXCEEDANCES = [0.0001, 0.9999] as const;
const EXCEEDANCE_REASON = "must lie between 0.0001 and 0.9999: nobody knows what lies further out";

/** How pasted data become a distribution. */
export const dataShapes = ["empirical", "normal", "lognormal"] as const;
export type DataShape = (typeof dataShapes)[number];
/** Fewer say nothing of a shape; more belong in a file. Of an input with cases, the most holds for all of them together. */
export const DATA_VALUES = [5, 2_000] as const;

const simpleKinds = [
  z.object({ kind: z.literal("constant"), value: finite }).strict(),
  z.object({ kind: z.literal("uniform"), low: finite, high: finite, ...truncation }).strict(),
  z
    .object({
      kind: z.literal("triangular"),
      low: finite,
      mode: finite,
      high: finite,
      ...ends,
      ...truncation,
    })
    .strict(),
  z
    .object({
      kind: z.literal("pert"),
      low: finite,
      mode: finite,
      high: finite,
      ...ends,
      ...truncation,
    })
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
  z
    .object({
      kind: z.literal("percentiles"),
      family: z.enum(percentileFamilies),
      /** `exceedance` is the chance of at least `value`: 0.9 for a P90 */
      points: z
        .array(
          z
            .object({
              exceedance: z
                .number()
                .min(EXCEEDANCES[0], EXCEEDANCE_REASON)
                .max(EXCEEDANCES[1], EXCEEDANCE_REASON),
              value: finite,
            })
            .strict(),
        )
        .min(2)
        .max(3),
      ...truncation,
    })
    .strict(),
  z
    .object({
      kind: z.literal("data"),
      shape: z.enum(dataShapes),
      values: z.array(finite).min(DATA_VALUES[0]).max(DATA_VALUES[1]),
      ...truncation,
    })
    .strict(),
] as const;

/** A distribution that is not made of others. */
export const simpleDistributionSchema = z.discriminatedUnion("kind", simpleKinds);
export type SimpleDistribution = z.infer<typeof simpleDistributionSchema>;

/** One of several things that may be true, with its chance and what the input is then. */
export const scenarioSchema = z
  .object({
    name: z.string().trim().min(1).max(60),
    /** chance of the case; those of one input add up to 1 */
    weight: z.number().gt(0).lt(1),
    distribution: simpleDistributionSchema,
  })
  .strict();
export type Scenario = z.infer<typeof scenarioSchema>;

function countValues(scenarios: readonly Scenario[]): number {
  return scenarios.reduce(
    (count, { distribution: d }) => count + (d.kind === "data" ? d.values.length : 0),
    0,
  );
}

/**
 * How an uncertain input is described. P90 is the low case (90 % chance of at least this much), P10 the high case.
 * The shape only; `distribution.ts` refuses parameters that make no distribution (low above high, negative spread).
 */
export const distributionSchema = z.discriminatedUnion("kind", [
  ...simpleKinds,
  z
    .object({
      kind: z.literal("scenarios"),
      /**
       * inputs that name the same set take the same case in every trial (a deeper gas-water contact is a larger area AND
       * a thicker column); their cases then have the same names and weights
       */
      caseSet: z.string().trim().min(1).max(60).optional(),
      scenarios: z
        .array(scenarioSchema)
        .min(2)
        .max(12)
        .refine(
          (scenarios) => countValues(scenarios) <= DATA_VALUES[1],
          `may have ${DATA_VALUES[1].toLocaleString("en-GB")} measured values in all their cases together: more belong in ` +
            "a file, of which a case takes the average or the percentiles",
        ),
    })
    .strict(),
]);

export type Distribution = z.infer<typeof distributionSchema>;
export type DistributionKind = Distribution["kind"];
