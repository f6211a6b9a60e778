/** Volume shift of a heavy fraction, so that Peng-Robinson gives its measured specific gravity at 60 degF. */
import { ConvergenceError } from "../errors";
import { CUBIC_FEET_PER_BARREL, GAS_CONSTANT } from "../units/conversions";
import { CANONICAL_BASE, WATER_POUNDS_PER_BARREL } from "../units/standard-conditions";
import type { CriticalProperties } from "./heavy-fractions";

const OMEGA_A = 0.457235529;
const OMEGA_B = 0.0777960739;
/** acentric factor from which the 1978 form of alpha applies */
const LARGEST_ACENTRIC_OF_1976 = 0.491;

/**
 * Dimensionless volume shift s = c/b at which the translated liquid volume v - c of the pure fraction at 14.696 psia
 * and 60 degF is M / rho.
 *
 *     s = (v_PR - M / (62.366 g)) / b
 *
 * @throws {ConvergenceError} when the fraction has no liquid root at 60 degF
 * @example volumeShiftAtSixtyDegF(keslerLee(803.78, 0.774), 140, 0.774) // => 0.0493
 * @see A. Peneloux, E. Rauzy, R. Freze, Fluid Phase Equilibria 8 (1982) 7-23; B. S. Jhaveri, G. K. Youngren (1988)
 */
export function volumeShiftAtSixtyDegF(
  critical: CriticalProperties,
  molecularWeight: number,
  specificGravity: number,
): number {
  const density = (specificGravity * WATER_POUNDS_PER_BARREL) / CUBIC_FEET_PER_BARREL;
  const { criticalTemperatureDegR, criticalPressurePsia } = critical;
  const b = (OMEGA_B * GAS_CONSTANT * criticalTemperatureDegR) / criticalPressurePsia;
  return (liquidVolume(critical, b) - molecularWeight / density) / b;
}

/** Liquid molar volume at standard conditions, ft3/lbmol: the root nearest to the covolume. */
function liquidVolume(critical: CriticalProperties, b: number): number {
  const { criticalTemperatureDegR, criticalPressurePsia, acentricFactor: w } = critical;
  const { temperatureDegR, pressurePsia } = CANONICAL_BASE;
  const m =
    w > LARGEST_ACENTRIC_OF_1976
      ? 0.379642 + w * (1.48503 + w * (-0.164423 + w * 0.016666))
      : 0.37464 + w * (1.54226 - w * 0.26992);
  const alpha = (1 + m * (1 - Math.sqrt(temperatureDegR / criticalTemperatureDegR))) ** 2;
  const attraction =
    (OMEGA_A * alpha * (GAS_CONSTANT * criticalTemperatureDegR) ** 2) / criticalPressurePsia;
  const pressure = (v: number) =>
    (GAS_CONSTANT * temperatureDegR) / (v - b) - attraction / (v * v + 2 * b * v - b * b);
  let low = b * (1 + 1e-9);
  let high = b;
  do {
    low = high === b ? low : high;
    high += 0.02 * b;
    if (high > 4 * b) {
      throw new ConvergenceError("A heavy fraction has no liquid at 60 degF", { ...critical });
    }
  } while (pressure(high) > pressurePsia);
  for (let iteration = 0; iteration < 60; iteration += 1) {
    const middle = 0.5 * (low + high);
    if (pressure(middle) > pressurePsia) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
