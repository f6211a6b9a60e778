/** The fields of one uncertain quantity: text, as people type it, and the shape that it is typed in. */
import type {
  DataShape,
  Distribution,
  DistributionKind,
  PercentileFamily,
  RangeEnds,
  SimpleDistribution,
} from "@/analytics/uncertainty/distribution-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { definedEnds } from "./input-catalogue";
import { percentText } from "./percent-text";
import { typedFigure } from "./quantities-of-inputs";
import { isEndless, parametersOf } from "./shapes";

/** Percentiles to fit a curve through. */
export interface PercentilesText {
  family: PercentileFamily;
  /** `exceedance` is typed as 90, or P90 */
  points: { exceedance: string; value: string }[];
}

/** Measured values, as they were pasted. */
export interface DataText {
  shape: DataShape;
  cells: string;
}

/** A range that is not made of others. Figures of shapes that are not chosen are kept, so that trying one loses nothing. */
export interface RangeText<Kind extends DistributionKind = SimpleDistribution["kind"]> {
  kind: Kind;
  /** by parameter key */
  fields: Record<string, string>;
  minimum: string;
  maximum: string;
  /** what low and high of a triangular or PERT range mean; left out they are the ends */
  ends?: RangeEnds;
  /** absent until somebody chose that shape, as `data` and `cases` are */
  percentiles?: PercentilesText;
  data?: DataText;
}

/** One thing that may be true. */
export interface CaseText {
  name: string;
  /** in per cent */
  weight: string;
  range: RangeText;
}

export interface CasesText {
  /** inputs that name the same set take the same case; empty for cases of this input alone */
  caseSet: string;
  cases: CaseText[];
}

export interface InputText extends RangeText<DistributionKind> {
  cases?: CasesText;
  source: string;
  /** why this range and not another */
  reason?: string;
}

/** Text of a stored input: its distribution, and what was said of it. */
export const textOfInput = (input: {
  distribution: Distribution;
  source: string;
  reason?: string;
}): InputText => ({
  ...textOfDistribution(input.distribution, input.source),
  ...(input.reason !== undefined && { reason: input.reason }),
});

/** Where a range comes from and why it is what it is, as an estimate keeps them. */
export function saidOf({ source, reason = "" }: InputText): { source: string; reason?: string } {
  return { source: source.trim(), ...(reason.trim() !== "" && { reason: reason.trim() }) };
}

/** Text of one distribution, with the source beside it. */
export function textOfDistribution(distribution: Distribution, source = ""): InputText {
  if (distribution.kind !== "scenarios") return { ...textOfRange(distribution), source };
  return {
    kind: "scenarios",
    fields: {},
    minimum: "",
    maximum: "",
    cases: {
      caseSet: distribution.caseSet ?? "",
      cases: distribution.scenarios.map(({ name, weight, distribution: range }) => ({
        name,
        weight: percentText(weight),
        range: textOfRange(range),
      })),
    },
    source,
  };
}

function textOfRange(distribution: SimpleDistribution): RangeText {
  const bound = (key: "minimum" | "maximum") =>
    distribution.kind !== "constant" && distribution[key] !== undefined
      ? typedFigure(distribution[key])
      : "";
  return {
    kind: distribution.kind,
    fields: Object.fromEntries(
      Object.entries(parametersOf(distribution)).map(([key, value]) => [key, typedFigure(value)]),
    ),
    minimum: bound("minimum"),
    maximum: bound("maximum"),
    ...("ends" in distribution && distribution.ends && { ends: distribution.ends }),
    ...(distribution.kind === "percentiles" && {
      percentiles: {
        family: distribution.family,
        points: distribution.points.map(({ exceedance, value }) => ({
          exceedance: percentText(exceedance),
          value: typedFigure(value),
        })),
      },
    }),
    ...(distribution.kind === "data" && {
      data: {
        shape: distribution.shape,
        cells: distribution.values.map((value) => typedFigure(value)).join("\n"),
      },
    }),
  };
}

type BoundsText = Pick<InputText, "minimum" | "maximum">;

/** Bounds that an input starts with in a shape: those it has by definition, where the shape has no ends of its own. */
export function startingBounds(name: DriverName, kind: DistributionKind): BoundsText {
  const { minimum, maximum } = isEndless(kind) ? definedEnds(name) : {};
  const written = (value: number | undefined) => (value === undefined ? "" : typedFigure(value));
  return { minimum: written(minimum), maximum: written(maximum) };
}

/** The range in another shape, its figures as they are. Bounds that nobody has touched become those of the new shape. */
export function withShape<Text extends RangeText<DistributionKind>>(
  name: DriverName,
  text: Text,
  kind: Text["kind"],
): Text {
  const { minimum, maximum } = startingBounds(name, text.kind);
  const isUntouched = text.minimum === minimum && text.maximum === maximum;
  return { ...text, kind, ...(isUntouched ? startingBounds(name, kind) : {}) };
}
