/** The fitted fluid of constant_volume_depletion.py, the same numbers that the separate implementation ran on. */
import type { Characterised } from "@/analytics/equation-of-state/mixture";
import reference from "../../fixtures/constant-volume-depletion.json";

const { fittedMixture: numbers } = reference;

export const fittedMixture: Characterised = {
  mixture: {
    names: numbers.names,
    criticalTemperatureDegR: Float64Array.from(numbers.criticalTemperatureDegR),
    criticalPressurePsia: Float64Array.from(numbers.criticalPressurePsia),
    acentricFactor: Float64Array.from(numbers.acentricFactor),
    molecularWeight: Float64Array.from(numbers.molecularWeight),
    volumeShift: Float64Array.from(numbers.volumeShift),
    interactions: Float64Array.from(numbers.interactions),
  },
  moleFractions: Float64Array.from(numbers.moleFractions),
  firstHeavy: 10,
};
