import { acidGasWarnings } from "../fluid/acid-gas";
import { wellstreamGravityAtYield, yieldConstants } from "../fluid/wellstream";
import { pseudocritical } from "../gas/pseudocritical";
import { zFactor } from "../gas/z-factor";
import { planPaths, type CompiledPlan } from "../recovery/compile-plan";
import { planRanges } from "../recovery/plan-ranges";
import { planWarnings, type PlanSurroundings } from "../recovery/plan-warnings";
import type { CompiledDistribution } from "../uncertainty/distribution";
import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import { extremeConditionWarnings } from "./extreme-conditions";
import { fitWarnings } from "./fit-warnings";
import type { EstimateInputs, InputName } from "./inputs-schema";
import { isRecovery, prepareInputs, type PreparedInputs } from "./prepare-inputs";
import { usualRanges } from "./usual-ranges";
import { stateWarnings } from "./state-warnings";

/**
 * Everything a reviewer would ask about an estimate's inputs, before any trial is run.
 *
 * @returns  warnings and cautions, in the order of the inputs
 * @throws {DomainError} when an input is impossible; `details.input` is its path
 */
export function checkInputs(inputs: EstimateInputs): Warning[] {
  return warningsOf(inputs, prepareInputs(inputs));
}

/**
 * The refusals of {@link checkInputs} without its warnings, for a caller that asks only whether a simulation may start:
 * the tests of measured values take longer than everything else and refuse nothing.
 *
 * @throws {DomainError} as `checkInputs`
 */
export function requirePossibleInputs(inputs: EstimateInputs): void {
  stateAndPlanWarnings(inputs, prepareInputs(inputs));
}

/** `checkInputs` for inputs that have been prepared already. */
export function warningsOf(inputs: EstimateInputs, prepared: PreparedInputs): Warning[] {
  const { distributions, inputNames } = prepared;
  return [
    ...inputNames.flatMap((name) => inputWarnings(name, distributions[name])),
    ...planFitWarnings(prepared),
    ...stateAndPlanWarnings(inputs, prepared),
  ];
}

/** What follows from several inputs together; working it out can find a state that is impossible. */
function stateAndPlanWarnings(inputs: EstimateInputs, prepared: PreparedInputs): Warning[] {
  const { distributions, wellstream, plan } = prepared;
  return [
    ...correlationWarnings(inputs, prepared),
    ...caseSetWarnings(prepared),
    ...depthWarnings(inputs, prepared),
    ...(plan
      ? planWarnings(plan, surroundingsOf(inputs, prepared, plan))
      : recoveryWarnings(prepared)),
    ...extremeConditionWarnings(
      {
        pressurePsia: distributions.pressurePsia.range.p10,
        temperatureDegF: distributions.temperatureDegF.range.p10,
      },
      "P10 is",
    ),
    // The reservoir's pressure says more about acid gas than the separator's.
    ...wellstream.warnings.filter(({ code }) => code !== "sour_gas" && code !== "corrosive_gas"),
    ...acidGasWarnings(
      inputs.fluid.hydrogenSulphide,
      inputs.fluid.carbonDioxide,
      distributions.pressurePsia.range.p50,
      "at reservoir pressure",
    ),
    ...fluidWarnings(inputs, prepared),
    ...stateWarnings(inputs, prepared),
  ];
}

function inputWarnings(name: InputName, compiled: CompiledDistribution): Warning[] {
  const { label, unit, usual, ratio, slip } = usualRanges[name];
  const { p90, p10 } = compiled.range;
  const input = `uncertain.${name}`;
  const warnings: Warning[] = [];
  const warn = (code: string, message: string) =>
    warnings.push({ code, severity: "warning", input, message });
  const values =
    p90 === p10 ? `is ${figure(p90)}` : `runs from ${figure(p90)} (P90) to ${figure(p10)} (P10)`;
  if (p90 < usual[0] || p10 > usual[1]) {
    const question = p10 < usual[0] ? ` ${slip}` : "";
    warn(
      "unusual_value",
      `The ${label} ${values} ${unit}; usual values lie between ${figure(usual[0])} and ${figure(usual[1])}.${question}`,
    );
  }
  const spread = p10 / p90;
  if (ratio && spread > ratio[1]) {
    warn(
      "wide_range",
      `P10 of the ${label} is ${figure(spread)} times its P90; more than ${ratio[1]} times is unusual. ` +
        "Are the two ends from the same reservoir?",
    );
  } else if (ratio && spread > 1 && spread < ratio[0]) {
    warn(
      "narrow_range",
      `P10 of the ${label} is only ${spread.toFixed(2)} times its P90; ${ratio[0]} to ${ratio[1]} times is usual. ` +
        "Is it really known that well?",
    );
  }
  return [
    ...warnings,
    ...fitWarnings({ input, label, unit, isAverage: isAverage(name) }, compiled),
  ];
}

