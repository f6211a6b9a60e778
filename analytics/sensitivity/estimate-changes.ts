import {
  planInputNames,
  type PlanInputName,
  type RecoveryPlan,
} from "../recovery/recovery-plan-schema";
import type { Distribution } from "../uncertainty/distribution-schema";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import { inputNames, type EstimateInputs, type InputName } from "../volumetrics/inputs-schema";
import { isRecovery } from "../volumetrics/prepare-inputs";
import { recoveryNames, type DriverName } from "../volumetrics/results-schema";
import type { Change, SingleChange } from "./sensitivity-schema";

/** An estimate with everything that decides its numbers. */
export interface EstimateRun {
  inputs: EstimateInputs;
  seed: number;
  trials: number;
  sampling: SamplingMethod;
}

/** One step from an estimate to another. */
export interface ChangeStep {
  readonly change: Change;
  /** the run with this part taken from the other estimate; steps touch different parts, so their order is free */
  readonly make: (run: EstimateRun) => EstimateRun;
}

interface SingleStep extends ChangeStep {
  readonly change: SingleChange;
}

/**
 * What differs between two estimates in a way that can move a result: reworded sources and reasons do not, nor do
 * recoveries that a plan on both sides replaces. Where only one side has a recovery plan, the recoveries belong to that
 * change. Differences of which one without the others makes no estimate are one step.
 */
export function changesBetween(from: EstimateRun, to: EstimateRun): ChangeStep[] {
  const steps = [
    ...inputSteps(from.inputs, to.inputs),
    ...planSteps(from.inputs.recoveryPlan, to),
    ...restSteps(from, to),
  ];
  return joined(steps, (a, b) => belongTogether(a.change, b.change, from.inputs, to.inputs));
}

/** Changes of the fluid, of what it is produced by and of the state it is in, as one: for estimates that differ in kind. */
export function withStateTogether(steps: readonly ChangeStep[]): ChangeStep[] {
  return joined(steps, (a, b) => isOfState(a.change) && isOfState(b.change));
}

const stateNames: readonly DriverName[] = [
  "pressurePsia",
  "temperatureDegF",
  "condensateYieldStbPerMmscf",
  ...planInputNames,
];

function isOfState(change: Change): boolean {
  if (change.kind === "together") return change.changes.some(isOfState);
  return change.kind === "input"
    ? stateNames.includes(change.input)
    : change.kind === "fluid" || change.kind === "recoveryPlan";
}

function inputSteps(from: EstimateInputs, to: EstimateInputs): SingleStep[] {
  const changed = (name: InputName) =>
    !sameValue(from.uncertain[name].distribution, to.uncertain[name].distribution);
  return inputNames
    .filter(
      (name) => changed(name) && !(isRecovery(name) && (from.recoveryPlan || to.recoveryPlan)),
    )
    .map((input) => ({
      change: { kind: "input", input },
      make: (run) => ({
        ...run,
        inputs: {
          ...run.inputs,
          uncertain: { ...run.inputs.uncertain, [input]: to.uncertain[input] },
        },
      }),
    }));
}

/** Plans of one concept differ input by input and in the rest; others differ as wholes. */
function planSteps(before: RecoveryPlan | null, to: EstimateRun): SingleStep[] {
  const after = to.inputs.recoveryPlan;
  if (!before && !after) return [];
  if (!before || !after || before.concept !== after.concept) {
    return [{ change: { kind: "recoveryPlan" }, make: (run) => withPlanOf(run, to.inputs) }];
  }
  const inputs = planInputNames
    .filter((name) => !sameValue(planDistribution(before, name), planDistribution(after, name)))
    .map(
      (input): SingleStep => ({
        change: { kind: "input", input },
        make: (run) => withPlan(run, (plan) => withPlanInput(plan, input, after)),
      }),
    );
  const rest: SingleStep = {
    change: { kind: "recoveryPlan" },
    make: (run) =>
      withPlan(run, (plan) =>
        planInputNames.reduce((next, name) => withPlanInput(next, name, plan), after),
      ),
  };
  return sameValue(withoutInputs(before), withoutInputs(after)) ? inputs : [...inputs, rest];
}

/**
 * Whether two estimates have the same rank correlations, whatever their order; one of 0 is none. Those of recoveries do not
 * count where both have a plan that replaces them.
 */
export function sameCorrelations(from: EstimateInputs, to: EstimateInputs): boolean {
  const isReplaced = (name: InputName) =>
    from.recoveryPlan && to.recoveryPlan ? isRecovery(name) : false;
  const pairs = ({ correlations }: EstimateInputs) =>
    correlations
      .filter(({ a, b, rank }) => rank !== 0 && !isReplaced(a) && !isReplaced(b))
      .map(({ a, b, rank }) => `${[a, b].sort().join(" ")} ${rank}`)
      .sort();
  return sameValue(pairs(from), pairs(to));
}

function restSteps(from: EstimateRun, to: EstimateRun): SingleStep[] {
  const { correlations, fluid } = to.inputs;
  const { seed, trials, sampling } = to;
  const steps: SingleStep[] = [];
  if (!sameCorrelations(from.inputs, to.inputs)) {
    steps.push({
      change: { kind: "correlations" },
      make: (run) => ({ ...run, inputs: { ...run.inputs, correlations } }),
    });
  }
  if (!sameValue(from.inputs.fluid, fluid)) {
    steps.push({
      change: { kind: "fluid" },
      make: (run) => ({ ...run, inputs: { ...run.inputs, fluid } }),
    });
  }
  if (from.seed !== seed || from.trials !== trials || from.sampling !== sampling) {
    steps.push({
      change: { kind: "sampling" },
      make: (run) => ({ ...run, seed, trials, sampling }),
    });
  }
  return steps;
}

