import { DomainError } from "../errors";
import {
  createOrderWorkspace,
  rankByCounting,
  type OrderWorkspace,
} from "../numerics/order-statistics";
import { createRandom, fillPermutation, streamOf } from "../numerics/random";
import { normalScores } from "../uncertainty/rank-correlation";
import {
  rangeOfSample,
  summariseSample,
  type SampleRange,
  type SampleSummary,
} from "../uncertainty/summary";

export type TrialVector = Float32Array | Float64Array;

/** One reservoir (or field) with the trials of its estimate. */
export interface RollUpMember {
  /** unique; also picks the member's random stream, so a member's draws do not depend on who else is in the sum */
  id: string;
  /** members of one group move together: the basin */
  group: string;
  /** trials by name; element t of each belongs to the same trial, and rows stay whole */
  vectors: Readonly<Record<string, TrialVector>>;
  /** what each quantity is multiplied by, >= 0: working interest, or interest times a price */
  factors: Readonly<Record<string, number>>;
  /** chance that there is anything at all, 0 to 1; 1 unless given. Used when `risking` is "expectation" */
  chance?: number;
  /** what the member is grouped under, by dimension: `{ basin: "...", class: "..." }` */
  tags?: Readonly<Record<string, string>>;
}

export interface RollUpOptions {
  /** what to add up, by name, and the vector each comes from: `{ liquidValue: "condensateRecoverableStb" }` */
  quantities: Readonly<Record<string, string>>;
  /** a safe integer, 0 or more */
  seed: number;
  /** correlation of the normal scores of two members of one group, 0 to 1; groups are independent of each other */
  dependence: number;
  /** the vector whose rank follows the group; `condensateRecoverableStb` unless given */
  orderBy?: string;
  /**
   * `unrisked`: every member succeeds. `expectation`: every trial of a member is multiplied by its chance, which
   * gives the risked mean exactly but NOT the spread of success and failure (that has a spike at zero).
   */
  risking?: "unrisked" | "expectation";
  /** dimensions of `tags` to total by as well */
  groupBy?: readonly string[];
}

export interface Totals {
  members: number;
  /** trial by trial, by quantity */
  vectors: Record<string, Float64Array>;
  /**
   * Sums of the members' own percentiles. They are NOT the percentiles of the sum: the P90s add up to less than the
   * total's P90 unless everything moves together. Means do add up.
   */
  arithmeticSums: Record<string, SampleRange>;
}

export interface RollUp {
  trials: number;
  total: Totals;
  /** by dimension, then by the tag's value */
  groups: Record<string, Record<string, Totals>>;
}

const DEFAULT_ORDER = "condensateRecoverableStb";

/**
 * Adds up members trial by trial. Each member's rows are re-ordered, whole, so that the rank of its ordering vector
 * follows a normal score
 *
 *     s = sqrt(rho) F + sqrt(1 - rho) e
 *
 * with F common to its group and e its own (both normal scores in random order): a one-factor normal copula, under
 * which two members of a group have the rank correlation (6 / pi) asin(rho / 2). A member's own distribution does not
 * change. Same members, options and seed give the same bytes whatever the order of the members.
 *
 * Percentiles of a total describe the portfolio; they are not reserves of any category.
 *
 * @returns total and group totals, with the arithmetic sums of percentiles beside them
 * @throws {DomainError} when members have different numbers of trials, an id occurs twice, a vector, factor or tag is
 *   missing, or a number is out of its range
 * @see A. J. McNeil, R. Frey, P. Embrechts, Quantitative Risk Management, 2nd ed. (2015), section 7.3 (one-factor
 *      Gauss copula)
 */
export function rollUp(members: readonly RollUpMember[], options: RollUpOptions): RollUp {
  const trials = checkMembers(members, options);
  const quantities = Object.entries(options.quantities);
  const emptyTotals = () => newTotals(quantities, trials);
  const total = emptyTotals();
  const groups: RollUp["groups"] = Object.fromEntries(
    (options.groupBy ?? []).map((dimension) => [dimension, {}]),
  );
  if (trials === 0) return { trials, total, groups };

  const mixer = createMixer(trials, options);
  const sorted = [...members].sort((a, b) => (a.id < b.id ? -1 : 1));
  for (const member of sorted) {
    const sums = [total];
    for (const dimension of options.groupBy ?? []) {
      const value = tagOf(member, dimension);
      sums.push((groups[dimension][value] ??= emptyTotals()));
    }
    addMember(member, quantities, mixer.rowsOf(member), mixer.counting, options, sums);
  }
  return { trials, total, groups };
}

/**
 * Percentiles, mean, standard errors, histogram and exceedance curve of a total. Its standard errors are those of
 * independent trials.
 */
export function summariseTotal(vector: TrialVector): SampleSummary {
  return summariseSample(vector, vector.length, createOrderWorkspace(vector.length));
}

function newTotals(quantities: readonly [string, string][], trials: number): Totals {
  return {
    members: 0,
    vectors: Object.fromEntries(quantities.map(([name]) => [name, new Float64Array(trials)])),
    arithmeticSums: Object.fromEntries(
      quantities.map(([name]) => [name, { p90: 0, p50: 0, p10: 0, mean: 0 }]),
    ),
  };
}

