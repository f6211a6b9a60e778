import { DomainError } from "../errors";
import { degreesRankine, GAS_CONSTANT } from "../units/conversions";
import { AIR_MOLECULAR_WEIGHT } from "../units/standard-conditions";
import { assertGasState } from "./formation-volume-factor";

/**
 * Density of a gas from the real-gas law.
 *
 *     rho = p M / (z R T),   M = 28.9647 gamma,   R = 10.731577 psia ft3/(lbmol degR)
 *
 * @param gasGravity  air = 1
 * @returns           lb/ft3
 * @throws {DomainError} when gravity, pressure, absolute temperature or z is not positive
 * @example gasDensityLbPerCubicFoot(0.65, 2000, 200, 0.9) // => 5.909893
 */
export function gasDensityLbPerCubicFoot(
  gasGravity: number,
  pressurePsia: number,
  temperatureDegF: number,
  zFactor: number,
): number {
  assertGasState(pressurePsia, temperatureDegF, zFactor);
  if (!(gasGravity > 0 && gasGravity < Infinity)) {
    throw new DomainError(`A gas gravity is above zero, not ${gasGravity}`, {
      input: "gasGravity",
      value: gasGravity,
    });
  }
  return (
    (pressurePsia * AIR_MOLECULAR_WEIGHT * gasGravity) /
    (zFactor * GAS_CONSTANT * degreesRankine(temperatureDegF))
  );
}
