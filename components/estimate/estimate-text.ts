/**
 * What stands in the fields of an estimate: text, as people type it, beside the estimate that it reads as. The text is
 * what is kept in the browser, so that a half-typed figure survives a reload.
 */
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { planInputNames, type PlanInputName } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution, DistributionKind } from "@/analytics/uncertainty/distribution-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { withSharedCases } from "./case-sets";
import { startingBounds, textOfInput, type InputText } from "./input-text";
import { textOfPlan, type PlanText } from "./plan-text";

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
  /** kept while recoveries are typed by hand, so that going back to it loses nothing */
  plan: PlanText | null;
  /** whether recoveries are worked out by the plan rather than typed */
  usesPlan: boolean;
}

/**
 * Stands in a stored estimate for a recovery that nobody typed because its plan works it out: nothing looks at it, and
 * it reads as an empty field.
 */
export const NOT_TYPED: Distribution = { kind: "constant", value: 0 };

const isNotTyped = ({ recoveryPlan, uncertain }: EstimateInputs, name: InputName) => {
  const { distribution } = uncertain[name];
  return (
    recoveryPlan !== null &&
    isWorkedOut(name) &&
    distribution.kind === "constant" &&
    distribution.value === 0
  );
};

/** Whether a recovery plan takes the place of an input. */
export const isWorkedOut = (name: InputName) =>
  name === "gasRecovery" || name === "condensateRecovery";

/** Text of a stored estimate. Reading it back gives the same inputs. */
export function textOfInputs(inputs: EstimateInputs): EstimateText {
  return {
    inputs: mapInputs((name) =>
      isNotTyped(inputs, name) ? emptyInput(name) : textOfInput(inputs.uncertain[name]),
    ),
    correlations: inputs.correlations.map((pair) => ({ ...pair })),
    fluid: inputs.fluid,
    depthFt: inputs.depthFt,
    plan: inputs.recoveryPlan && textOfPlan(inputs.recoveryPlan),
    usesPlan: inputs.recoveryPlan !== null,
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

const emptyInput = (name: InputName): InputText => ({
  kind: firstShapes[name],
  fields: {},
  ...startingBounds(name, firstShapes[name]),
  source: "",
});

/** An estimate that nobody has typed anything into. No figure is proposed but the ends that a fraction has. */
export function emptyText(depthFt: number | null, fluid: SeparatorTest | null): EstimateText {
  return {
    inputs: mapInputs(emptyInput),
    correlations: [],
    fluid,
    depthFt,
    plan: null,
    usesPlan: false,
  };
}

/**
 * Sets one uncertain input, of the estimate or of its recovery plan. Inputs that take their case from the same set get
 * its names and chances.
 */
export function withInput(text: EstimateText, name: DriverName, input: InputText): EstimateText {
  if (!isPlanInput(name)) {
    return { ...text, inputs: withSharedCases({ ...text.inputs, [name]: input }, name) };
  }
  const { plan } = text;
  return plan ? { ...text, plan: { ...plan, inputs: { ...plan.inputs, [name]: input } } } : text;
}

const isPlanInput = (name: DriverName): name is PlanInputName =>
  planInputNames.some((planName) => planName === name);

/** What stands in the fields of one uncertain input; `null` for one of a plan that is not there. */
export const inputText = (text: EstimateText, name: DriverName): InputText | null =>
  isPlanInput(name) ? (text.plan?.inputs[name] ?? null) : text.inputs[name];

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

export function mapInputs<Value>(make: (name: InputName) => Value): Record<InputName, Value> {
  return Object.fromEntries(inputNames.map((name) => [name, make(name)])) as Record<
    InputName,
    Value
  >;
}
