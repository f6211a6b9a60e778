import type { Mixture } from "../equation-of-state/mixture";
import { GAS_CONSTANT } from "../units/conversions";

const DEGR_PER_KELVIN = 1.8;
const PSIA_PER_ATMOSPHERE = 14.695949;
const POLYNOMIAL = [0.1023, 0.023364, 0.058533, -0.040758, 0.0093324] as const;

/**
 * Viscosity of a hydrocarbon mixture by Lohrenz, Bray and Clark, from its density:
 *
 *     [(mu - mu*) xi + 1e-4]^(1/4) = 0.1023 + 0.023364 r + 0.058533 r2 - 0.040758 r3 + 0.0093324 r4
 *     r = Vc / V,   xi = Tc^(1/6) / (M^(1/2) Pc^(2/3)),   Tc in K, Pc in atm, molar averages
 *     mu* = sum x mu_i sqrt(M_i) / sum x sqrt(M_i)        (Herning and Zipperer)
 *     mu_i xi_i = 34e-5 Tr^0.94  (Tr <= 1.5),  17.78e-5 (4.58 Tr - 1.67)^(5/8)  above   (Stiel and Thodos)
 *
 * Critical volumes come from the critical point, Vc = (0.2905 - 0.085 w) R Tc / Pc, for light and heavy alike. The fourth
 * power makes it very sensitive to density: the authors report 16 % on reservoir liquids, and 25 % to 50 % is common for
 * a liquid whose heavy fractions were not tuned to a measured viscosity (from memory).
 *
 * @param moleFractions           of the phase, adding up to 1
 * @param molarVolumeFt3PerLbmol  of the phase
 * @returns  cp
 * @see J. Lohrenz, B. G. Bray, C. R. Clark, J. Pet. Technol. 16 (October 1964) 1171-1176; K. S. Pitzer et al., J. Am.
 *      Chem. Soc. 77 (1955) 3433-3440 (critical z by the acentric factor). Coefficients from memory
 */
export function condensateViscosityCp(
  mixture: Mixture,
  moleFractions: Float64Array,
  temperatureDegR: number,
  molarVolumeFt3PerLbmol: number,
): number {
  const { criticalTemperatureDegR, criticalPressurePsia, acentricFactor, molecularWeight } =
    mixture;
  let temperature = 0;
  let pressure = 0;
  let mass = 0;
  let volume = 0;
  let dilute = 0;
  let rootMass = 0;
  for (let i = 0; i < moleFractions.length; i += 1) {
    const x = moleFractions[i];
    const kelvin = criticalTemperatureDegR[i] / DEGR_PER_KELVIN;
    const atmospheres = criticalPressurePsia[i] / PSIA_PER_ATMOSPHERE;
    const weight = x * Math.sqrt(molecularWeight[i]);
    temperature += x * kelvin;
    pressure += x * atmospheres;
    mass += x * molecularWeight[i];
    volume +=
      (x * (0.2905 - 0.085 * acentricFactor[i]) * GAS_CONSTANT * criticalTemperatureDegR[i]) /
      criticalPressurePsia[i];
    dilute +=
      (weight * diluteTimesGroup(temperatureDegR / criticalTemperatureDegR[i])) /
      group(kelvin, molecularWeight[i], atmospheres);
    rootMass += weight;
  }
  const reduced = volume / molarVolumeFt3PerLbmol;
  const root = POLYNOMIAL.reduceRight((sum, coefficient) => sum * reduced + coefficient, 0);
  return dilute / rootMass + (root ** 4 - 1e-4) / group(temperature, mass, pressure);
}

function group(kelvin: number, molecularWeight: number, atmospheres: number): number {
  return kelvin ** (1 / 6) / (Math.sqrt(molecularWeight) * atmospheres ** (2 / 3));
}

function diluteTimesGroup(reducedTemperature: number): number {
  return reducedTemperature <= 1.5
    ? 34e-5 * reducedTemperature ** 0.94
    : 17.78e-5 * (4.58 * reducedTemperature - 1.67) ** 0.625;
}
