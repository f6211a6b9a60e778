import { describe, expect, it } from "vitest";
import { createRandom } from "@/analytics/numerics/random";
import {
  fillNet,
  fillScrambled,
  SOBOL_DIMENSIONS,
  sobolDirections,
  toProbability,
} from "@/analytics/uncertainty/sobol";
import reference from "../../fixtures/sobol.json";

function plain(dimension: number, k: number): Uint32Array {
  const out = new Uint32Array(1 << k);
  fillNet(sobolDirections(dimension), 0, k, out);
  return out;
}

function scrambled(dimension: number, k: number, seed: number): Float64Array {
  const out = new Uint32Array(1 << k);
  fillScrambled(dimension, createRandom(seed, dimension), k, out);
  return Float64Array.from(out, toProbability);
}

/**
 * Squared centred L2 discrepancy of points given by dimension.
 *
 * F. J. Hickernell, A generalized discrepancy and quadrature error bound, Math. Comp. 67 (1998) 299-322, equation 5.1c
 */
function centredL2(columns: ArrayLike<number>[]): number {
  const n = columns[0].length;
  const d = columns.length;
  let single = 0;
  let double = 0;
  for (let i = 0; i < n; i += 1) {
    let product = 1;
    for (const x of columns) {
      const a = Math.abs(x[i] - 0.5);
      product *= 1 + 0.5 * a - 0.5 * a * a;
    }
    single += product;
    for (let j = 0; j < n; j += 1) {
      let pair = 1;
      for (const x of columns) {
        pair *=
          1 + 0.5 * Math.abs(x[i] - 0.5) + 0.5 * Math.abs(x[j] - 0.5) - 0.5 * Math.abs(x[i] - x[j]);
      }
      double += pair;
    }
  }
  return (13 / 12) ** d - (2 / n) * single + double / (n * n);
}

describe("fillNet", () => {
  // scipy.stats.qmc.Sobol without scrambling, in SciPy's order.
  it("gives SciPy's points in every dimension", () => {
    expect(SOBOL_DIMENSIONS).toBe(48);
    for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension += 1) {
      const numerators = Array.from(plain(dimension, 6), (x) => x / 2 ** 26);
      expect(numerators).toEqual(reference.points.map((point) => point[dimension]));
      const far = plain(dimension, 16);
      for (const { index, numerators: wanted } of reference.deep) {
        expect(far[index] / 2 ** 16).toBe(wanted[dimension]);
      }
    }
  });

  it.each(reference.discrepancies)(
    "has SciPy's centred L2 discrepancy, $dimensions dimensions, 2^$log2 points",
    ({ dimensions, log2, centredL2: wanted }) => {
      const columns = Array.from({ length: dimensions }, (_, d) =>
        Array.from(plain(d, log2), (x) => x / 2 ** 32),
      );
      expect(centredL2(columns)).toBeCloseTo(wanted, 10);
    },
  );
});

describe("fillScrambled", () => {
  it.each([1, 2, 3])("puts one point in every stratum of every dimension, seed %i", (seed) => {
    const k = 9;
    for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension += 1) {
      const strata = Array.from(scrambled(dimension, k, seed), (p) => Math.floor(p * 2 ** k));
      expect(new Set(strata).size).toBe(2 ** k);
    }
  });

  it("keeps the first two dimensions a net: one point in every box of area 2^-k", () => {
    const k = 8;
    const [x, y] = [scrambled(0, k, 4), scrambled(1, k, 4)];
    for (let a = 0; a <= k; a += 1) {
      const boxes = Array.from(
        x,
        (p, i) => `${Math.floor(p * 2 ** a)},${Math.floor(y[i] * 2 ** (k - a))}`,
      );
      expect(new Set(boxes).size).toBe(2 ** k);
    }
  });

  it("fills ten dimensions more evenly than random points", () => {
    const k = 9;
    const words = new Uint32Array(1 << k);
    const random = Array.from({ length: 10 }, (_, d) => {
      createRandom(5, 100 + d).fill(words);
      return Float64Array.from(words, toProbability);
    });
    const net = Array.from({ length: 10 }, (_, d) => scrambled(d, k, 5));
    expect(centredL2(net)).toBeLessThan(0.5 * centredL2(random));
  });

  it("places each point uniformly over many scrambles", () => {
    // 400 scrambles: mean of 1/2 within 4 standard errors of 1 / sqrt(12 x 400), variance of 1/12 within 15 %.
    const stream = createRandom(6, 3);
    const out = new Uint32Array(16);
    const points = Array.from({ length: 400 }, () => {
      fillScrambled(3, stream, 4, out);
      return toProbability(out[5]);
    });
    const mean = points.reduce((sum, p) => sum + p, 0) / 400;
    const variance = points.reduce((sum, p) => sum + (p - mean) ** 2, 0) / 399;
    expect(Math.abs(mean - 0.5)).toBeLessThan(4 / Math.sqrt(12 * 400));
    expect(Math.abs(variance * 12 - 1)).toBeLessThan(0.15);
  });
});
