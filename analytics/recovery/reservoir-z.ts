import { DomainError } from "../errors";
import type { Wellstream } from "../fluid/wellstream";
import { pseudocritical, pseudocriticalWarnings, type Impurities } from "../gas/pseudocritical";
import { zFactor, zFactorWarnings } from "../gas/z-factor";
import { sampleMonotone } from "../numerics/monotone-interpolation";
import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import { checkCurve } from "./fine-curve";
import type { RecoveryCurve, RecoveryPoint } from "./recovery-curve-schema";

/** Intervals of the grid between the ends of the curve: 3 psi for a dew point of 3,000. */
const INTERVALS = 1024;
/** Sheets round the dew point, and a curve's lowest pressure. */
const END_TOLERANCE_PSI = 1;

export interface ZAtPressure {
  /** two-phase below the dew point, of gas and liquid together */
  readonly z: number;
  /** of the gas phase alone */
  readonly gasZ: number;
  readonly isBelowDewPoint: boolean;
}

export interface ReservoirZ {
  /** @throws {DomainError} below the end of the curve; `details.input` is `pressurePsia` */
  readonly at: (pressurePsia: number) => ZAtPressure;
  /** z of the curve's dew point over the correlation's; 1 without a curve */
  readonly curveOverCorrelation: number;
  /** about the correlation of z, at the highest pressure it is asked for */
  readonly warningsAt: (pressurePsia: number) => Warning[];
}

export interface ReservoirFluid {
  readonly wellstream: Pick<Wellstream, "wellstreamGravity">;
  readonly impurities: Impurities;
  readonly temperatureDegF: number;
  /** below its dew point; `null` takes the gas's own z everywhere */
  readonly curve: RecoveryCurve | null;
}

/**
 * z of what a reservoir holds, over pressure, for a material balance.
 *
 * At and below the dew point it is the curve's two-phase z, by monotone interpolation over pressure. Above, the
 * correlation of the wellstream's gravity gives it, times one factor so that both meet at the dew point: a step there
 * would look like gas that came or went.
 *
 * @throws {DomainError} when the curve contradicts itself
 * @see C. H. Whitson, S. B. Torp, Evaluating constant-volume depletion data, J. Pet. Technol. 35 (March 1983) 610-620
 *      (two-phase z); gas correlations as in `pseudocritical` and `zFactor`
 */
export function reservoirZ({
  wellstream,
  impurities,
  temperatureDegF,
  curve,
}: ReservoirFluid): ReservoirZ {
  if (curve) checkCurve(curve);
  const critical = pseudocritical(wellstream.wellstreamGravity, impurities);
  const reducedTemperature = degreesRankine(temperatureDegF) / critical.temperatureDegR;
  const correlated = (pressurePsia: number) =>
    zFactor(pressurePsia / critical.pressurePsia, reducedTemperature);
  const below = curve && curveColumns(curve);
  const curveOverCorrelation = curve
    ? curve.points[0].twoPhaseZ / correlated(curve.dewPointPsia)
    : 1;
  return {
    at(pressurePsia) {
      if (below && pressurePsia <= below.dewPointPsia) return below.at(pressurePsia);
      const z = curveOverCorrelation * correlated(pressurePsia);
      return { z, gasZ: z, isBelowDewPoint: false };
    },
    curveOverCorrelation,
    warningsAt: (pressurePsia) => [
      ...pseudocriticalWarnings(wellstream.wellstreamGravity, impurities),
      ...zFactorWarnings(pressurePsia / critical.pressurePsia, reducedTemperature),
    ],
  };
}

function curveColumns(curve: RecoveryCurve) {
  const points = [...curve.points].reverse();
  const pressures = points.map(({ pressurePsia }) => pressurePsia);
  const lowest = pressures[0];
  const dewPointPsia = pressures[pressures.length - 1];
  const column = (of: (point: RecoveryPoint) => number) =>
    sampleMonotone(pressures, points.map(of), INTERVALS + 1);
  const twoPhase = column((point) => point.twoPhaseZ);
  const gas = column((point) => point.gasZ);
  return {
    dewPointPsia,
    at(pressurePsia: number): ZAtPressure {
      if (pressurePsia < lowest - END_TOLERANCE_PSI) {
        throw new DomainError(
          `The depletion curve ends at ${Math.ceil(lowest)} psia; at ${pressurePsia} psia no two-phase z is known.`,
          { input: "pressurePsia", value: pressurePsia },
        );
      }
      const position = Math.max(0, ((pressurePsia - lowest) / (dewPointPsia - lowest)) * INTERVALS);
      const i = Math.min(Math.floor(position), INTERVALS - 1);
      const u = position - i;
      const read = (values: Float64Array) => values[i] + u * (values[i + 1] - values[i]);
      return {
        z: read(twoPhase),
        gasZ: read(gas),
        isBelowDewPoint: pressurePsia < dewPointPsia,
      };
    },
  };
}
