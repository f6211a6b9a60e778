import type { CompiledDistribution } from "../uncertainty/distribution";
import { describeFit } from "../uncertainty/describe-fit";
import type { DataFitReport, PercentilesFitReport } from "../uncertainty/fit-schema";
import type { Warning } from "../warnings";

/** The quantity that a range is of. */
export interface Quantity {
  /** where it stands in the estimate's inputs */
  readonly input: string;
  /** as in "the porosity" */
  readonly label: string;
  readonly unit: string;
  /** an estimate needs its average over the reservoir, not its value at a place */
  readonly isAverage: boolean;
}

/** With fewer values a fitted range rests on chance. Common practice, no source. */
const FEW_VALUES = 10;
/** An outermost percentile of an empirical range may lie beyond all values with more than this chance. */
const MISSED_END = 0.05;
/** With more values of a property of rock, each is a plug or a log reading, not a well. Common practice, no source. */
const MANY_SAMPLES = 30;
/** A fit that misses a stated percentile by more of the stated spread is not what was stated. */
const MOST_RESIDUAL = 0.05;

/** Bounds that leave out more move the percentiles of a range. */
const HEAVY_TRUNCATION = 0.05;

/**
 * What a reviewer would ask about how the figures of a range became its distribution: too few values, a shape that they
 * contradict, a percentile that is missed, bounds that cut off much, a mean that a long end carries. Scenarios are looked
 * at case by case, and their mean as a whole.
 */
export function fitWarnings(quantity: Quantity, compiled: CompiledDistribution): Warning[] {
  if (compiled.cases) {
    const ofCases = compiled.cases.flatMap(({ name: ofCase, compiled: one }) =>
      fitWarnings(quantity, one).map((warning) => ({
        ...warning,
        message: `In the case “${ofCase}”: ${warning.message}`,
      })),
    );
    return [...ofCases, ...asWarnings(quantity, heavyTail(quantity, compiled))];
  }
  const fit = describeFit(compiled.definition);
  return asWarnings(quantity, [
    ...(fit?.kind === "data" ? ofData(quantity, fit) : []),
    ...(fit?.kind === "percentiles" ? ofPercentiles(quantity, fit, compiled.lostMass) : []),
    ...(compiled.lostMass > HEAVY_TRUNCATION ? [truncated(quantity, compiled.lostMass)] : []),
    ...heavyTail(quantity, compiled),
  ]);
}

type Found = readonly [code: string, message: string];

function asWarnings({ input }: Quantity, found: readonly Found[]): Warning[] {
  return found.map(([code, message]) => ({ code, severity: "warning", input, message }));
}

/** Less than one trial in ten then decides the mean of everything that follows. */
function heavyTail({ label, unit }: Quantity, { mean, range }: CompiledDistribution): Found[] {
  // A constant's mean differs from it by rounding at most.
  if (!(mean - range.p10 > 1e-9 * Math.abs(mean))) return [];
  return [
    [
      "heavy_tail",
      `The mean of the ${label}, ${figure(mean)} ${unit}, is above its P10, ${figure(range.p10)}: a chance of less than ` +
        "10 % carries it. Is the highest value possible, and with that chance?",
    ],
  ];
}

function ofData(
  { label, isAverage }: Quantity,
  { shape, sampleSize, tests }: DataFitReport,
): Found[] {
  const found: Found[] = [];
  const missed = 0.9 ** sampleSize;
  if (sampleSize < FEW_VALUES) {
    found.push([
      "few_values",
      `The ${label} rests on ${sampleSize} values. So few say little of a P90 or a P10; compare the range with analogues.`,
    ]);
  } else if (shape === "empirical" && missed > MISSED_END) {
    found.push([
      "data_end_at_samples",
      `The ${label} runs from the smallest to the largest of ${sampleSize} values and no further. With a chance of ` +
        `${percent(missed)} none of them lies above the true P10, and the same holds below the P90: a fitted shape reaches further.`,
    ]);
  }
  if (shape !== "empirical") {
    const test = tests[shape];
    if (test?.contradicted) found.push(["poor_fit", `${upper(label)}: ${test.meaning}`]);
  }
  if (isAverage && sampleSize > MANY_SAMPLES) {
    found.push([
      "spread_of_samples",
      `The ${label} has the spread of ${sampleSize} single values, but an estimate needs how well its average over the ` +
        "reservoir is known, which is narrower. Is each value an average of a well or a zone?",
    ]);
  }
  return found;
}

/** Of a fit that bounds cut, the lost share says more than the residuals do. */
function ofPercentiles(
  { label, unit }: Quantity,
  fit: PercentilesFitReport,
  lostMass: number,
): Found[] {
  if (lostMass > HEAVY_TRUNCATION || fit.largestResidual <= MOST_RESIDUAL) return [];
  const worst = fit.points.reduce((a, b) =>
    Math.abs(b.given - b.asked) > Math.abs(a.given - a.asked) ? b : a,
  );
  return [
    [
      "poor_fit",
      `The ${label} was stated as ${figure(worst.asked)} ${unit} with a chance of ${percent(worst.exceedance)} of more, ` +
        `but the fitted distribution has ${figure(worst.given)} there. A shape with three parameters would meet it.`,
    ],
  ];
}

function truncated({ label }: Quantity, lostMass: number): Found {
  return [
    "heavy_truncation",
    `The bounds of the ${label} leave out ${Math.round(100 * lostMass)} % of the distribution as ` +
      "described, which moves its percentiles. Describe the range between the bounds instead.",
  ];
}

// Made once: building a formatter takes longer than a thousand trials.
const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 3 });
const figure = (value: number) => FIGURE.format(value);
const percent = (share: number) => `${Number((100 * share).toPrecision(2))} %`;
const upper = (label: string) => label[0].toUpperCase() + label.slice(1);
