import type {
  Distribution,
  DistributionKind,
  RangeEnds,
} from "@/analytics/uncertainty/distribution-schema";

/** Shapes that a few figures describe; the others are edited in a panel under their line. */
export type ParametricKind = Exclude<DistributionKind, "percentiles" | "data" | "scenarios">;

/** Ledger column a parameter is typed in. */
export type Slot = "low" | "best" | "high";

export interface ShapeParameter {
  /** key in the distribution */
  key: string;
  slot: Slot;
  /** above the field on a phone, and in its accessible name */
  label: string;
  /** whether the figure carries the input's unit (a standard deviation does, a logarithm does not) */
  inUnit: boolean;
}

export interface Shape {
  kind: DistributionKind;
  label: string;
  /** a soft line under the label in the menu */
  note?: string;
  /** empty for a shape that is edited in a panel */
  parameters: ShapeParameter[];
}

const p = (key: string, slot: Slot, label: string, inUnit = true): ShapeParameter => ({
  key,
  slot,
  label,
  inUnit,
});

/** The shapes of the menu, in its order, with the parameters that each takes and the column each is typed in. */
export const shapes: Shape[] = [
  {
    kind: "lognormalP90P10",
    label: "Lognormal, by P90 and P10",
    parameters: [p("p90", "low", "P90"), p("p10", "high", "P10")],
  },
  {
    kind: "normalP90P10",
    label: "Normal, by P90 and P10",
    parameters: [p("p90", "low", "P90"), p("p10", "high", "P10")],
  },
  {
    kind: "pert",
    label: "PERT",
    parameters: [
      p("low", "low", "Lowest"),
      p("mode", "best", "Most likely"),
      p("high", "high", "Highest"),
    ],
  },
  {
    kind: "triangular",
    label: "Triangular",
    parameters: [
      p("low", "low", "Lowest"),
      p("mode", "best", "Most likely"),
      p("high", "high", "Highest"),
    ],
  },
  {
    kind: "uniform",
    label: "Uniform",
    parameters: [p("low", "low", "Lowest"), p("high", "high", "Highest")],
  },
  {
    kind: "normal",
    label: "Normal, by mean",
    parameters: [p("mean", "best", "Mean"), p("standardDeviation", "high", "Standard deviation")],
  },
  {
    kind: "lognormal",
    label: "Lognormal, by logarithms",
    parameters: [p("mu", "best", "Mean of ln", false), p("sigma", "high", "St. dev. of ln", false)],
  },
  { kind: "constant", label: "Constant", parameters: [p("value", "best", "Value")] },
  {
    kind: "percentiles",
    label: "Percentiles",
    note: "two or three, of any chance",
    parameters: [],
  },
  { kind: "data", label: "Pasted data", note: "a column of measured values", parameters: [] },
  {
    kind: "scenarios",
    label: "Cases",
    note: "several things that may be true, each with a chance",
    parameters: [],
  },
];

/** What low and high of a most-likely/low/high range mean, as the menu says it. */
export const endsLabels: Record<RangeEnds, string> = {
  limits: "the lowest and highest possible",
  p90p10: "P90 and P10",
  p95p05: "P95 and P05",
};

const endsNames: Record<Exclude<RangeEnds, "limits">, Record<string, string>> = {
  p90p10: { low: "P90", high: "P10" },
  p95p05: { low: "P95", high: "P05" },
};

/** Whether low and high of a shape can mean more than one thing. */
export const hasEnds = (kind: DistributionKind): kind is "triangular" | "pert" =>
  kind === "triangular" || kind === "pert";

/** Whether a shape is edited in a panel under its line. */
export const isDetailed = (
  kind: DistributionKind,
): kind is Exclude<DistributionKind, ParametricKind> => shapeOf(kind).parameters.length === 0;

/** Parameters of a shape, with the names that they have for the stated meaning of low and high. */
export function parametersOfShape(shape: {
  kind: DistributionKind;
  ends?: RangeEnds;
}): ShapeParameter[] {
  const { parameters } = shapeOf(shape.kind);
  if (!hasEnds(shape.kind) || !shape.ends || shape.ends === "limits") return parameters;
  const names = endsNames[shape.ends];
  return parameters.map((parameter) => ({
    ...parameter,
    label: names[parameter.key] ?? parameter.label,
  }));
}

/** Whether the curve of a shape reaches further than any figure that is typed. */
export function isEndless(kind: DistributionKind): boolean {
  return (
    kind.startsWith("normal") ||
    kind.startsWith("lognormal") ||
    kind === "percentiles" ||
    kind === "data"
  );
}

export function shapeOf(kind: DistributionKind): Shape {
  const shape = shapes.find((candidate) => candidate.kind === kind);
  if (!shape) throw new RangeError(`no such shape: ${kind}`);
  return shape;
}

/** Values of a distribution's parameters by key, without its truncation. */
export function parametersOf(distribution: Distribution): Record<string, number> {
  const entries = Object.entries(distribution).filter(
    ([key, value]) => typeof value === "number" && key !== "minimum" && key !== "maximum",
  );
  return Object.fromEntries(entries) as Record<string, number>;
}

/** Chance of less than the low figure. Possible limits are put where 1 % is left on each side. */
const lowerChance: Record<RangeEnds, number> = { limits: 0.01, p90p10: 0.1, p95p05: 0.05 };

const LOGARITHM_DIGITS = 5;
export const tidy = (value: number, digits = 3) => Number(value.toPrecision(digits));

/**
 * Parameters of another shape with about the same P90, P50 and P10, so that choosing a shape does not throw the range
 * away. Limits of bounded shapes are put where the old curve leaves 1 % on each side; figures are rounded to three
 * digits, for a person will look at them and type better ones.
 *
 * @param quantile  quantile function of the present distribution; quantile(0.1) is P90
 * @param ends      what low and high of a triangular or PERT range mean
 */
export function convertShape(
  quantile: (probability: number) => number,
  to: ParametricKind,
  ends: RangeEnds = "limits",
): Record<string, number> {
  const p90 = quantile(0.1);
  const p50 = quantile(0.5);
  const p10 = quantile(0.9);
  /** P90 to P10 in standard deviations of a normal: 2 x 1.2815515655446004 */
  const span = 2.5631031310892007;
  switch (to) {
    case "constant":
      return { value: tidy(p50) };
    case "uniform":
      return { low: tidy(p90 - (p10 - p90) / 8), high: tidy(p10 + (p10 - p90) / 8) };
    case "triangular":
    case "pert":
      return {
        low: tidy(quantile(lowerChance[ends])),
        mode: tidy(p50),
        high: tidy(quantile(1 - lowerChance[ends])),
      };
    case "normal":
      return { mean: tidy(p50), standardDeviation: tidy((p10 - p90) / span) };
    case "lognormal":
      return {
        mu: tidy(Math.log(p50), LOGARITHM_DIGITS),
        sigma: tidy(Math.log(p10 / p90) / span, LOGARITHM_DIGITS),
      };
    case "normalP90P10":
    case "lognormalP90P10":
      return { p90: tidy(p90), p10: tidy(p10) };
  }
}
