import { DomainError } from "../errors";
import { compileDistribution, type CompiledDistribution } from "./distribution";
import type { Distribution } from "./distribution-schema";
import { compileScenarios } from "./scenarios";

/** What a quantity can be whatever the others are. Units as its name says. */
export interface PossibleRange {
  /** as in "the porosity" */
  label: string;
  unit: string;
  /** outside: refused. Infinity where nature sets no end */
  possible: readonly [low: number, high: number];
  /** the possible range does not include its lower end */
  lowExcluded: boolean;
  /** why the possible range ends where it does; a pair when the two ends have different reasons */
  reason: string | readonly [low: string, high: string];
  /** a slip that gives values like this, or what to do about one */
  slip: string;
}

/**
 * A distribution may reach past what is physically possible by this much probability and still be accepted: less than
 * one trial in a million. It is then conditioned on the possible range, which changes no digit that is shown. With
 * more, the person decides where to truncate.
 */
const NEGLIGIBLE_MASS = 1e-6;

/**
 * Compiles the distribution of one quantity, found possible for it; of scenarios, each case by itself.
 *
 * @throws {DomainError} when its parameters make no distribution, or when it reaches further past the possible range
 *   than a negligible chance; `details.input` is then `value`, `minimum` or `maximum`, and `details.value` the
 *   impossible value or the end of the possible range
 */
export function compilePossible(
  range: PossibleRange,
  distribution: Distribution,
): CompiledDistribution {
  if (distribution.kind === "scenarios") {
    return compileScenarios(distribution, (ofCase) => compilePossible(range, ofCase));
  }
  const compiled = compileDistribution(distribution);
  const { label, unit, possible, lowExcluded, slip } = range;
  const [low, high] = possible;
  const because = (tooLow: boolean) =>
    typeof range.reason === "string" ? range.reason : range.reason[tooLow ? 0 : 1];
  if (distribution.kind === "constant") {
    const { value } = distribution;
    if (value > low && value <= high) return compiled;
    if (value === low && !lowExcluded) return compiled;
    throw new DomainError(
      `The ${label} cannot be ${value} ${unit}: ${because(value <= low)}. ${slip}`,
      { input: "value", value },
    );
  }
  const below = compiled.support.minimum < low ? compiled.cdf(low) : 0;
  const above = compiled.support.maximum > high ? 1 - compiled.cdf(high) : 0;
  if (below + above > NEGLIGIBLE_MASS) {
    const tooLow = below > above;
    const bound = tooLow ? low : high;
    const shown = Number(bound.toPrecision(6));
    const advice =
      below + above > 0.5
        ? slip
        : `Give it a ${tooLow ? "minimum" : "maximum"} of ${shown} or a narrower range.`;
    throw new DomainError(
      `As described, the ${label} would be ${tooLow ? "below" : "above"} ${shown} ${unit} with a chance of ` +
        `${percent(tooLow ? below : above)}, but ${because(tooLow)}. ${advice}`,
      { input: tooLow ? "minimum" : "maximum", value: bound },
    );
  }
  if (below === 0 && above === 0) return compiled;
  return compileDistribution({
    ...distribution,
    minimum: Math.max(low, distribution.minimum ?? low),
    ...(Number.isFinite(high) ? { maximum: Math.min(high, distribution.maximum ?? high) } : {}),
  });
}

function percent(share: number): string {
  return `${Number((share * 100).toPrecision(2))} %`;
}
