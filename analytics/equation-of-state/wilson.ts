import type { Mixture } from "./mixture";

/**
 * Natural logarithms of Wilson's K-values, the usual first guess.
 *
 *     K = (pc / p) exp(5.373 (1 + w)(1 - Tc / T))
 *
 * @see G. M. Wilson, 65th national AIChE meeting (1969), paper 15C
 */
export function fillWilson(
  mixture: Mixture,
  pressurePsia: number,
  temperatureDegR: number,
  lnK: Float64Array,
): void {
  for (let i = 0; i < lnK.length; i += 1) {
    lnK[i] =
      Math.log(mixture.criticalPressurePsia[i] / pressurePsia) +
      5.373 *
        (1 + mixture.acentricFactor[i]) *
        (1 - mixture.criticalTemperatureDegR[i] / temperatureDegR);
  }
}
