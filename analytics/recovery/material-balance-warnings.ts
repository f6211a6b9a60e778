import { DomainError } from "../errors";
import type { Warning } from "../warnings";
import type { MaterialBalance, MaterialBalanceInput } from "./material-balance";
import { pressureOverZLine } from "./pressure-over-z";
import { isUnmeasured } from "./recovery-curve-schema";

/** With fewer a line cannot show that it bends. Common practice, no source; as those below. */
const ENOUGH_POINTS = 5;
/** Fall of p/z below which the foot of the line is far from every point. */
const ENOUGH_DEPLETION = 0.1;
const STRAIGHT = 0.99;
/** Difference of the gas in place by the early and by the late points. */
const BEND = 0.15;
/** As `planWarnings` judge a curve. */
const TEMPERATURE_TOLERANCE_DEGF = 10;
const Z_TOLERANCE = 0.05;
/** A first pressure this far below the dew point is no rounding. */
const SATURATED_PSI = 50;
/**
 * Above it rock and water expand with the gas; R. J. Hammerlindl, Predicting gas reserves in abnormally pressured
 * reservoirs, SPE 3479 (1971), from memory.
 */
const ABNORMAL_PSI_PER_FT = 0.5;

/** Everything a reviewer would ask about a p/z line. */
export function materialBalanceWarnings(
  input: MaterialBalanceInput,
  result: Omit<MaterialBalance, "warnings">,
  curveOverCorrelation: number,
): Warning[] {
  return [
    ...lineWarnings(result),
    ...gradientWarnings(input),
    ...zWarnings(input, result, curveOverCorrelation),
  ];
}

function warn(code: string, input: string, message: string): Warning {
  return { code, severity: "warning", input, message };
}

function lineWarnings({ points, line }: Omit<MaterialBalance, "warnings">): Warning[] {
  const warnings: Warning[] = [];
  if (points.length < ENOUGH_POINTS) {
    warnings.push(
      warn(
        "few_pressures",
        "records",
        `${points.length} pressures carry the line: too few to show whether it bends.`,
      ),
    );
  }
  const last = points[points.length - 1];
  const fallen = 1 - last.linePressureOverZ / line.initialPressureOverZ;
  if (fallen < ENOUGH_DEPLETION) {
    warnings.push(
      warn(
        "little_depletion",
        "records",
        `p/z has fallen by ${percent(fallen)} only: the line is drawn on far beyond its points, and a small error of ` +
          "pressure moves its foot a long way.",
      ),
    );
  }
  if (line.rSquared < STRAIGHT) {
    warnings.push(
      warn(
        "line_not_straight",
        "records",
        `The points stray from the line: r² is ${line.rSquared.toFixed(3)}. Are they static pressures at one datum?`,
      ),
    );
  }
  return [...warnings, ...bendWarnings(points)];
}

/** r² alone hides a bend: the early points and the late ones are asked separately. */
function bendWarnings(points: MaterialBalance["points"]): Warning[] {
  if (points.length < ENOUGH_POINTS) return [];
  const middle = Math.floor(points.length / 2);
  const early = inPlaceBy(points.slice(0, middle + 1));
  const late = inPlaceBy(points.slice(middle));
  const found = `the early points alone give ${inWords(early)}, the late ones ${inWords(late)}.`;
  if (late > early * (1 + BEND)) {
    return [
      warn(
        "line_flattens",
        "records",
        `The line flattens: ${found} Water influx or gas from a neighbour holds the pressure up, and the line shows ` +
          "more than is there.",
      ),
    ];
  }
  if (early > late * (1 + BEND)) {
    return [
      warn(
        "line_steepens",
        "records",
        `The line steepens: ${found} Expanding rock and water, or a z that does not fit, make early points show more ` +
          "than is there.",
      ),
    ];
  }
  return [];
}

/** scf; Infinity where p/z does not fall */
function inPlaceBy(points: MaterialBalance["points"]): number {
  try {
    return pressureOverZLine(points).gasInPlaceScf;
  } catch (error) {
    if (error instanceof DomainError) return Infinity;
    throw error;
  }
}

