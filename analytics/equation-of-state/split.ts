/** Gas and liquid in equilibrium at a temperature and pressure, from a guess of the K-values. */
import { solveLinear } from "../numerics/linear-system";
import { createPhaseState, type PengRobinson, type PhaseState } from "./peng-robinson";
import { vapourFraction } from "./rachford-rice";

/** Largest |ln f_liquid - ln f_gas| of a component that counts as equilibrium. */
const FUGACITY_TOLERANCE = 1e-10;
/** What rounding may leave of it where K-values are near 1 and both phases hardly differ. */
const ROUNDING_TOLERANCE = 1e-9;
/** Where all ln K are below this, small residuals alone leave the phases open, so the step must be small, too. */
const NEAR_CRITICAL = 1;
const SMALL_STEP = 1e-8;
const FIRST_SUBSTITUTIONS = 3;
const SUBSTITUTIONS_PER_ROUND = 5;
const MAXIMUM_ROUNDS = 60;
const LARGEST_STEP = 3;
/** Newton steps that may pass before one brings the fugacities closer. */
const PATIENCE = 15;
/** Phases whose ln K are all below this are the same phase. */
const TRIVIAL = 1e-6;

/**
 * - `two`: both phases, with a vapour fraction that may lie outside 0 to 1 (the negative flash)
 * - `trivial`: the iteration ran into one phase
 * - `lost`: neither
 */
export type SplitOutcome = "two" | "trivial" | "lost";

/**
 * Successive substitution, ln K = ln phi_liquid - ln phi_gas, then Newton's method in ln K with analytic derivatives.
 * A Newton step that does not bring the fugacities closer is taken back, and substitution goes on, accelerated by its
 * dominant eigenvalue, until Newton's method holds.
 *
 * @see M. L. Michelsen, Fluid Phase Equilib. 9 (1982) 21-40
 * @see C. M. Crowe, M. Nishio, AIChE J. 21 (1975) 528-533 (the acceleration)
 */
export class TwoPhaseSplit {
  /** the guess, then the answer */
  readonly lnK: Float64Array;
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly liquid: PhaseState;
  readonly gas: PhaseState;
  vapourFraction = NaN;
  /** largest |ln f_liquid - ln f_gas| of the last iterate */
  residual = Infinity;
  iterations = 0;

  private readonly k: Float64Array;
  private readonly error: Float64Array;
  private readonly lastError: Float64Array;
  private readonly held: Float64Array;
  private readonly step: Float64Array;
  private readonly byFraction: Float64Array;
  private readonly jacobian: Float64Array;

  constructor(private readonly equation: PengRobinson) {
    const n = equation.count;
    const vector = () => new Float64Array(n);
    this.lnK = vector();
    this.x = vector();
    this.y = vector();
    this.k = vector();
    this.error = vector();
    this.lastError = vector();
    this.held = vector();
    this.step = vector();
    this.byFraction = vector();
    this.jacobian = new Float64Array(n * n);
    this.liquid = createPhaseState(n);
    this.gas = createPhaseState(n);
  }

  /** Iterates from `lnK` to equilibrium. */
  solve(z: Float64Array, pressurePsia: number): SplitOutcome {
    this.begin();
    let substitutions = FIRST_SUBSTITUTIONS;
    for (let round = 0; round < MAXIMUM_ROUNDS; round += 1) {
      if (!this.substitute(z, pressurePsia, substitutions)) return this.lostOrTrivial(z);
      if (this.newton(z, pressurePsia, round > 0)) return this.isTrivial(z) ? "trivial" : "two";
      substitutions = SUBSTITUTIONS_PER_ROUND;
    }
    return this.residual < ROUNDING_TOLERANCE && !this.isTrivial(z) ? "two" : "lost";
  }

  /** Forgets the last call: its vapour fraction would be a start for this one. */
  begin(): void {
    this.vapourFraction = NaN;
    this.iterations = 0;
    this.residual = Infinity;
  }

  /**
   * A number of substitutions, the last ones accelerated, and the state at the outcome evaluated.
   *
   * @returns false when the K-values leave no split
   */
  substitute(z: Float64Array, pressurePsia: number, times: number): boolean {
    const { lnK, error, lastError } = this;
    if (!this.evaluate(z, pressurePsia)) return false;
    for (let pass = 1; pass <= times && this.residual > FUGACITY_TOLERANCE; pass += 1) {
      let factor = 1;
      if (pass === times && pass > 3) {
        let over = 0;
        let under = 0;
        for (let i = 0; i < z.length; i += 1) {
          over += error[i] * lastError[i];
          under += lastError[i] * lastError[i];
        }
        const eigenvalue = over / under;
        if (eigenvalue > 0 && eigenvalue < 1) factor = Math.min(1 / (1 - eigenvalue), 50);
      }
      for (let i = 0; i < z.length; i += 1) {
        lastError[i] = error[i];
        lnK[i] -= factor * error[i];
      }
      if (!this.evaluate(z, pressurePsia)) {
        if (factor === 1) return false;
        for (let i = 0; i < z.length; i += 1) lnK[i] += (factor - 1) * lastError[i];
        if (!this.evaluate(z, pressurePsia)) return false;
      }
    }
    return true;
  }

