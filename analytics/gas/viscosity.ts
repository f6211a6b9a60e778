import {
  CUBIC_METRES_PER_CUBIC_FOOT,
  degreesRankine,
  KILOGRAMS_PER_POUND,
} from "../units/conversions";
import { AIR_MOLECULAR_WEIGHT } from "../units/standard-conditions";
import type { Warning } from "../warnings";
import { gasDensityLbPerCubicFoot } from "./density";

const GRAMS_PER_CC_PER_LB_PER_FT3 = KILOGRAMS_PER_POUND / CUBIC_METRES_PER_CUBIC_FOOT / 1000;

/**
 * Gas viscosity by Lee, Gonzalez and Eakin.
 *
 *     K = (9.379 + 0.01607 M) T^1.5 / (209.2 + 19.26 M + T)
 *     X = 3.448 + 986.4/T + 0.01009 M        Y = 2.447 - 0.2224 X
 *     mu = 1e-4 K exp(X rho^Y),  rho in g/cm3, T in degR
 *
 * Range 100-340 degF and 100-8,000 psia, sweet gas; the authors report about 3 % standard deviation and 9 % at most
 * (from memory).
 *
 * @returns  cp
 * @throws {DomainError} when gravity, pressure, absolute temperature or z is not positive
 * @example gasViscosityCp(0.65, 2000, 200, 0.9) // => 0.016875
 * @see A. L. Lee, M. H. Gonzalez, B. E. Eakin, J. Pet. Technol. 18 (August 1966) 997-1000
 */
export function gasViscosityCp(
  gasGravity: number,
  pressurePsia: number,
  temperatureDegF: number,
  zFactor: number,
): number {
  const density =
    gasDensityLbPerCubicFoot(gasGravity, pressurePsia, temperatureDegF, zFactor) *
    GRAMS_PER_CC_PER_LB_PER_FT3;
  const temperature = degreesRankine(temperatureDegF);
  const molecularWeight = AIR_MOLECULAR_WEIGHT * gasGravity;
  const k =
    ((9.379 + 0.01607 * molecularWeight) * temperature ** 1.5) /
    (209.2 + 19.26 * molecularWeight + temperature);
  const x = 3.448 + 986.4 / temperature + 0.01009 * molecularWeight;
  const y = 2.447 - 0.2224 * x;
  return 1e-4 * k * Math.exp(x * density ** y);
}

/** Warns outside the temperatures and pressures of the viscosity data. */
export function gasViscosityWarnings(pressurePsia: number, temperatureDegF: number): Warning[] {
  if (
    pressurePsia >= 100 &&
    pressurePsia <= 8000 &&
    temperatureDegF >= 100 &&
    temperatureDegF <= 340
  ) {
    return [];
  }
  return [
    {
      code: "viscosity_outside_range",
      severity: "warning",
      message:
        `${Math.round(pressurePsia)} psia and ${Math.round(temperatureDegF)} °F lie outside 100-8,000 psia and ` +
        "100-340 °F, the data of the viscosity correlation; the viscosity is extrapolated.",
    },
  ];
}
