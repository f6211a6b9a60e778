import { DomainError } from "../errors";
import { createOrderWorkspace, type OrderWorkspace } from "../numerics/order-statistics";
import { normalScoreCorrelation } from "../uncertainty/rank-correlation";
import { rangeOfSample, summariseSample, type SampleSummary } from "../uncertainty/summary";
import { vectorNames, type Range, type VectorName } from "../volumetrics/results-schema";
import { rankTrials, type RankSpread } from "./rank-trials";
import { rollUp, type RollUpMember, type Totals, type TrialVector } from "./roll-up";

/** One reservoir with the stored trials of the revision that stands for it. */
export interface LedgerMember {
  /**
   * The reservoir's address rather than a random id: it picks the draws, which then stay the same when a revision or a
   * neighbour changes, and on every installation that holds the same book.
   */
  id: string;
  fieldId: string;
  basinId: string;
  /** the basin's address, for its draws */
  basinSlug: string;
  /** PRMS class, or whatever else totals are wanted by */
  classId: string;
  vectors: Readonly<Record<VectorName, TrialVector>>;
  /** what the company has of it: 1 for gross, the net revenue interest for net */
  interest: number;
  /** chance of commerciality; 1 for unrisked */
  chance: number;
}

export interface LedgerOptions {
  /** rank correlation between two members of a basin, 0 to 1, by basin */
  basinRankCorrelations: Readonly<Record<string, number>>;
  /** a safe integer, 0 or more */
  seed: number;
}

export type VolumeRanges = Record<VectorName, Range>;

export interface LedgerGroup {
  /** trial by trial */
  ranges: VolumeRanges;
  /** of the recoverable condensate [STB2]; basins are independent, so theirs add up to the portfolio's */
  condensateVariance: number;
}

export interface Ledger {
  trials: number;
  fields: Record<string, { ranges: VolumeRanges; ranks: RankSpread }>;
  basins: Record<string, LedgerGroup>;
  classes: Record<string, LedgerGroup>;
  total: LedgerGroup;
  /** of the total's recoverable condensate */
  condensate: Pick<SampleSummary, "exceedance" | "standardErrors" | "minimum" | "maximum">;
  /** chance that the total's recoverable condensate reaches the sum of the fields' P90s, 0 to 1 */
  chanceOfSummedP90: number;
}

/**
 * The correlation of normal scores under which two normal-copula variables have a wanted rank correlation:
 * rho = 2 sin(pi r / 6), 0 to 1.
 *
 * @param rankCorrelation  Spearman's, 0 to 1
 * @throws {DomainError} outside that range
 * @see K. Pearson, On further methods of determining correlation, Drapers' Company Research Memoirs, Biometric Series
 *      IV (1907)
 * @example scoreCorrelation(0.5) // => 0.517638
 */
export function scoreCorrelation(rankCorrelation: number): number {
  if (!(rankCorrelation >= 0 && rankCorrelation <= 1)) {
    throw new DomainError(
      `A rank correlation within a basin lies between 0 and 1; ${rankCorrelation} does not.`,
      { input: "rankCorrelation", value: rankCorrelation },
    );
  }
  return normalScoreCorrelation(rankCorrelation);
}

/**
 * Fields, basins, classes and the whole portfolio from the stored trials of their reservoirs, added up trial by trial
 * with each basin's own dependence. Basins are independent of each other.
 *
 * Chance multiplies every trial of a member: risked means are exact, and the spike at zero of a field that does not
 * come is not in the ranges.
 *
 * @param members  at least one; all with the same number of trials
 * @returns        volumes in the units of the vectors, times interest and chance
 * @throws {DomainError} as `rollUp`
 */
