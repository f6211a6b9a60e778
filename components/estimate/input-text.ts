/** The fields of one uncertain quantity: text, as people type it, and the shape that it is typed in. */
import type { Distribution, DistributionKind } from "@/analytics/uncertainty/distribution-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { definedEnds } from "./input-catalogue";
import { typedFigure } from "./quantities-of-inputs";
import { isEndless, parametersOf, shapeOf } from "./shapes";

export interface InputText {
  kind: DistributionKind;
  /** by parameter key; keys of other shapes are kept, so that trying a shape loses nothing */
  fields: Record<string, string>;
  minimum: string;
  maximum: string;
  source: string;
}

/** Text of one distribution, with the source beside it. */
export function textOfDistribution(distribution: Distribution, source = ""): InputText {
  const bound = (key: "minimum" | "maximum") =>
    key in distribution && typeof distribution[key as keyof Distribution] === "number"
      ? typedFigure(Number(distribution[key as keyof Distribution]))
      : "";
  return {
    kind: distribution.kind,
    fields: Object.fromEntries(
      Object.entries(parametersOf(distribution)).map(([key, value]) => [key, typedFigure(value)]),
    ),
    minimum: bound("minimum"),
    maximum: bound("maximum"),
    source,
  };
}

type BoundsText = Pick<InputText, "minimum" | "maximum">;

/** Bounds that an input starts with in a shape: those it has by definition, where the shape has no ends of its own. */
export function startingBounds(name: DriverName, kind: DistributionKind): BoundsText {
  const { minimum, maximum } = isEndless(kind) ? definedEnds(name) : {};
  const written = (value: number | undefined) => (value === undefined ? "" : typedFigure(value));
  return { minimum: written(minimum), maximum: written(maximum) };
}

/** The input in another shape, its figures as they are. Bounds that nobody has touched become those of the new shape. */
export function withShape(name: DriverName, text: InputText, kind: DistributionKind): InputText {
  const { minimum, maximum } = startingBounds(name, text.kind);
  const isUntouched = text.minimum === minimum && text.maximum === maximum;
  return { ...text, kind, ...(isUntouched ? startingBounds(name, kind) : {}) };
}

/** Keys of the fields that a shape shows and that are still empty. */
export function emptyFields(text: InputText): string[] {
  return shapeOf(text.kind)
    .parameters.map(({ key }) => key)
    .filter((key) => (text.fields[key] ?? "").trim() === "");
}
