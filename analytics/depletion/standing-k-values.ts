/** Equilibrium ratios at separator conditions without an equation of state. */
import { DomainError } from "../errors";
import type { Warning } from "../warnings";
import { characterisationConstants, characterisationFactor } from "./hoffmann";
import { balanceComponents } from "./lumped-gas";

/** Range of the correlation. */
const HIGHEST_PSIA = 1000;
const HIGHEST_DEGF = 200;

/**
 * K values of Standing at separator conditions, in the order of `balanceComponents`.
 *
 *     log10(K p) = a + c F,   F = b (1/Tb - 1/T)
 *     a = 1.2 + 4.5e-4 p + 15e-10 p2          c = 0.89 - 1.7e-4 p - 3.5e-8 p2
 *     heptanes plus:  n = 7.3 + 0.0075 T(degF) + 0.0016 p,  b = 1013 + 324 n - 4.256 n2,  Tb = 301 + 59.85 n - 0.971 n2
 *
 * Range: below 1,000 psia and 200 degF (coefficients and range from memory).
 *
 * @throws {DomainError} when the pressure or the absolute temperature is not positive
 * @example standingKValues(814.7, 80)[3] // => 3.7674 (C1)
 * @see M. B. Standing, J. Pet. Technol. 31 (September 1979) 1193-1195
 */
export function standingKValues(pressurePsia: number, temperatureDegF: number): Float64Array {
  if (!(pressurePsia > 0 && pressurePsia < Infinity)) {
    throw new DomainError(`A pressure is above zero, not ${pressurePsia}`, {
      input: "pressurePsia",
      value: pressurePsia,
    });
  }
  const p = pressurePsia;
  const a = 1.2 + 4.5e-4 * p + 15e-10 * p * p;
  const c = 0.89 - 1.7e-4 * p - 3.5e-8 * p * p;
  const n = 7.3 + 0.0075 * temperatureDegF + 0.0016 * p;
  const heptanesPlus = {
    slopeDegR: 1013 + 324 * n - 4.256 * n * n,
    boilingPointDegR: 301 + 59.85 * n - 0.971 * n * n,
  };
  return Float64Array.from(balanceComponents, (name) => {
    const constants = characterisationConstants[name] ?? heptanesPlus;
    return 10 ** (a + c * characterisationFactor(constants, temperatureDegF)) / p;
  });
}

/** Warns above the pressures and temperatures of the correlation. */
export function standingKWarnings(pressurePsia: number, temperatureDegF: number): Warning[] {
  if (pressurePsia <= HIGHEST_PSIA && temperatureDegF <= HIGHEST_DEGF) return [];
  return [
    {
      code: "k_values_outside_range",
      severity: "warning",
      message:
        `${Math.round(pressurePsia)} psia and ${Math.round(temperatureDegF)} °F lie outside the K-value correlation, which ends ` +
        "at 1,000 psia and 200 °F; the separator split is extrapolated.",
    },
  ];
}
