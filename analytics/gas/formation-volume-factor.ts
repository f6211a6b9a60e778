import { DomainError } from "../errors";
import { CUBIC_FEET_PER_BARREL, degreesRankine } from "../units/conversions";
import {
  CANONICAL_BASE,
  standardConstants,
  type StandardConditions,
} from "../units/standard-conditions";

/**
 * Refuses a state that no gas can have.
 *
 * @throws {DomainError} when pressure, absolute temperature or z is not positive and finite
 */
export function assertGasState(
  pressurePsia: number,
  temperatureDegF: number,
  zFactor: number,
): void {
  if (!(pressurePsia > 0 && pressurePsia < Infinity)) {
    throw new DomainError(`A pressure is above zero psia, not ${pressurePsia}`, {
      input: "pressurePsia",
      value: pressurePsia,
    });
  }
  const temperatureDegR = degreesRankine(temperatureDegF);
  if (!(temperatureDegR > 0 && temperatureDegR < Infinity)) {
    throw new DomainError(`${temperatureDegF} °F is not above absolute zero`, {
      input: "temperatureDegF",
      value: temperatureDegF,
    });
  }
  if (!(zFactor > 0 && zFactor < Infinity)) {
    throw new DomainError(`A z factor is above zero, not ${zFactor}`, {
      input: "zFactor",
      value: zFactor,
    });
  }
}

/**
 * Gas formation volume factor: reservoir volume of one standard volume.
 *
 *     Bg = (psc / Tsc) z T / p          0.0282795 z T / p at 14.696 psia and 60 degF
 *
 * @param base  standard conditions of the scf
 * @returns     reservoir cf per scf
 * @throws {DomainError} when pressure, absolute temperature or z is not positive
 * @example gasFormationVolumeFactorCfPerScf(6500, 260, 1.12) // => 0.00350679
 */
export function gasFormationVolumeFactorCfPerScf(
  pressurePsia: number,
  temperatureDegF: number,
  zFactor: number,
  base: StandardConditions = CANONICAL_BASE,
): number {
  assertGasState(pressurePsia, temperatureDegF, zFactor);
  return (
    (standardConstants(base).volumeFactorCfPerScf * zFactor * degreesRankine(temperatureDegF)) /
    pressurePsia
  );
}

/**
 * The same as reservoir barrels per thousand standard cubic feet, the unit of black-oil tables.
 *
 * @throws {DomainError} when pressure, absolute temperature or z is not positive
 * @example gasFormationVolumeFactorRbPerMscf(6500, 260, 1.12) // => 0.624586
 */
export function gasFormationVolumeFactorRbPerMscf(
  pressurePsia: number,
  temperatureDegF: number,
  zFactor: number,
  base: StandardConditions = CANONICAL_BASE,
): number {
  return (
    (1000 * gasFormationVolumeFactorCfPerScf(pressurePsia, temperatureDegF, zFactor, base)) /
    CUBIC_FEET_PER_BARREL
  );
}
