import { createRandom, fillPermutation } from "../numerics/random";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { CompiledPlan } from "../recovery/compile-plan";
import { planInputNames, type PlanInputName } from "../recovery/recovery-plan-schema";
import { fillByRank, fillStrata } from "../uncertainty/latin-hypercube";
import { fillCorrelatedRanks, type CorrelationBlock } from "../uncertainty/rank-correlation";
import { rangeOfSorted, type SampleRange } from "../uncertainty/summary";
import { inputNames, type InputName } from "./inputs-schema";
import { columns, planWorkspace, type SimulationWorkspace } from "./workspace";

/**
 * Samples the ten inputs of every trial: a Latin hypercube, with the order of correlated inputs arranged after Iman
 * and Conover. Fills `workspace.inputs` and `workspace.inputRanks`.
 *
 * Each input has two random streams of its own (where in its strata, in which order), so changing one input leaves
 * the draws of the others as they were and a difference between two runs comes from the change alone.
 *
 * @returns percentiles of what was sampled
 */
export function sampleInputs(
  distributions: Readonly<Record<InputName, CompiledDistribution>>,
  blocks: readonly CorrelationBlock<InputName>[],
  seed: number,
  workspace: SimulationWorkspace,
): Record<InputName, SampleRange> {
  const { trials, inputRanks, words, probabilities, sorted } = workspace;
  const orderStream = (name: InputName) => createRandom(seed, 2 * inputNames.indexOf(name) + 1);
  const tied = new Set<InputName>();
  for (const { names, factor } of blocks) {
    names.forEach((name) => tied.add(name));
    const ranks = names.map((name) => inputRanks[name]);
    fillCorrelatedRanks(factor, names.map(orderStream), trials, workspace, ranks);
  }
  return columns(inputNames, (name) => {
    if (!tied.has(name)) fillPermutation(orderStream(name), inputRanks[name], trials, words);
    const strata = createRandom(seed, 2 * inputNames.indexOf(name));
    fillStrata(strata, trials, probabilities, words);
    distributions[name].fillQuantiles(probabilities, trials, sorted);
    fillByRank(sorted, inputRanks[name], trials, workspace.inputs[name]);
    return rangeOfSorted(sorted, trials);
  });
}

/**
 * Samples the uncertain inputs of a recovery plan in the same way, from streams of their own after those of the ten
 * inputs: with and without a plan, and from plan to plan, every other draw stays as it was.
 *
 * @returns percentiles of what was sampled, for the inputs that the plan uses
 */
export function samplePlanInputs(
  { inputNames: names, distributions }: CompiledPlan,
  seed: number,
  workspace: SimulationWorkspace,
): Partial<Record<PlanInputName, SampleRange>> {
  const { trials, words, probabilities, sorted } = workspace;
  const { inputs, inputRanks } = planWorkspace(workspace);
  const ranges: Partial<Record<PlanInputName, SampleRange>> = {};
  for (const name of names) {
    const stream = 2 * (inputNames.length + planInputNames.indexOf(name));
    fillPermutation(createRandom(seed, stream + 1), inputRanks[name], trials, words);
    fillStrata(createRandom(seed, stream), trials, probabilities, words);
    distributions[name]?.fillQuantiles(probabilities, trials, sorted);
    fillByRank(sorted, inputRanks[name], trials, inputs[name]);
    ranges[name] = rangeOfSorted(sorted, trials);
  }
  return ranges;
}
