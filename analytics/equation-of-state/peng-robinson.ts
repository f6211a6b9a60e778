/** The Peng-Robinson equation of state of a mixture: z factor, fugacities and their derivatives. */
import { DomainError } from "../errors";
import { GAS_CONSTANT } from "../units/conversions";
import { cubicRoots, type CubicRoots } from "./cubic-roots";
import type { Mixture } from "./mixture";

/** a = OMEGA_A R2 Tc2 / Pc and b = OMEGA_B R Tc / Pc hold the isotherm flat at the critical point. */
const OMEGA_A = 0.45723552892138218;
const OMEGA_B = 0.07779607390388846;
const DELTA_1 = 1 + Math.SQRT2;
const DELTA_2 = 1 - Math.SQRT2;
/** DELTA_1 - DELTA_2 */
const SPREAD = 2 * Math.SQRT2;
/** The polynomial of 1976 serves up to n-decane's acentric factor, the one of 1978 above. */
const HEAVY_ACENTRIC_FACTOR = 0.491;

/** Which root of the cubic: the one of lower Gibbs energy, or the largest or smallest volume whatever its energy. */
export type RootChoice = "stable" | "gas" | "liquid";

/** One phase at one temperature and pressure; owned by the caller and filled by `PengRobinson`. */
export interface PhaseState {
  /** root of the cubic, p v / (R T) of the untranslated volume */
  z: number;
  /** A = a p / (R T)2 and B = b p / (R T) of the phase */
  a: number;
  b: number;
  /** natural logarithms of the fugacity coefficients */
  readonly lnPhi: Float64Array;
  /** sum over j of x_j A_ij */
  readonly pull: Float64Array;
  /** d ln phi_i / d n_j at constant temperature and pressure for one mole in all, by rows; symmetric */
  readonly byMoles: Float64Array;
  /** d ln phi_i / d ln p */
  readonly byLnPressure: Float64Array;
  /** d ln phi_i / d ln T */
  readonly byLnTemperature: Float64Array;
}

export function createPhaseState(count: number): PhaseState {
  return {
    z: NaN,
    a: NaN,
    b: NaN,
    lnPhi: new Float64Array(count),
    pull: new Float64Array(count),
    byMoles: new Float64Array(count * count),
    byLnPressure: new Float64Array(count),
    byLnTemperature: new Float64Array(count),
  };
}

/**
 * m of alpha = (1 + m (1 - sqrt(T/Tc)))2.
 *
 *     m = 0.37464 + 1.54226 w - 0.26992 w2                      w <= 0.491
 *     m = 0.379642 + 1.48503 w - 0.164423 w2 + 0.016666 w3      w > 0.491
 *
 * @example alphaSlope(0.1521) // => 0.602973
 * @see D.-Y. Peng, D. B. Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59-64 and GPA Research Report RR-28 (1978)
 */
export function alphaSlope(acentricFactor: number): number {
  const w = acentricFactor;
  return w <= HEAVY_ACENTRIC_FACTOR
    ? 0.37464 + w * (1.54226 - 0.26992 * w)
    : 0.379642 + w * (1.48503 + w * (-0.164423 + 0.016666 * w));
}

/**
 * The equation for one mixture, held at one temperature at a time.
 *
 *     p = R T / (v - b) - a / (v2 + 2 b v - b2)
 *     a = sum x_i x_j (1 - k_ij) sqrt(a_i a_j),   b = sum x_i b_i
 *
 * Volumes that leave this class are translated, v = v_eos - sum x_i c_i with c_i = s_i b_i, which moves no K-value.
 * An instance is a workspace: it belongs to one calculation at a time.
 *
 * @see D.-Y. Peng, D. B. Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59-64
 * @see A. Peneloux, E. Rauzy, R. Freze, Fluid Phase Equilib. 8 (1982) 7-23 (the translation)
 */
export class PengRobinson {
  readonly count: number;
  /** b_i, ft3/lbmol */
  readonly coVolume: Float64Array;
  /** c_i = s_i b_i, ft3/lbmol */
  readonly translation: Float64Array;
  temperatureDegR = NaN;

  private readonly slope: Float64Array;
  private readonly rootA: Float64Array;
  /** sqrt(a_i) / (R T) and d ln of it / d ln T, at the temperature */
  private readonly strength: Float64Array;
  private readonly strengthSlope: Float64Array;
  /** b_i / (R T), 1/psi */
  private readonly reducedCoVolume: Float64Array;
  /** a_ij / (R T)2 by rows, 1/psi */
  private readonly attraction: Float64Array;
  private readonly roots: CubicRoots = { low: NaN, high: NaN };
  private readonly dPull: Float64Array;

