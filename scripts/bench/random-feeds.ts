/** Feeds from dry gas to heavy oil, at any reservoir or separator condition, for trying the flash on. */
import { createRandom } from "@/analytics/numerics/random";
import type { Mixture } from "@/analytics/equation-of-state/mixture";
import { PASCALS_PER_PSI } from "@/analytics/units/conversions";

/** Tc in K, pc in Pa, acentric factor, molecular weight, volume shift; the last three are made-up heavy fractions. */
const components = [
  ["CO2", 304.1282, 7377300, 0.22394, 44.0095, -0.0817],
  ["N2", 126.192, 3395800, 0.0372, 28.0134, -0.1927],
  ["H2S", 373.1, 9000000, 0.1005, 34.0809, -0.1288],
  ["C1", 190.564, 4599200, 0.01142, 16.0425, -0.1595],
  ["C2", 305.322, 4872200, 0.0995, 30.069, -0.1134],
  ["C3", 369.89, 4251200, 0.1521, 44.0956, -0.0863],
  ["iC4", 407.81, 3629000, 0.184, 58.1222, -0.0844],
  ["nC4", 425.125, 3796000, 0.201, 58.1222, -0.0675],
  ["iC5", 460.35, 3378000, 0.2274, 72.1488, -0.0608],
  ["nC5", 469.7, 3367500, 0.251, 72.1488, -0.039],
  ["C6", 507.82, 3044100, 0.3, 86.1754, -0.008],
  ["F1", 585, 3000000, 0.35, 110, 0.02],
  ["F2", 680, 2200000, 0.55, 165, 0.08],
  ["F3", 790, 1400000, 0.85, 290, 0.15],
] as const;

const CARBON_DIOXIDE = 0;
const NITROGEN = 1;
const HYDROGEN_SULPHIDE = 2;
const METHANE = 3;
const FIRST_HEAVY = 11;

function interaction(i: number, j: number): number {
  if (i > j) return interaction(j, i);
  if (i === j) return 0;
  if (i === CARBON_DIOXIDE) return j === NITROGEN ? 0 : j === HYDROGEN_SULPHIDE ? 0.135 : 0.105;
  if (i === NITROGEN) return j === HYDROGEN_SULPHIDE ? 0.13 : j === METHANE ? 0.025 : 0.1;
  if (i === HYDROGEN_SULPHIDE) return 0.07;
  if (i === METHANE && j >= FIRST_HEAVY) return 0.035 + 0.01 * (j - FIRST_HEAVY);
  return 0;
}

const column = (index: 1 | 2 | 3 | 4 | 5) => Float64Array.from(components, (row) => row[index]);

/** Fourteen components, acid gases to C20. */
export const feedMixture: Mixture = {
  names: components.map(([name]) => name),
  criticalTemperatureDegR: column(1).map((kelvin) => 1.8 * kelvin),
  criticalPressurePsia: column(2).map((pascals) => pascals / PASCALS_PER_PSI),
  acentricFactor: column(3),
  molecularWeight: column(4),
  volumeShift: column(5),
  interactions: Float64Array.from({ length: components.length ** 2 }, (_, at) =>
    interaction(Math.floor(at / components.length), at % components.length),
  ),
};

export interface RandomFeed {
  readonly moleFractions: Float64Array;
  readonly pressurePsia: number;
  readonly temperatureDegR: number;
}

/**
 * One feed. Each component has an exponential weight times a scale: methane 2 to 22, intermediates 1, heavy fractions
 * 0.05 to 0.65 (the less methane, the more), acid gases and nitrogen 0.03, 0.1 or 0.3; one component in ten is left
 * out. Temperature is uniform from 60 to 400 degF, pressure log-uniform from 15 to 10,000 psia.
 */
function randomFeed(uniform: () => number): RandomFeed {
  const lightness = uniform();
  const sourness = uniform() < 0.3 ? 0.3 : uniform() < 0.5 ? 0.1 : 0.03;
  const weights = Float64Array.from(components, (_, i) => {
    const weight = -Math.log(1 - uniform());
    if (uniform() < 0.1) return 0;
    if (i < METHANE) return sourness * weight;
    if (i === METHANE) return (2 + 20 * lightness) * weight;
    return i < FIRST_HEAVY ? weight : (0.6 * (1 - lightness) + 0.05) * weight;
  });
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return {
    moleFractions: weights.map((weight) => weight / total),
    temperatureDegR: 519.67 + 340 * uniform(),
    pressurePsia: 15 * Math.exp(Math.log(10_000 / 15) * uniform()),
  };
}

/** The same feeds for the same seed. */
export function randomFeeds(count: number, seed: number): RandomFeed[] {
  const random = createRandom(seed, 0);
  const word = new Uint32Array(1);
  const uniform = () => {
    random.fill(word);
    return word[0] / 2 ** 32;
  };
  return Array.from({ length: count }, () => randomFeed(uniform));
}
