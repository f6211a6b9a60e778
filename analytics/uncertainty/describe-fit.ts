import { fitData } from "./data-fit";
import { compileDistribution } from "./distribution";
import type { Distribution, SimpleDistribution } from "./distribution-schema";
import type { DataFitReport, Goodness, PercentilesFitReport, RangeFit } from "./fit-schema";
import { ANDERSON_DARLING_VALUES, isContradicted, testNormality } from "./goodness-of-fit";
import { fitPercentiles } from "./percentile-fit";
import { limitsOf } from "./range-ends";

/**
 * How the figures of a range became its distribution: the residual at each percentile, the tests of measured values, the
 * limits behind a P90 and a P10. Scenarios have a fit a case.
 *
 * @returns null for a kind whose parameters are the distribution itself
 * @throws {DomainError} as `compileDistribution`
 */
export function describeFit(definition: Distribution): RangeFit | null {
  switch (definition.kind) {
    case "triangular":
    case "pert":
      if ((definition.ends ?? "limits") === "limits") return null;
      return { kind: "limits", limits: limitsOf(definition) };
    case "percentiles":
      return percentilesFit(definition);
    case "data":
      return dataFit(definition);
    default:
      return null;
  }
}

type OfKind<Kind> = Extract<SimpleDistribution, { kind: Kind }>;

function percentilesFit(definition: OfKind<"percentiles">): PercentilesFitReport {
  const { family, points } = definition;
  const { limits } = fitPercentiles(family, points);
  const compiled = compileDistribution(definition);
  const described = points.map(({ exceedance, value }) => ({
    exceedance,
    asked: value,
    given: compiled.quantile(1 - exceedance),
  }));
  const asked = points.map(({ value }) => value);
  const spread = Math.max(...asked) - Math.min(...asked);
  const differences = described.map(({ asked: value, given }) => Math.abs(given - value));
  return {
    kind: "percentiles",
    family,
    points: described,
    largestResidual: Math.max(...differences) / spread,
    limits,
  };
}

function dataFit({ shape, values }: OfKind<"data">): DataFitReport {
  const n = values.length;
  const { parameters } = fitData(shape, values);
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const sorted = [...values].sort((a, b) => a - b);
  const steps = thinned(
    sorted.flatMap((value, i) => (sorted[i + 1] === value ? [] : [{ value, share: (i + 1) / n }])),
  );
  return {
    kind: "data",
    shape,
    sampleSize: n,
    mean,
    standardDeviation: Math.sqrt(squares / (n - 1)),
    parameters,
    tests: {
      normal: goodness("normal", values),
      lognormal: sorted[0] > 0 ? goodness("lognormal", values.map(Math.log)) : null,
    },
    stairs: { values: steps.map(({ value }) => value), shares: steps.map(({ share }) => share) },
  };
}

/** As many as a drawing can show. */
const MOST_STAIRS = 200;

/** Evenly chosen steps, the first and the last among them; each that stays is where it was. */
function thinned<Step>(steps: readonly Step[]): readonly Step[] {
  if (steps.length <= MOST_STAIRS) return steps;
  const gap = (steps.length - 1) / (MOST_STAIRS - 1);
  return Array.from({ length: MOST_STAIRS }, (_, i) => steps[Math.round(i * gap)]);
}

function goodness(name: "normal" | "lognormal", values: readonly number[]): Goodness {
  const tests = testNormality(values);
  const contradicted = isContradicted(tests);
  return { ...tests, contradicted, meaning: meaningOf(name, tests, contradicted, values.length) };
}

function meaningOf(
  name: string,
  { andersonDarling, lilliefors }: ReturnType<typeof testNormality>,
  contradicted: boolean,
  count: number,
): string {
  const chances = [andersonDarling.pValue, lilliefors.pValue].filter((p) => p !== null);
  const least = Math.min(...chances);
  const chance = least < 0.001 ? "less than 1 time in 1,000" : `${percent(least)} of the time`;
  if (contradicted) {
    return `The values contradict a ${name} distribution: values from one would look this unlike it ${chance}.`;
  }
  const few =
    count < ANDERSON_DARLING_VALUES ? " So few values can hardly contradict any shape." : "";
  return (
    `The values do not contradict a ${name} distribution (values from one would look at least this unlike it ` +
    `${chance}), which is not proof that they come from one.${few}`
  );
}

const percent = (share: number) => `${Number((100 * share).toPrecision(2))} %`;
