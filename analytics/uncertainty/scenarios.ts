import { DomainError, underPath } from "../errors";
import type { Atom, CompiledCase, CompiledDistribution } from "./compiled-distribution";
import type { Distribution, Scenario } from "./distribution-schema";
import { createMixtureTable, type MixtureTable } from "./mixture-table";
import { requireProbability } from "./parameter-checks";

export type Scenarios = Extract<Distribution, { kind: "scenarios" }>;

/** Weights that miss a sum of 1 by no more are meant to add up, and were rounded. */
const WEIGHT_TOLERANCE = 1e-6;

/**
 * The mixture of several cases, each with its chance:
 *
 *     F(x) = sum of w_i F_i(x),   mean = sum of w_i m_i,   variance = sum of w_i (s_i^2 + (m_i - mean)^2)
 *
 * A case that is a constant keeps its whole chance on its value (an atom), and the quantile there is that value.
 *
 * @param compileCase  makes the distribution of one case usable; a quantity with a possible range checks it here
 * @throws {DomainError} when the weights do not add up to 1 (nothing is scaled unasked), two cases have one name, or a
 *   case makes no distribution; `details.input` is a path such as `scenarios.1.distribution.high`
 */
export function compileScenarios(
  definition: Scenarios,
  compileCase: (distribution: Scenario["distribution"]) => CompiledDistribution,
): CompiledDistribution {
  const total = totalWeight(definition.scenarios);
  requireNames(definition.scenarios);
  const cases = definition.scenarios.map(
    ({ name, weight, distribution }, i): CompiledCase => ({
      name,
      weight: weight / total,
      compiled: underCase(name, i, () => compileCase(distribution)),
    }),
  );
  const sum = (of: (compiled: CompiledDistribution) => number) =>
    cases.reduce((subtotal, { weight, compiled }) => subtotal + weight * of(compiled), 0);
  const cdf = (x: number) => sum((compiled) => compiled.cdf(x));
  const pdf = (x: number) => sum((compiled) => compiled.pdf(x));
  const mean = sum((compiled) => compiled.mean);
  const variance = sum((compiled) => compiled.standardDeviation ** 2 + (compiled.mean - mean) ** 2);
  const atoms = mergeAtoms(cases);
  const mixture = { cases, cdf, pdf, atoms };
  const quantile = (p: number) => {
    requireProbability(p);
    return mixtureQuantile(mixture, p);
  };
  let table: MixtureTable | null = null;
  return {
    definition,
    quantile,
    cdf,
    pdf,
    mean,
    standardDeviation: Math.sqrt(variance),
    range: { p90: quantile(0.1), p50: quantile(0.5), p10: quantile(0.9) },
    support: {
      minimum: Math.min(...cases.map(({ compiled }) => compiled.support.minimum)),
      maximum: Math.max(...cases.map(({ compiled }) => compiled.support.maximum)),
    },
    lostMass: sum((compiled) => compiled.lostMass),
    atoms,
    cases,
    caseSet: definition.caseSet ?? null,
    fillQuantiles(probabilities, count, out) {
      table ??= createMixtureTable(mixture, (p) => mixtureQuantile(mixture, p));
      table.fillQuantiles(probabilities, count, out);
    },
  };
}

function totalWeight(scenarios: readonly Scenario[]): number {
  const total = scenarios.reduce((sum, { weight }) => sum + weight, 0);
  if (Math.abs(total - 1) <= WEIGHT_TOLERANCE) return total;
  const weights = scenarios.map(({ weight }) => Number(weight.toPrecision(6))).join(" + ");
  throw new DomainError(
    `The weights of the cases add up to ${Number(total.toPrecision(7))} (${weights}); they are chances and add up to 1.`,
    { input: "scenarios", value: total },
  );
}

function requireNames(scenarios: readonly Scenario[]): void {
  const seen = new Set<string>();
  scenarios.forEach(({ name }, i) => {
    if (seen.has(name)) {
      throw new DomainError(`Two cases are called “${name}”; each needs a name of its own.`, {
        input: `scenarios.${i}.name`,
      });
    }
    seen.add(name);
  });
}

function underCase<Result>(name: string, index: number, check: () => Result): Result {
  return underPath(`scenarios.${index}.distribution`, () => {
    try {
      return check();
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      throw new DomainError(`In the case “${name}”: ${error.message}`, error.details);
    }
  });
}

function mergeAtoms(cases: readonly CompiledCase[]): Atom[] {
  const chances = new Map<number, number>();
  for (const { weight, compiled } of cases) {
    for (const { value, probability } of compiled.atoms) {
      chances.set(value, (chances.get(value) ?? 0) + weight * probability);
    }
  }
  return [...chances]
    .map(([value, probability]) => ({ value, probability }))
    .sort((a, b) => a.value - b.value);
}

/** What a quantile of a mixture is found from. */
export interface Mixture {
  readonly cases: readonly CompiledCase[];
  readonly cdf: (x: number) => number;
  readonly pdf: (x: number) => number;
  readonly atoms: readonly Atom[];
}

/** Sums of weights are compared to within this, so that the quantile at the sum of some weights is the case before. */
const ROUNDING = 1e-13;

/**
 * Smallest x with F(x) >= p. It lies between the smallest and the largest quantile of the cases; atoms are tried
 * first, and Newton's method does the rest inside a bracket that always holds the answer.
 */
function mixtureQuantile({ cases, cdf, pdf, atoms }: Mixture, p: number): number {
  const ends = cases.map(({ compiled }) => compiled.quantile(p));
  let low = Math.min(...ends);
  let high = Math.max(...ends);
  if (low === high || p === 0 || p === 1) return p < 0.5 ? low : high;
  for (const { value, probability } of atoms) {
    if (value < low || value > high) continue;
    const upTo = cdf(value);
    if (p > upTo + ROUNDING) low = value;
    else if (p > upTo - probability + ROUNDING) return value;
    else {
      high = value;
      break;
    }
  }
  let x = 0.5 * (low + high);
  for (
    let step = 0;
    step < 200 && high - low > 4e-16 * (Math.abs(low) + Math.abs(high));
    step += 1
  ) {
    const error = cdf(x) - p;
    if (error >= -ROUNDING) high = x;
    else low = x;
    const newton = x - error / pdf(x);
    if (Math.abs(newton - x) <= 1e-15 * Math.abs(x)) return newton;
    // A step that leaves the bracket, or that a flat stretch between two cases makes endless, halves it instead.
    x = step % 3 < 2 && newton > low && newton < high ? newton : 0.5 * (low + high);
  }
  return high;
}