/** Properties of rock, which an estimate needs the average of. */
function isAverage(name: InputName): boolean {
  return name === "netThicknessFt" || name === "porosity" || name === "waterSaturation";
}

function planFitWarnings({ plan }: PreparedInputs): Warning[] {
  if (!plan) return [];
  const ranges = planRanges(plan.plan);
  return plan.inputNames.flatMap((name) => {
    const compiled = plan.distributions[name];
    const { label, unit } = ranges[name];
    const input = `recoveryPlan.${planPaths[name]}`;
    return compiled ? fitWarnings({ input, label, unit, isAverage: false }, compiled) : [];
  });
}

function correlationWarnings(
  inputs: EstimateInputs,
  { distributions, plan }: PreparedInputs,
): Warning[] {
  return inputs.correlations.flatMap(({ a, b, rank }) => {
    const replaced = plan && [a, b].find(isRecovery);
    if (replaced) {
      return {
        code: "correlation_without_effect",
        severity: "warning",
        input: "correlations",
        message: `The ${usualRanges[replaced].label} follows from the recovery plan, so its correlation has no effect.`,
      };
    }
    const fixed = [a, b].find((name) => distributions[name].definition.kind === "constant");
    if (!fixed || rank === 0) return [];
    return {
      code: "correlation_without_effect",
      severity: "warning",
      input: "correlations",
      message: `The ${usualRanges[fixed].label} is a constant, so its correlation has no effect.`,
    };
  });
}

/** A set that only one input names ties nothing: the other inputs' cases were perhaps called otherwise. */
function caseSetWarnings({ caseSets }: PreparedInputs): Warning[] {
  return caseSets.flatMap(({ name, inputs, planInputs }) => {
    if (inputs.length + planInputs.length !== 1) return [];
    const [input] = inputs;
    return {
      code: "case_set_of_one",
      severity: "warning",
      input: input ? `uncertain.${input}` : "recoveryPlan",
      message:
        `Only one input takes its case from the set “${name}”, so the set ties nothing. Does another input belong to it, ` +
        "under the same name?",
    };
  });
}

/** Usual gradients: 0.40 to 0.95 psi/ft, and 1.0 to 2.2 °F per 100 ft from 60 °F. Common practice, no source. */
const PRESSURE_GRADIENT_PSI_PER_FT = [0.4, 0.95] as const;
const TEMPERATURE_GRADIENT_DEGF_PER_100FT = [1, 2.2] as const;
const SURFACE_TEMPERATURE_DEGF = 60;
const USUAL_DEPTH_FT = [5_000, 20_000] as const;

function depthWarnings({ depthFt }: EstimateInputs, { distributions }: PreparedInputs): Warning[] {
  if (depthFt === null) return [];
  const warnings: Warning[] = [];
  const outside = (value: number, [low, high]: readonly [number, number]) =>
    value < low || value > high;
  const warn = (code: string, input: string, message: string) =>
    warnings.push({ code, severity: "warning", input, message });
  if (outside(depthFt, USUAL_DEPTH_FT)) {
    const question = depthFt < USUAL_DEPTH_FT[0] ? " Is it in metres (1 m is 3.281 ft)?" : "";
    warn(
      "unusual_value",
      "depthFt",
      `The depth is ${figure(depthFt)} ft; usual values lie between 5,000 and 20,000.${question}`,
    );
  }
  const pressure = distributions.pressurePsia.range.p50;
  const pressureGradient = pressure / depthFt;
  if (outside(pressureGradient, PRESSURE_GRADIENT_PSI_PER_FT)) {
    warn(
      "unusual_pressure_gradient",
      "uncertain.pressurePsia",
      `${figure(pressure)} psia at ${figure(depthFt)} ft is ${pressureGradient.toFixed(2)} psi/ft; usual gradients are ` +
        "0.40 to 0.95. Does the depth belong to this pressure?",
    );
  }
  const temperature = distributions.temperatureDegF.range.p50;
  const temperatureGradient = (100 * (temperature - SURFACE_TEMPERATURE_DEGF)) / depthFt;
  if (outside(temperatureGradient, TEMPERATURE_GRADIENT_DEGF_PER_100FT)) {
    warn(
      "unusual_temperature_gradient",
      "uncertain.temperatureDegF",
      `${figure(temperature)} °F at ${figure(depthFt)} ft is ${temperatureGradient.toFixed(1)} °F per 100 ft from ` +
        "60 °F at surface; usual gradients are 1.0 to 2.2.",
    );
  }
  return warnings;
}

