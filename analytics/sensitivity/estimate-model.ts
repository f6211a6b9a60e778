import { normalCdf, normalQuantileUnchecked } from "../numerics/normal";
import { createRankingWorkspace, rankByCounting } from "../numerics/ranking";
import { planInputNames } from "../recovery/recovery-plan-schema";
import { createRecoveryColumns } from "../recovery/trial-recovery";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { CorrelationBlock } from "../uncertainty/rank-correlation";
import { inputNames, type EstimateInputs, type InputName } from "../volumetrics/inputs-schema";
import { prepareInputs, type PreparedInputs } from "../volumetrics/prepare-inputs";
import { sampledInputs, type SampledInput } from "../volumetrics/sample-inputs";
import {
  derivedNames,
  resultNames,
  type DriverName,
  type ResultName,
} from "../volumetrics/results-schema";
import { evaluateTrials, fluidConstants } from "../volumetrics/trials";
import { columns as record } from "../volumetrics/workspace";
import type { ColumnModel } from "./sobol-indices";

/** An estimate as a function of columns of its inputs, and how independent samples of them are made. */
export interface EstimateModel {
  /** the inputs that vary; column i is `drivers[i]` */
  readonly drivers: readonly DriverName[];
  /** columns that depend on each other: correlated inputs, inputs of one set of cases, or one input by itself */
  readonly factors: readonly (readonly number[])[];
  /** uniform numbers that one trial of the inputs takes */
  readonly dimensions: number;
  /**
   * Columns of inputs from columns of independent uniform numbers: correlated inputs through their normal scores, those
   * of a set of cases with one number for the case and one each within it.
   */
  fillInputs(uniforms: readonly Float64Array[], columns: readonly Float64Array[]): void;
  readonly evaluate: ColumnModel;
}

/** Part of a sample that is independent of the rest. */
interface Part {
  readonly sources: readonly SampledInput[];
  readonly dimensions: number;
  readonly fill: (
    uniforms: readonly Float64Array[],
    columnOf: (name: DriverName) => Float64Array | null,
  ) => void;
}

/**
 * @param count  trials of a column
 * @throws {DomainError} as `prepareInputs`. A trial without a possible result evaluates to no finite number
 */
export function estimateModel(
  inputs: EstimateInputs,
  result: ResultName,
  count: number,
): EstimateModel {
  const prepared = prepareInputs(inputs);
  const parts = partsOf(prepared, count);
  const drivers = parts.flatMap(({ sources }) => sources.filter(varies).map(({ name }) => name));
  return {
    drivers,
    factors: parts
      .map(({ sources }) => sources.filter(varies).map(({ name }) => drivers.indexOf(name)))
      .filter((factor) => factor.length > 0),
    dimensions: parts.reduce((sum, { dimensions }) => sum + dimensions, 0),
    fillInputs(uniforms, columns) {
      const columnOf = (name: DriverName) => columns[drivers.indexOf(name)] ?? null;
      let first = 0;
      for (const { dimensions, fill } of parts) {
        fill(uniforms.slice(first, first + dimensions), columnOf);
        first += dimensions;
      }
    },
    evaluate: createEvaluation(inputs, prepared, drivers, result, count),
  };
}

const varies = ({ distribution }: SampledInput) => distribution.standardDeviation > 0;

function partsOf(prepared: PreparedInputs, count: number): Part[] {
  const fillQuantiles = createQuantiles(count);
  const parts: Part[] = [];
  const placed = new Set<DriverName>();
  const sources = sampledInputs(prepared);
  for (const source of sources) {
    if (placed.has(source.name)) continue;
    const block = prepared.blocks.find(({ names }) => names.some((name) => name === source.name));
    const { caseSet } = source.distribution;
    const members = block
      ? block.names.map((name) => ({ name, distribution: prepared.distributions[name] }))
      : caseSet !== null
        ? sources.filter(({ distribution }) => distribution.caseSet === caseSet)
        : [source];
    members.forEach(({ name }) => placed.add(name));
    if (!members.some(varies)) continue;
    if (block) parts.push(correlatedPart(members, block, fillQuantiles));
    else if (caseSet !== null) parts.push(casePart(members, fillQuantiles));
    else parts.push(singlePart(source, fillQuantiles));
  }
  return parts;
}