function addMember(
  member: RollUpMember,
  quantities: readonly [string, string][],
  rows: Uint32Array,
  counting: OrderWorkspace,
  { risking }: RollUpOptions,
  sums: readonly Totals[],
): void {
  const chance = risking === "expectation" ? (member.chance ?? 1) : 1;
  const ranges = new Map<string, SampleRange>();
  for (const sum of sums) sum.members += 1;
  for (const [name, source] of quantities) {
    const values = member.vectors[source];
    const factor = member.factors[name] * chance;
    const range = ranges.get(source) ?? rangeOfSample(values, values.length, counting);
    ranges.set(source, range);
    for (const { vectors, arithmeticSums } of sums) {
      addRows(vectors[name], values, rows, factor);
      const sum = arithmeticSums[name];
      sum.p90 += factor * range.p90;
      sum.p50 += factor * range.p50;
      sum.p10 += factor * range.p10;
      sum.mean += factor * range.mean;
    }
  }
}

function addRows(
  total: Float64Array,
  values: TrialVector,
  rows: Uint32Array,
  factor: number,
): void {
  for (let trial = 0; trial < total.length; trial += 1) {
    total[trial] += factor * values[rows[trial]];
  }
}

/** Decides which of a member's rows goes to which trial of the total. */
function createMixer(trials: number, { seed, dependence, orderBy = DEFAULT_ORDER }: RollUpOptions) {
  const counting = createOrderWorkspace(trials);
  const integers = () => new Uint32Array(trials);
  const [words, permutation, ranks, scratch, ascending, rows] = Array.from({ length: 6 }, integers);
  const scores = normalScores(trials);
  const mixed = new Float64Array(trials);
  const factors = new Map<string, Float64Array>();
  const shared = Math.sqrt(dependence);
  const own = Math.sqrt(1 - dependence);

  function commonFactor(group: string): Float64Array {
    const known = factors.get(group);
    if (known) return known;
    fillPermutation(createRandom(seed, streamOf(`group ${group}`)), permutation, trials, words);
    const factor = Float64Array.from(permutation, (rank) => scores[rank]);
    factors.set(group, factor);
    return factor;
  }

  /** The ranks the member's ordering vector must have, trial by trial. */
  function fillTargetRanks(member: RollUpMember): void {
    if (dependence === 0) {
      fillPermutation(createRandom(seed, streamOf(`member ${member.id}`)), ranks, trials, words);
      return;
    }
    const factor = commonFactor(member.group);
    fillPermutation(
      createRandom(seed, streamOf(`member ${member.id}`)),
      permutation,
      trials,
      words,
    );
    for (let t = 0; t < trials; t += 1)
      mixed[t] = shared * factor[t] + own * scores[permutation[t]];
    rankByCounting(mixed, trials, counting, ranks, scratch);
  }

  return {
    counting,
    /** valid until the next call */
    rowsOf(member: RollUpMember): Uint32Array {
      fillTargetRanks(member);
      // `ascending` comes out as the member's rows from smallest to largest.
      rankByCounting(member.vectors[orderBy], trials, counting, scratch, ascending);
      for (let t = 0; t < trials; t += 1) rows[t] = ascending[ranks[t]];
      return rows;
    },
  };
}

function tagOf(member: RollUpMember, dimension: string): string {
  const value = member.tags?.[dimension];
  if (value !== undefined) return value;
  throw new DomainError(`Member ${member.id} has no ${dimension} to be grouped by.`, {
    input: "tags",
    member: member.id,
  });
}

/** @returns the number of trials they have in common; 0 when there are no members */
function checkMembers(members: readonly RollUpMember[], options: RollUpOptions): number {
  const { dependence, seed, quantities, orderBy = DEFAULT_ORDER } = options;
  requireShare("dependence", "The dependence within a group", dependence);
  if (!Number.isSafeInteger(seed) || seed < 0) {
    throw new DomainError(`The seed is a whole number, 0 or more; ${seed} is not.`, {
      input: "seed",
      value: seed,
    });
  }
  const trials = members[0]?.vectors[orderBy]?.length ?? 0;
  const ids = new Set<string>();
  for (const member of members) {
    if (ids.has(member.id)) throw refuse(member, "id", "is in the sum twice");
    ids.add(member.id);
    requireShare("chance", `The chance of ${member.id}`, member.chance ?? 1);
    for (const source of new Set([orderBy, ...Object.values(quantities)])) {
      const vector = member.vectors[source];
      if (!vector || vector.length === 0)
        throw refuse(member, source, `has no trials of ${source}`);
      if (vector.length !== trials) {
        throw refuse(
          member,
          source,
          `has ${vector.length} trials and ${members[0].id} has ${trials}; trials are added one by one, so all ` +
            "estimates of a total need the same number. Run them again with one number of trials",
        );
      }
    }
    for (const name of Object.keys(quantities)) {
      if (!(member.factors[name] >= 0 && member.factors[name] < Infinity)) {
        throw refuse(member, name, `needs a factor of 0 or more for ${name}`);
      }
    }
  }
  return trials;
}

function refuse({ id }: RollUpMember, input: string, reason: string): DomainError {
  return new DomainError(`${id} ${reason}.`, { input, member: id });
}

function requireShare(input: string, name: string, value: number): void {
  if (value >= 0 && value <= 1) return;
  throw new DomainError(`${name} lies between 0 and 1; ${value} does not.`, { input, value });
}
