import { DomainError } from "../errors";

/** One measured reservoir pressure and what had been produced by then. */
export interface PressureRecord {
  readonly pressurePsia: number;
  /** two-phase below the dew point; above it the gas's own */
  readonly z: number;
  /** gas of all separators plus the vapour equivalent of the condensate */
  readonly wellstreamProducedScf: number;
}

export interface PressureOverZLine {
  readonly gasInPlaceScf: number;
  readonly initialPressureOverZ: number;
  readonly rSquared: number;
}

/**
 * Wellstream produced, from what was metered at the surface.
 *
 * @param vapourEquivalentScfPerStb  of the condensate
 * @example wellstreamProducedScf(9_000_000, 100, 800) // => 9080000
 */
export function wellstreamProducedScf(
  surfaceGasScf: number,
  condensateStb: number,
  vapourEquivalentScfPerStb: number,
): number {
  return surfaceGasScf + condensateStb * vapourEquivalentScfPerStb;
}

/**
 * Wellstream in place from pressures and production: the straight line of a closed reservoir, by least squares.
 *
 *     p / z = (pi / zi) (1 - Gp / G)
 *
 * Below the dew point z is the two-phase z; with the gas's own z the line bends and misses G. Water influx and rock or
 * water expansion bend it too (an abnormally high pressure above about 0.5 psi/ft), and make the first points look like
 * a larger reservoir.
 *
 * @param records  at least three, production rising
 * @throws {DomainError} when there are fewer, a figure is impossible, or p / z does not fall with production
 * @see R. J. Hammerlindl, Predicting gas reserves in abnormally pressured reservoirs, SPE 3479 (1971); J. Hagoort,
 *      Fundamentals of Gas Reservoir Engineering (1988), chapter 10 (two-phase z), from memory
 */
export function pressureOverZLine(records: readonly PressureRecord[]): PressureOverZLine {
  if (records.length < 3) {
    throw new DomainError(
      `A p/z line needs at least three pressures; there ${records.length === 1 ? "is" : "are"} ${records.length}.`,
      { input: "records", value: records.length },
    );
  }
  records.forEach((record, i) => checkRecord(records, record, i));
  const x = records.map(({ wellstreamProducedScf: produced }) => produced);
  const y = records.map(({ pressurePsia, z }) => pressurePsia / z);
  const mean = (values: readonly number[]) =>
    values.reduce((sum, value) => sum + value, 0) / values.length;
  const [meanX, meanY] = [mean(x), mean(y)];
  let xx = 0;
  let xy = 0;
  let yy = 0;
  for (let i = 0; i < x.length; i += 1) {
    xx += (x[i] - meanX) ** 2;
    xy += (x[i] - meanX) * (y[i] - meanY);
    yy += (y[i] - meanY) ** 2;
  }
  const slope = xy / xx;
  if (!(slope < 0)) {
    throw new DomainError("p/z does not fall as gas is produced: these pressures give no volume.", {
      input: "records",
    });
  }
  const initialPressureOverZ = meanY - slope * meanX;
  return {
    gasInPlaceScf: -initialPressureOverZ / slope,
    initialPressureOverZ,
    rSquared: xy ** 2 / (xx * yy),
  };
}

function checkRecord(records: readonly PressureRecord[], record: PressureRecord, i: number): void {
  const refuse = (name: keyof PressureRecord, message: string) => {
    throw new DomainError(message, { input: `records.${i}.${name}`, value: record[name] });
  };
  if (!(record.pressurePsia > 0 && record.pressurePsia < Infinity)) {
    refuse("pressurePsia", `A pressure is above zero, not ${record.pressurePsia} psia.`);
  }
  if (!(record.z > 0 && record.z < Infinity)) {
    refuse("z", `A z factor is above zero, not ${record.z}.`);
  }
  const before = i > 0 ? records[i - 1].wellstreamProducedScf : -1;
  if (!(record.wellstreamProducedScf > before && record.wellstreamProducedScf < Infinity)) {
    refuse(
      "wellstreamProducedScf",
      `Cumulative production rises from record to record; ${record.wellstreamProducedScf} scf does not.`,
    );
  }
}
