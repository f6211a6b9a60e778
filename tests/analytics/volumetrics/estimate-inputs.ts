import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";

const usual: Record<InputName, Distribution> = {
  areaAcres: { kind: "lognormalP90P10", p90: 1400, p10: 4200 },
  netThicknessFt: { kind: "pert", low: 40, mode: 80, high: 150 },
  porosity: { kind: "normal", mean: 0.15, standardDeviation: 0.02, minimum: 0.08, maximum: 0.25 },
  waterSaturation: { kind: "triangular", low: 0.18, mode: 0.25, high: 0.38 },
  pressurePsia: { kind: "normal", mean: 6500, standardDeviation: 150 },
  temperatureDegF: { kind: "normal", mean: 260, standardDeviation: 6 },
  condensateYieldStbPerMmscf: { kind: "lognormalP90P10", p90: 68, p10: 95 },
  gasRecovery: { kind: "pert", low: 0.55, mode: 0.72, high: 0.85 },
  condensateRecovery: { kind: "pert", low: 0.2, mode: 0.36, high: 0.55 },
  salesGasFraction: { kind: "triangular", low: 0.88, mode: 0.94, high: 0.98 },
};

/** An estimate with nothing unusual about it, changed where a test needs it. */
export function buildInputs(
  distributions: Partial<Record<InputName, Distribution>> = {},
  changes: Partial<Omit<EstimateInputs, "uncertain">> = {},
): EstimateInputs {
  const all = { ...usual, ...distributions };
  return {
    schemaVersion: 1,
    uncertain: Object.fromEntries(
      inputNames.map((name) => [name, { distribution: all[name], source: "" }]),
    ) as EstimateInputs["uncertain"],
    correlations: [{ a: "porosity", b: "waterSaturation", rank: -0.6 }],
    fluid: {
      basePressurePsia: 14.696,
      primarySeparator: {
        pressurePsia: 514.696,
        temperatureDegF: 80,
        gasOilRatioScfPerStb: 12000,
        gasGravity: 0.68,
      },
      secondSeparator: null,
      stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 1.15 },
      condensateApi: 56,
      condensateMolecularWeight: null,
      nitrogen: 0,
      carbonDioxide: 0,
      hydrogenSulphide: 0,
      dewPointPsia: 5200,
    },
    depthFt: 12500,
    recoveryPlan: null,
    ...changes,
  };
}

/** Every input a constant. */
export function constants(values: Record<InputName, number>): Record<InputName, Distribution> {
  return Object.fromEntries(
    inputNames.map((name) => [name, { kind: "constant", value: values[name] }]),
  ) as Record<InputName, Distribution>;
}

/** An acre-foot of rock in which nothing is uncertain: volumes per unit of what a test then varies. */
export const oneAcreFoot = constants({
  areaAcres: 1,
  netThicknessFt: 1,
  porosity: 0.1,
  waterSaturation: 0.25,
  pressurePsia: 6500,
  temperatureDegF: 260,
  condensateYieldStbPerMmscf: 80,
  gasRecovery: 0.7,
  condensateRecovery: 0.4,
  salesGasFraction: 0.9,
});

/** A whole reservoir in which nothing is uncertain. */
export const withoutSpread = constants({
  areaAcres: 2000,
  netThicknessFt: 80,
  porosity: 0.15,
  waterSaturation: 0.25,
  pressurePsia: 6500,
  temperatureDegF: 260,
  condensateYieldStbPerMmscf: 80,
  gasRecovery: 0.7,
  condensateRecovery: 0.35,
  salesGasFraction: 0.93,
});
