import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";

/**
 * The fluid of the third comparative solution project: D. E. Kenyon, G. A. Behie, J. Pet. Technol. 39 (August 1987)
 * 981-997 (SPE 12278), the laboratory's tables, from memory. Pressures in psig; per MMscf of wellstream at the dew
 * point; surface products summed over the three separators.
 */
const initial = { stb: 131.0, mscf: 750.46 + 107.05 + 27.25 };
const table = [
  { psig: 3428, z: 0.803, z2: 0.803, producedPercent: 0, liquidPercent: 0, stb: 0, mscf: 0 },
  {
    psig: 3000,
    z: 0.798,
    z2: 0.774,
    producedPercent: 9.095,
    liquidPercent: 15.0,
    stb: 7.35,
    mscf: 74.75 + 7.25 + 2.02,
  },
  {
    psig: 2400,
    z: 0.802,
    z2: 0.748,
    producedPercent: 24.702,
    liquidPercent: 19.9,
    stb: 14.83,
    mscf: 211.89 + 16.07 + 4.7,
  },
  {
    psig: 1800,
    z: 0.83,
    z2: 0.73,
    producedPercent: 42.026,
    liquidPercent: 19.2,
    stb: 20.43,
    mscf: 369.22 + 23.76 + 7.15,
  },
  {
    psig: 1200,
    z: 0.877,
    z2: 0.703,
    producedPercent: 59.687,
    liquidPercent: 17.1,
    stb: 25.14,
    mscf: 530.64 + 31.45 + 9.69,
  },
  {
    psig: 700,
    z: 0.924,
    z2: 0.642,
    producedPercent: 74.019,
    liquidPercent: 15.2,
    stb: 29.25,
    mscf: 666.19 + 32.92 + 12.67,
  },
];

export const psia = (psig: number) => psig + 14.7;

/**
 * The published table as a curve. What is in the gas follows from the table alone: a step's products over its moles are
 * those of the equilibrium gas, and the gas fills what the liquid leaves,
 *
 *     moles of gas = (1 - S) (p / z) / (pd / zd)
 */
export const publishedCurve: RecoveryCurve = {
  route: "laboratory",
  temperatureDegF: 200,
  dewPointPsia: psia(3428),
  points: table.map((row, i) => {
    const before = table[i - 1];
    const moles = before ? (row.producedPercent - before.producedPercent) / 100 : 1;
    const stb = before ? row.stb - before.stb : initial.stb;
    const mscf = before ? row.mscf - before.mscf : initial.mscf;
    const gasMoles =
      ((1 - row.liquidPercent / 100) * (psia(row.psig) / row.z)) / (psia(3428) / table[0].z);
    return {
      pressurePsia: psia(row.psig),
      wellstreamProduced: row.producedPercent / 100,
      gasProduced: row.mscf / initial.mscf,
      condensateProduced: row.stb / initial.stb,
      condensateInGas: (gasMoles * stb) / moles / initial.stb,
      liquidSaturation: row.liquidPercent / 100,
      gasZ: row.z,
      twoPhaseZ: row.z2,
      producingYieldStbPerMmscf: (1000 * stb) / mscf,
    };
  }),
};

export const constant = (value: number): { distribution: Distribution; source: string } => ({
  distribution: { kind: "constant", value },
  source: "",
});

/** Depletion to 700 psig by the published curve, changed where a test needs it. */
export function buildPlan(changes: Partial<RecoveryPlan> = {}): RecoveryPlan {
  return {
    concept: "depletion",
    curve: publishedCurve,
    abandonmentPressurePsia: constant(psia(700)),
    condensateCurveFactor: constant(1),
    criticalSaturation: { low: 0.2, high: 0.3 },
    waterDrive: { kind: "none" },
    cycling: null,
    ...changes,
  };
}

/** Cycling from a pressure on, changed where a test needs it. */
export function buildCycling(
  changes: Partial<NonNullable<RecoveryPlan["cycling"]>> = {},
): NonNullable<RecoveryPlan["cycling"]> {
  return {
    pressurePsia: psia(3428),
    pressure: "maintained",
    sweepEfficiency: constant(0.6),
    displacementEfficiency: constant(0.9),
    injectedPoreVolumes: 1,
    fuelFraction: 0.05,
    ...changes,
  };
}
