import { DomainError } from "../errors";
import type { Distribution } from "./distribution-schema";
import {
  lognormalFamily,
  normalFamily,
  pertFamily,
  triangularFamily,
  uniformFamily,
  type Family,
} from "./families";

/** Standard normal quantile of 0.9: P10 lies this many standard deviations above P50, P90 below it. */
const Z_P10 = 1.2815515655446004;

/** Bounds that leave less of the distribution than this contradict its parameters. */
const LEAST_KEPT_MASS = 0.01;

/**
 * A distribution ready for use. `quantile(0.1)` is P90, the value that is reached with a chance of 90 %.
 */
export interface CompiledDistribution {
  readonly definition: Distribution;
  /** @param p cumulative probability, 0 to 1 */
  quantile(p: number): number;
  cdf(x: number): number;
  /** density per unit of x; 0 everywhere for a constant, which has none */
  pdf(x: number): number;
  readonly mean: number;
  readonly standardDeviation: number;
  /** after truncation, so a truncated `lognormalP90P10` need not return the figures it was given */
  readonly range: { p90: number; p50: number; p10: number };
  /** the interval it lies in; infinite where it has no end */
  readonly support: { minimum: number; maximum: number };
  /** probability that truncation removed from the distribution as described, 0 to 0.99 */
  readonly lostMass: number;
  /**
   * Quantiles of `count` ascending probabilities strictly between 0 and 1, written to `out`: for sampling. The
   * probabilities are overwritten when the distribution is truncated.
   */
  fillQuantiles(probabilities: Float64Array, count: number, out: Float64Array): void;
}

/**
 * Checks a distribution's parameters and makes it usable. With `minimum` or `maximum` it is conditioned on lying
 * inside them (values outside are left out, not moved to the bound), and `lostMass` says how much that removed.
 *
 * @throws {DomainError} when the parameters make no distribution, or the bounds leave under 1 % of it; the message
 *   names the parameter and says why
 * @example compileDistribution({ kind: "lognormalP90P10", p90: 50, p10: 500 }).mean // => 236.710864...
 */
export function compileDistribution(definition: Distribution): CompiledDistribution {
  if (definition.kind === "constant") return constant(definition, definition.value);
  return truncate(definition, familyOf(definition));
}

type Uncertain = Exclude<Distribution, { kind: "constant" }>;

function familyOf(d: Uncertain): Family {
  switch (d.kind) {
    case "uniform":
      requireAbove("high", d.high, "low", d.low);
      return uniformFamily(d.low, d.high);
    case "triangular":
      requireAbove("high", d.high, "low", d.low);
      requireMode(d);
      return triangularFamily(d.low, d.mode, d.high);
    case "pert":
      requireAbove("high", d.high, "low", d.low);
      requireMode(d);
      return pertFamily(d.low, d.mode, d.high);
    case "normal":
      requirePositive("standardDeviation", "The standard deviation", d.standardDeviation);
      return normalFamily(finite("mean", d.mean), d.standardDeviation);
    case "lognormal":
      requirePositive("sigma", "Sigma, the standard deviation of the logarithm,", d.sigma);
      return lognormalFamily(finite("mu", d.mu), d.sigma);
    case "normalP90P10":
      requireAbove("p10", d.p10, "p90", d.p90);
      return normalFamily((d.p90 + d.p10) / 2, (d.p10 - d.p90) / (2 * Z_P10));
    case "lognormalP90P10":
      requirePositive("p90", "The P90 of a lognormal distribution", d.p90);
      requireAbove("p10", d.p10, "p90", d.p90);
      return lognormalFamily(
        (Math.log(d.p90) + Math.log(d.p10)) / 2,
        Math.log(d.p10 / d.p90) / (2 * Z_P10),
      );
  }
}

