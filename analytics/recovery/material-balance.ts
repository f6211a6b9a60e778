import { DomainError, underPath } from "../errors";
import type { SeparatorTest } from "../fluid/separator-test-schema";
import { recombine } from "../fluid/wellstream";
import { compilePossible } from "../uncertainty/possible-range";
import { usualRanges } from "../volumetrics/usual-ranges";
import type { Warning } from "../warnings";
import { materialBalanceWarnings } from "./material-balance-warnings";
import {
  pressureOverZLine,
  wellstreamProducedScf,
  type PressureOverZLine,
} from "./pressure-over-z";
import type { RecoveryCurve } from "./recovery-curve-schema";
import { reservoirZ } from "./reservoir-z";

/** A static reservoir pressure, and what the surface had metered by then. */
export interface ProductionRecord {
  readonly pressurePsia: number;
  /** of all separators and the tank, cumulative */
  readonly surfaceGasScf: number;
  /** cumulative */
  readonly condensateStb: number;
}

export interface MaterialBalanceInput {
  /** in the order of production */
  readonly records: readonly ProductionRecord[];
  readonly separatorTest: SeparatorTest;
  readonly temperatureDegF: number;
  /** below its dew point its two-phase z is taken; `null` takes the gas's own z everywhere */
  readonly curve: RecoveryCurve | null;
  /** of the pressures' datum; `null` leaves the pressure gradient unjudged */
  readonly depthFt: number | null;
}

export interface MaterialBalancePoint {
  readonly pressurePsia: number;
  readonly wellstreamProducedScf: number;
  readonly z: number;
  readonly pressureOverZ: number;
  /** of the line, at the same production */
  readonly linePressureOverZ: number;
  readonly gasZ: number;
  readonly gasPressureOverZ: number;
  readonly isBelowDewPoint: boolean;
}

export interface MaterialBalance {
  readonly wellstreamInPlaceScf: number;
  readonly dryGasInPlaceScf: number;
  readonly condensateInPlaceStb: number;
  readonly line: { readonly initialPressureOverZ: number; readonly rSquared: number };
  /** share of the wellstream in place produced at the last record */
  readonly producedFraction: number;
  /** of the curve or else of the separator test; `null` when neither has one */
  readonly dewPointPsia: number | null;
  readonly vapourEquivalentScfPerStb: number;
  readonly points: readonly MaterialBalancePoint[];
  /** what the gas's own z below the dew point would have given; `null` where it makes no difference or no line */
  readonly withGasZ: {
    readonly wellstreamInPlaceScf: number;
    readonly initialPressureOverZ: number;
    readonly rSquared: number;
    /** over `wellstreamInPlaceScf` of the balance, less 1 */
    readonly bias: number;
  } | null;
  readonly warnings: readonly Warning[];
}

/**
 * Gas and condensate in place from reservoir pressures and production, without a volume of rock: the straight line of
 * p / z2 against the wellstream produced, whose foot is the wellstream in place. The closed reservoir of
 * `pressureOverZLine`, with
 *
 *     wellstream produced = gas + Veq condensate          Veq: vapour equivalent of the condensate
 *     z2                  as `reservoirZ`
 *     dry gas = G fg,  condensate = dry gas Y / 1e6       fg and Y of the separator test
 *
 * The separator test is of the fluid that was there at first.
 *
 * @throws {DomainError} with a path into the input when fewer than three records are given, a figure is impossible,
 *   production falls, p/z does not fall, or a pressure lies below the end of the curve
 * @throws {ConvergenceError} when z does not converge
 */
