import { underPath } from "../errors";
import { recombine, type Wellstream } from "../fluid/wellstream";
import { compileDistribution, type CompiledDistribution } from "../uncertainty/distribution";
import { compilePlan, type CompiledPlan } from "../recovery/compile-plan";
import type { Distribution } from "../uncertainty/distribution-schema";
import { compilePossible } from "../uncertainty/possible-range";
import { correlationBlocks, type CorrelationBlock } from "../uncertainty/rank-correlation";
import { inputNames, type EstimateInputs, type InputName } from "./inputs-schema";
import { recoveryNames, type RecoveryName } from "./results-schema";
import { usualRanges } from "./usual-ranges";
import { columns } from "./workspace";

/** An estimate's inputs, found possible and ready to sample. */
export interface PreparedInputs {
  /** with a recovery plan, those of the two recoveries are nothing but placeholders */
  readonly distributions: Readonly<Record<InputName, CompiledDistribution>>;
  /** the inputs that count, in their order */
  readonly inputNames: readonly InputName[];
  readonly blocks: readonly CorrelationBlock<InputName>[];
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
  return {
    distributions: columns(inputNames, (name) =>
      isUsed(name)
        ? underPath(`uncertain.${name}`, () =>
            compileInput(name, inputs.uncertain[name].distribution),
          )
        : PLACEHOLDER,
    ),
    inputNames: names,
    blocks: correlationBlocks(
      names,
      inputs.correlations.filter(({ a, b }) => isUsed(a) && isUsed(b)),
      (name) => usualRanges[name].label,
    ),
    wellstream: underPath("fluid", () => recombine(inputs.fluid)),
    plan,
  };
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
