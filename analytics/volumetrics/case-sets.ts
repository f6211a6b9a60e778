import { rankByCounting } from "../numerics/ranking";
import type { PointSource } from "../uncertainty/points";
import { rangeOfSample } from "../uncertainty/summary";
import type { InputName } from "./inputs-schema";
import type { DriverName } from "./results-schema";
import type { RangeTotals, SampledInput } from "./sample-inputs";
import type { InputColumn, SimulationWorkspace } from "./workspace";

/** Inputs that take the same case in every trial. */
export interface CaseSet {
  readonly members: readonly SampledInput[];
  /** cumulative chances of the cases, the last one 1 */
  readonly bounds: readonly number[];
}

export function caseSetsOf(inputs: readonly SampledInput[]): CaseSet[] {
  const names = new Set(inputs.flatMap(({ distribution: { caseSet } }) => caseSet ?? []));
  return [...names].map((name) => {
    const members = inputs.filter(({ distribution }) => distribution.caseSet === name);
    let sum = 0;
    const bounds = (members[0].distribution.cases ?? []).map(({ weight }) => (sum += weight));
    bounds[bounds.length - 1] = 1;
    return { members, bounds };
  });
}

interface Addresses {
  readonly dimensionOf: (name: DriverName) => number;
  readonly caseDimensionOf: (first: DriverName) => number;
  readonly columnOf: (name: DriverName) => InputColumn;
}

/**
 * Draws the case of each trial from a dimension of its own, then every member from its distribution in that case, with
 * its own dimension: given the case, members are independent.
 */
export function placeCases(
  { members, bounds }: CaseSet,
  source: PointSource<InputName>,
  { dimensionOf, caseDimensionOf, columnOf }: Addresses,
  count: number,
  workspace: SimulationWorkspace,
  ranges: RangeTotals,
): void {
  const { cases, ranks, probabilities, order, counting } = workspace;
  source.fill(caseDimensionOf(members[0].name), count);
  for (let t = 0; t < count; t += 1) {
    const p = probabilities[ranks[t]];
    let chosen = 0;
    while (p > bounds[chosen]) chosen += 1;
    cases[t] = chosen;
  }
  for (const { name, distribution } of members) {
    const { values, strata } = columnOf(name);
    source.fill(dimensionOf(name), count);
    for (let t = 0; t < count; t += 1) order[ranks[t]] = t;
    distribution.cases?.forEach(({ compiled }, chosen) => {
      fillCase(compiled, chosen, count, workspace, values);
    });
    ranges.add(name, rangeOfSample(values, count, counting), count);
    rankByCounting(values, count, counting, ranks, order);
    for (let t = 0; t < count; t += 1) strata[t] = ranks[t];
  }
}

/** Values of the trials that take one case: quantiles of their probabilities, which ascend along `order`. */
function fillCase(
  compiled: SampledInput["distribution"],
  chosen: number,
  count: number,
  { cases, order, probabilities, words, caseProbabilities, sorted }: SimulationWorkspace,
  values: Float64Array,
): void {
  let taken = 0;
  for (let stratum = 0; stratum < count; stratum += 1) {
    const trial = order[stratum];
    if (cases[trial] !== chosen) continue;
    caseProbabilities[taken] = probabilities[stratum];
    words[taken] = trial;
    taken += 1;
  }
  compiled.fillQuantiles(caseProbabilities, taken, sorted);
  for (let i = 0; i < taken; i += 1) values[words[i]] = sorted[i];
}
