import type { Distribution, DistributionKind } from "@/analytics/uncertainty/distribution-schema";

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
];

/** Whether the curve of a shape reaches further than any figure that is typed. */
export function isEndless(kind: DistributionKind): boolean {
  return kind.startsWith("normal") || kind.startsWith("lognormal");
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

const LOGARITHM_DIGITS = 5;
const tidy = (value: number, digits = 3) => Number(value.toPrecision(digits));

/**
 * Parameters of another shape with about the same P90, P50 and P10, so that choosing a shape does not throw the range
 * away. Ends of bounded shapes are put where the old curve leaves 1 % on each side; figures are rounded to three
 * digits, for a person will look at them and type better ones.
 *
 * @param quantile  quantile function of the present distribution; quantile(0.1) is P90
 */
export function convertShape(
  quantile: (probability: number) => number,
  to: DistributionKind,
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
      return { low: tidy(quantile(0.01)), mode: tidy(p50), high: tidy(quantile(0.99)) };
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
