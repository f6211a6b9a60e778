/** The equations of the lines in a phase diagram, for the curve tracer. */
import type { CurveSystem } from "./curve-tracer";
import { PengRobinson, createPhaseState } from "./peng-robinson";

/**
 * The phase boundary of a feed z: unknowns ln K_i, ln T, ln p with an incipient phase w_i = z_i K_i,
 *
 *     ln K_i + ln phi_i(w) - ln phi_i(z) = 0,   sum w_i - 1 = 0
 *
 * Dew and bubble points alike: K of the heavy components is above 1 at a dew point and below 1 at a bubble point, and
 * passes through 1 at the critical point, where the tracer walks across.
 */
export function boundarySystem(equation: PengRobinson, z: Float64Array): CurveSystem {
  const n = equation.count;
  const size = n + 2;
  const w = new Float64Array(n);
  const feed = createPhaseState(n);
  const incipient = createPhaseState(n);
  return {
    size,
    fill(at, residual, jacobian) {
      const pressure = Math.exp(at[n + 1]);
      const temperature = Math.exp(at[n]);
      if (!(pressure < Infinity && temperature > 0 && temperature < Infinity)) return false;
      equation.setTemperature(temperature);
      let total = 0;
      for (let i = 0; i < n; i += 1) {
        w[i] = z[i] * Math.exp(at[i]);
        total += w[i];
      }
      if (!(total > 0 && total < Infinity)) return false;
      residual[n] = total - 1;
      for (let i = 0; i < n; i += 1) {
        jacobian[n * size + i] = w[i];
        w[i] /= total;
      }
      equation.evaluate(z, pressure, "stable", feed);
      equation.differentiateByState(z, pressure, feed);
      equation.evaluate(w, pressure, "stable", incipient);
      equation.differentiateByState(w, pressure, incipient);
      equation.differentiateByMoles(pressure, incipient);
      for (let i = 0; i < n; i += 1) {
        residual[i] = at[i] + incipient.lnPhi[i] - feed.lnPhi[i];
        const row = i * size;
        for (let j = 0; j < n; j += 1) jacobian[row + j] = incipient.byMoles[i * n + j] * w[j];
        jacobian[row + i] += 1;
        jacobian[row + n] = incipient.byLnTemperature[i] - feed.byLnTemperature[i];
        jacobian[row + n + 1] = incipient.byLnPressure[i] - feed.byLnPressure[i];
      }
      return true;
    },
  };
}

/** Relative step of the one row whose derivatives are taken by differences. */
const DIFFERENCE = 1e-6;

/**
 * States in which the liquid is a given share of the volume: unknowns ln K_i = ln(y_i/x_i), ln T, ln p and the vapour
 * fraction V, with x_i = z_i / (1 + V (K_i - 1)),
 *
 *     ln K_i + ln phi_i(y) - ln phi_i(x) = 0,   sum (y_i - x_i) = 0,
 *     ln((1-V) v_liquid / (V v_gas)) - ln(q / (1-q)) = 0
 *
 * with translated volumes. The last row is differentiated by differences; the others analytically.
 */
export function qualitySystem(
  equation: PengRobinson,
  z: Float64Array,
  liquidVolumeFraction: number,
): CurveSystem {
  const n = equation.count;
  const size = n + 3;
  const x = new Float64Array(n);
  const y = new Float64Array(n);
  const liquid = createPhaseState(n);
  const gas = createPhaseState(n);
  const moved = new Float64Array(size);
  const target = Math.log(liquidVolumeFraction / (1 - liquidVolumeFraction));

  /** Both phases at the unknowns. @returns sum (y - x), or NaN where there are no phases */
  function evaluate(at: Float64Array): number {
    const temperature = Math.exp(at[n]);
    const v = at[n + 2];
    if (!(v > 0 && v < 1 && temperature > 0 && temperature < Infinity)) return NaN;
    equation.setTemperature(temperature);
    let sumX = 0;
    let sumY = 0;
    for (let i = 0; i < n; i += 1) {
      const k = Math.exp(at[i]);
      x[i] = z[i] / (1 + v * (k - 1));
      y[i] = k * x[i];
      sumX += x[i];
      sumY += y[i];
    }
    for (let i = 0; i < n; i += 1) {
      x[i] /= sumX;
      y[i] /= sumY;
    }
    const pressure = Math.exp(at[n + 1]);
    equation.evaluate(x, pressure, "stable", liquid);
    equation.evaluate(y, pressure, "stable", gas);
    return sumY - sumX;
  }

  function volumeResidual(at: Float64Array): number {
    const pressure = Math.exp(at[n + 1]);
    const v = at[n + 2];
    const liquidVolume = (1 - v) * equation.molarVolume(x, pressure, liquid.z);
    return Math.log(liquidVolume / (v * equation.molarVolume(y, pressure, gas.z))) - target;
  }

  return {
    size,
    fill(at, residual, jacobian) {
      const last = (n + 1) * size;
      moved.set(at);
      for (let j = 0; j < size; j += 1) {
        moved[j] = at[j] + DIFFERENCE;
        if (!Number.isFinite(evaluate(moved))) return false;
        jacobian[last + j] = volumeResidual(moved);
        moved[j] = at[j];
      }
      residual[n] = evaluate(at);
      residual[n + 1] = volumeResidual(at);
      if (!Number.isFinite(residual[n])) return false;
      for (let j = 0; j < size; j += 1) {
        jacobian[last + j] = (jacobian[last + j] - residual[n + 1]) / DIFFERENCE;
      }
      const pressure = Math.exp(at[n + 1]);
      const v = at[n + 2];
      for (const [composition, phase] of [
        [x, liquid],
        [y, gas],
      ] as const) {
        equation.differentiateByMoles(pressure, phase);
        equation.differentiateByState(composition, pressure, phase);
      }
      let spread = 0;
      for (let j = 0; j < n; j += 1) {
        const k = Math.exp(at[j]);
        const t = 1 + v * (k - 1);
        const share = z[j] / (t * t);
        const dx = -share * (k - 1);
        spread -= dx * (k - 1);
        jacobian[n * size + j] = k * share;
        for (let i = 0; i < n; i += 1) {
          const byY = gas.byMoles[i * n + j];
          const byX = liquid.byMoles[i * n + j];
          jacobian[i * size + j] += k * share * ((1 - v) * byY + v * byX);
          jacobian[i * size + n + 2] += dx * (k * byY - byX);
        }
      }
      jacobian[n * size + n + 2] = -spread;
      for (let i = 0; i < n; i += 1) {
        residual[i] = at[i] + gas.lnPhi[i] - liquid.lnPhi[i];
        jacobian[i * size + i] += 1;
        jacobian[i * size + n] = gas.byLnTemperature[i] - liquid.byLnTemperature[i];
        jacobian[i * size + n + 1] = gas.byLnPressure[i] - liquid.byLnPressure[i];
      }
      return true;
    },
  };
}
