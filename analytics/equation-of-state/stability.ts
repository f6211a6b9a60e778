/** Whether a feed stays one phase: the tangent-plane test. */
import { ConvergenceError } from "../errors";
import { solveShifted } from "../numerics/linear-system";
import { createPhaseState, type PengRobinson, type PhaseState } from "./peng-robinson";
import { fillWilson } from "./wilson";

/** Largest residual of ln W + ln phi(W) - ln z - ln phi(z), weighted by sqrt W, at a stationary point. */
const TOLERANCE = 1e-10;
/** What counts where rounding stalls the descent next to the critical point; tm is off by the square of it. */
const STALLED_TOLERANCE = 1e-7;
const SUBSTITUTIONS = 6;
const MAXIMUM_NEWTON = 200;
/** Added to the Hessian's diagonal, whose entries are about 1, when a step fails; more and more of it. */
const LEAST_SHIFT = 1e-4;
/** A stationary point whose ln(W/z) are all below this is the feed itself. */
const TRIVIAL = 1e-5;
/** A distance below the tangent plane counts from here; rounding of the sums is smaller. */
const UNSTABLE = -1e-11;

export type TrialStart = "gas" | "liquid";

/** A stationary point of the tangent-plane distance. */
export interface TrialPhase {
  /** ln(W_i / z_i); finite for components of zero, too */
  readonly lnRatio: Float64Array;
  /** 1 + sum W_i (ln W_i + ln phi_i(W) - ln z_i - ln phi_i(z) - 1); negative when the feed is unstable */
  distance: number;
  /** the stationary point is the feed */
  trivial: boolean;
  /** z of the trial phase */
  z: number;
}

/**
 * The tangent-plane test of Michelsen: a feed z is unstable when some composition W has
 *
 *     tm(W) = 1 + sum W_i (ln W_i + ln phi_i(W) - ln z_i - ln phi_i(z) - 1) < 0
 *
 * Two trials, a gas (z K) and a liquid (z / K) by Wilson's K-values, go to their stationary points by successive
 * substitution, then by Newton's method in 2 sqrt W, shifted so that tm always falls: near the critical point, where
 * substitution creeps, Newton's method still takes a dozen steps.
 *
 * @see M. L. Michelsen, Fluid Phase Equilib. 9 (1982) 1-19
 */
export class StabilityTest {
  readonly gas: TrialPhase;
  readonly liquid: TrialPhase;
  /** the feed as one phase, at its root of lower Gibbs energy */
  readonly feed: PhaseState;

  private readonly trial: PhaseState;
  private readonly x: Float64Array;
  private readonly residual: Float64Array;
  private readonly hessian: Float64Array;
  private readonly factor: Float64Array;
  private readonly gradient: Float64Array;
  private readonly step: Float64Array;
  private readonly held: Float64Array;
  private total = 1;

  constructor(readonly equation: PengRobinson) {
    const n = equation.count;
    const vector = () => new Float64Array(n);
    const trialPhase = (): TrialPhase => ({
      lnRatio: vector(),
      distance: NaN,
      trivial: true,
      z: NaN,
    });
    this.gas = trialPhase();
    this.liquid = trialPhase();
    this.feed = createPhaseState(n);
    this.trial = createPhaseState(n);
    this.x = vector();
    this.residual = vector();
    this.gradient = vector();
    this.step = vector();
    this.held = vector();
    this.hessian = new Float64Array(n * n);
    this.factor = new Float64Array(n * n);
  }

  /**
   * Tests the feed at the equation's temperature; `gas` and `liquid` then hold both stationary points.
   *
   * @returns true when the feed is unstable
   * @throws {ConvergenceError} when a trial does not settle
   */
  isUnstable(z: Float64Array, pressurePsia: number): boolean {
    this.equation.evaluate(z, pressurePsia, "stable", this.feed);
    this.search(z, pressurePsia, "gas");
    this.search(z, pressurePsia, "liquid");
    return this.gas.distance < UNSTABLE || this.liquid.distance < UNSTABLE;
  }

  /** One trial from Wilson's K-values, with `feed` evaluated before. */
  search(z: Float64Array, pressurePsia: number, start: TrialStart): TrialPhase {
    const phase = start === "gas" ? this.gas : this.liquid;
    const { lnRatio } = phase;
    const n = z.length;
    fillWilson(this.equation.mixture, pressurePsia, this.equation.temperatureDegR, lnRatio);
    if (start === "liquid") for (let i = 0; i < n; i += 1) lnRatio[i] = -lnRatio[i];
    for (let i = 0; i < SUBSTITUTIONS; i += 1) {
      this.evaluate(z, pressurePsia, lnRatio);
      for (let j = 0; j < n; j += 1) lnRatio[j] = this.feed.lnPhi[j] - this.trial.lnPhi[j];
    }
    return this.follow(z, pressurePsia, phase);
  }