function gradientWarnings({ records, depthFt }: MaterialBalanceInput): Warning[] {
  if (depthFt === null) return [];
  const highest = Math.max(...records.map(({ pressurePsia }) => pressurePsia));
  const gradient = highest / depthFt;
  if (!(gradient > ABNORMAL_PSI_PER_FT)) return [];
  return [
    warn(
      "abnormal_pressure",
      "depthFt",
      `${figure(highest)} psia at ${figure(depthFt)} ft is ${gradient.toFixed(2)} psi/ft, above ` +
        `${ABNORMAL_PSI_PER_FT}: rock and water expand with the gas, which no straight line knows of. Early points then ` +
        "show more gas than is there.",
    ),
  ];
}

function zWarnings(
  { records, curve, temperatureDegF }: MaterialBalanceInput,
  { dewPointPsia, points }: Omit<MaterialBalance, "warnings">,
  curveOverCorrelation: number,
): Warning[] {
  if (!curve) return gasZWarnings(records, dewPointPsia);
  const warnings: Warning[] = [];
  const isBelow = points.some(({ isBelowDewPoint }) => isBelowDewPoint);
  if (isBelow && isUnmeasured(curve.route)) {
    warnings.push(
      curve.route === "correlation"
        ? warn(
            "gas_z_below_dew_point",
            "curve.route",
            "A curve by correlation has no two-phase z of its own: below the dew point the gas's z stands in for it, and " +
              "the line shows less than is there.",
          )
        : warn(
            "untuned_two_phase_z",
            "curve.route",
            "The two-phase z comes from an untuned equation of state. Tune it to a depletion study before anybody plans " +
              "on it.",
          ),
    );
  }
  if (Math.abs(curve.temperatureDegF - temperatureDegF) > TEMPERATURE_TOLERANCE_DEGF) {
    warnings.push(
      warn(
        "curve_temperature_differs",
        "curve.temperatureDegF",
        `The depletion curve is of ${figure(curve.temperatureDegF)} °F, the reservoir is at ${figure(temperatureDegF)} °F. ` +
          "Is it the same fluid?",
      ),
    );
  }
  if (Math.abs(curveOverCorrelation - 1) > Z_TOLERANCE) {
    warnings.push(
      warn(
        "curve_z_differs",
        "curve.points.0.twoPhaseZ",
        `z at the dew point is ${curve.points[0].twoPhaseZ.toFixed(3)} on the curve and ` +
          `${(curve.points[0].twoPhaseZ / curveOverCorrelation).toFixed(3)} by correlation; above the dew point the ` +
          "correlation is moved to meet the curve. Do curve and separator test belong to one fluid?",
      ),
    );
  }
  const [first] = records;
  if (first.surfaceGasScf === 0 && first.pressurePsia < curve.dewPointPsia - SATURATED_PSI) {
    warnings.push(
      warn(
        "begins_below_dew_point",
        "records.0.pressurePsia",
        `Nothing was produced yet at ${figure(first.pressurePsia)} psia, below the curve's dew point of ` +
          `${figure(curve.dewPointPsia)}. The fluid in place is then another than the sample's.`,
      ),
    );
  }
  return warnings;
}

/** Without a curve the gas's own z is taken everywhere. */
function gasZWarnings(
  records: MaterialBalanceInput["records"],
  dewPointPsia: number | null,
): Warning[] {
  if (dewPointPsia === null) {
    return [
      warn(
        "dew_point_unknown",
        "separatorTest.dewPointPsia",
        "No dew point is known. Below it the gas's own z, which is taken here, makes the line show less than is there.",
      ),
    ];
  }
  const below = records.filter(({ pressurePsia }) => pressurePsia < dewPointPsia).length;
  if (below === 0) return [];
  return [
    warn(
      "gas_z_below_dew_point",
      "curve",
      `${below} of ${records.length} pressures lie below the dew point of ${figure(dewPointPsia)} psia. Without a ` +
        "depletion curve they take the gas's own z, and the line shows less than is there.",
    ),
  ];
}

const FIGURE = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 4 });
const figure = (value: number) => FIGURE.format(value);
const percent = (fraction: number) => `${Number((fraction * 100).toPrecision(2))} %`;
const inWords = (scf: number) =>
  Number.isFinite(scf) ? `${Number((scf / 1e9).toPrecision(3))} Bscf` : "no fall at all";
