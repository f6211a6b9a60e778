import { underPath } from "../errors";
import { recombine, type Wellstream } from "../fluid/wellstream";
import { compileDistribution, type CompiledDistribution } from "../uncertainty/distribution";
import { compilePlan, planPaths, type CompiledPlan } from "../recovery/compile-plan";
import { planRanges } from "../recovery/plan-ranges";
import type { Distribution } from "../uncertainty/distribution-schema";
import { compilePossible } from "../uncertainty/possible-range";
import { correlationBlocks, type CorrelationBlock } from "../uncertainty/rank-correlation";

import { inputNames, type EstimateInputs, type InputName } from "./inputs-schema";
import { recoveryNames, type RecoveryName } from "./results-schema";
import {
  refuseCorrelatedCases,
  sharedCasesOf,
  type CaseHolder,
  type SharedCases,
} from "./shared-cases";
import { usualRanges } from "./usual-ranges";
import { columns } from "./workspace";

/** An estimate's inputs, found possible and ready to sample. */
export interface PreparedInputs {
  /** with a recovery plan, those of the two recoveries are nothing but placeholders */
  readonly distributions: Readonly<Record<InputName, CompiledDistribution>>;
  /** the inputs that count, in their order */
  readonly inputNames: readonly InputName[];
  /** of inputs that are in no case set */
  readonly blocks: readonly CorrelationBlock<InputName>[];
  readonly caseSets: readonly SharedCases[];
  readonly wellstream: Wellstream;
  readonly plan: CompiledPlan | null;
}

/**
 * Checks everything that can be impossible in an estimate's inputs, and compiles it.
 *
 * @throws {DomainError} naming the input as a path (`uncertain.porosity.maximum`, `fluid.condensateApi`,
 *   `correlations`) and the reason
 */
export function prepareInputs(inputs: EstimateInputs): PreparedInputs {
  const { recoveryPlan } = inputs;
  // Inputs stored before plans lack the field.
  const plan = recoveryPlan ? underPath("recoveryPlan", () => compilePlan(recoveryPlan)) : null;
  const isUsed = (name: InputName) => !plan || !isRecovery(name);
  const names = inputNames.filter(isUsed);
  const distributions = columns(inputNames, (name) =>
    isUsed(name)
      ? underPath(`uncertain.${name}`, () =>
          compileInput(name, inputs.uncertain[name].distribution),
        )
      : PLACEHOLDER,
  );
  const pairs = inputs.correlations.filter(({ a, b }) => isUsed(a) && isUsed(b));
  const labelOf = (name: InputName) => usualRanges[name].label;
  refuseCorrelatedCases(pairs, distributions, labelOf);
  return {
    distributions,
    inputNames: names,
    blocks: correlationBlocks(
      names,
      // A correlation of 0 with an input of a case set says nothing.
      pairs.filter(({ a, b }) => !distributions[a].caseSet && !distributions[b].caseSet),
      labelOf,
    ),
    caseSets: sharedCasesOf([
      ...names.map((name) => ({
        input: name,
        planInput: null,
        path: `uncertain.${name}`,
        label: labelOf(name),
        compiled: distributions[name],
      })),
      ...(plan ? planMembers(plan) : []),
    ]),
    wellstream: underPath("fluid", () => recombine(inputs.fluid)),
    plan,
  };
}

function planMembers({ plan, inputNames: names, distributions }: CompiledPlan): CaseHolder[] {
  const ranges = planRanges(plan);
  return names.flatMap((name) => {
    const compiled = distributions[name];
    if (!compiled) return [];
    const path = `recoveryPlan.${planPaths[name]}`;
    return { input: null, planInput: name, path, label: ranges[name].label, compiled };
  });
}

/** In the place of an input that a recovery plan replaces. */
const PLACEHOLDER = compileDistribution({ kind: "constant", value: 0 });

export function isRecovery(name: InputName): name is RecoveryName {
  return recoveryNames.some((recovery) => recovery === name);
}

/**
 * Compiles the distribution of one input, found possible for that input whatever the others are.
 *
 * @param distribution  in the unit that the input's name says
 * @throws {DomainError} as `compilePossible`
 */
export function compileInput(name: InputName, distribution: Distribution): CompiledDistribution {
  return compilePossible(usualRanges[name], distribution);
}