export function materialBalance(input: MaterialBalanceInput): MaterialBalance {
  const { records, separatorTest, temperatureDegF, curve } = input;
  checkTemperature(temperatureDegF);
  records.forEach((record, i) => checkRecord(record, records[i - 1], i));
  const wellstream = underPath("separatorTest", () => recombine(separatorTest));
  const fluid = { wellstream, impurities: separatorTest, temperatureDegF, curve };
  const z = reservoirZ(fluid);
  const veq = wellstream.vapourEquivalentScfPerStb;
  const states = records.map(({ pressurePsia, surfaceGasScf, condensateStb }, i) => ({
    pressurePsia,
    wellstreamProducedScf: wellstreamProducedScf(surfaceGasScf, condensateStb, veq),
    ...underPath(`records.${i}`, () => z.at(pressurePsia)),
  }));
  const line = lineOf(states);
  const { gasInPlaceScf, initialPressureOverZ, rSquared } = line;
  const points = states.map((state) => ({
    ...state,
    pressureOverZ: state.pressurePsia / state.z,
    linePressureOverZ: initialPressureOverZ * (1 - state.wellstreamProducedScf / gasInPlaceScf),
    gasPressureOverZ: state.pressurePsia / state.gasZ,
  }));
  const dryGasInPlaceScf = gasInPlaceScf * wellstream.dryGasFraction;
  const result = {
    wellstreamInPlaceScf: gasInPlaceScf,
    dryGasInPlaceScf,
    condensateInPlaceStb: (dryGasInPlaceScf * wellstream.condensateYieldStbPerMmscf) / 1e6,
    line: { initialPressureOverZ, rSquared },
    producedFraction: points[points.length - 1].wellstreamProducedScf / gasInPlaceScf,
    dewPointPsia: curve?.dewPointPsia ?? separatorTest.dewPointPsia,
    vapourEquivalentScfPerStb: veq,
    points,
    withGasZ: withGasZ(points, gasInPlaceScf),
  };
  return {
    ...result,
    warnings: [
      ...materialBalanceWarnings(input, result, z.curveOverCorrelation),
      ...wellstream.warnings.map((warning) => ({
        ...warning,
        input: (warning.input ?? "fluid").replace(/^fluid/, "separatorTest"),
      })),
      ...correlationWarnings(points, z.warningsAt),
    ],
  };
}

function lineOf(
  states: readonly {
    pressurePsia: number;
    z: number;
    wellstreamProducedScf: number;
  }[],
): PressureOverZLine {
  try {
    return pressureOverZLine(states);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    // The sum that does not rise is worked out; the gas is what was typed.
    const input = error.details.input?.replace("wellstreamProducedScf", "surfaceGasScf");
    throw new DomainError(error.message, { ...error.details, input });
  }
}

function withGasZ(
  points: readonly MaterialBalancePoint[],
  wellstreamInPlaceScf: number,
): MaterialBalance["withGasZ"] {
  if (points.every(({ z, gasZ }) => z === gasZ)) return null;
  try {
    const line = pressureOverZLine(points.map((point) => ({ ...point, z: point.gasZ })));
    return {
      wellstreamInPlaceScf: line.gasInPlaceScf,
      initialPressureOverZ: line.initialPressureOverZ,
      rSquared: line.rSquared,
      bias: line.gasInPlaceScf / wellstreamInPlaceScf - 1,
    };
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

/** About the correlation of z at the highest pressure that it is used for. */
function correlationWarnings(
  points: readonly MaterialBalancePoint[],
  warningsAt: (pressurePsia: number) => Warning[],
): Warning[] {
  const above = points.filter(({ isBelowDewPoint }) => !isBelowDewPoint);
  if (above.length === 0) return [];
  return warningsAt(Math.max(...above.map(({ pressurePsia }) => pressurePsia))).map((warning) => ({
    ...warning,
    input: "temperatureDegF",
  }));
}

function checkTemperature(value: number): void {
  try {
    compilePossible(usualRanges.temperatureDegF, { kind: "constant", value });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(error.message, { ...error.details, input: "temperatureDegF" });
  }
}

function checkRecord(
  record: ProductionRecord,
  before: ProductionRecord | undefined,
  i: number,
): void {
  const refuse = (name: keyof ProductionRecord, message: string) => {
    throw new DomainError(message, { input: `records.${i}.${name}`, value: record[name] });
  };
  const { label, possible } = usualRanges.pressurePsia;
  // Below what a new reservoir can have: an old one is emptied to less.
  if (!(record.pressurePsia > 0 && record.pressurePsia <= possible[1])) {
    refuse(
      "pressurePsia",
      `The ${label} cannot be ${record.pressurePsia} psia: it is above zero, and at most ` +
        `${possible[1].toLocaleString("en-GB")}.`,
    );
  }
  for (const [name, label] of [
    ["surfaceGasScf", "gas"],
    ["condensateStb", "condensate"],
  ] as const) {
    if (!(record[name] >= 0 && record[name] < Infinity)) {
      refuse(name, `Cumulative ${label} is not negative; ${record[name]} is.`);
    }
    if (before && record[name] < before[name]) {
      refuse(name, `Cumulative ${label} does not fall from record to record; here it does.`);
    }
  }
}
