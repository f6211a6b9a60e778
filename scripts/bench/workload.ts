import { createRandom, streamOf } from "@/analytics/numerics/random";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";

/** One made-up reservoir of the bench. */
export interface BenchReservoir {
  id: string;
  basin: string;
  inputs: EstimateInputs;
}

const RESERVOIRS_PER_BASIN = 40;

/**
 * Made-up gas-condensate reservoirs with every kind of distribution the bench must cover (lognormal, PERT, truncated
 * normal, triangular, normal) and two rank-correlated pairs. The same for the same count.
 */
export function makeReservoirs(count: number): BenchReservoir[] {
  return Array.from({ length: count }, (_, index) => {
    const id = `bench-${String(index + 1).padStart(4, "0")}`;
    return {
      id,
      basin: `basin-${Math.floor(index / RESERVOIRS_PER_BASIN) + 1}`,
      inputs: makeInputs(id),
    };
  });
}

function makeInputs(id: string): EstimateInputs {
  const words = new Uint32Array(16);
  createRandom(20_270_101, streamOf(id)).fill(words);
  let used = 0;
  const between = (low: number, high: number) =>
    low + ((words[used++] + 0.5) / 0x100000000) * (high - low);
  const area = between(800, 6_000);
  const thickness = between(30, 160);
  const porosity = between(0.1, 0.22);
  const saturation = between(0.18, 0.35);
  const depth = between(9_000, 15_000);
  const pressure = depth * between(0.45, 0.6);
  const temperature = 60 + (depth / 100) * between(1.3, 1.8);
  const gasOilRatio = between(6_000, 25_000);
  const condensateYield = 1e6 / (gasOilRatio + 400);
  const from = (distribution: EstimateInputs["uncertain"]["porosity"]["distribution"]) => ({
    distribution,
    source: "",
  });
  return {
    schemaVersion: 1,
    uncertain: {
      areaAcres: from({ kind: "lognormalP90P10", p90: area, p10: area * 3.2 }),
      netThicknessFt: from({
        kind: "pert",
        low: thickness * 0.4,
        mode: thickness,
        high: thickness * 2.2,
      }),
      porosity: from({
        kind: "normal",
        mean: porosity,
        standardDeviation: porosity * 0.15,
        minimum: 0.04,
        maximum: 0.35,
      }),
      waterSaturation: from({
        kind: "triangular",
        low: saturation * 0.6,
        mode: saturation,
        high: saturation * 1.6,
      }),
      pressurePsia: from({ kind: "normal", mean: pressure, standardDeviation: pressure * 0.03 }),
      temperatureDegF: from({ kind: "normal", mean: temperature, standardDeviation: 6 }),
      condensateYieldStbPerMmscf: from({
        kind: "lognormalP90P10",
        p90: condensateYield * 0.8,
        p10: condensateYield * 1.25,
      }),
      gasRecovery: from({ kind: "pert", low: 0.5, mode: 0.72, high: 0.88 }),
      condensateRecovery: from({ kind: "pert", low: 0.18, mode: 0.36, high: 0.58 }),
      salesGasFraction: from({ kind: "triangular", low: 0.88, mode: 0.94, high: 0.98 }),
    },
    correlations: [
      { a: "areaAcres", b: "netThicknessFt", rank: 0.4 },
      { a: "porosity", b: "waterSaturation", rank: -0.6 },
    ],
    fluid: {
      basePressurePsia: 14.696,
      primarySeparator: {
        pressurePsia: 514.7,
        temperatureDegF: 80,
        gasOilRatioScfPerStb: gasOilRatio,
        gasGravity: 0.68,
      },
      secondSeparator: null,
      stockTankGas: { gasOilRatioScfPerStb: 400, gasGravity: 1.15 },
      condensateApi: between(46, 58),
      condensateMolecularWeight: null,
      nitrogen: 0.01,
      carbonDioxide: 0.02,
      hydrogenSulphide: 0,
      dewPointPsia: null,
    },
    depthFt: depth,
    recoveryPlan: null,
  };
}
