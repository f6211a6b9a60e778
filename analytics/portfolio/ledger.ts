import { DomainError } from "../errors";
import {
  countSample,
  createOrderWorkspace,
  type OrderWorkspace,
} from "../numerics/order-statistics";
import { rankByCounting } from "../numerics/ranking";
import { rangeOfSample, summariseSample, type SampleSummary } from "../uncertainty/summary";
import { vectorNames, type Range, type VectorName } from "../volumetrics/results-schema";
import {
  contributionErrors,
  createContributions,
  type Contribution,
  type ContributionFit,
} from "./contributions";
import type { FieldTrials, TrialVector } from "./field-trials";
import { rankTrials, type RankSpread } from "./rank-trials";
import { scaleRange } from "./ranking";

export type VolumeRanges = Record<VectorName, Range>;

/** A field's own ranges, gross: should it come for certain, and as it comes or not. */
export interface FieldFigures {
  certain: VolumeRanges;
  yesNo: VolumeRanges;
}

/** One field with its trials in the order of the portfolio. */
export interface LedgerField {
  id: string;
  /** the field's address: sums are added in its order, so that they are the same in any */
  slug: string;
  basinId: string;
  /** PRMS class, or whatever else totals are wanted by */
  classId: string;
  trials: FieldTrials;
  figures: FieldFigures;
  /** what the company has of it: 1 for gross, the net revenue interest for net */
  interest: number;
  /** chance of commerciality */
  chance: number;
  /** fewest trials among its reservoirs' estimates: how much there is behind its percentiles */
  sourceTrials: number;
}

/**
 * How the chance of commerciality counts. `unrisked`: every field comes. `risked`: every trial of a field is
 * multiplied by its chance, which gives the mean exactly but not the spread of success and failure. `yesNo`: a field is
 * there or not, drawn trial by trial, independently of other fields and of its volumes.
 */
export type Risking = "unrisked" | "risked" | "yesNo";

export interface LedgerOptions {
  risk: Risking;
  /** place every field among the others, trial by trial */
  withRanks: boolean;
}

export interface LedgerGroup {
  /** trial by trial */
  ranges: VolumeRanges;
  /** of the variance of the total's recoverable condensate, by covariance; the shares of all groups add up to 1 */
  shareOfVariance: number;
}

export interface LedgerEntry {
  ranges: VolumeRanges;
  /** to the total's recoverable condensate [STB] */
  contribution: Contribution;
  /** one standard error of the contribution [STB], of sampling alone */
  contributionErrors: Range;
}

export interface Ledger {
  trials: number;
  fields: Record<string, LedgerEntry>;
  basins: Record<string, LedgerGroup>;
  classes: Record<string, LedgerGroup>;
  total: VolumeRanges;
  /** of the total's recoverable condensate; standard errors as `computeLedger` says */
  condensate: Pick<
    SampleSummary,
    "exceedance" | "standardErrors" | "minimum" | "maximum" | "standardDeviation"
  >;
  /** chance that the total's recoverable condensate reaches the sum of the fields' P90s, 0 to 1 */
  chanceOfSummedP90: number;
  /** chance that no field comes at all, 0 to 1: the product of their chances of not coming; null unless `yesNo` */
  chanceOfNothing: number | null;
  /** where each field stands among the others; null unless asked for */
  ranks: Record<string, RankSpread> | null;
}

/**
 * Fields, basins, classes and the total of some fields, added up trial by trial from trials in the portfolio's order.
 * Percentiles of a total describe the portfolio; they are not reserves of any category.
 *
 * Standard errors of the total are on the safe side; they hold what sampling leaves open, not whether the inputs are
 * right. Percentiles have those of independent trials, with an effective number of them: each field counts by its share
 * of the variance, with the trials of the total or of its own estimates, whichever are fewer, because repeated rows say
 * nothing new. The factors and the draws behind them are evenly spread, so that the errors are smaller in fact. Means
 * add, and estimates are drawn independently of each other whatever their dependence here, so the mean has the root of
 * the fields' own squared errors; those of Latin hypercubes and Sobol' points are smaller again.
 *
 * @param fields  at least one; all with the same number of trials
 * @returns       volumes in the units of the vectors, times interest and, as `risk` says, chance
 * @throws {DomainError} when there are no fields, one occurs twice, or an interest is negative
 */
