/** Names of what a recovery plan is made of, wherever one is shown. */
import {
  recoveryRouteLabels,
  type RecoveryRoute,
} from "@/analytics/recovery/recovery-curve-schema";
import type {
  Cycling,
  ProducingConcept,
  RecoveryPlan,
} from "@/analytics/recovery/recovery-plan-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { RecoveryPhaseName } from "@/analytics/volumetrics/results-schema";
import { formatFigure, formatPercent } from "@/components/ui/format";

export const conceptLabels: Record<ProducingConcept, string> = {
  depletion: "Depletion",
  compression: "Depletion with compression",
  cycling: "Cycling, then blowdown",
};

/** For the head of a column and for sentences. */
export const shortConcepts: Record<ProducingConcept, string> = {
  depletion: "Depletion",
  compression: "Compression",
  cycling: "Cycling",
};

/** The word that goes with a figure of a weak route; `null` for the others, and without a plan. */
export const routeMark = (route: RecoveryRoute | null | undefined): string | null =>
  route === "correlation"
    ? "from a correlation"
    : route === "untunedEquationOfState"
      ? "from an untuned equation of state"
      : null;

export const phaseLabels: Record<RecoveryPhaseName, string> = {
  aboveDewPoint: "Above the dew point",
  belowDewPoint: "Below the dew point",
  cycling: "While cycling",
  blowdown: "Blowdown",
};

export const pressureLabels: Record<Cycling["pressure"], string> = {
  maintained: "Pressure held, make-up gas bought",
  declining: "Pressure declines, own gas only",
};

const psia = (value: number) => `${formatFigure(value, { digits: 4 })} psia`;

/** A whole plan in a line: concept, curve, and each uncertain input's P90, P50 and P10. */
export function planInWords(plan: RecoveryPlan): string {
  const range = ({ distribution }: RecoveryPlan["abandonmentPressurePsia"]) => {
    const { p90, p50, p10 } = compileDistribution(distribution).range;
    if (p90 === p10) return formatFigure(p50);
    return [p90, p50, p10].map((value) => formatFigure(value)).join(" / ");
  };
  return [
    `${conceptLabels[plan.concept]}, ${recoveryRouteLabels[plan.curve.route].toLowerCase()} curve`,
    `abandonment ${range(plan.abandonmentPressurePsia)} psia`,
    `curve factor ${range(plan.condensateCurveFactor)}`,
    ...(plan.cycling
      ? [
          `sweep ${range(plan.cycling.sweepEfficiency)}`,
          `displacement ${range(plan.cycling.displacementEfficiency)}`,
          cyclingInWords(plan),
        ]
      : [waterInWords(plan)]),
    `critical saturation ${criticalInWords(plan)}`,
  ].join("; ");
}

/** "Laboratory, 714.7 to 4,424 psia at 224 °F" */
export function curveInWords({ curve }: Pick<RecoveryPlan, "curve">): string {
  const lowest = curve.points[curve.points.length - 1].pressurePsia;
  const from = formatFigure(lowest, { digits: 4 });
  return `${recoveryRouteLabels[curve.route]}, dew point ${psia(curve.dewPointPsia)} down to ${from} psia at ${formatFigure(curve.temperatureDegF)} °F`;
}

/** "Closed volume", or what water takes and traps. */
export function waterInWords({ waterDrive }: Pick<RecoveryPlan, "waterDrive">): string {
  if (waterDrive.kind === "none") return "Closed volume, no water";
  return `Water takes ${formatPercent(waterDrive.invadedFraction)} of the pore volume and traps ${formatPercent(waterDrive.trappedGasSaturation)} gas behind it`;
}

export function criticalInWords({ criticalSaturation }: RecoveryPlan): string {
  const { low, high } = criticalSaturation;
  return `${formatPercent(low)} to ${formatPercent(high)} of pore space`;
}

/** What is injected and how, or that nothing is. */
export function cyclingInWords({ cycling }: RecoveryPlan): string {
  if (cycling === null) return "No injection";
  return (
    `${formatFigure(cycling.injectedPoreVolumes)} pore volumes from ${psia(cycling.pressurePsia)}; ` +
    `${pressureLabels[cycling.pressure].toLowerCase()}; ${formatPercent(cycling.fuelFraction, { decimals: 1 })} fuel` +
    (cycling.revaporisation
      ? `; injected gas takes up ${formatPercent(cycling.revaporisation)} of the liquid it can`
      : "")
  );
}
