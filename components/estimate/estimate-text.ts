/**
 * What stands in the fields of an estimate: text, as people type it, beside the estimate that it reads as. The text is
 * what is kept in the browser, so that a half-typed figure survives a reload.
 */
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { Distribution, DistributionKind } from "@/analytics/uncertainty/distribution-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
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

export interface Correlation {
  a: InputName;
  b: InputName;
  rank: number;
}

export interface EstimateText {
  inputs: Record<InputName, InputText>;
  correlations: Correlation[];
  fluid: SeparatorTest | null;
  depthFt: number | null;
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

/** Text of a stored estimate. Reading it back gives the same inputs. */
export function textOfInputs(inputs: EstimateInputs): EstimateText {
  return {
    inputs: mapInputs((name) =>
      textOfDistribution(inputs.uncertain[name].distribution, inputs.uncertain[name].source),
    ),
    correlations: inputs.correlations.map((pair) => ({ ...pair })),
    fluid: inputs.fluid,
    depthFt: inputs.depthFt,
  };
}

/** Shapes that a first estimate starts with: common practice for each kind of quantity. */
const firstShapes: Record<InputName, DistributionKind> = {
  areaAcres: "lognormalP90P10",
  netThicknessFt: "lognormalP90P10",
  porosity: "normalP90P10",
  waterSaturation: "normalP90P10",
  pressurePsia: "normalP90P10",
  temperatureDegF: "normalP90P10",
  condensateYieldStbPerMmscf: "normalP90P10",
  gasRecovery: "pert",
  condensateRecovery: "pert",
  salesGasFraction: "pert",
};

type BoundsText = Pick<InputText, "minimum" | "maximum">;

/** Bounds that an input starts with in a shape: those it has by definition, where the shape has no ends of its own. */
export function startingBounds(name: InputName, kind: DistributionKind): BoundsText {
  const { minimum, maximum } = isEndless(kind) ? definedEnds(name) : {};
  const written = (value: number | undefined) => (value === undefined ? "" : typedFigure(value));
  return { minimum: written(minimum), maximum: written(maximum) };
}

/** The input in another shape, its figures as they are. Bounds that nobody has touched become those of the new shape. */
export function withShape(name: InputName, text: InputText, kind: DistributionKind): InputText {
  const { minimum, maximum } = startingBounds(name, text.kind);
  const isUntouched = text.minimum === minimum && text.maximum === maximum;
  return { ...text, kind, ...(isUntouched ? startingBounds(name, kind) : {}) };
}

/** An estimate that nobody has typed anything into. No figure is proposed but the ends that a fraction has. */
export function emptyText(depthFt: number | null, fluid: SeparatorTest | null): EstimateText {
  return {
    inputs: mapInputs((name) => ({
      kind: firstShapes[name],
      fields: {},
      ...startingBounds(name, firstShapes[name]),
      source: "",
    })),
    correlations: [],
    fluid,
    depthFt,
  };
}

/** Sets the rank correlation of a pair; 0 takes the pair out. */
export function withCorrelation(
  pairs: readonly Correlation[],
  a: InputName,
  b: InputName,
  rank: number,
): Correlation[] {
  const others = pairs.filter((pair) => !isPair(pair, a, b));
  return rank === 0 ? others : [...others, { a, b, rank }];
}

export function correlationOf(pairs: readonly Correlation[], a: InputName, b: InputName): number {
  return pairs.find((pair) => isPair(pair, a, b))?.rank ?? 0;
}

const isPair = (pair: Correlation, a: InputName, b: InputName) =>
  (pair.a === a && pair.b === b) || (pair.a === b && pair.b === a);

/** Keys of the fields that a shape shows and that are still empty. */
export function emptyFields(text: InputText): string[] {
  return shapeOf(text.kind)
    .parameters.map(({ key }) => key)
    .filter((key) => (text.fields[key] ?? "").trim() === "");
}

export function mapInputs<Value>(make: (name: InputName) => Value): Record<InputName, Value> {
  return Object.fromEntries(inputNames.map((name) => [name, make(name)])) as Record<
    InputName,
    Value
  >;
}
