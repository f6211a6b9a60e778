import type { RecoveryName, Range } from "../volumetrics/results-schema";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { Warning } from "../warnings";
import { planPaths, type CompiledPlan } from "./compile-plan";
import { planRanges } from "./plan-ranges";
import type { RecoveryCurve, RecoveryRoute } from "./recovery-curve-schema";
import type { Cycling } from "./recovery-plan-schema";

/** What a plan is judged against: the estimate it belongs to. */
export interface PlanSurroundings {
  readonly pressure: CompiledDistribution;
  readonly temperatureDegF: number;
  readonly waterSaturation: number;
  readonly condensateYieldStbPerMmscf: number;
  /** of the separator sheet; null when it has none */
  readonly dewPointPsia: number | null;
  /** z of the reservoir's gas at the curve's dew point by the estimate's own method, at P50 */
  readonly zAtDewPoint: number;
}

/** A curve of another temperature, in degF, is another experiment. Common practice, no source; as the next three. */
const TEMPERATURE_TOLERANCE_DEGF = 10;
const YIELD_TOLERANCE = 0.25;
const DEW_POINT_TOLERANCE = 0.02;
const Z_TOLERANCE = 0.05;
const USUAL_FUEL = 0.15;
const USUAL_REVAPORISATION = 0.7;
/** Chances below this are not worth a sentence. */
const RARE = 0.01;

/**
 * Everything a reviewer would ask about a recovery plan, before any trial is run.
 *
 * @returns  warnings whose `input` begins with `recoveryPlan`
 */
export function planWarnings(compiled: CompiledPlan, around: PlanSurroundings): Warning[] {
  return [
    ...routeWarnings(compiled.plan.curve.route),
    ...doubtWarnings(compiled.plan.curve),
    ...inputWarnings(compiled),
    ...curveWarnings(compiled, around),
    ...saturatedWarnings(compiled, around),
    ...criticalSaturationWarnings(compiled, around),
    ...cyclingWarnings(compiled, around),
  ];
}

function warn(code: string, path: string, message: string): Warning {
  return { code, severity: "warning", input: `recoveryPlan.${path}`, message };
}

function routeWarnings(route: RecoveryRoute): Warning[] {
  switch (route) {
    case "untunedEquationOfState":
      return [
        warn(
          "untuned_recovery",
          "curve.route",
          "The recovery comes from an untuned equation of state, whose liquid can be wrong by half. Tune it to a " +
            "depletion study before anybody plans on it.",
        ),
      ];
    case "correlation":
      return [
        warn(
          "correlation_recovery",
          "curve.route",
          "The recovery comes from a correlation of surface figures: for screening, about 12 % either way.",
        ),
      ];
    default:
      return [];
  }
}

/** What spoke against the curve when it was worked out is not lost with the table that stays behind. */
function doubtWarnings({ doubts = [] }: RecoveryCurve): Warning[] {
  if (doubts.length === 0) return [];
  return [
    warn(
      "doubtful_curve",
      "curve.doubts",
      `The depletion behind the recovery does not hold together. ${doubts.join(" ")}`,
    ),
  ];
}

function inputWarnings({ plan, inputNames, distributions }: CompiledPlan): Warning[] {
  const ranges = planRanges(plan);
  return inputNames.flatMap((name) => {
    const range = distributions[name]?.range;
    const { label, unit, usual, slip } = ranges[name];
    if (!range || (range.p90 >= usual[0] && range.p10 <= usual[1])) return [];
    const values =
      range.p90 === range.p10
        ? `is ${figure(range.p50)}`
        : `runs from ${figure(range.p90)} (P90) to ${figure(range.p10)} (P10)`;
    const question = range.p10 < usual[0] ? ` ${slip}` : "";
    return warn(
      "unusual_value",
      planPaths[name],
      `The ${label} ${values} ${unit}; usual values lie between ${figure(usual[0])} and ${figure(usual[1])}.${question}`,
    );
  });
}

function curveWarnings({ plan }: CompiledPlan, around: PlanSurroundings): Warning[] {
  const { curve } = plan;
  const [first] = curve.points;
  const warnings: Warning[] = [];
  if (Math.abs(curve.temperatureDegF - around.temperatureDegF) > TEMPERATURE_TOLERANCE_DEGF) {
    warnings.push(
      warn(
        "plan_temperature_differs",
        "curve.temperatureDegF",
        `The depletion curve is of ${figure(curve.temperatureDegF)} °F, the reservoir is at ` +
          `${figure(around.temperatureDegF)} °F. Is it the same fluid?`,
      ),
    );
  }
  const curveYield = first.producingYieldStbPerMmscf;
  if (Math.abs(around.condensateYieldStbPerMmscf / curveYield - 1) > YIELD_TOLERANCE) {
    warnings.push(
      warn(
        "plan_yield_differs",
        "curve.points.0.producingYieldStbPerMmscf",
        `The curve's fluid yields ${figure(curveYield)} STB/MMscf at its dew point, the estimate's ` +
          `${figure(around.condensateYieldStbPerMmscf)} at P50. Is it the same fluid?`,
      ),
    );
  }
  const { dewPointPsia } = around;
  if (
    dewPointPsia !== null &&
    Math.abs(dewPointPsia / curve.dewPointPsia - 1) > DEW_POINT_TOLERANCE
  ) {
    warnings.push(
      warn(
        "plan_dew_point_differs",
        "curve.dewPointPsia",
        `The curve's dew point is ${figure(curve.dewPointPsia)} psia, the sample sheet's ${figure(dewPointPsia)} psia.`,
      ),
    );
  }
  if (Math.abs(around.zAtDewPoint / first.gasZ - 1) > Z_TOLERANCE) {
    warnings.push(
      warn(
        "plan_z_differs",
        "curve.points.0.gasZ",
        `At the dew point the curve's z is ${first.gasZ.toFixed(3)}, the estimate's ${around.zAtDewPoint.toFixed(3)}. ` +
          "Gas in place and recovery then stand on different fluids.",
      ),
    );
  }
  return warnings;
}

