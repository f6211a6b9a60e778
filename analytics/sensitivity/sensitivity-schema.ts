import { z } from "zod";
import { driverNames, rangeSchema } from "../volumetrics/results-schema";

const driverName = z.enum(driverNames);
/** an estimate from a sample, with one standard error */
const estimated = z.object({ value: z.number(), standardError: z.number() });

/**
 * Rank regression of one result on all inputs at once. A coefficient says by how many standard deviations of rank the
 * result moves when one input moves by one, the others held.
 */
export const rankRegressionSchema = z.object({
  /** share of the variance of ranks that the regression explains, 0 to 1 */
  rSquared: z.number(),
  coefficients: z.array(z.object({ input: driverName, coefficient: z.number() })),
  /** inputs that vary but have no coefficient, and why: their ranks follow from those of others */
  leftOut: z.array(z.object({ input: driverName, reason: z.string() })),
});

/**
 * Variance-based shares. Inputs that are rank-correlated are one factor together: only independent factors have such
 * shares. As estimated: sampling can put a share a little below 0 or above 1, or a first one above its total.
 */
export const varianceSharesSchema = z.object({
  /** size of each base sample and number of evaluations of the model that it took */
  baseRuns: z.number().int(),
  evaluations: z.number().int(),
  factors: z.array(
    z.object({
      inputs: z.array(driverName).min(1),
      /** share of the variance that goes when the factor alone is known */
      first: estimated,
      /** share of the variance that stays when everything but the factor is known */
      total: estimated,
    }),
  ),
});

/**
 * What it is worth to know one input exactly, on average over what it may turn out to be. As estimated: sampling can put
 * the share of an input of no importance a little below 0.
 */
export const knowingSchema = z.object({
  input: driverName,
  /** expected share of the variance that goes; right with correlated inputs too */
  varianceRemoved: z.number(),
  /** expected P90-P10 width of the result once the input is known, over the width now */
  remainingWidth: z.number(),
});

/** Trials whose result lies between two chances, and what their inputs have in common. */
export const conditionalViewSchema = z.object({
  /** cumulative probabilities of the result, 0 to 1: 0.9 to 1 are the trials above P10 */
  from: z.number(),
  to: z.number(),
  trials: z.number().int(),
  /** of the result, among the chosen trials */
  result: rangeSchema,
  inputs: z.array(
    z.object({
      input: driverName,
      all: rangeSchema,
      chosen: rangeSchema,
      /** mean rank of the chosen trials, 0 to 1; 0.5 for an input that does not matter */
      meanRank: z.number(),
    }),
  ),
});

export const sensitivitySchema = z.object({
  trials: z.number().int(),
  rankRegression: rankRegressionSchema,
  varianceShares: varianceSharesSchema,
  /** most worth knowing first */
  knowing: z.array(knowingSchema),
  conditional: conditionalViewSchema,
});
export type Sensitivity = z.infer<typeof sensitivitySchema>;

/** What can be asked for by itself. */
export const sensitivityParts = [
  "rankRegression",
  "varianceShares",
  "knowing",
  "conditional",
] as const;
export type SensitivityPart = (typeof sensitivityParts)[number];
/** The parts that were asked for. */
export const sensitivityAnswerSchema = sensitivitySchema.partial().required({ trials: true });
export type SensitivityAnswer = z.infer<typeof sensitivityAnswerSchema>;

const singleChanges = [
  z.object({ kind: z.literal("input"), input: driverName }),
  z.object({ kind: z.enum(["correlations", "fluid", "recoveryPlan", "sampling"]) }),
] as const;
const singleChangeSchema = z.discriminatedUnion("kind", singleChanges);
export type SingleChange = z.infer<typeof singleChangeSchema>;

/**
 * Something that differs between two estimates; `sampling` is seed, method and number of trials. `together` are
 * differences of which one without the others makes no estimate (inputs of one set of cases, for instance).
 */
export const changeSchema = z.discriminatedUnion("kind", [
  ...singleChanges,
  z.object({ kind: z.literal("together"), changes: z.array(singleChangeSchema).min(2) }),
]);
export type Change = z.infer<typeof changeSchema>;

/** How much each difference explains of the move of one percentile; the effects add up to the move. */
export const changeExplanationSchema = z.object({
  /** the percentile at both ends, on the trials that the effects were worked out with */
  from: z.number(),
  to: z.number(),
  /** the same of the two estimates on all their trials; differs where those are more than `trials` */
  own: z.object({ from: z.number(), to: z.number() }),
  trials: z.number().int(),
  /** effects are averaged over all orders of making the changes, or over this many drawn at random */
  orders: z.union([z.literal("all"), z.number().int()]),
  changes: z.array(
    z.object({
      change: changeSchema,
      effect: z.number(),
      /** of the average over drawn orders; null when all were taken */
      standardError: z.number().nullable(),
    }),
  ),
});
export type ChangeExplanation = z.infer<typeof changeExplanationSchema>;
