/** Figures that a recovery plan starts from. All are common practice without a source, and say so. */
import {
  recoveryRouteLabels,
  type RecoveryCurve,
  type RecoveryRoute,
} from "./recovery-curve-schema";
import type { ProducingConcept, RecoveryPlan } from "./recovery-plan-schema";
import type { Distribution } from "../uncertainty/distribution-schema";

/** The reservoir and the curve that assumptions start from. */
export interface ConceptStart {
  curve: RecoveryCurve;
  /** stands in the sources of what is started with; `null` for a sample that was not saved */
  sampleName: string | null;
  /** of the estimate; `null` while it is not known */
  pressurePsia: { p90: number; p50: number } | null;
  depthFt: number | null;
  /** liquid below it does not flow; fractions of pore space */
  criticalSaturation: { low: number; high: number };
}

const COMMON = "Common practice, no source";

/** Half-width of the curve factor by how the curve was found, no narrower with less trust. Common practice, no source. */
const curveUncertainty: Record<RecoveryRoute, number> = {
  laboratory: 0.1,
  tunedEquationOfState: 0.15,
  untunedEquationOfState: 0.4,
  correlation: 0.4,
};

/** Abandonment without compression: 100 psi for every 1,000 ft. Common practice, no source. */
const ABANDONMENT_PSI_PER_FT = 0.1;
/** The same without a depth, as a share of the initial pressure. Common practice, no source. */
const ABANDONMENT_SHARE = 0.15;
/** What compression halves it to. Common practice, no source. */
const COMPRESSED_SHARE = 0.5;

const toStep = (value: number, step = 50) => Math.max(step, Math.round(value / step) * step);

/**
 * A PERT around a pressure, 0.7 to 1.5 times it, inside what the curve knows: no lower than its last point, no higher
 * than nine tenths of the dew point.
 */
function abandonmentAround(middle: number, curve: RecoveryCurve): Distribution {
  const lowest = curve.points[curve.points.length - 1].pressurePsia;
  const highest = 0.9 * curve.dewPointPsia;
  const low = Math.max(toStep(0.7 * middle), lowest);
  const mode = Math.min(Math.max(toStep(middle), 1.15 * low), highest);
  const high = Math.min(Math.max(toStep(1.5 * middle), 1.3 * mode), curve.dewPointPsia);
  const tidy = (value: number) => Math.ceil(value);
  if (!(low < mode && mode < high)) return { kind: "constant", value: low };
  return { kind: "pert", low: tidy(low), mode: tidy(mode), high: Math.floor(high) };
}

function abandonmentOf(
  concept: ProducingConcept,
  start: ConceptStart,
): RecoveryPlan["abandonmentPressurePsia"] {
  const { curve, depthFt, pressurePsia } = start;
  const free =
    depthFt !== null
      ? { psia: ABANDONMENT_PSI_PER_FT * depthFt, words: "100 psi per 1,000 ft" }
      : {
          psia: ABANDONMENT_SHARE * (pressurePsia?.p50 ?? curve.dewPointPsia),
          words: "15 % of the initial pressure",
        };
  const isCompressed = concept === "compression";
  return {
    distribution: abandonmentAround(free.psia * (isCompressed ? COMPRESSED_SHARE : 1), curve),
    source: `${COMMON}: ${isCompressed ? `half of ${free.words}` : free.words}`,
  };
}

/** Injection begins as liquid is about to drop out, or where the reservoir begins when that is lower. */
function cyclingPressure({ curve, pressurePsia }: ConceptStart): number {
  const atDewPoint = Math.ceil(curve.dewPointPsia / 50) * 50;
  const initial = pressurePsia && Math.floor(pressurePsia.p90 / 50) * 50;
  return initial !== null && initial < atDewPoint ? initial : atDewPoint;
}

/**
 * A plan that nobody has changed yet. Every figure is common practice without a source, and its source line says so.
 */
export function startingPlan(concept: ProducingConcept, start: ConceptStart): RecoveryPlan {
  const { curve, sampleName } = start;
  const spread = curveUncertainty[curve.route];
  const percent = Math.round(spread * 100);
  const sample = sampleName ? `Sample ${sampleName}, ` : "";
  return {
    concept,
    curve,
    abandonmentPressurePsia: abandonmentOf(concept, start),
    condensateCurveFactor: {
      distribution: { kind: "pert", low: 1 - spread, mode: 1, high: 1 + spread },
      source: `${sample}${recoveryRouteLabels[curve.route].toLowerCase()} curve; ± ${percent} % is common practice, no source`,
    },
    criticalSaturation: start.criticalSaturation,
    waterDrive: { kind: "none" },
    cycling:
      concept === "cycling"
        ? {
            pressurePsia: cyclingPressure(start),
            pressure: "maintained",
            sweepEfficiency: {
              distribution: { kind: "pert", low: 0.4, mode: 0.6, high: 0.8 },
              source: COMMON,
            },
            displacementEfficiency: {
              distribution: { kind: "pert", low: 0.8, mode: 0.95, high: 1 },
              source: COMMON,
            },
            injectedPoreVolumes: 1,
            fuelFraction: 0.08,
          }
        : null,
  };
}

/**
 * An estimate's plan as another concept would have it: its own abandonment pressure to start from, and everything else
 * as it stands where the concept uses it.
 *
 * @param plan     of the estimate
 * @param start    the reservoir, with the plan's curve
 */
export function planForConcept(
  concept: ProducingConcept,
  plan: RecoveryPlan,
  start: Omit<ConceptStart, "curve" | "criticalSaturation">,
): RecoveryPlan {
  if (concept === plan.concept) return plan;
  const { curve, criticalSaturation, condensateCurveFactor, waterDrive } = plan;
  const started = startingPlan(concept, { ...start, curve, criticalSaturation });
  return {
    ...started,
    condensateCurveFactor,
    waterDrive,
    cycling: started.cycling && (plan.cycling ?? started.cycling),
  };
}