function withPlanOf(run: EstimateRun, { recoveryPlan, uncertain }: EstimateInputs): EstimateRun {
  const recoveries = Object.fromEntries(recoveryNames.map((name) => [name, uncertain[name]]));
  return {
    ...run,
    inputs: {
      ...run.inputs,
      recoveryPlan,
      uncertain: { ...run.inputs.uncertain, ...recoveries },
    },
  };
}

function withPlan(run: EstimateRun, change: (plan: RecoveryPlan) => RecoveryPlan): EstimateRun {
  const { recoveryPlan } = run.inputs;
  if (!recoveryPlan) return run;
  return { ...run, inputs: { ...run.inputs, recoveryPlan: change(recoveryPlan) } };
}

/** The distribution of an input that the plan's concept uses; null for one it does not. */
function planDistribution(plan: RecoveryPlan, name: PlanInputName): Distribution | null {
  if (name === "abandonmentPressurePsia" || name === "condensateCurveFactor") {
    return plan[name].distribution;
  }
  return plan.concept === "cycling" ? (plan.cycling?.[name].distribution ?? null) : null;
}

/** The plan with one input as another plan has it. */
function withPlanInput(plan: RecoveryPlan, name: PlanInputName, other: RecoveryPlan): RecoveryPlan {
  if (name === "abandonmentPressurePsia" || name === "condensateCurveFactor") {
    return { ...plan, [name]: other[name] };
  }
  if (!plan.cycling || !other.cycling) return plan;
  return { ...plan, cycling: { ...plan.cycling, [name]: other.cycling[name] } };
}

/** What decides numbers in a plan besides its uncertain inputs. */
function withoutInputs({ concept, curve, criticalSaturation, waterDrive, cycling }: RecoveryPlan) {
  const used = concept === "cycling" ? cycling : null;
  return {
    curve,
    criticalSaturation,
    waterDrive,
    cycling: used && { ...used, sweepEfficiency: null, displacementEfficiency: null },
  };
}

/**
 * Inputs of one set of cases whose names or weights differ make no estimate when they are mixed, nor does a set of cases
 * together with rank correlations of its inputs.
 */
function belongTogether(a: Change, b: Change, from: EstimateInputs, to: EstimateInputs): boolean {
  if (a.kind === "input" && b.kind === "input") {
    const sets = (input: DriverName) =>
      [from, to].flatMap((inputs) => casesOf(inputs, input) ?? []);
    return sets(a.input).some((one) =>
      sets(b.input).some(({ name, cases }) => name === one.name && !sameValue(cases, one.cases)),
    );
  }
  const [input, other] = a.kind === "input" ? [a, b] : [b, a];
  if (input.kind !== "input" || other.kind !== "correlations") return false;
  return [from, to].some((inputs) => {
    const opposite = inputs === from ? to : from;
    const isTied = opposite.correlations.some(
      (pair) => pair.rank !== 0 && (pair.a === input.input || pair.b === input.input),
    );
    return isTied && casesOf(inputs, input.input) !== null;
  });
}

function casesOf(inputs: EstimateInputs, input: DriverName) {
  const isSampled = (name: DriverName): name is InputName =>
    (inputNames as readonly string[]).includes(name);
  const distribution = isSampled(input)
    ? inputs.uncertain[input].distribution
    : inputs.recoveryPlan && planDistribution(inputs.recoveryPlan, input);
  if (distribution?.kind !== "scenarios" || distribution.caseSet === undefined) return null;
  return {
    name: distribution.caseSet,
    cases: distribution.scenarios.map(({ name, weight }) => ({ name, weight })),
  };
}

/** Steps with those that belong together, directly or through others, made one. */
function joined<Step extends ChangeStep>(
  steps: readonly Step[],
  belong: (a: Step, b: Step) => boolean,
): ChangeStep[] {
  const groups: Step[][] = [];
  for (const step of steps) {
    const own = groups.filter((group) => group.some((other) => belong(step, other)));
    const others = groups.filter((group) => !own.includes(group));
    groups.splice(0, groups.length, ...others, [...own.flat(), step]);
  }
  return groups
    .map((group) => group.sort((a, b) => steps.indexOf(a) - steps.indexOf(b)))
    .sort((a, b) => steps.indexOf(a[0]) - steps.indexOf(b[0]))
    .map((group): ChangeStep => {
      if (group.length === 1) return group[0];
      return {
        change: { kind: "together", changes: group.flatMap(({ change }) => singles(change)) },
        make: (run) => group.reduce((next, { make }) => make(next), run),
      };
    });
}

const singles = (change: Change): SingleChange[] =>
  change.kind === "together" ? change.changes : [change];

/** Equal as JSON, whatever the order of properties; a property that is missing is the same as one without a value. */
function sameValue(a: unknown, b: unknown): boolean {
  if (a === b) return true;
  if (typeof a !== "object" || typeof b !== "object" || a === null || b === null) return false;
  if (Array.isArray(a) !== Array.isArray(b)) return false;
  const left = a as Record<string, unknown>;
  const right = b as Record<string, unknown>;
  return [...new Set([...Object.keys(left), ...Object.keys(right)])].every((key) =>
    sameValue(left[key], right[key]),
  );
}
