/** Constants of the components that a laboratory reports one by one, and of single carbon number fractions. */
import { DomainError } from "../errors";
import { PASCALS_PER_PSI } from "../units/conversions";
import type { LightComponent } from "./composition-schema";

export interface ComponentConstants {
  /** lb/lbmol */
  readonly molecularWeight: number;
  readonly criticalTemperatureDegR: number;
  readonly criticalPressurePsia: number;
  readonly acentricFactor: number;
  /** s = c/b of the volume translation of Peng-Robinson; Jhaveri and Youngren (1988), from memory */
  readonly volumeShift: number;
}

/**
 * Critical constants of the reference equations of state (K and Pa to degR and psia), molecular weights of GPA 2145.
 * C6 counts as n-hexane.
 *
 * @see O. Kunz, W. Wagner, J. Chem. Eng. Data 57 (2012) 3032 and the equations it collects; B. S. Jhaveri,
 *   G. K. Youngren, SPE Reservoir Eng. 3 (Aug. 1988) 1033-1040
 */
export const lightConstants: Readonly<Record<LightComponent, ComponentConstants>> = {
  H2S: constants(34.0809, 373.1, 9_000_000, 0.1005, -0.1288),
  CO2: constants(44.0095, 304.1282, 7_377_300, 0.22394, -0.0817),
  N2: constants(28.0134, 126.192, 3_395_800, 0.0372, -0.1927),
  C1: constants(16.0425, 190.564, 4_599_200, 0.01142, -0.1595),
  C2: constants(30.069, 305.322, 4_872_200, 0.0995, -0.1134),
  C3: constants(44.0956, 369.89, 4_251_200, 0.1521, -0.0863),
  iC4: constants(58.1222, 407.81, 3_629_000, 0.184, -0.0844),
  nC4: constants(58.1222, 425.125, 3_796_000, 0.201, -0.0675),
  iC5: constants(72.1488, 460.35, 3_378_000, 0.2274, -0.0608),
  nC5: constants(72.1488, 469.7, 3_367_500, 0.251, -0.039),
  C6: constants(86.1754, 507.82, 3_044_100, 0.3, -0.008),
};

function constants(
  molecularWeight: number,
  criticalTemperatureK: number,
  criticalPressurePa: number,
  acentricFactor: number,
  volumeShift: number,
): ComponentConstants {
  return {
    molecularWeight,
    criticalTemperatureDegR: criticalTemperatureK * 1.8,
    criticalPressurePsia: criticalPressurePa / PASCALS_PER_PSI,
    acentricFactor,
    volumeShift,
  };
}

export interface CarbonNumberProperties {
  /** lb/lbmol */
  readonly molecularWeight: number;
  /** at 60 degF, water = 1 */
  readonly specificGravity: number;
  readonly boilingPointDegR: number;
}

/** Molecular weight, specific gravity and normal boiling point (degR) of C7, C8, … C36. */
const GENERALISED: readonly (readonly [number, number, number])[] = [
  [96, 0.727, 658],
  [107, 0.749, 702],
  [121, 0.768, 748],
  [134, 0.782, 791],
  [147, 0.793, 829],
  [161, 0.804, 867],
  [175, 0.815, 901],
  [190, 0.826, 936],
  [206, 0.836, 971],
  [222, 0.843, 1002],
  [237, 0.851, 1032],
  [251, 0.856, 1055],
  [263, 0.861, 1077],
  [275, 0.866, 1101],
  [291, 0.871, 1124],
  [300, 0.876, 1146],
  [312, 0.881, 1167],
  [324, 0.885, 1187],
  [337, 0.888, 1207],
  [349, 0.892, 1226],
  [360, 0.896, 1244],
  [372, 0.899, 1262],
  [382, 0.902, 1277],
  [394, 0.905, 1294],
  [404, 0.909, 1310],
  [415, 0.912, 1326],
  [426, 0.915, 1341],
  [437, 0.917, 1355],
  [445, 0.92, 1368],
  [456, 0.922, 1382],
];

/**
 * Generalised properties of a single carbon number fraction, for extended analyses that give mole per cent alone. The
 * table is that of Katz and Firoozabadi with the molecular weights that Whitson made consistent with its boiling points
 * and gravities; written from memory. Laboratories' own fractions differ by a few per cent with the crude's character.
 *
 * @param carbonNumber  7 to 36
 * @throws {DomainError} outside the table
 * @example carbonNumberProperties(7) // => { molecularWeight: 96, specificGravity: 0.727, boilingPointDegR: 658 }
 * @see D. L. Katz, A. Firoozabadi, J. Pet. Technol. 30 (Nov. 1978) 1649-1655; C. H. Whitson, SPE J. 23 (Aug. 1983)
 *   683-694
 */
export function carbonNumberProperties(carbonNumber: number): CarbonNumberProperties {
  const row = GENERALISED[carbonNumber - 7];
  if (!row) {
    throw new DomainError(
      `There are no generalised properties of C${carbonNumber}; the table runs from C7 to C36`,
      { input: "carbonNumber", value: carbonNumber },
    );
  }
  const [molecularWeight, specificGravity, boilingPointDegR] = row;
  return { molecularWeight, specificGravity, boilingPointDegR };
}

/** Name of a single carbon number fraction, or of everything from it up. */
export const fractionName = (carbonNumber: number, plus = false) =>
  `C${carbonNumber}${plus ? "+" : ""}`;