  /** Phases, fugacities and residuals at `lnK`. @returns false when there is no split */
  private evaluate(z: Float64Array, pressurePsia: number): boolean {
    const { lnK, x, y, k, error, liquid, gas } = this;
    const v = vapourFraction(z, lnK, k, this.vapourFraction);
    if (!(Math.abs(v) < Infinity)) {
      this.residual = Infinity;
      return false;
    }
    this.iterations += 1;
    this.vapourFraction = v;
    for (let i = 0; i < z.length; i += 1) {
      x[i] = z[i] / (1 + v * (k[i] - 1));
      y[i] = k[i] * x[i];
    }
    this.equation.evaluate(x, pressurePsia, "stable", liquid);
    this.equation.evaluate(y, pressurePsia, "stable", gas);
    let residual = 0;
    for (let i = 0; i < z.length; i += 1) {
      error[i] = lnK[i] + gas.lnPhi[i] - liquid.lnPhi[i];
      if (z[i] > 0) residual = Math.max(residual, Math.abs(error[i]));
    }
    this.residual = residual;
    return residual < Infinity;
  }

  /**
   * Newton's method from an evaluated state. Each step must bring the fugacities closer, but when patient: next to the
   * critical point the way to equilibrium leads over larger residuals.
   *
   * @returns true at equilibrium; false with the state it began from, or the last good one, evaluated
   */
  private newton(z: Float64Array, pressurePsia: number, isPatient: boolean): boolean {
    const { lnK, held, step } = this;
    held.set(lnK);
    let heldFraction = this.vapourFraction;
    let heldResidual = this.residual;
    for (let pass = 0; !isPatient || pass < PATIENCE; pass += 1) {
      const isEquilibrium = this.residual < FUGACITY_TOLERANCE;
      if (isEquilibrium && !this.isNearCritical(z)) return true;
      if (!this.fillStep(z, pressurePsia)) break;
      let largest = 0;
      for (let i = 0; i < z.length; i += 1) {
        if (z[i] > 0) largest = Math.max(largest, Math.abs(step[i]));
      }
      if (isEquilibrium && largest < SMALL_STEP) return true;
      if (!(largest < LARGEST_STEP)) break;
      for (let i = 0; i < z.length; i += 1) lnK[i] -= step[i];
      if (!this.evaluate(z, pressurePsia)) break;
      if (this.residual < 0.7 * heldResidual) {
        held.set(lnK);
        heldFraction = this.vapourFraction;
        heldResidual = this.residual;
      } else if (this.residual < ROUNDING_TOLERANCE && heldResidual < ROUNDING_TOLERANCE) {
        return true;
      } else if (!isPatient) break;
    }
    lnK.set(held);
    this.vapourFraction = heldFraction;
    this.evaluate(z, pressurePsia);
    return this.residual < ROUNDING_TOLERANCE;
  }

  /**
   * Newton step of ln K, to be subtracted. With w_k = x_k y_k / z_k and S = sum (y_k - x_k)^2 / z_k,
   *
   *     dx_k = -V w_k dlnK_k - x_k (y_k - x_k)/z_k dV,  dy_k = (1-V) w_k dlnK_k - y_k (y_k - x_k)/z_k dV,
   *     dV = sum w_j dlnK_j / S
   */
  private fillStep(z: Float64Array, pressurePsia: number): boolean {
    const { k, liquid, gas, jacobian, step, error, byFraction, vapourFraction: v } = this;
    const n = z.length;
    this.equation.differentiateByMoles(pressurePsia, liquid);
    this.equation.differentiateByMoles(pressurePsia, gas);
    let spread = 0;
    for (let i = 0; i < n; i += 1) {
      const t = 1 + v * (k[i] - 1);
      spread += (z[i] * (k[i] - 1) * (k[i] - 1)) / (t * t);
    }
    byFraction.fill(0);
    for (let j = 0; j < n; j += 1) {
      const t = 1 + v * (k[j] - 1);
      const share = z[j] / (t * t);
      const dx = -share * (k[j] - 1);
      const dy = k[j] * dx;
      for (let i = 0; i < n; i += 1) {
        byFraction[i] += gas.byMoles[i * n + j] * dy - liquid.byMoles[i * n + j] * dx;
      }
    }
    for (let j = 0; j < n; j += 1) {
      const t = 1 + v * (k[j] - 1);
      const w = (k[j] * z[j]) / (t * t);
      for (let i = 0; i < n; i += 1) {
        const at = i * n + j;
        jacobian[at] =
          w * ((1 - v) * gas.byMoles[at] + v * liquid.byMoles[at] + byFraction[i] / spread);
      }
      jacobian[j * n + j] += 1;
    }
    step.set(error);
    return solveLinear(jacobian, step, n);
  }

  private isNearCritical(z: Float64Array): boolean {
    return this.lnK.every((value, i) => z[i] === 0 || Math.abs(value) < NEAR_CRITICAL);
  }

  private isTrivial(z: Float64Array): boolean {
    return this.lnK.every((value, i) => z[i] === 0 || Math.abs(value) < TRIVIAL);
  }

  private lostOrTrivial(z: Float64Array): SplitOutcome {
    return this.lnK.every((value, i) => z[i] === 0 || Math.abs(value) < 1e-2) ? "trivial" : "lost";
  }
}
