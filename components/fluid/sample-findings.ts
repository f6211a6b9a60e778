import type {
  CompositionResponse,
  DepletionResponse,
  EquationOfStateResponse,
} from "@/app/api/v1/calculations/fluid-schema";
import type { WellstreamResponse } from "@/app/api/v1/calculations/schema";
import { fluidTypeLabels } from "@/analytics/fluid/fluid-type";
import type { SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { Warning } from "@/analytics/warnings";
import type { Finding } from "@/components/estimate/finding-list";
import { formatFigure } from "@/components/ui/format";
import type { AvailableCurve } from "./available-curves";
import { mostLiquid } from "./curve-reading";
import { psia } from "./words";

/** Two roads to one gravity may differ by this much before somebody should look; common practice, no source. */
const GRAVITY_TOLERANCE = 0.02;
/** A computed dew point this far from the measured one is a miss worth naming, psi. */
const DEW_POINT_TOLERANCE_PSI = 50;
/** Dew points of two sheets of one sample agree to this share. */
const SAME_DEW_POINT = 0.005;

export interface SampleEvidence {
  wellstream: WellstreamResponse | null;
  composition: CompositionResponse | null;
  equationOfState: EquationOfStateResponse | null;
  depletion: DepletionResponse | null;
  /** of the curve by correlation; none where there is another */
  screeningWarnings: readonly Warning[];
  curve: AvailableCurve | null;
  tuning: SampleStudy["tuning"];
  /** of the separator sheet, and of the depletion table */
  dewPoints: { test: number | null; table: number | null };
  /** per cent of pore space */
  criticalBand: { low: number; high: number };
  /** P50; `null` while unknown */
  waterSaturation: number | null;
}

/** Warnings about the whole fluid: two calculations that give one mean the same. */
const saidOnce = new Set(["sour_gas", "corrosive_gas", "untuned_equation_of_state"]);

/** How a check that could not be made begins. */
const NOT_CHECKED = "Not checked: ";

const tones = { passed: "done", warning: "warning", failed: "caution" } as const;

/** What the parts of a sample say about each other, as far as they exist. */
export function sampleFindings(evidence: SampleEvidence): Finding[] {
  return [
    ...gravities(evidence),
    ...fluidTypes(evidence),
    ...dewPoints(evidence),
    ...tuningAge(evidence),
    ...yields(evidence),
    ...tableChecks(evidence),
    ...band(evidence),
    ...[
      ...(evidence.composition?.warnings ?? []),
      ...(evidence.equationOfState?.warnings ?? []),
      ...(evidence.depletion?.warnings ?? []),
      ...evidence.screeningWarnings,
    ]
      .filter(
        ({ code, message }, index, all) =>
          // The separator test's own findings say it already.
          !evidence.wellstream?.warnings.some((told) => told.code === code) &&
          all.findIndex((other) =>
            saidOnce.has(code) ? other.code === code : other.message === message,
          ) === index,
      )
      .map(
        ({ severity, message }): Finding => ({
          tone: severity === "caution" ? "caution" : "warning",
          text: message,
        }),
      ),
  ];
}

/** The composition decides a fluid's type; a gas-oil ratio that says another is named. */
function fluidTypes({ wellstream, composition }: SampleEvidence): Finding[] {
  if (!wellstream || !composition || wellstream.fluidType === composition.fluidType.type) return [];
  const { label, rule } = composition.fluidType;
  const other = fluidTypeLabels[wellstream.fluidType].toLowerCase();
  return [
    {
      tone: "warning",
      title: "Two rules disagree",
      text: `${label} by the composition (${rule.split(". ")[0]}), ${other} by ${formatFigure(wellstream.surfaceGasOilRatioScfPerStb, { digits: 4 })} scf/STB alone. The composition’s is shown.`,
    },
  ];
}

/** Checks of the depletion table; one that fails in several rows is one finding. */
function tableChecks({ depletion }: SampleEvidence): Finding[] {
  const found = depletion?.findings ?? [];
  const isFirst = (index: number) =>
    found.findIndex(
      ({ code, severity }) => code === found[index].code && severity === found[index].severity,
    ) === index;
  return found.flatMap(({ code, severity, title, message }, index): Finding[] => {
    if (!isFirst(index)) return [];
    const more =
      found.filter((other) => other.code === code && other.severity === severity).length - 1;
    return [
      {
        tone: message.startsWith(NOT_CHECKED) ? "open" : tones[severity],
        title,
        text: more === 0 ? message : `${message} And ${more} more of the kind.`,
      },
    ];
  });
}

function gravities({ wellstream, composition }: SampleEvidence): Finding[] {
  if (!wellstream || !composition) return [];
  const [test, sheet] = [wellstream.wellstreamGravity, composition.gravity];
  const apart = Math.abs(sheet - test) / test;
  return [
    {
      tone: apart <= GRAVITY_TOLERANCE ? "done" : "warning",
      title: "Two roads to one gravity",
      text: `Separator test ${formatFigure(test, { digits: 4 })}, composition ${formatFigure(sheet, { digits: 4 })}: apart by ${formatFigure(apart * 100, { digits: 2 })} %.`,
    },
  ];
}

function dewPoints({ equationOfState, dewPoints: { test, table } }: SampleEvidence): Finding[] {
  const findings: Finding[] = [];
  if (test !== null && table !== null && Math.abs(test - table) / table > SAME_DEW_POINT) {
    findings.push({
      tone: "warning",
      title: "Two dew points",
      text: `The separator sheet says ${psia(test)} psia, the depletion table ${psia(table)} psia. The table’s is used.`,
    });
  }
  const mismatch = equationOfState?.saturation.mismatchPsia ?? null;
  if (equationOfState && mismatch !== null) {
    findings.push({
      tone: Math.abs(mismatch) <= DEW_POINT_TOLERANCE_PSI ? "done" : "warning",
      title: equationOfState.isTuned
        ? "Dew point of the tuned equation of state"
        : "Dew point of the untuned equation of state",
      text: `${psia(equationOfState.saturation.upperPsia)} psia: ${formatFigure(Math.abs(mismatch))} psi ${mismatch > 0 ? "above" : "below"} the measured one.`,
    });
  }
  return findings;
}

function tuningAge({ tuning, dewPoints: { test, table } }: SampleEvidence): Finding[] {
  const measured = table ?? test;
  if (!tuning || measured === null || Math.abs(tuning.measuredDewPointPsia - measured) < 0.5) {
    return [];
  }
  return [
    {
      tone: "warning",
      title: "Tuned to another dew point",
      text: `The fit was made to ${psia(tuning.measuredDewPointPsia)} psia; the sheet now says ${psia(measured)} psia. Run the tuning again.`,
    },
  ];
}

function yields({ wellstream, equationOfState }: SampleEvidence): Finding[] {
  if (!wellstream || !equationOfState?.train) return [];
  const measured = wellstream.condensateYieldStbPerMmscf;
  const computed = equationOfState.train.condensateYieldStbPerMmscf;
  const apart = Math.abs(computed - measured) / measured;
  return [
    {
      tone: apart <= 0.05 ? "done" : "warning",
      title: "Separator test against flash",
      text: `Measured ${formatFigure(measured)} STB/MMscf, flashed ${formatFigure(computed)}: apart by ${formatFigure(apart * 100, { digits: 2 })} %.`,
    },
  ];
}

/** Liquid counts of what water leaves, critical saturation of all pore space: compared as estimates compare them. */
function band({ curve, criticalBand, waterSaturation }: SampleEvidence): Finding[] {
  if (!curve) return [];
  const most = mostLiquid(curve.curve);
  const percent = most.liquidSaturation * (1 - (waterSaturation ?? 0)) * 100;
  if (percent <= criticalBand.low) return [];
  const isOver = percent > criticalBand.high;
  return [
    {
      tone: "warning",
      title: isOver
        ? "Dropout passes the critical saturation"
        : "Dropout reaches into the critical band",
      text: `${formatFigure(percent)} % of ${waterSaturation === null ? "what water leaves of the pores" : "all pore space"} at ${psia(most.pressurePsia)} psia, band ${formatFigure(criticalBand.low, { digits: 2 })} to ${formatFigure(criticalBand.high, { digits: 2 })} %: ${isOver ? "part of it may flow" : "part of it may begin to flow"}, while these figures leave all of it in the rock.`,
    },
  ];
}