function saturatedWarnings({ plan }: CompiledPlan, { pressure }: PlanSurroundings): Warning[] {
  const { dewPointPsia } = plan.curve;
  const share =
    pressure.definition.kind === "constant"
      ? Number(pressure.mean < dewPointPsia)
      : pressure.cdf(dewPointPsia);
  if (share < RARE) return [];
  return [
    warn(
      "saturated_trials",
      "curve.dewPointPsia",
      `${Math.round(100 * share)} % of the trials begin below the curve's dew point of ${figure(dewPointPsia)} psia. ` +
        "They are taken as just saturated at their own pressure, with the same fluid; a reservoir with liquid in it " +
        "from the beginning recovers less.",
    ),
  ];
}

function criticalSaturationWarnings(
  { plan }: CompiledPlan,
  { waterSaturation }: PlanSurroundings,
): Warning[] {
  const { curve, criticalSaturation } = plan;
  const most = Math.max(...curve.points.map(({ liquidSaturation }) => liquidSaturation));
  const ofPores = most * (1 - waterSaturation);
  if (ofPores <= criticalSaturation.low) return [];
  const { low, high } = criticalSaturation;
  const where = ofPores > high ? "above" : "inside";
  return [
    warn(
      "dropout_reaches_critical_saturation",
      "criticalSaturation",
      `Liquid comes to ${percent(ofPores)} of the pore space, ${where} the band of critical saturation, ` +
        `${percent(low)} to ${percent(high)}: some of it may flow. The recovery counts it as immobile.`,
    ),
  ];
}

function cyclingWarnings(
  { plan, curve, cycling }: CompiledPlan,
  { pressure }: PlanSurroundings,
): Warning[] {
  if (!cycling) return [];
  const warnings: Warning[] = [];
  if (cycling.pressurePsia < curve.dewPointPsia) {
    const dropped = plan.curve.points.find((point) => point.pressurePsia <= cycling.pressurePsia);
    warnings.push(
      warn(
        "cycling_below_dew_point",
        "cycling.pressurePsia",
        `Injection begins at ${figure(cycling.pressurePsia)} psia, below the dew point of ` +
          `${figure(curve.dewPointPsia)} psia: liquid that has dropped out by then` +
          `${dropped ? ` (up to ${percent(dropped.liquidSaturation)} of the gas space)` : ""} is not swept.`,
      ),
    );
  }
  warnings.push(...revaporisationWarnings(cycling));
  if (cycling.pressurePsia > pressure.range.p90) {
    warnings.push(
      warn(
        "cycling_begins_at_once",
        "cycling.pressurePsia",
        `Many trials begin below ${figure(cycling.pressurePsia)} psia, where injection should begin; in them it begins ` +
          "at once, at their initial pressure.",
      ),
    );
  }
  if (cycling.fuelFraction > USUAL_FUEL) {
    warnings.push(
      warn(
        "unusual_value",
        "cycling.fuelFraction",
        `${percent(cycling.fuelFraction)} of the gas produced while cycling goes to fuel or is lost; above ` +
          `${percent(USUAL_FUEL)} is unusual.`,
      ),
    );
  }
  return warnings;
}

function revaporisationWarnings({ pressure, revaporisation = 0 }: Cycling): Warning[] {
  if (revaporisation > USUAL_REVAPORISATION) {
    return [
      warn(
        "unusual_value",
        "cycling.revaporisation",
        `Injected gas is taken to pick up ${percent(revaporisation)} of the liquid it could; above ` +
          `${percent(USUAL_REVAPORISATION)} there is hardly any delay or bypassing. Has a simulation shown it?`,
      ),
    ];
  }
  if (pressure === "maintained" || revaporisation > 0) return [];
  return [
    warn(
      "cycling_declines",
      "cycling.pressure",
      "The pressure declines while gas goes back. Liquid that drops out meanwhile is counted as lost, although dry gas " +
        "takes some of it up again: the recovery is on the low side.",
    ),
  ];
}

/** Questions about recoveries that have been worked out. */
export function recoveryWarnings(
  { cycling }: CompiledPlan,
  { gasRecovery, condensateRecovery }: Readonly<Record<RecoveryName, Range>>,
): Warning[] {
  if (cycling || condensateRecovery.p50 <= gasRecovery.p50) return [];
  return [
    warn(
      "condensate_recovery_above_gas",
      "condensateCurveFactor",
      `P50 of condensate recovery, ${figure(condensateRecovery.p50)}, is above that of gas recovery, ` +
        `${figure(gasRecovery.p50)}. By depletion condensate recovers less than gas; only cycling can turn that round.`,
    ),
  ];
}

const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 4 });
const figure = (value: number) => FIGURE.format(value);
const percent = (share: number) => `${Number((100 * share).toPrecision(2))} %`;