  constructor(readonly mixture: Mixture) {
    const n = mixture.names.length;
    this.count = n;
    this.coVolume = new Float64Array(n);
    this.translation = new Float64Array(n);
    this.slope = new Float64Array(n);
    this.rootA = new Float64Array(n);
    this.strength = new Float64Array(n);
    this.strengthSlope = new Float64Array(n);
    this.reducedCoVolume = new Float64Array(n);
    this.attraction = new Float64Array(n * n);
    this.dPull = new Float64Array(n);
    for (let i = 0; i < n; i += 1) {
      const criticalTemperature = mixture.criticalTemperatureDegR[i];
      const criticalPressure = mixture.criticalPressurePsia[i];
      if (!(criticalTemperature > 0 && criticalPressure > 0)) {
        throw new DomainError(
          `${mixture.names[i]} has a critical point of ${criticalTemperature} degR and ${criticalPressure} psia`,
          { input: "mixture", value: criticalTemperature },
        );
      }
      const rt = GAS_CONSTANT * criticalTemperature;
      this.coVolume[i] = (OMEGA_B * rt) / criticalPressure;
      this.translation[i] = mixture.volumeShift[i] * this.coVolume[i];
      this.rootA[i] = rt * Math.sqrt(OMEGA_A / criticalPressure);
      this.slope[i] = alphaSlope(mixture.acentricFactor[i]);
    }
  }

  /** @throws {DomainError} when the temperature is not positive and finite */
  setTemperature(temperatureDegR: number): void {
    if (temperatureDegR === this.temperatureDegR) return;
    if (!(temperatureDegR > 0 && temperatureDegR < Infinity)) {
      throw new DomainError(`A temperature is above absolute zero, not ${temperatureDegR} degR`, {
        input: "temperatureDegR",
        value: temperatureDegR,
      });
    }
    this.temperatureDegR = temperatureDegR;
    const { count: n, strength, attraction } = this;
    const { criticalTemperatureDegR, interactions } = this.mixture;
    const rt = GAS_CONSTANT * temperatureDegR;
    for (let i = 0; i < n; i += 1) {
      const rootTr = Math.sqrt(temperatureDegR / criticalTemperatureDegR[i]);
      const rootAlpha = 1 + this.slope[i] * (1 - rootTr);
      strength[i] = (this.rootA[i] * rootAlpha) / rt;
      this.strengthSlope[i] = (-0.5 * this.slope[i] * rootTr) / rootAlpha - 1;
      this.reducedCoVolume[i] = this.coVolume[i] / rt;
    }
    for (let i = 0; i < n; i += 1) {
      for (let j = 0; j <= i; j += 1) {
        const value = (1 - interactions[i * n + j]) * strength[i] * strength[j];
        attraction[i * n + j] = value;
        attraction[j * n + i] = value;
      }
    }
  }

  /**
   * z and ln phi of a phase at the temperature set.
   *
   *     ln phi_i = (b_i/b)(z - 1) - ln(z - B)
   *                - A / (2 sqrt2 B) (2 sum_j x_j A_ij / A - b_i/b) ln((z + (1+sqrt2) B) / (z + (1-sqrt2) B))
   *
   * @param x  mole fractions, adding up to 1
   */
  evaluate(x: Float64Array, pressurePsia: number, choice: RootChoice, state: PhaseState): void {
    const { count: n, attraction, reducedCoVolume, roots } = this;
    const { pull, lnPhi } = state;
    let a = 0;
    let b = 0;
    for (let i = 0; i < n; i += 1) {
      let sum = 0;
      for (let j = 0, at = i * n; j < n; j += 1, at += 1) sum += attraction[at] * x[j];
      sum *= pressurePsia;
      pull[i] = sum;
      a += x[i] * sum;
      b += x[i] * reducedCoVolume[i];
    }
    b *= pressurePsia;
    cubicRoots(a, b, roots);
    let z = choice === "liquid" ? roots.low : roots.high;
    if (choice === "stable" && roots.low < roots.high) {
      if (departure(roots.low, a, b) < departure(roots.high, a, b)) z = roots.low;
    }
    state.z = z;
    state.a = a;
    state.b = b;
    const lnFree = Math.log(z - b);
    const lnSpread = Math.log((z + DELTA_1 * b) / (z + DELTA_2 * b)) / (SPREAD * b);
    const perCoVolume = ((z - 1 + a * lnSpread) * pressurePsia) / b;
    for (let i = 0; i < n; i += 1) {
      lnPhi[i] = perCoVolume * reducedCoVolume[i] - lnFree - 2 * lnSpread * pull[i];
    }
  }