export function computeLedger(fields: readonly LedgerField[], options: LedgerOptions): Ledger {
  const sorted = inOrder(fields);
  const trials = sorted[0].trials.comes.length;
  const counting = createOrderWorkspace(trials);
  const total = emptyVectors(trials);
  const classes = new Map<string, Vectors>();
  const basinRanges: [string, VolumeRanges][] = [];

  const basin = emptyVectors(trials);
  for (const [basinId, inBasin] of groupBy(sorted, ({ basinId: id }) => id)) {
    for (const name of vectorNames) basin[name].fill(0);
    for (const [classId, inClass] of groupBy(inBasin, ({ classId: id }) => id)) {
      // One pass over the fields feeds basin, class and total: the sums of a class within a basin are added to all.
      const sums = emptyVectors(trials);
      for (const field of inClass) addField(sums, field, options.risk);
      addVectors(basin, sums);
      const known = classes.get(classId);
      if (known) addVectors(known, sums);
      else classes.set(classId, sums);
    }
    addVectors(total, basin);
    basinRanges.push([basinId, rangesOf(basin, counting)]);
  }

  const condensate = total.condensateRecoverableStb;
  const summary = summariseSample(condensate, trials, counting);
  const { entries, standardErrors } = entriesOf(
    sorted,
    condensate,
    summary,
    counting,
    options.risk,
  );
  const shareOf = (belongs: (field: LedgerField) => boolean) =>
    sorted
      .filter(belongs)
      .reduce((sum, { id }) => sum + entries[id].contribution.shareOfVariance, 0);
  const summedP90 = sorted.reduce(
    (sum, { id }) => sum + entries[id].ranges.condensateRecoverableStb.p90,
    0,
  );
  const { exceedance, minimum, maximum, standardDeviation } = summary;
  return {
    trials,
    fields: entries,
    basins: Object.fromEntries(
      basinRanges.map(([id, ranges]) => [
        id,
        { ranges, shareOfVariance: shareOf(({ basinId }) => basinId === id) },
      ]),
    ),
    classes: Object.fromEntries(
      [...classes].map(([id, vectors]) => [
        id,
        {
          ranges: rangesOf(vectors, counting),
          shareOfVariance: shareOf(({ classId }) => classId === id),
        },
      ]),
    ),
    total: rangesOf(total, counting),
    condensate: {
      exceedance,
      minimum,
      maximum,
      standardDeviation,
      standardErrors,
    },
    chanceOfSummedP90: shareAtLeast(condensate, summedP90),
    chanceOfNothing:
      options.risk === "yesNo"
        ? sorted.reduce((product, { chance }) => product * (1 - chance), 1)
        : null,
    ranks: options.withRanks ? ranksOf(sorted, options.risk) : null,
  };
}

/**
 * A field's own ranges, from its trials.
 *
 * @param workspace  for at least as many values as there are trials
 */
export function figuresOf(
  { volumes, comes }: FieldTrials,
  workspace: OrderWorkspace,
): FieldFigures {
  const certain = rangesOf(volumes, workspace);
  const successes = Uint32Array.from(comes.keys()).filter((trial) => comes[trial] === 1);
  if (successes.length === comes.length) return { certain, yesNo: certain };
  const drawn = new Float64Array(successes.length);
  const yesNo = {} as VolumeRanges;
  for (const name of vectorNames) {
    const values = volumes[name];
    for (let i = 0; i < drawn.length; i += 1) drawn[i] = values[successes[i]];
    yesNo[name] = rangeWithZeros(drawn, comes.length, workspace);
  }
  return { certain, yesNo };
}

