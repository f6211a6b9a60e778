/** The phase split by steps that always lower the Gibbs energy: slower than Newton's method in ln K, but sure. */
import { solveShifted } from "../numerics/linear-system";
import { createPhaseState, type PengRobinson, type PhaseState } from "./peng-robinson";

const TOLERANCE = 1e-9;
const MAXIMUM_ITERATIONS = 200;
const LEAST_SHIFT = 1e-4;
const LARGEST_SHIFT = 1e9;

/**
 * Minimises the Gibbs energy of two phases over the moles v_i of each component in the second one,
 *
 *     G / (R T) = sum v_i (ln y_i + ln phi_i(y)) + sum l_i (ln x_i + ln phi_i(x)),   l_i = z_i - v_i
 *
 * by Newton's method in v_i / sqrt(v_i l_i / z_i), in which the ideal part of the Hessian is the unit matrix, with a
 * shift that grows until G falls. From a start below the energy of one phase it cannot end in one phase.
 *
 * @see M. L. Michelsen, J. M. Mollerup, Thermodynamic Models: Fundamentals and Computational Aspects, 2nd ed. (2007),
 *      chapter 10
 */
export class GibbsDescent {
  /** ln (y_i / x_i) at the end */
  readonly lnK: Float64Array;
  private readonly x: Float64Array;
  private readonly y: Float64Array;
  private readonly v: Float64Array;
  private readonly held: Float64Array;
  private readonly scale: Float64Array;
  private readonly gradient: Float64Array;
  private readonly step: Float64Array;
  private readonly hessian: Float64Array;
  private readonly factor: Float64Array;
  private readonly first: PhaseState;
  private readonly second: PhaseState;
  private amount = 0;

  constructor(private readonly equation: PengRobinson) {
    const n = equation.count;
    const vector = () => new Float64Array(n);
    this.lnK = vector();
    this.x = vector();
    this.y = vector();
    this.v = vector();
    this.held = vector();
    this.scale = vector();
    this.gradient = vector();
    this.step = vector();
    this.hessian = new Float64Array(n * n);
    this.factor = new Float64Array(n * n);
    this.first = createPhaseState(n);
    this.second = createPhaseState(n);
  }

  /**
   * @param lnRatio  ln(W_i / z_i) of a trial phase below the tangent plane of the feed: some of it, taken out of the
   *                 feed, lowers the energy
   * @returns        true at a minimum, with `lnK` of the trial phase over the rest
   */
  solve(z: Float64Array, pressurePsia: number, lnRatio: Float64Array): boolean {
    let energy = this.takeOut(z, pressurePsia, lnRatio);
    if (!(energy < Infinity)) return false;
    let shift = 0;
    for (let iteration = 0; iteration < MAXIMUM_ITERATIONS; iteration += 1) {
      if (this.fillNewton(z, pressurePsia) < TOLERANCE) break;
      this.held.set(this.v);
      for (;;) {
        if (shift > LARGEST_SHIFT) return false;
        this.step.set(this.gradient);
        if (solveShifted(this.hessian, shift, this.factor, this.step, z.length)) {
          this.move(z);
          const next = this.evaluate(z, pressurePsia);
          if (next <= energy + 1e-14 * (1 + Math.abs(energy))) {
            energy = next;
            break;
          }
        }
        shift = Math.max(LEAST_SHIFT, 4 * shift);
      }
      shift = shift > LEAST_SHIFT ? shift / 10 : 0;
    }
    const { first, second, lnK } = this;
    for (let i = 0; i < z.length; i += 1) lnK[i] = first.lnPhi[i] - second.lnPhi[i];
    return true;
  }

  /** The largest amount of the trial phase, halved until the energy is below that of the feed. */
  private takeOut(z: Float64Array, pressurePsia: number, lnRatio: Float64Array): number {
    const { x, v, first } = this;
    this.equation.evaluate(z, pressurePsia, "stable", first);
    let reference = 0;
    let largest = 0;
    let total = 0;
    for (let i = 0; i < z.length; i += 1) {
      if (z[i] > 0) reference += z[i] * (Math.log(z[i]) + first.lnPhi[i]);
      const ratio = Math.exp(lnRatio[i]);
      x[i] = z[i] * ratio;
      total += x[i];
      if (z[i] > 0) largest = Math.max(largest, ratio);
    }
    const trial = x.slice();
    for (let amount = Math.min(0.5, (0.9 * total) / largest); amount > 1e-9; amount /= 2) {
      for (let i = 0; i < z.length; i += 1) v[i] = (amount * trial[i]) / total;
      const energy = this.evaluate(z, pressurePsia);
      if (energy < reference) return energy;
    }
    return Infinity;
  }

  /** Phases at `v`. @returns the Gibbs energy */
  private evaluate(z: Float64Array, pressurePsia: number): number {
    const { x, y, v, first, second } = this;
    let amount = 0;
    for (let i = 0; i < z.length; i += 1) amount += v[i];
    this.amount = amount;
    for (let i = 0; i < z.length; i += 1) {
      y[i] = v[i] / amount;
      x[i] = (z[i] - v[i]) / (1 - amount);
    }
    this.equation.evaluate(x, pressurePsia, "stable", first);
    this.equation.evaluate(y, pressurePsia, "stable", second);
    let energy = 0;
    for (let i = 0; i < z.length; i += 1) {
      if (y[i] > 0) energy += v[i] * (Math.log(y[i]) + second.lnPhi[i]);
      if (x[i] > 0) energy += (z[i] - v[i]) * (Math.log(x[i]) + first.lnPhi[i]);
    }
    return energy;
  }

  /** Scaled gradient (downhill) and Hessian. @returns the largest entry of the gradient */
  private fillNewton(z: Float64Array, pressurePsia: number): number {
    const { x, y, v, first, second, scale, gradient, hessian, amount } = this;
    const n = z.length;
    this.equation.differentiateByMoles(pressurePsia, first);
    this.equation.differentiateByMoles(pressurePsia, second);
    let largest = 0;
    for (let i = 0; i < n; i += 1) {
      const inside = v[i] > 0 && z[i] > v[i];
      scale[i] = inside ? Math.sqrt((v[i] * (z[i] - v[i])) / z[i]) : 0;
      gradient[i] = inside
        ? -scale[i] * (Math.log(y[i] / x[i]) + second.lnPhi[i] - first.lnPhi[i])
        : 0;
      largest = Math.max(largest, Math.abs(gradient[i]));
      for (let j = 0; j <= i; j += 1) {
        const at = i * n + j;
        hessian[at] =
          scale[i] *
          scale[j] *
          ((second.byMoles[at] - 1) / amount + (first.byMoles[at] - 1) / (1 - amount));
      }
      hessian[i * n + i] += 1;
    }
    return largest;
  }

  /** `v` after the step from `held`, shortened to stay inside the feed. */
  private move(z: Float64Array): void {
    const { v, held, scale, step } = this;
    let length = 1;
    for (let i = 0; i < z.length; i += 1) {
      const change = scale[i] * step[i];
      if (change < 0) length = Math.min(length, (-0.9 * held[i]) / change);
      else if (change > 0) length = Math.min(length, (0.9 * (z[i] - held[i])) / change);
    }
    for (let i = 0; i < z.length; i += 1) v[i] = held[i] + length * scale[i] * step[i];
  }
}
