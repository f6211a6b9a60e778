import { DomainError } from "../errors";
import type { PlanInputName } from "../recovery/recovery-plan-schema";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { InputName } from "./inputs-schema";

/** Inputs that take the same case in every trial: a deeper contact is a larger area and a thicker column. */
export interface SharedCases {
  readonly name: string;
  /** the same for each of the inputs, in this order */
  readonly cases: readonly { readonly name: string; readonly weight: number }[];
  readonly inputs: readonly InputName[];
  /** inputs of the recovery plan that belong to it as well */
  readonly planInputs: readonly PlanInputName[];
}

/** An input that may belong to a set. */
export interface CaseHolder {
  readonly input: InputName | null;
  readonly planInput: PlanInputName | null;
  /** where it stands in the estimate's inputs */
  readonly path: string;
  /** as in "the area" */
  readonly label: string;
  readonly compiled: CompiledDistribution;
}

/** Chances that differ by no more are the same figure, divided by sums that were rounded differently. */
const SAME_WEIGHT = 1e-6;

/**
 * The sets of cases that inputs share, in the order in which they first appear.
 *
 * @throws {DomainError} when two inputs of a set do not have the same cases with the same weights in the same order; the
 *   message names both and where they differ
 */
export function sharedCasesOf(members: readonly CaseHolder[]): SharedCases[] {
  const sets = new Map<string, CaseHolder[]>();
  for (const member of members) {
    const { caseSet } = member.compiled;
    if (caseSet === null) continue;
    const together = sets.get(caseSet) ?? [];
    const [first] = together;
    if (first) requireSameCases(caseSet, first, member);
    sets.set(caseSet, [...together, member]);
  }
  return [...sets].map(([name, together]) => ({
    name,
    cases: (together[0].compiled.cases ?? []).map((one) => ({
      name: one.name,
      weight: one.weight,
    })),
    inputs: together.flatMap(({ input }) => input ?? []),
    planInputs: together.flatMap(({ planInput }) => planInput ?? []),
  }));
}

function requireSameCases(set: string, first: CaseHolder, other: CaseHolder): void {
  const [ours, theirs] = [first, other].map(({ compiled }) => compiled.cases ?? []);
  const details = { input: `${other.path}.scenarios`, caseSet: set };
  if (ours.length !== theirs.length) {
    throw new DomainError(
      `The case set “${set}” has ${ours.length} cases for the ${first.label} and ${theirs.length} for the ` +
        `${other.label}. Inputs that share a set have the same cases.`,
      details,
    );
  }
  ours.forEach((mine, i) => {
    const { name, weight } = theirs[i];
    if (mine.name !== name) {
      throw new DomainError(
        `Case ${i + 1} of the set “${set}” is “${mine.name}” for the ${first.label} and “${name}” for the ` +
          `${other.label}. Inputs that share a set have the same cases in the same order.`,
        details,
      );
    }
    if (Math.abs(mine.weight - weight) > SAME_WEIGHT) {
      const figure = (value: number) => Number(value.toPrecision(4));
      throw new DomainError(
        `The case “${name}” of the set “${set}” weighs ${figure(mine.weight)} for the ${first.label} and ` +
          `${figure(weight)} for the ${other.label}. Inputs that share a set have the same weights.`,
        details,
      );
    }
  });
}

/**
 * Refuses rank correlations of inputs that belong to a set: their cases tie them already, and an order within the cases
 * would contradict the case that the set draws.
 *
 * @throws {DomainError} with `input` `correlations`
 */
export function refuseCorrelatedCases(
  pairs: readonly { a: InputName; b: InputName; rank: number }[],
  distributions: Readonly<Record<InputName, CompiledDistribution>>,
  labelOf: (name: InputName) => string,
): void {
  for (const { a, b, rank } of pairs) {
    const tied = rank === 0 ? undefined : [a, b].find((name) => distributions[name].caseSet);
    if (!tied) continue;
    throw new DomainError(
      `The ${labelOf(tied)} takes its case from the set “${distributions[tied].caseSet}”, so it cannot also have a rank ` +
        `correlation with the ${labelOf(tied === a ? b : a)}. Take the correlation away, or let the other input share the set.`,
      { input: "correlations", value: rank, pairs: [`${labelOf(a)} with ${labelOf(b)} ${rank}`] },
    );
  }
}
