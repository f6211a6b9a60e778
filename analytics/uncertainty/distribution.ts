import type { CompiledDistribution } from "./compiled-distribution";
import { DomainError } from "../errors";
import { requireMagnitudes } from "./parameter-magnitudes";
import { condition } from "./conditioned";
import { fitData } from "./data-fit";
import { drawnDensity, drawnEnds } from "./drawn-density";
import type { Distribution, SimpleDistribution } from "./distribution-schema";
import {
  lognormalFamily,
  normalFamily,
  pertFamily,
  triangularFamily,
  uniformFamily,
  type Family,
} from "./families";
import {
  requireAbove,
  requireFinite,
  requireHonestSigma,
  requireMode,
  requirePositive,
  requireProbability,
} from "./parameter-checks";
import { fitPercentiles } from "./percentile-fit";
import { limitsOf } from "./range-ends";
import { compileScenarios } from "./scenarios";

export type { Atom, CompiledCase, CompiledDistribution } from "./compiled-distribution";

/** Standard normal quantile of 0.9: P10 lies this many standard deviations above P50, P90 below it. */
const Z_P10 = 1.2815515655446004;

/**
 * Checks a distribution's parameters and makes it usable. With `minimum` or `maximum` it is conditioned on lying
 * inside them (values outside are left out, not moved to the bound), and `lostMass` says how much that removed.
 *
 * @throws {DomainError} when the parameters make no distribution or one whose mean and deviation cannot be worked out, or
 *   the bounds leave under 1 % of it; the message names the parameter and says why
 * @example compileDistribution({ kind: "lognormalP90P10", p90: 50, p10: 500 }).mean // => 236.710864...
 */
export function compileDistribution(definition: Distribution): CompiledDistribution {
  if (definition.kind === "scenarios") return compileScenarios(definition, compileDistribution);
  const largest = requireMagnitudes(definition);
  if (definition.kind === "constant") return constant(definition, definition.value);
  const compiled = condition(definition, familyOf(definition));
  const { range, mean, standardDeviation } = compiled;
  const figures = [mean, standardDeviation, range.p90, range.p50, range.p10];
  if (figures.every(Number.isFinite) && standardDeviation > 0) return compiled;
  throw new DomainError(
    "With these parameters the distribution is too narrow, or lies too close to 0, for a mean and a standard deviation. " +
      "For a value without uncertainty use a constant.",
    { input: largest },
  );
}

function familyOf(d: Exclude<SimpleDistribution, { kind: "constant" }>): Family {
  switch (d.kind) {
    case "uniform":
      requireAbove("high", d.high, "low", d.low);
      return uniformFamily(d.low, d.high);
    case "triangular": {
      const { low, mode, high } = limitsOf(checkedEnds(d));
      return triangularFamily(low, mode, high);
    }
    case "pert": {
      const { low, mode, high } = limitsOf(checkedEnds(d));
      return pertFamily(low, mode, high);
    }
    case "normal":
      requirePositive("standardDeviation", "The standard deviation", d.standardDeviation);
      return normalFamily(requireFinite("mean", d.mean), d.standardDeviation);
    case "lognormal":
      requirePositive("sigma", "Sigma, the standard deviation of the logarithm,", d.sigma);
      requireHonestSigma("sigma", d.sigma);
      return lognormalFamily(d.mu, d.sigma);
    case "normalP90P10":
      requireAbove("p10", d.p10, "p90", d.p90);
      return normalFamily((d.p90 + d.p10) / 2, (d.p10 - d.p90) / (2 * Z_P10));
    case "lognormalP90P10": {
      requirePositive("p90", "The P90 of a lognormal distribution", d.p90);
      requireAbove("p10", d.p10, "p90", d.p90);
      const sigma = Math.log(d.p10 / d.p90) / (2 * Z_P10);
      requireHonestSigma("p10", sigma);
      return lognormalFamily((Math.log(d.p90) + Math.log(d.p10)) / 2, sigma);
    }
    case "percentiles":
      return fitPercentiles(d.family, d.points).family;
    case "data":
      return fitData(d.shape, d.values).family;
  }
}

function checkedEnds<D extends Extract<SimpleDistribution, { kind: "triangular" | "pert" }>>(
  d: D,
): D {
  requireAbove("high", d.high, "low", d.low);
  // Where low and high are percentiles the most likely value may lie a little outside them.
  if (d.ends === undefined || d.ends === "limits") requireMode(d);
  return d;
}

function constant(definition: Distribution, value: number): CompiledDistribution {
  requireFinite("value", value);
  return {
    definition,
    quantile(p) {
      requireProbability(p);
      return value;
    },
    cdf: (x) => (x < value ? 0 : 1),
    pdf: () => 0,
    mean: value,
    standardDeviation: 0,
    range: { p90: value, p50: value, p10: value },
    support: { minimum: value, maximum: value },
    lostMass: 0,
    atoms: [{ value, probability: 1 }],
    cases: null,
    caseSet: null,
    fillQuantiles: (_probabilities, count, out) => void out.fill(value, 0, count),
  };
}

/** A density to draw: `x[i]` ascending, `density[i]` per unit of x. */
export interface DensityCurve {
  x: number[];
  density: number[];
}

/**
 * Points of a distribution's density for a small curve, from its P99.9 to its P0.1 where it has no end, else from
 * bound to bound. A constant gives its value alone; what has a chance of its own is in `atoms`, not in the density.
 *
 * @param points at least 2
 * @throws {DomainError} as {@link compileDistribution}
 */
export function densityCurve(definition: Distribution, points = 81): DensityCurve {
  const compiled = compileDistribution(definition);
  const { minimum, maximum } = compiled.support;
  if (minimum === maximum) return { x: [minimum], density: [0] };
  const [low, high] = drawnEnds(compiled);
  const x = Array.from({ length: points }, (_, i) => low + ((high - low) * i) / (points - 1));
  return { x, density: x.map(drawnDensity(compiled)) };
}
