import { DomainError } from "../errors";
import { recombine, type Wellstream } from "../fluid/wellstream";
import { compileDistribution, type CompiledDistribution } from "../uncertainty/distribution";
import type { Distribution } from "../uncertainty/distribution-schema";
import { correlationBlocks, type CorrelationBlock } from "../uncertainty/rank-correlation";
import { inputNames, type EstimateInputs, type InputName } from "./inputs-schema";
import { usualRanges } from "./usual-ranges";
import { columns } from "./workspace";

/** An estimate's inputs, found possible and ready to sample. */
export interface PreparedInputs {
  readonly distributions: Readonly<Record<InputName, CompiledDistribution>>;
  readonly blocks: readonly CorrelationBlock<InputName>[];
  readonly wellstream: Wellstream;
}

/**
 * A distribution may reach past what is physically possible by this much probability and still be accepted: less than
 * one trial in a million. It is then conditioned on the possible range, which changes no digit that is shown. With
 * more, the person decides where to truncate.
 */
const NEGLIGIBLE_MASS = 1e-6;

/**
 * Checks everything that can be impossible in an estimate's inputs, and compiles it.
 *
 * @throws {DomainError} naming the input as a path (`uncertain.porosity.maximum`, `fluid.condensateApi`,
 *   `correlations`) and the reason
 */
export function prepareInputs(inputs: EstimateInputs): PreparedInputs {
  return {
    distributions: columns(inputNames, (name) =>
      within(`uncertain.${name}`, () => compileInput(name, inputs.uncertain[name].distribution)),
    ),
    blocks: correlationBlocks(inputNames, inputs.correlations, (name) => usualRanges[name].label),
    wellstream: within("fluid", () => recombine(inputs.fluid)),
  };
}

/** Runs a check of a part; its errors name their input from the whole's point of view. */
function within<Result>(path: string, check: () => Result): Result {
  try {
    return check();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { input } = error.details;
    throw new DomainError(error.message, {
      ...error.details,
      input: input ? `${path}.${input}` : path,
    });
  }
}

/**
 * Compiles the distribution of one input, found possible for that input whatever the others are.
 *
 * @param distribution  in the unit that the input's name says
 * @throws {DomainError} when its parameters make no distribution, or when it reaches further past the input's possible
 *   range than a negligible chance; `details.input` is then `value`, `minimum` or `maximum`, and `details.value` the
 *   impossible value or the end of the possible range
 */
export function compileInput(name: InputName, distribution: Distribution): CompiledDistribution {
  const compiled = compileDistribution(distribution);
  const { label, unit, possible, lowExcluded, reason, slip } = usualRanges[name];
  const [low, high] = possible;
  if (distribution.kind === "constant") {
    const { value } = distribution;
    if (value > low && value <= high) return compiled;
    if (value === low && !lowExcluded) return compiled;
    throw new DomainError(`The ${label} cannot be ${value} ${unit}: ${reason}. ${slip}`, {
      input: "value",
      value,
    });
  }
  const below = compiled.support.minimum < low ? compiled.cdf(low) : 0;
  const above = compiled.support.maximum > high ? 1 - compiled.cdf(high) : 0;
  if (below + above > NEGLIGIBLE_MASS) {
    const tooLow = below > above;
    const bound = tooLow ? low : high;
    const advice =
      below + above > 0.5
        ? slip
        : `Give it a ${tooLow ? "minimum" : "maximum"} of ${bound} or a narrower range.`;
    throw new DomainError(
      `As described, the ${label} would be ${tooLow ? "below" : "above"} ${bound} ${unit} with a chance of ` +
        `${percent(tooLow ? below : above)}, but ${reason}. ${advice}`,
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