/**
 * R-7 percentiles and mean of a sample of `count` values of which all but these are zeros; found among the rest alone,
 * because half a sample of equals is slow to sort.
 *
 * @param values  0 or more
 */
function rangeWithZeros(values: Float64Array, count: number, workspace: OrderWorkspace): Range {
  const zeros = count - values.length;
  if (values.length === 0) return { p90: 0, p50: 0, p10: 0, mean: 0 };
  const last = Math.max(1, values.length - 1);
  /** the place among the rest, from 0 for the smallest; below it lie the zeros */
  const places = [0.1, 0.5, 0.9].map((p) => (count - 1) * p - zeros);
  const shares = places.map((place) => Math.min(1, Math.max(0, place / last)));
  const { quantiles, mean, minimum } = countSample(values, values.length, shares, workspace);
  const [p90, p50, p10] = places.map((place, index) => {
    if (place >= 0) return quantiles[index];
    // Between the last zero and the smallest of the rest, the rule draws a straight line.
    return place > -1 ? (1 + place) * minimum : 0;
  });
  return { p90, p50, p10, mean: (mean * values.length) / count };
}

type Vectors = Record<VectorName, Float64Array>;

function inOrder(fields: readonly LedgerField[]): LedgerField[] {
  if (fields.length === 0) throw new DomainError("There is nothing to add up.");
  const sorted = [...fields].sort((a, b) => (a.slug < b.slug ? -1 : 1));
  const trials = sorted[0].trials.comes.length;
  sorted.forEach(({ slug, interest, trials: { comes } }, index) => {
    if (slug === sorted[index + 1]?.slug) {
      throw new DomainError(`${slug} is in the sum twice.`, { input: "fields", field: slug });
    }
    if (comes.length !== trials) {
      throw new DomainError(`${slug} has ${comes.length} trials in a total of ${trials}.`, {
        input: "trials",
        field: slug,
      });
    }
    if (!(interest >= 0 && interest < Infinity)) {
      throw new DomainError(`The interest in ${slug} is 0 or more; ${interest} is not.`, {
        input: "interest",
        field: slug,
      });
    }
  });
  return sorted;
}

/** Groups in the order in which their first members stand, which is that of the fields' addresses. */
function groupBy(
  fields: readonly LedgerField[],
  keyOf: (field: LedgerField) => string,
): [string, LedgerField[]][] {
  const groups = new Map<string, LedgerField[]>();
  for (const field of fields) {
    const known = groups.get(keyOf(field));
    if (known) known.push(field);
    else groups.set(keyOf(field), [field]);
  }
  return [...groups];
}

function emptyVectors(trials: number): Vectors {
  return {
    wetGasInPlaceScf: new Float64Array(trials),
    dryGasInPlaceScf: new Float64Array(trials),
    condensateInPlaceStb: new Float64Array(trials),
    salesGasScf: new Float64Array(trials),
    condensateRecoverableStb: new Float64Array(trials),
  };
}

/** What every trial of a field is multiplied by. */
const factorOf = ({ interest, chance }: LedgerField, risk: Risking) =>
  risk === "risked" ? interest * chance : interest;

function addField(sums: Vectors, field: LedgerField, risk: Risking): void {
  const factor = factorOf(field, risk);
  const { volumes, comes } = field.trials;
  for (const name of vectorNames) {
    if (risk === "yesNo") addDrawn(sums[name], volumes[name], comes, factor);
    else addScaled(sums[name], volumes[name], factor);
  }
}

function addScaled(sum: Float64Array, values: TrialVector, factor: number): void {
  for (let t = 0; t < sum.length; t += 1) sum[t] += factor * values[t];
}

function addDrawn(sum: Float64Array, values: TrialVector, comes: Uint8Array, factor: number): void {
  for (let t = 0; t < sum.length; t += 1) sum[t] += comes[t] * factor * values[t];
}