  /**
   * Adds the derivatives by mole numbers to a phase that `evaluate` filled: with one mole in all,
   * d ln phi_i / d n_j at constant temperature and pressure.
   */
  differentiateByMoles(pressurePsia: number, state: PhaseState): void {
    const { count: n, attraction, reducedCoVolume } = this;
    const { z, a, b, pull, byMoles } = state;
    const free = 1 / (z - b);
    const near = 1 / (z + DELTA_1 * b);
    const far = 1 / (z + DELTA_2 * b);
    const spread = Math.log((z + DELTA_1 * b) * far) / (SPREAD * b);
    const { byA, byB } = rootSlopes(z, a, b);
    // ln phi_i = r_i (z - 1) - ln(z - B) - (2 S_i - A r_i) G with r_i = b_i/b and G = ln(...)/(2 sqrt2 B)
    for (let j = 0; j < n; j += 1) {
      const rj = (reducedCoVolume[j] * pressurePsia) / b;
      const dB = b * (rj - 1);
      const dA = 2 * (pull[j] - a);
      const dZ = byA * dA + byB * dB;
      const dG =
        ((dZ + DELTA_1 * dB) * near - (dZ + DELTA_2 * dB) * far) / (SPREAD * b) - (spread * dB) / b;
      const dFree = (dZ - dB) * free;
      const dR = 1 - rj;
      for (let i = 0; i <= j; i += 1) {
        const ri = (reducedCoVolume[i] * pressurePsia) / b;
        const dPull = attraction[i * n + j] * pressurePsia - pull[i];
        const value =
          ri * dZ +
          (z - 1) * ri * dR -
          dFree -
          (2 * dPull - dA * ri - a * ri * dR) * spread -
          (2 * pull[i] - a * ri) * dG;
        byMoles[i * n + j] = value;
        byMoles[j * n + i] = value;
      }
    }
  }

  /** Adds d ln phi / d ln p and d ln phi / d ln T to a phase that `evaluate` filled. */
  differentiateByState(x: Float64Array, pressurePsia: number, state: PhaseState): void {
    const { count: n, attraction, strengthSlope, dPull } = this;
    const { a, b, pull } = state;
    this.alongState(pressurePsia, state, a, b, pull, state.byLnPressure);
    let dA = 0;
    for (let i = 0; i < n; i += 1) {
      let sum = 0;
      for (let j = 0, at = i * n; j < n; j += 1, at += 1) {
        sum += attraction[at] * x[j] * (strengthSlope[i] + strengthSlope[j]);
      }
      dPull[i] = sum * pressurePsia;
      dA += x[i] * dPull[i];
    }
    this.alongState(pressurePsia, state, dA, -b, dPull, state.byLnTemperature);
  }

  /** Volume of a phase, translated, ft3/lbmol. */
  molarVolume(x: Float64Array, pressurePsia: number, z: number): number {
    let volume = (z * GAS_CONSTANT * this.temperatureDegR) / pressurePsia;
    for (let i = 0; i < this.count; i += 1) volume -= x[i] * this.translation[i];
    return volume;
  }

  /**
   * Translated volume of a liquid at any temperature and pressure, ft3/lbmol: its smallest root, whether it would boil
   * there or not. Leaves the equation at that temperature.
   */
  liquidVolume(x: Float64Array, pressurePsia: number, temperatureDegR: number): number {
    this.setTemperature(temperatureDegR);
    const state = createPhaseState(this.count);
    this.evaluate(x, pressurePsia, "liquid", state);
    return this.molarVolume(x, pressurePsia, state.z);
  }

  /** d ln phi along any change dA, dB, dS of the attraction and the co-volume at constant composition. */
  private alongState(
    pressurePsia: number,
    { z, a, b, pull }: PhaseState,
    dA: number,
    dB: number,
    dS: Float64Array,
    out: Float64Array,
  ): void {
    const { byA, byB } = rootSlopes(z, a, b);
    const dZ = byA * dA + byB * dB;
    const high = z + DELTA_1 * b;
    const low = z + DELTA_2 * b;
    const spread = Math.log(high / low) / (SPREAD * b);
    const dG =
      ((dZ + DELTA_1 * dB) / high - (dZ + DELTA_2 * dB) / low) / (SPREAD * b) - (spread * dB) / b;
    const dFree = (dZ - dB) / (z - b);
    for (let i = 0; i < this.count; i += 1) {
      const ri = (this.reducedCoVolume[i] * pressurePsia) / b;
      out[i] = ri * dZ - dFree - (2 * dS[i] - dA * ri) * spread - (2 * pull[i] - a * ri) * dG;
    }
  }
}

/** Residual Gibbs energy over R T of a root: the same A and B, so that roots of one mixture compare. */
function departure(z: number, a: number, b: number): number {
  return (
    z - 1 - Math.log(z - b) - (a / (SPREAD * b)) * Math.log((z + DELTA_1 * b) / (z + DELTA_2 * b))
  );
}

/** d z / d A and d z / d B along a root of z3 - (1-B) z2 + (A-2B-3B2) z - (AB-B2-B3) = 0. */
function rootSlopes(z: number, a: number, b: number): { byA: number; byB: number } {
  const slope = 3 * z * z - 2 * (1 - b) * z + (a - 2 * b - 3 * b * b);
  return {
    byA: (b - z) / slope,
    byB: (-z * z + (2 + 6 * b) * z + a - 2 * b - 3 * b * b) / slope,
  };
}