type FillQuantiles = (
  distribution: CompiledDistribution,
  probabilities: Float64Array,
  trials: Uint32Array | null,
  out: Float64Array,
) => void;

/** Quantiles of probabilities in any order, of all trials or of some: sorted first, for distributions take them so. */
function createQuantiles(capacity: number): FillQuantiles {
  const counting = createRankingWorkspace(capacity);
  const ranks = new Uint32Array(capacity);
  const order = new Uint32Array(capacity);
  const sorted = new Float64Array(capacity);
  const values = new Float64Array(capacity);
  return (distribution, probabilities, trials, out) => {
    const chosen = trials ? Float64Array.from(trials, (t) => probabilities[t]) : probabilities;
    const count = chosen.length;
    if (count === 0) return;
    rankByCounting(chosen, count, counting, ranks, order);
    for (let i = 0; i < count; i += 1) sorted[i] = chosen[order[i]];
    distribution.fillQuantiles(sorted, count, values);
    for (let i = 0; i < count; i += 1) out[trials ? trials[order[i]] : order[i]] = values[i];
  };
}

function singlePart(source: SampledInput, fillQuantiles: FillQuantiles): Part {
  return {
    sources: [source],
    dimensions: 1,
    fill([uniform], columnOf) {
      const out = columnOf(source.name);
      if (out) fillQuantiles(source.distribution, uniform, null, out);
    },
  };
}

function correlatedPart(
  sources: readonly SampledInput[],
  { factor }: CorrelationBlock<InputName>,
  fillQuantiles: FillQuantiles,
): Part {
  const size = sources.length;
  return {
    sources,
    dimensions: size,
    fill(uniforms, columnOf) {
      const scores = uniforms.map((uniform) => uniform.map(normalQuantileUnchecked));
      sources.forEach(({ name, distribution }, row) => {
        const out = columnOf(name);
        if (!out) return;
        const probabilities = uniforms[0].map((_, t) => {
          let score = 0;
          for (let k = 0; k <= row; k += 1) score += factor[row * size + k] * scores[k][t];
          return normalCdf(score);
        });
        fillQuantiles(distribution, probabilities, null, out);
      });
    },
  };
}

function casePart(sources: readonly SampledInput[], fillQuantiles: FillQuantiles): Part {
  const weights = sources[0].distribution.cases?.map(({ weight }) => weight) ?? [];
  return {
    sources,
    dimensions: 1 + sources.length,
    fill([ofCase, ...within], columnOf) {
      const trialsByCase = weights.map((): number[] => []);
      ofCase.forEach((uniform, t) => {
        let left = uniform;
        let chosen = 0;
        while (chosen < weights.length - 1 && left >= weights[chosen]) left -= weights[chosen++];
        trialsByCase[chosen].push(t);
      });
      sources.forEach(({ name, distribution }, i) => {
        const out = columnOf(name);
        if (!out) return;
        distribution.cases?.forEach(({ compiled }, chosen) => {
          fillQuantiles(compiled, within[i], Uint32Array.from(trialsByCase[chosen]), out);
        });
      });
    },
  };
}

function createEvaluation(
  inputs: EstimateInputs,
  prepared: PreparedInputs,
  drivers: readonly DriverName[],
  result: ResultName,
  capacity: number,
): ColumnModel {
  const column = () => new Float64Array(capacity);
  const fluid = fluidConstants(prepared.wellstream, inputs.fluid);
  const scratch = { reducedPressure: column(), reducedTemperature: column() };
  const outputs = record([...resultNames, ...derivedNames], column);
  const recoveryColumns = prepared.plan && createRecoveryColumns(capacity);
  const constants = new Map(
    sampledInputs(prepared).map(({ name, distribution }) => [
      name,
      column().fill(distribution.range.p50),
    ]),
  );
  const unused = column();
  return (columns, count) => {
    const valuesOf = (name: DriverName) =>
      columns[drivers.indexOf(name)] ?? constants.get(name) ?? unused;
    const plan = prepared.plan &&
      recoveryColumns && {
        compiled: prepared.plan,
        inputs: record(planInputNames, valuesOf),
        columns: recoveryColumns,
      };
    evaluateTrials(fluid, record(inputNames, valuesOf), plan, count, scratch, outputs);
    return outputs[result];
  };
}
