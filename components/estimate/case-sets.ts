/** Cases of several inputs that are true together: a deeper contact is a larger area and a thicker column. */
import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import { lowerFirst } from "@/components/ui/format";
import { inputCatalogue } from "./input-catalogue";
import type { CasesText, CaseText, InputText } from "./input-text";
import { singleValue } from "./reshape";

export interface CaseSet {
  name: string;
  /** inputs that take their case from it, in the order in which they are listed */
  inputs: InputName[];
  cases: Pick<CaseText, "name" | "weight">[];
}

/** Name of the set that an input takes its case from; `null` when it does not. */
export function caseSetOf({ kind, cases }: InputText): string | null {
  const name = kind === "scenarios" ? (cases?.caseSet.trim() ?? "") : "";
  return name === "" ? null : name;
}

/** Every shared set of an estimate, in the order of its first input. */
export function caseSetsOf(inputs: Record<InputName, InputText>): CaseSet[] {
  const sets = new Map<string, CaseSet>();
  for (const input of inputNames) {
    const text = inputs[input];
    const name = caseSetOf(text);
    if (name === null || !text.cases) continue;
    const set = sets.get(name);
    if (set) set.inputs.push(input);
    else {
      const cases = text.cases.cases.map(({ name: called, weight }) => ({ name: called, weight }));
      sets.set(name, { name, inputs: [input], cases });
    }
  }
  return [...sets.values()];
}

/** Cases with the names and chances of a set; ranges stay with the case of their name, or of their place. */
export function alignedCases(
  own: readonly CaseText[],
  to: readonly Pick<CaseText, "name" | "weight">[],
): CaseText[] {
  const isRenamed = own.length === to.length;
  return to.map(({ name, weight }, index) => {
    const same = isRenamed ? own[index] : own.find((candidate) => candidate.name === name);
    return { name, weight, range: same?.range ?? singleValue("") };
  });
}

/** Joins a set: takes its names and chances. */
export const joined = (cases: CasesText, set: CaseSet): CasesText => ({
  caseSet: set.name,
  cases: alignedCases(cases.cases, set.cases),
});

/**
 * Gives the names and chances of an input that was just edited to every other input of its set, which has to have the
 * same ones.
 */
export function withSharedCases(
  inputs: Record<InputName, InputText>,
  edited: InputName,
): Record<InputName, InputText> {
  const name = caseSetOf(inputs[edited]);
  const to = inputs[edited].cases?.cases;
  if (name === null || !to) return inputs;
  const next = { ...inputs };
  for (const other of inputNames) {
    const text = inputs[other];
    if (other === edited || caseSetOf(text) !== name || !text.cases) continue;
    next[other] = {
      ...text,
      cases: { ...text.cases, cases: alignedCases(text.cases.cases, to) },
    };
  }
  return next;
}

/** "Takes the same case as net thickness in every trial." */
export function sharingWords({ name, inputs }: CaseSet, input: InputName): string {
  const others = inputs
    .filter((other) => other !== input)
    .map((other) => lowerFirst(inputCatalogue[other].label));
  if (others.length === 0) {
    return `No other input takes its case from “${name}” yet. Give another input cases, and choose “${name}” there.`;
  }
  const list =
    others.length === 1 ? others[0] : `${others.slice(0, -1).join(", ")} and ${others.at(-1)}`;
  return `Takes the same case as ${list} in every trial.`;
}