/** What the plan is judged against, at P50. */
function surroundingsOf(
  { fluid }: EstimateInputs,
  { distributions, wellstream }: PreparedInputs,
  { plan }: CompiledPlan,
): PlanSurroundings {
  const { pressurePsia, temperatureDegF, waterSaturation, condensateYieldStbPerMmscf } =
    distributions;
  const assumedYield = condensateYieldStbPerMmscf.range.p50;
  const gravity = wellstreamGravityAtYield(assumedYield, yieldConstants(wellstream));
  const critical = pseudocritical(gravity, fluid);
  return {
    pressure: pressurePsia,
    temperatureDegF: temperatureDegF.range.p50,
    waterSaturation: waterSaturation.range.p50,
    condensateYieldStbPerMmscf: assumedYield,
    dewPointPsia: fluid.dewPointPsia,
    zAtDewPoint: zFactor(
      plan.curve.dewPointPsia / critical.pressurePsia,
      degreesRankine(temperatureDegF.range.p50) / critical.temperatureDegR,
    ),
  };
}

function recoveryWarnings({ distributions }: PreparedInputs): Warning[] {
  const gas = distributions.gasRecovery.range;
  const condensate = distributions.condensateRecovery.range;
  const at = (["p50", "p10", "p90"] as const).find((level) => condensate[level] > gas[level]);
  if (!at) return [];
  return [
    {
      code: "condensate_recovery_above_gas",
      severity: "warning",
      input: "uncertain.condensateRecovery",
      message:
        `${at.toUpperCase()} of condensate recovery, ${figure(condensate[at])}, is above that of gas recovery, ` +
        `${figure(gas[at])}. By depletion condensate recovers less than gas; only cycling can turn that round.`,
    },
  ];
}

/** A sampled yield this far from the separator test's is probably on another basis, or another fluid's. */
const YIELD_TOLERANCE = 0.25;

function fluidWarnings({ fluid }: EstimateInputs, prepared: PreparedInputs): Warning[] {
  const { distributions, wellstream } = prepared;
  const warnings: Warning[] = [];
  const pressure = distributions.pressurePsia.range.p50;
  if (fluid.dewPointPsia !== null && fluid.dewPointPsia > pressure) {
    warnings.push({
      code: "saturated_fluid",
      severity: "warning",
      input: "fluid.dewPointPsia",
      message:
        `The dew point, ${figure(fluid.dewPointPsia)} psia, is above the reservoir pressure, ${figure(pressure)} psia: ` +
        "liquid has dropped out already, or there is an oil rim, and a single-phase estimate misleads.",
    });
  }
  const tested = wellstream.condensateYieldStbPerMmscf;
  const assumed = distributions.condensateYieldStbPerMmscf.range.p50;
  if (Math.abs(assumed / tested - 1) > YIELD_TOLERANCE) {
    warnings.push({
      code: "yield_differs_from_test",
      severity: "warning",
      input: "uncertain.condensateYieldStbPerMmscf",
      message:
        `P50 of the condensate yield is ${figure(assumed)} STB/MMscf, but the separator test gives ${figure(tested)} ` +
        "per MMscf of surface gas. Is it the same fluid, and per surface gas rather than per wellstream?",
    });
  }
  return warnings;
}

// Made once: building a formatter takes longer than a thousand trials.
const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 3 });

function figure(value: number): string {
  return FIGURE.format(value);
}
