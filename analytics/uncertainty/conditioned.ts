import { DomainError } from "../errors";
import type { Bounded, CompiledDistribution } from "./compiled-distribution";
import type { Family } from "./families";
import { requireAbove, requireProbability } from "./parameter-checks";

/** Bounds that leave less of the distribution than this contradict its parameters. */
const LEAST_KEPT_MASS = 0.01;

/**
 * A family conditioned on lying inside the bounds of its definition: values outside are left out, not moved to the
 * bound, and `lostMass` says how much that removed.
 *
 * @throws {DomainError} when the bounds are in the wrong order, or leave under 1 % of the distribution
 */
export function condition(definition: Bounded, family: Family): CompiledDistribution {
  const minimum = Math.max(family.minimum, definition.minimum ?? -Infinity);
  const maximum = Math.min(family.maximum, definition.maximum ?? Infinity);
  if (definition.minimum !== undefined && definition.maximum !== undefined) {
    requireAbove("maximum", definition.maximum, "minimum", definition.minimum);
  }
  const below = minimum > family.minimum ? chanceBelow(family, minimum) : 0;
  const above = maximum < family.maximum ? family.cdf(maximum) : 1;
  const kept = above - below;
  if (!(kept >= LEAST_KEPT_MASS)) {
    const but = kept > 0 ? ` but ${Number((100 * kept).toPrecision(2))} %` : "";
    const input = definition.minimum !== undefined && below > 1 - above ? "minimum" : "maximum";
    throw new DomainError(
      `The bounds ${describeBounds(definition)} leave out all${but} of the distribution. ` +
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
    cdf: (x) => (x < minimum ? 0 : x >= maximum ? 1 : (family.cdf(x) - below) / kept),
    pdf: (x) => (x < minimum || x > maximum ? 0 : family.pdf(x) / kept),
    mean,
    standardDeviation: Math.sqrt(variance),
    range: { p90: quantile(0.1), p50: quantile(0.5), p10: quantile(0.9) },
    support: { minimum, maximum },
    lostMass: 1 - kept,
    atoms: (family.atoms ?? [])
      .filter(({ value }) => value >= minimum && value <= maximum)
      .map(({ value, probability }) => ({ value, probability: probability / kept })),
    cases: null,
    caseSet: null,
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

/** A bound keeps its own value, so what has a chance of its own there is not below it. */
function chanceBelow(family: Family, bound: number): number {
  const atom = family.atoms?.find(({ value }) => value === bound);
  return family.cdf(bound) - (atom?.probability ?? 0);
}

function describeBounds(d: Bounded): string {
  if (d.minimum === undefined) return `(at most ${d.maximum})`;
  return d.maximum === undefined ? `(at least ${d.minimum})` : `${d.minimum} to ${d.maximum}`;
}
