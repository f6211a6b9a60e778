import type { PossibleRange } from "../uncertainty/possible-range";
import type { PlanInputName, RecoveryPlan } from "./recovery-plan-schema";

/** What is expected of an uncertain input of a recovery plan, and what it cannot be. */
export interface PlanRange extends PossibleRange {
  /** outside: a question. Common practice, no source */
  usual: readonly [low: number, high: number];
}

/**
 * Usual and possible ranges of a plan's uncertain inputs. The abandonment pressure ends where the depletion curve does:
 * what happens below is not known, and above the dew point nothing has dropped out yet.
 */
export function planRanges({
  curve,
}: Pick<RecoveryPlan, "curve">): Record<PlanInputName, PlanRange> {
  const lowest = curve.points[curve.points.length - 1].pressurePsia;
  return {
    abandonmentPressurePsia: {
      label: "abandonment pressure",
      unit: "psia",
      usual: [300, 3_000],
      possible: [lowest, curve.dewPointPsia],
      lowExcluded: false,
      reason: [
        `the depletion curve ends at ${figure(lowest)} psia`,
        `the fluid's dew point is ${figure(curve.dewPointPsia)} psia and recovery is worked out for abandonment below it`,
      ],
      slip: "Raise it, or extend the depletion study to lower pressures.",
    },
    condensateCurveFactor: {
      label: "factor on the curve's condensate recovery",
      unit: "times",
      usual: [0.7, 1.3],
      possible: [0, 3],
      lowExcluded: true,
      reason: "a factor lies above 0, and above 3 the curve is another fluid's",
      slip: "Is it in per cent? Enter 1 for a curve that is taken as it is.",
    },
    sweepEfficiency: {
      label: "sweep efficiency",
      unit: "fraction",
      usual: [0.4, 0.85],
      possible: [0, 1],
      lowExcluded: false,
      reason: "injected gas reaches between none and all of the reservoir",
      slip: "Is it in per cent? Enter 0.6 for 60 %.",
    },
    displacementEfficiency: {
      label: "displacement efficiency",
      unit: "fraction",
      usual: [0.7, 1],
      possible: [0, 1],
      lowExcluded: false,
      reason: "between none and all of the swept vapour is displaced",
      slip: "Is it in per cent? Enter 0.9 for 90 %.",
    },
  };
}

const figure = (value: number) => Number(value.toPrecision(6));
