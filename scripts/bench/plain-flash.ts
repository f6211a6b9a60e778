/**
 * The flash as a textbook writes it, for the bench: Wilson's K-values, then ln K = ln phi_liquid - ln phi_gas over and
 * over, with the same Peng-Robinson equation, Rachford-Rice by Newton's method and the same tolerance. No stability
 * test, no acceleration, no derivatives, new arrays every time.
 */
import { alphaSlope } from "@/analytics/equation-of-state/peng-robinson";
import type { Mixture } from "@/analytics/equation-of-state/mixture";
import { GAS_CONSTANT } from "@/analytics/units/conversions";

const TOLERANCE = 1e-10;
const MOST_ITERATIONS = 5000;

function roots(a: number, b: number): number[] {
  const [c2, c1, c0] = [b - 1, a - 2 * b - 3 * b * b, b * b + b * b * b - a * b];
  const q = (c2 * c2 - 3 * c1) / 9;
  const r = (2 * c2 ** 3 - 9 * c2 * c1 + 27 * c0) / 54;
  if (r * r < q ** 3) {
    const angle = Math.acos(r / Math.sqrt(q ** 3));
    return [0, 2 * Math.PI, -2 * Math.PI].map(
      (turn) => -2 * Math.sqrt(q) * Math.cos((angle + turn) / 3) - c2 / 3,
    );
  }
  const s = -Math.sign(r) * Math.cbrt(Math.abs(r) + Math.sqrt(r * r - q ** 3));
  return [s + (s === 0 ? 0 : q / s) - c2 / 3];
}

function lnPhi(x: number[], pij: number[][], b: number[]): number[] {
  const pull = pij.map((row) => row.reduce((sum, a, j) => sum + a * x[j], 0));
  const a = pull.reduce((sum, value, i) => sum + value * x[i], 0);
  const bm = b.reduce((sum, value, i) => sum + value * x[i], 0);
  const s = Math.SQRT2;
  const at = (z: number) =>
    b.map(
      (bi, i) =>
        (bi / bm) * (z - 1) -
        Math.log(z - bm) -
        (a / (2 * s * bm)) *
          ((2 * pull[i]) / a - bi / bm) *
          Math.log((z + (1 + s) * bm) / (z + (1 - s) * bm)),
    );
  const found = roots(a, bm)
    .filter((z) => z > bm)
    .map(at);
  const energy = (values: number[]) => values.reduce((sum, value, i) => sum + x[i] * value, 0);
  return found.reduce((best, next) => (energy(next) < energy(best) ? next : best));
}

function split(z: number[], k: number[]): number {
  let low = 1 / (1 - Math.max(...k));
  let high = 1 / (1 - Math.min(...k));
  let v = 0.5 * (low + high);
  for (let i = 0; i < 100; i += 1) {
    let value = 0;
    let slope = 0;
    z.forEach((zi, j) => {
      const share = (k[j] - 1) / (1 + v * (k[j] - 1));
      value += zi * share;
      slope -= zi * share * share;
    });
    if (value > 0) low = v;
    else high = v;
    let next = v - value / slope;
    if (!(next > low && next < high)) next = 0.5 * (low + high);
    if (Math.abs(next - v) < 1e-15) break;
    v = next;
  }
  return v;
}

export interface PlainFlash {
  /** NaN when it did not get there */
  vapourFraction: number;
  iterations: number;
}

export function plainFlash(
  mixture: Mixture,
  feed: Float64Array,
  { pressurePsia, temperatureDegR }: { pressurePsia: number; temperatureDegR: number },
): PlainFlash {
  const present = [...feed.keys()].filter((i) => feed[i] > 0);
  const z = present.map((i) => feed[i]);
  const rt = GAS_CONSTANT * temperatureDegR;
  const strength = present.map((i) => {
    const tc = mixture.criticalTemperatureDegR[i];
    const pc = mixture.criticalPressurePsia[i];
    const alpha = 1 + alphaSlope(mixture.acentricFactor[i]) * (1 - Math.sqrt(temperatureDegR / tc));
    return (GAS_CONSTANT * tc * alpha * Math.sqrt(0.45723552892138218 / pc)) / rt;
  });
  const b = present.map(
    (i) =>
      (0.07779607390388846 * GAS_CONSTANT * mixture.criticalTemperatureDegR[i] * pressurePsia) /
      (mixture.criticalPressurePsia[i] * rt),
  );
  const n = mixture.names.length;
  const pij = present.map((i, row) =>
    present.map(
      (j, column) =>
        (1 - mixture.interactions[i * n + j]) * strength[row] * strength[column] * pressurePsia,
    ),
  );
  let k = present.map(
    (i) =>
      (mixture.criticalPressurePsia[i] / pressurePsia) *
      Math.exp(
        5.373 *
          (1 + mixture.acentricFactor[i]) *
          (1 - mixture.criticalTemperatureDegR[i] / temperatureDegR),
      ),
  );
  for (let iterations = 1; iterations <= MOST_ITERATIONS; iterations += 1) {
    if (!(Math.max(...k) > 1 && Math.min(...k) < 1)) return { vapourFraction: NaN, iterations };
    const v = split(z, k);
    const x = z.map((zi, i) => zi / (1 + v * (k[i] - 1)));
    const y = x.map((xi, i) => k[i] * xi);
    const liquid = lnPhi(x, pij, b);
    const gas = lnPhi(y, pij, b);
    const next = k.map((_, i) => Math.exp(liquid[i] - gas[i]));
    const error = Math.max(...next.map((value, i) => Math.abs(Math.log(value / k[i]))));
    if (error < TOLERANCE) return { vapourFraction: v, iterations };
    k = next;
  }
  return { vapourFraction: NaN, iterations: MOST_ITERATIONS };
}