  /** A trial from its own last stationary point, with `feed` evaluated before at a pressure near by. */
  follow(z: Float64Array, pressurePsia: number, phase: TrialPhase): TrialPhase {
    const { lnRatio } = phase;
    // tm is stationary, so it is better known than 1 - sum W, which equals it only at the very end.
    const distance = this.descend(z, pressurePsia, lnRatio);
    let farthest = 0;
    for (let i = 0; i < z.length; i += 1) {
      if (z[i] > 0) farthest = Math.max(farthest, Math.abs(lnRatio[i]));
    }
    phase.trivial = farthest < TRIVIAL;
    phase.distance = phase.trivial ? 0 : distance;
    phase.z = this.trial.z;
    return phase;
  }

  /**
   * Slope of a trial's distance against ln p: sum W_i (d ln phi_i(W) - d ln phi_i(z)) / d ln p, for the trial and feed
   * evaluated last. The stationary point's own movement does not count.
   */
  distanceSlope(z: Float64Array, pressurePsia: number): number {
    const { feed, trial, x, total } = this;
    this.equation.differentiateByState(z, pressurePsia, feed);
    this.equation.differentiateByState(x, pressurePsia, trial);
    let slope = 0;
    for (let i = 0; i < x.length; i += 1) {
      slope += total * x[i] * (trial.byLnPressure[i] - feed.byLnPressure[i]);
    }
    return slope;
  }

  /** Fills the residuals at W = z exp(lnRatio). @returns tm(W) */
  private evaluate(z: Float64Array, pressurePsia: number, lnRatio: Float64Array): number {
    const { x, residual, feed, trial } = this;
    const n = z.length;
    let total = 0;
    for (let i = 0; i < n; i += 1) {
      x[i] = z[i] * Math.exp(lnRatio[i]);
      total += x[i];
    }
    this.total = total;
    for (let i = 0; i < n; i += 1) x[i] /= total;
    this.equation.evaluate(x, pressurePsia, "stable", trial);
    let tm = 1 - total;
    for (let i = 0; i < n; i += 1) {
      residual[i] = lnRatio[i] + trial.lnPhi[i] - feed.lnPhi[i];
      tm += total * x[i] * residual[i];
    }
    return tm;
  }

  /** Newton's method from `lnRatio`, in 2 sqrt W, shifted until tm falls. @returns tm */
  private descend(z: Float64Array, pressurePsia: number, lnRatio: Float64Array): number {
    const { residual, gradient, step, held } = this;
    let tm = this.evaluate(z, pressurePsia, lnRatio);
    let shift = 0;
    for (let iteration = 0; ; iteration += 1) {
      const error = this.fillGradient();
      if (error < TOLERANCE || (iteration === MAXIMUM_NEWTON && error < STALLED_TOLERANCE)) break;
      if (iteration === MAXIMUM_NEWTON) throw this.failure(pressurePsia, error);
      this.fillHessian(pressurePsia);
      held.set(lnRatio);
      const total = this.total;
      for (;;) {
        if (shift > 1e9) throw this.failure(pressurePsia, error);
        step.set(gradient);
        if (solveShifted(this.hessian, shift, this.factor, step, z.length)) {
          this.move(z, held, lnRatio);
          const next = this.evaluate(z, pressurePsia, lnRatio);
          // Near the end the change of tm is rounding.
          if (next <= tm + 1e-14 * (1 + total)) {
            tm = next;
            break;
          }
        }
        shift = Math.max(LEAST_SHIFT, 4 * shift);
      }
      shift = shift > LEAST_SHIFT ? shift / 10 : 0;
    }
    for (let i = 0; i < z.length; i += 1) lnRatio[i] -= residual[i];
    return tm;
  }

  /** @returns the largest entry */
  private fillGradient(): number {
    const { x, residual, gradient, total } = this;
    let largest = 0;
    for (let i = 0; i < x.length; i += 1) {
      gradient[i] = -Math.sqrt(x[i] * total) * residual[i];
      largest = Math.max(largest, Math.abs(gradient[i]));
    }
    return largest;
  }

  /** Without the term residual_i / 2 of the diagonal, which vanishes at the end and upsets traces before. */
  private fillHessian(pressurePsia: number): void {
    const { x, hessian, trial } = this;
    const n = x.length;
    this.equation.differentiateByMoles(pressurePsia, trial);
    for (let i = 0; i < n; i += 1) {
      const root = Math.sqrt(x[i]);
      for (let j = 0; j < i; j += 1) {
        hessian[i * n + j] = root * Math.sqrt(x[j]) * trial.byMoles[i * n + j];
      }
      hessian[i * n + i] = 1 + x[i] * trial.byMoles[i * n + i];
    }
  }

  /** lnRatio after the step in 2 sqrt W from `held`; no W falls below a hundredth of itself at once. */
  private move(z: Float64Array, held: Float64Array, lnRatio: Float64Array): void {
    const { step } = this;
    for (let i = 0; i < z.length; i += 1) {
      const alpha = 2 * Math.sqrt(z[i] * Math.exp(held[i]));
      lnRatio[i] = alpha > 0 ? held[i] + 2 * Math.log(Math.max(0.1, 1 + step[i] / alpha)) : held[i];
    }
  }

  private failure(pressurePsia: number, residual: number): ConvergenceError {
    return new ConvergenceError("The stability test did not converge", {
      pressurePsia,
      temperatureDegR: this.equation.temperatureDegR,
      residual,
    });
  }
}
