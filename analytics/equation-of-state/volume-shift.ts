/** Volume shift of a heavy fraction, so that Peng-Robinson gives its measured specific gravity at 60 degF. */
import { ConvergenceError } from "../errors";
import { CUBIC_FEET_PER_BARREL, GAS_CONSTANT } from "../units/conversions";
import { CANONICAL_BASE, WATER_POUNDS_PER_BARREL } from "../units/standard-conditions";
import type { CriticalProperties } from "./heavy-fractions";
import { createPhaseState, PengRobinson } from "./peng-robinson";

/** Volumes over covolume beyond which a root is no liquid. */
const LARGEST_LIQUID_VOLUME = 4;

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
  const pure = new PengRobinson({
    names: ["fraction"],
    criticalTemperatureDegR: Float64Array.of(critical.criticalTemperatureDegR),
    criticalPressurePsia: Float64Array.of(critical.criticalPressurePsia),
    acentricFactor: Float64Array.of(critical.acentricFactor),
    molecularWeight: Float64Array.of(molecularWeight),
    volumeShift: new Float64Array(1),
    interactions: new Float64Array(1),
  });
  const { temperatureDegR, pressurePsia } = CANONICAL_BASE;
  const state = createPhaseState(1);
  pure.setTemperature(temperatureDegR);
  pure.evaluate(Float64Array.of(1), pressurePsia, "liquid", state);
  const volume = (state.z * GAS_CONSTANT * temperatureDegR) / pressurePsia;
  const [b] = pure.coVolume;
  if (!(volume < LARGEST_LIQUID_VOLUME * b)) {
    throw new ConvergenceError("A heavy fraction has no liquid at 60 degF", { ...critical });
  }
  const density = (specificGravity * WATER_POUNDS_PER_BARREL) / CUBIC_FEET_PER_BARREL;
  return (volume - molecularWeight / density) / b;
}