export function computeLedger(members: readonly LedgerMember[], options: LedgerOptions): Ledger {
  if (members.length === 0) throw new DomainError("There is nothing to add up.");
  const trials = members[0].vectors.condensateRecoverableStb.length;
  const counting = createOrderWorkspace(trials);
  const total = emptyVectors(trials);
  const classVectors: Record<string, Vectors> = {};
  const fields: Ledger["fields"] = {};
  const basins: Ledger["basins"] = {};
  const condensateByField: Record<string, Float64Array> = {};

  for (const [basinId, inBasin] of byBasin(members)) {
    const basin = rollUp(inBasin.map(toRollUpMember), {
      quantities: Object.fromEntries(vectorNames.map((name) => [name, name])),
      seed: options.seed,
      dependence: scoreCorrelation(options.basinRankCorrelations[basinId] ?? 0),
      risking: "expectation",
      groupBy: ["field", "class"],
    });
    basins[basinId] = groupOf(basin.total.vectors as Vectors, counting);
    addVectors(total, basin.total);
    for (const [classId, totals] of Object.entries(basin.groups.class)) {
      addVectors((classVectors[classId] ??= emptyVectors(trials)), totals);
    }
    for (const [fieldId, { vectors }] of Object.entries(basin.groups.field)) {
      condensateByField[fieldId] = vectors.condensateRecoverableStb;
      fields[fieldId] = {
        ranges: rangesOf(vectors as Vectors, counting),
        ranks: { low: 0, high: 0, chanceFirst: 0 },
      };
    }
  }
  for (const [fieldId, ranks] of Object.entries(rankTrials(condensateByField))) {
    fields[fieldId].ranks = ranks;
  }
  return {
    trials,
    fields,
    basins,
    classes: Object.fromEntries(
      Object.entries(classVectors).map(([id, vectors]) => [id, groupOf(vectors, counting)]),
    ),
    ...wholeOf(total, fields, counting),
  };
}

function wholeOf(
  total: Vectors,
  fields: Ledger["fields"],
  counting: OrderWorkspace,
): Pick<Ledger, "total" | "condensate" | "chanceOfSummedP90"> {
  const condensate = total.condensateRecoverableStb;
  const summary = summariseSample(condensate, condensate.length, counting);
  const summedP90 = Object.values(fields).reduce(
    (sum, { ranges }) => sum + ranges.condensateRecoverableStb.p90,
    0,
  );
  const { exceedance, standardErrors, minimum, maximum } = summary;
  return {
    total: {
      ranges: rangesOf(total, counting),
      condensateVariance: summary.standardDeviation ** 2,
    },
    condensate: { exceedance, standardErrors, minimum, maximum },
    chanceOfSummedP90:
      condensate.reduce((count, value) => count + Number(value >= summedP90), 0) /
      condensate.length,
  };
}

type Vectors = Record<VectorName, Float64Array>;

function toRollUpMember(member: LedgerMember): RollUpMember {
  const { id, basinSlug, fieldId, classId, vectors, interest, chance } = member;
  return {
    id,
    group: basinSlug,
    vectors,
    factors: Object.fromEntries(vectorNames.map((name) => [name, interest])),
    chance,
    tags: { field: fieldId, class: classId },
  };
}

/** Members by basin, basins in the order of their addresses, so that sums are added in one order. */
function byBasin(members: readonly LedgerMember[]): [string, LedgerMember[]][] {
  const basins = new Map<string, LedgerMember[]>();
  for (const member of members) {
    const known = basins.get(member.basinId);
    if (known) known.push(member);
    else basins.set(member.basinId, [member]);
  }
  return [...basins].sort(([, [a]], [, [b]]) => (a.basinSlug < b.basinSlug ? -1 : 1));
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

function addVectors(sum: Vectors, { vectors }: Totals): void {
  for (const name of vectorNames) {
    const target = sum[name];
    const values = vectors[name];
    for (let trial = 0; trial < target.length; trial += 1) target[trial] += values[trial];
  }
}

function rangesOf(vectors: Vectors, counting: OrderWorkspace): VolumeRanges {
  const range = (name: VectorName) => rangeOfSample(vectors[name], vectors[name].length, counting);
  return {
    wetGasInPlaceScf: range("wetGasInPlaceScf"),
    dryGasInPlaceScf: range("dryGasInPlaceScf"),
    condensateInPlaceStb: range("condensateInPlaceStb"),
    salesGasScf: range("salesGasScf"),
    condensateRecoverableStb: range("condensateRecoverableStb"),
  };
}

function groupOf(vectors: Vectors, counting: OrderWorkspace): LedgerGroup {
  const condensate = vectors.condensateRecoverableStb;
  const { standardDeviation } = summariseSample(condensate, condensate.length, counting);
  return { ranges: rangesOf(vectors, counting), condensateVariance: standardDeviation ** 2 };
}