function truncate(definition: Uncertain, family: Family): CompiledDistribution {
  const minimum = Math.max(family.minimum, definition.minimum ?? -Infinity);
  const maximum = Math.min(family.maximum, definition.maximum ?? Infinity);
  if (definition.minimum !== undefined && definition.maximum !== undefined) {
    requireAbove("maximum", definition.maximum, "minimum", definition.minimum);
  }
  const below = minimum > family.minimum ? family.cdf(minimum) : 0;
  const above = maximum < family.maximum ? family.cdf(maximum) : 1;
  const kept = above - below;
  if (!(kept >= LEAST_KEPT_MASS)) {
    const input = definition.minimum !== undefined && below > 1 - above ? "minimum" : "maximum";
    throw new DomainError(
      `The bounds ${describeBounds(definition)} leave out ${(100 * (1 - kept)).toFixed(1)} % of the distribution. ` +
        "Its parameters and its bounds contradict each other.",
      { input, value: definition[input] },
    );
  }
  const whole = kept === 1;
  // Rounding in the inverse can step past a bound by a few units in the last place; nothing else is moved.
  const inside = (x: number) => (x < minimum ? minimum : x > maximum ? maximum : x);
  const quantile = (p: number) => {
    requireProbability(p);
    return inside(family.quantile(whole ? p : below + p * kept));
  };
  const { mean, variance } = family.momentsBetween(minimum, maximum);
  return {
    definition,
    quantile,
    cdf: (x) => (x <= minimum ? 0 : x >= maximum ? 1 : (family.cdf(x) - below) / kept),
    pdf: (x) => (x < minimum || x > maximum ? 0 : family.pdf(x) / kept),
    mean,
    standardDeviation: Math.sqrt(variance),
    range: { p90: quantile(0.1), p50: quantile(0.5), p10: quantile(0.9) },
    support: { minimum, maximum },
    lostMass: 1 - kept,
    fillQuantiles(probabilities, count, out) {
      if (!whole) {
        for (let i = 0; i < count; i += 1) probabilities[i] = below + kept * probabilities[i];
      }
      family.fillQuantiles(probabilities, count, out);
      // Ascending: only the ends can have stepped over.
      for (let i = 0; i < count && out[i] < minimum; i += 1) out[i] = minimum;
      for (let i = count - 1; i >= 0 && out[i] > maximum; i -= 1) out[i] = maximum;
    },
  };
}

function constant(definition: Distribution, value: number): CompiledDistribution {
  finite("value", value);
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
 * bound to bound. A constant gives its value alone.
 *
 * @param points at least 2
 * @throws {DomainError} as {@link compileDistribution}
 */
export function densityCurve(definition: Distribution, points = 81): DensityCurve {
  const compiled = compileDistribution(definition);
  const { minimum, maximum } = compiled.support;
  if (minimum === maximum) return { x: [minimum], density: [0] };
  const low = openEnd(definition, minimum) ? compiled.quantile(0.001) : minimum;
  const high = Number.isFinite(maximum) ? maximum : compiled.quantile(0.999);
  const x = Array.from({ length: points }, (_, i) => low + ((high - low) * i) / (points - 1));
  return { x, density: x.map((value) => compiled.pdf(value)) };
}

/** A lognormal's lower end is 0, where nothing is; its curve starts where there is something to see. */
function openEnd(definition: Distribution, minimum: number): boolean {
  return !Number.isFinite(minimum) || (minimum === 0 && definition.kind.startsWith("lognormal"));
}

function describeBounds(d: Uncertain): string {
  if (d.minimum === undefined) return `(at most ${d.maximum})`;
  return d.maximum === undefined ? `(at least ${d.minimum})` : `${d.minimum} to ${d.maximum}`;
}

function finite(input: string, value: number): number {
  if (!Number.isFinite(value)) {
    throw new DomainError(`The ${input} must be a number.`, { input, value });
  }
  return value;
}

const NAMES: Record<string, string> = {
  p10: "P10 (the high case)",
  p90: "P90 (the low case)",
  high: "high value",
  low: "low value",
  maximum: "maximum",
  minimum: "minimum",
};

function requireAbove(input: string, value: number, other: string, bound: number): void {
  finite(input, value);
  finite(other, bound);
  if (value > bound) return;
  const advice = value === bound ? " For a value without uncertainty use a constant." : "";
  throw new DomainError(
    `The ${NAMES[input]}, ${value}, must be greater than the ${NAMES[other]}, ${bound}.${advice}`,
    { input, value },
  );
}

function requireMode(d: { low: number; mode: number; high: number }): void {
  if (finite("mode", d.mode) >= d.low && d.mode <= d.high) return;
  throw new DomainError(
    `The most likely value, ${d.mode}, must lie between the low value, ${d.low}, and the high value, ${d.high}.`,
    { input: "mode", value: d.mode },
  );
}

function requirePositive(input: string, name: string, value: number): void {
  if (finite(input, value) > 0) return;
  throw new DomainError(`${name} must be greater than 0; ${value} is not.`, { input, value });
}

function requireProbability(p: number): void {
  if (p >= 0 && p <= 1) return;
  throw new DomainError(`A probability lies between 0 and 1; ${p} does not.`, {
    input: "p",
    value: p,
  });
}
