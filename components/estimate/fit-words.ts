/** What a fit says of itself, in sentences with the figures in them. */
import {
  ANDERSON_DARLING_VALUES,
  CONTRADICTED_BELOW,
  testNormality,
  type TestResult,
} from "@/analytics/uncertainty/goodness-of-fit";
import type {
  DataShape,
  PercentileFamily,
  SimpleDistribution,
} from "@/analytics/uncertainty/distribution-schema";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { percentileName } from "./percent-text";

export const familyLabels: Record<PercentileFamily, string> = {
  normal: "Normal",
  lognormal: "Lognormal",
  shiftedLognormal: "Shifted lognormal",
  triangular: "Triangular",
  pert: "PERT",
};

/** Families with three parameters, which three percentiles settle. */
export const needsThree = (family: PercentileFamily) =>
  family !== "normal" && family !== "lognormal";

/** One stated percentile, and what the curve has there. */
export interface Residual {
  name: string;
  asked: number;
  given: number;
  difference: number;
  /** difference over the asked value; `null` for a value of 0 */
  share: number | null;
}

type Percentiles = Extract<SimpleDistribution, { kind: "percentiles" }>;

/**
 * How far the curve misses each stated percentile, as it is used: after any truncation.
 *
 * @param quantile  of the compiled curve
 */
export function residualsOf(
  { points }: Percentiles,
  quantile: (probability: number) => number,
): Residual[] {
  return points.map(({ exceedance, value: asked }) => {
    const given = quantile(1 - exceedance);
    const difference = given - asked;
    return {
      name: percentileName(exceedance),
      asked,
      given,
      difference,
      share: asked === 0 ? null : difference / Math.abs(asked),
    };
  });
}

/** Misses that no figure on the screen shows. */
const UNSEEN = 5e-4;

/** "The lognormal curve misses P50 by 3.4 %, more than any other." */
export function residualFinding(family: PercentileFamily, residuals: readonly Residual[]): string {
  const curve = `The ${familyLabels[family].replace(/^[A-Z](?![A-Z])/, (letter) => letter.toLowerCase())} curve`;
  const size = ({ difference, share }: Residual) => Math.abs(share ?? difference);
  const worst = residuals.reduce((a, b) => (size(b) > size(a) ? b : a));
  if (size(worst) < UNSEEN) {
    return `${curve} goes through ${residuals.length === 2 ? "both percentiles" : "all three percentiles"}.`;
  }
  const miss =
    worst.share === null
      ? formatFigure(Math.abs(worst.difference))
      : formatPercent(Math.abs(worst.share), { decimals: 1 });
  return `${curve} misses ${worst.name} by ${miss}, the most of the ${residuals.length === 2 ? "two" : "three"}.`;
}

/** The outcome of one test of a fit. */
export interface TestWords {
  name: string;
  /** "p = 0.34"; `null` where no table reaches */
  figure: string | null;
  text: string;
  isContradicted: boolean;
}

const curveNames: Record<Exclude<DataShape, "empirical">, string> = {
  normal: "normal",
  lognormal: "lognormal",
};

function pFigure(p: number): string {
  if (p < 0.001) return "p < 0.001";
  if (p > 0.999) return "p > 0.999";
  return `p = ${Number(p.toPrecision(2))}`;
}

function wordsOf(
  name: string,
  what: string,
  { pValue }: TestResult,
  shape: Exclude<DataShape, "empirical">,
): TestWords {
  if (pValue === null) {
    const text = `${what} Says nothing below ${ANDERSON_DARLING_VALUES} values.`;
    return { name, figure: null, text, isContradicted: false };
  }
  const isContradicted = pValue < CONTRADICTED_BELOW;
  const hundred = Math.round(pValue * 100);
  const often =
    hundred === 0
      ? "Fewer than 1 in 100 samples"
      : hundred === 100
        ? "Nearly every sample"
        : `About ${hundred} in 100 samples`;
  const verdict = isContradicted
    ? "The values contradict the curve."
    : "Nothing here speaks against the curve.";
  return {
    name,
    figure: pFigure(pValue),
    text: `${what} ${often} from a ${curveNames[shape]} curve would lie further from it than these. ${verdict}`,
    isContradicted,
  };
}

/**
 * Both tests of a normal or lognormal fit, in words. `null` for the values themselves, which nothing was fitted to, and
 * for values that have no such fit.
 */
export function testsInWords(shape: DataShape, values: readonly number[]): TestWords[] | null {
  if (shape === "empirical" || values.length < 2) return null;
  if (shape === "lognormal" && values.some((value) => !(value > 0))) return null;
  const tested = shape === "lognormal" ? values.map((value) => Math.log(value)) : values;
  if (tested.every((value) => value === tested[0])) return null;
  const { andersonDarling, lilliefors } = testNormality(tested);
  return [
    wordsOf("Anderson–Darling", "Looks at the tails most.", andersonDarling, shape),
    wordsOf("Lilliefors", "Looks at the largest gap between the two lines.", lilliefors, shape),
  ];
}