function addVectors(sums: Vectors, vectors: Vectors): void {
  for (const name of vectorNames) addScaled(sums[name], vectors[name], 1);
}

function rangesOf(
  vectors: Readonly<Record<VectorName, TrialVector>>,
  workspace: OrderWorkspace,
): VolumeRanges {
  const range = (name: VectorName) => rangeOfSample(vectors[name], vectors[name].length, workspace);
  return {
    wetGasInPlaceScf: range("wetGasInPlaceScf"),
    dryGasInPlaceScf: range("dryGasInPlaceScf"),
    condensateInPlaceStb: range("condensateInPlaceStb"),
    salesGasScf: range("salesGasScf"),
    condensateRecoverableStb: range("condensateRecoverableStb"),
  };
}

/** Every field's ranges and contribution, and the standard errors of the total. */
function entriesOf(
  fields: readonly LedgerField[],
  total: Float64Array,
  summary: SampleSummary,
  counting: OrderWorkspace,
  risk: Risking,
): { entries: Record<string, LedgerEntry>; standardErrors: Range } {
  const trials = total.length;
  const order = new Uint32Array(trials);
  rankByCounting(total, trials, counting, new Uint32Array(trials), order);
  const fitOf = createContributions({ total, order, quantiles: summary });
  const own = new Float64Array(trials);
  const fitted = fields.map((field) => {
    own.fill(0);
    const factor = factorOf(field, risk);
    const { volumes, comes } = field.trials;
    if (risk === "yesNo") addDrawn(own, volumes.condensateRecoverableStb, comes, factor);
    else addScaled(own, volumes.condensateRecoverableStb, factor);
    const fit = fitOf(own);
    const behind = Math.min(trials, field.sourceTrials);
    const meanError = Math.sqrt(varianceAround(own, fit.contribution.mean) / behind);
    return { field, factor, fit, meanError, repeats: trials / behind };
  });
  const standardErrors = {
    ...scaleErrors(summary.standardErrors, fitted),
    mean: Math.hypot(...fitted.map(({ meanError }) => meanError)),
  };
  const entries = fitted.map(({ field, factor, fit, ...known }): [string, LedgerEntry] => {
    const figures = field.figures[risk === "yesNo" ? "yesNo" : "certain"];
    const ranges = Object.fromEntries(
      vectorNames.map((name) => [name, scaleRange(figures[name], factor)]),
    ) as VolumeRanges;
    return [
      field.id,
      {
        ranges,
        contribution: fit.contribution,
        contributionErrors: contributionErrors(fit, { ...known, totalErrors: standardErrors }),
      },
    ];
  });
  return { entries: Object.fromEntries(entries), standardErrors };
}

function varianceAround(values: Float64Array, mean: number): number {
  let squares = 0;
  for (let t = 0; t < values.length; t += 1) squares += (values[t] - mean) ** 2;
  return squares / values.length;
}

function scaleErrors(
  errors: Range,
  fields: readonly { fit: ContributionFit; repeats: number }[],
): Range {
  const inverse = fields.reduce(
    (sum, { fit, repeats }) => sum + Math.max(0, fit.contribution.shareOfVariance) * repeats,
    0,
  );
  return scaleRange(errors, Math.sqrt(Math.max(1, inverse)));
}

function shareAtLeast(values: Float64Array, least: number): number {
  let count = 0;
  for (let t = 0; t < values.length; t += 1) if (values[t] >= least) count += 1;
  return count / values.length;
}

function ranksOf(fields: readonly LedgerField[], risk: Risking): Record<string, RankSpread> {
  return rankTrials(
    fields.map((field) => ({
      id: field.id,
      values: field.trials.volumes.condensateRecoverableStb,
      factor: factorOf(field, risk),
      comes: risk === "yesNo" ? field.trials.comes : null,
    })),
  );
}
