/** The mixture and feeds of phase_equilibrium.py, the same numbers that the separate implementation ran on. */
import type { Mixture } from "@/analytics/equation-of-state/mixture";
import { degreesRankine } from "@/analytics/units/conversions";
import reference from "../../fixtures/phase-equilibrium.json";

export { reference, degreesRankine as degR };

export const mixture: Mixture = {
  names: reference.mixture.names,
  criticalTemperatureDegR: Float64Array.from(reference.mixture.criticalTemperatureDegR),
  criticalPressurePsia: Float64Array.from(reference.mixture.criticalPressurePsia),
  acentricFactor: Float64Array.from(reference.mixture.acentricFactor),
  molecularWeight: Float64Array.from(reference.mixture.molecularWeight),
  volumeShift: Float64Array.from(reference.mixture.volumeShift),
  interactions: Float64Array.from(reference.mixture.interactions),
};

export const feeds = {
  gas: Float64Array.from(reference.feeds.gas),
  oil: Float64Array.from(reference.feeds.oil),
};

export const feedOf = (name: string): Float64Array => feeds[name as keyof typeof feeds];

/** One component of the mixture by itself. */
export function pure(name: string): Mixture {
  const at = mixture.names.indexOf(name);
  return subset([at]);
}

/** Some components of the mixture, in the order given. */
export function subset(indices: readonly number[]): Mixture {
  const pick = (values: Float64Array) => Float64Array.from(indices, (i) => values[i]);
  const n = mixture.names.length;
  return {
    names: indices.map((i) => mixture.names[i]),
    criticalTemperatureDegR: pick(mixture.criticalTemperatureDegR),
    criticalPressurePsia: pick(mixture.criticalPressurePsia),
    acentricFactor: pick(mixture.acentricFactor),
    molecularWeight: pick(mixture.molecularWeight),
    volumeShift: pick(mixture.volumeShift),
    interactions: Float64Array.from(
      indices.flatMap((i) => indices.map((j) => mixture.interactions[i * n + j])),
    ),
  };
}
