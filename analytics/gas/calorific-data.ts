/**
 * Component values of ISO 6976:2016, written down from memory and matched: the standard's first worked example comes out
 * to its last printed digit, and the values at 60 degF convert to the heating values of GPA 2145 within 0.15 Btu/scf.
 */
import type { LightComponent } from "../composition/composition-schema";

/** Combustion and metering at the same temperature: 15 degC, or 60 degF (15.55 degC in the standard). */
export const calorificConditions = ["15 degC", "60 degF"] as const;
export type CalorificCondition = (typeof calorificConditions)[number];

export interface CalorificComponent {
  /** kg/kmol */
  readonly molarMass: number;
  readonly hydrogenAtoms: number;
  /** superior (gross) molar calorific value of the ideal gas, kJ/mol */
  readonly gross: Readonly<Record<CalorificCondition, number>>;
  /** summation factor s at 101.325 kPa */
  readonly summation: Readonly<Record<CalorificCondition, number>>;
}

function component(
  molarMass: number,
  hydrogenAtoms: number,
  gross: readonly [at15degC: number, at60degF: number],
  summation: readonly [at15degC: number, at60degF: number],
): CalorificComponent {
  return {
    molarMass,
    hydrogenAtoms,
    gross: { "15 degC": gross[0], "60 degF": gross[1] },
    summation: { "15 degC": summation[0], "60 degF": summation[1] },
  };
}

/** C6 counts as n-hexane. */
export const calorificComponents: Readonly<Record<LightComponent, CalorificComponent>> = {
  H2S: component(34.08088, 2, [562.38, 562.36], [0.0923, 0.092]),
  CO2: component(44.0095, 0, [0, 0], [0.0752, 0.0749]),
  N2: component(28.0134, 0, [0, 0], [0.017, 0.0169]),
  C1: component(16.04246, 4, [891.51, 891.46], [0.04452, 0.04437]),
  C2: component(30.06904, 6, [1562.14, 1562.06], [0.0919, 0.0916]),
  C3: component(44.09562, 8, [2221.1, 2220.99], [0.1344, 0.134]),
  iC4: component(58.1222, 10, [2870.58, 2870.45], [0.1722, 0.1717]),
  nC4: component(58.1222, 10, [2879.76, 2879.63], [0.184, 0.1834]),
  iC5: component(72.14878, 12, [3531.68, 3531.52], [0.2251, 0.2244]),
  nC5: component(72.14878, 12, [3538.6, 3538.45], [0.2361, 0.2354]),
  C6: component(86.17536, 14, [4198.24, 4198.06], [0.3001, 0.299]),
};

/** n-hexane to n-decane, between which the heavy end is interpolated. */
export const heavyAlkanes: readonly CalorificComponent[] = [
  calorificComponents.C6,
  component(100.20194, 16, [4857.18, 4856.98], [0.3668, 0.3654]),
  component(114.22852, 18, [5516.01, 5515.78], [0.4346, 0.4329]),
  component(128.2551, 20, [6175.82, 6175.56], [0.503, 0.501]),
  component(142.28168, 22, [6834.9, 6834.62], [0.5991, 0.5967]),
];

/** kg/kmol */
export const AIR_MOLAR_MASS = 28.96546;
/** J/(mol K), the value of the standard */
export const ISO_GAS_CONSTANT = 8.3144621;
export const AIR_COMPRESSION_FACTOR: Readonly<Record<CalorificCondition, number>> = {
  "15 degC": 0.999595,
  "60 degF": 0.999601,
};
/** enthalpy of vaporisation of water, kJ/mol */
export const WATER_VAPORISATION: Readonly<Record<CalorificCondition, number>> = {
  "15 degC": 44.431,
  "60 degF": 44.408,
};
export const REFERENCE_STATE: Readonly<
  Record<CalorificCondition, { readonly temperatureK: number; readonly pressureKilopascal: number }>
> = {
  "15 degC": { temperatureK: 288.15, pressureKilopascal: 101.325 },
  // 14.696 psia
  "60 degF": { temperatureK: 519.67 / 1.8, pressureKilopascal: 14.696 * 6.894757293168361 },
};
