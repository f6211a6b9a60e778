import { planInputNames } from "../recovery/recovery-plan-schema";
import type { CompiledDistribution } from "../uncertainty/distribution";
import { fillByRank } from "../uncertainty/latin-hypercube";
import { createPoints } from "../uncertainty/points";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import { rangeOfStrata, type SampleRange } from "../uncertainty/summary";
import { caseSetsOf, placeCases } from "./case-sets";
import { inputNames, type InputName } from "./inputs-schema";
import type { PreparedInputs } from "./prepare-inputs";
import type { DriverName } from "./results-schema";
import {
  columnOf as columnIn,
  columns,
  type InputColumn,
  type SimulationWorkspace,
} from "./workspace";

/** A sampled input, of the ten or of a recovery plan. */
export interface SampledInput {
  readonly name: DriverName;
  readonly distribution: CompiledDistribution;
}

/** Draws the inputs of one replicate after the other. */
export interface InputSampler {
  /** Fills the inputs and strata of replicate `index` in the workspace, and those of the plan. */
  fill(index: number): void;
  /**
   * Percentiles of what was drawn: those of the replicates, averaged. They differ from the percentiles of all trials
   * together by less than a stratum.
   */
  rangeOf(name: DriverName): SampleRange | null;
}

/** The inputs of an estimate that count, in the order of their dimensions. */
export function sampledInputs({
  inputNames: names,
  distributions,
  plan,
}: PreparedInputs): SampledInput[] {
  const ofPlan = (plan?.inputNames ?? []).flatMap((name): SampledInput[] => {
    const distribution = plan?.distributions[name];
    return distribution ? [{ name, distribution }] : [];
  });
  return [...names.map((name) => ({ name, distribution: distributions[name] })), ...ofPlan];
}

/**
 * Makes what draws the inputs of an estimate: points of the method asked for, one dimension an input, as quantiles of
 * its distribution.
 *
 * Each dimension has random streams of its own, so changing one input or the plan leaves the draws of the others as
 * they were, and a difference between two runs comes from the change alone.
 */
export function createInputSampler(
  prepared: PreparedInputs,
  { seed, sampling }: { seed: number; sampling: SamplingMethod },
  workspace: SimulationWorkspace,
): InputSampler {
  const source = createPoints<InputName>(sampling, seed, workspace);
  const inputs = sampledInputs(prepared);
  const tied = new Set<DriverName>(prepared.blocks.flatMap(({ names }) => names));
  const sets = caseSetsOf(inputs);
  const shared = new Set(sets.flatMap(({ members }) => members.map(({ name }) => name)));
  const alone = inputs.filter(({ name }) => !tied.has(name) && !shared.has(name));
  const ranges = createRanges(workspace.trials);

  return {
    rangeOf: ranges.of,
    fill(index) {
      const { count } = workspace.replicates[index];
      const columnOf = (name: DriverName) => columnIn(workspace, index, name);
      const place = ({ name, distribution }: SampledInput) => {
        placeByRank(distribution, count, workspace, columnOf(name));
        ranges.add(name, rangeOfStrata(workspace.sorted, count), count);
      };
      for (const block of prepared.blocks) {
        source.fillCorrelated(block, dimensionOf, count, (name) => {
          place({ name, distribution: prepared.distributions[name] });
        });
      }
      for (const input of alone) {
        const { name, distribution } = input;
        if (isConstant(distribution)) {
          columnOf(name).values.fill(distribution.mean);
          ranges.add(name, { ...distribution.range, mean: distribution.mean }, count);
          continue;
        }
        source.fill(dimensionOf(name), count);
        place(input);
      }
      for (const set of sets) {
        placeCases(
          set,
          source,
          { dimensionOf, caseDimensionOf, columnOf },
          count,
          workspace,
          ranges,
        );
      }
    },
  };
}

const isConstant = ({ definition }: CompiledDistribution) => definition.kind === "constant";

/** Dimensions of the points: the ten inputs, then those of a recovery plan, then the sets of cases. */
const dimensionOf = (name: DriverName): number => {
  const input = (inputNames as readonly string[]).indexOf(name);
  return input >= 0
    ? input
    : inputNames.length + (planInputNames as readonly string[]).indexOf(name);
};

/** A set of cases is known by its first input, so that one set more moves no other. */
const caseDimensionOf = (first: DriverName) =>
  inputNames.length + planInputNames.length + dimensionOf(first);

/** Quantiles of the probabilities drawn last, each given to the trial of its stratum. */
function placeByRank(
  distribution: CompiledDistribution,
  count: number,
  { probabilities, ranks, sorted }: SimulationWorkspace,
  { values, strata }: InputColumn,
): void {
  distribution.fillQuantiles(probabilities, count, sorted);
  fillByRank(sorted, ranks, count, values);
  for (let t = 0; t < count; t += 1) strata[t] = ranks[t];
}

export interface RangeTotals {
  add(name: DriverName, range: SampleRange, count: number): void;
  of(name: DriverName): SampleRange | null;
}

/** Means of the replicates' percentiles, each counting by its trials. */
function createRanges(trials: number): RangeTotals {
  const totals = new Map<DriverName, SampleRange>();
  return {
    add(name, range, count) {
      const total = totals.get(name) ?? { p90: 0, p50: 0, p10: 0, mean: 0 };
      const share = count / trials;
      totals.set(
        name,
        columns(["p90", "p50", "p10", "mean"], (level) => total[level] + share * range[level]),
      );
    },
    of: (name) => totals.get(name) ?? null,
  };
}
