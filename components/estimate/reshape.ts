/** An input in another shape, with about the range that it had. */
import type { DistributionKind, RangeEnds } from "@/analytics/uncertainty/distribution-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import {
  startingBounds,
  withShape,
  type CasesText,
  type InputText,
  type PercentilesText,
  type RangeText,
} from "./input-text";
import { typedFigure } from "./quantities-of-inputs";
import { convertShape, hasEnds, tidy, type ParametricKind } from "./shapes";

type Quantile = (probability: number) => number;

/** Takes figures that were worked out as if they had been typed. */
export function withValues<Text extends RangeText<DistributionKind>>(
  text: Text,
  values: Record<string, number>,
): Text {
  const typed = Object.entries(values).map(([key, value]) => [key, typedFigure(value)]);
  return { ...text, fields: { ...text.fields, ...Object.fromEntries(typed) } };
}

/**
 * The input in another shape. What was typed in that shape before is kept for percentiles, data and cases; otherwise
 * the figures are those of the present curve, for a person to look at and improve.
 *
 * @param quantile  of the present curve; `null` while there is none
 */
export function reshaped(
  name: DriverName,
  text: InputText,
  quantile: Quantile | null,
  kind: DistributionKind,
): InputText {
  if (kind === text.kind) return text;
  const next = withShape(name, text, kind);
  switch (kind) {
    case "percentiles":
      return { ...next, percentiles: text.percentiles ?? startingPercentiles(text, quantile) };
    case "data":
      return { ...next, data: text.data ?? { shape: "empirical", cells: "" } };
    case "scenarios":
      return { ...next, cases: text.cases ?? startingCases(quantile) };
    default:
      return quantile ? withValues(next, convertShape(quantile, kind, next.ends)) : next;
  }
}

/** Another meaning of low and high for the same curve: the figures move, the curve about stays. */
export function withEnds(text: InputText, quantile: Quantile | null, ends: RangeEnds): InputText {
  if (!hasEnds(text.kind) || ends === (text.ends ?? "limits")) return text;
  const next = { ...text, ends };
  if (!quantile) return next;
  // The most likely value is what it was; only the ends are asked in another way.
  const { low, high } = convertShape(quantile, text.kind, ends);
  return withValues(next, { low, high });
}

/** One case in another shape. A single value says nothing of a spread: what it does not say is left to fill in. */
export function reshapedCase(
  name: DriverName,
  range: RangeText,
  quantile: Quantile | null,
  kind: ParametricKind,
): RangeText {
  if (kind === range.kind) return range;
  const next = { ...range, kind, ...startingBounds(name, kind) };
  if (range.kind === "constant") {
    return { ...next, fields: { ...next.fields, mode: range.fields.value ?? "" } };
  }
  return quantile ? withValues(next, convertShape(quantile, kind, next.ends)) : next;
}

const written = (value: number | undefined) =>
  value === undefined || !Number.isFinite(value) ? "" : typedFigure(tidy(value));

function startingPercentiles(text: InputText, quantile: Quantile | null): PercentilesText {
  const family = hasEnds(text.kind)
    ? text.kind
    : text.kind.startsWith("normal") || (quantile && quantile(0.1) <= 0)
      ? "normal"
      : "lognormal";
  return {
    family,
    points: [0.9, 0.5, 0.1].map((exceedance) => ({
      exceedance: String(exceedance * 100),
      value: written(quantile?.(1 - exceedance)),
    })),
  };
}

/** Names and chances of cases that nobody has named: 30, 40 and 30 % at P90, P50 and P10 keep the mean about right. */
const firstCases = [
  { name: "Low", weight: "30", probability: 0.1 },
  { name: "Middle", weight: "40", probability: 0.5 },
  { name: "High", weight: "30", probability: 0.9 },
];

const startingCases = (quantile: Quantile | null): CasesText => ({
  caseSet: "",
  cases: firstCases.map(({ name, weight, probability }) => ({
    name,
    weight,
    range: singleValue(written(quantile?.(probability))),
  })),
});

/** A case that is one value. */
export const singleValue = (value: string): RangeText => ({
  kind: "constant",
  fields: { value },
  minimum: "",
  maximum: "",
});
