import { incompleteBeta, logBeta, betaQuantile } from "../numerics/beta";
import { normalCdf, normalPdf, normalQuantile } from "../numerics/normal";
import { fillNormalQuantiles } from "../numerics/normal-table";
import type { Atom } from "./compiled-distribution";
import { createBetaTable, type BetaTable } from "./beta-table";

/**
 * A distribution without truncation. Probabilities are cumulative (0.1 is the value that 10 % lie below).
 */
export interface Family {
  /** where the density is positive; infinite where it has no end */
  readonly minimum: number;
  readonly maximum: number;
  /** values with chances of their own, ascending; none where there is a density everywhere */
  readonly atoms?: readonly Atom[];
  quantile(p: number): number;
  cdf(x: number): number;
  pdf(x: number): number;
  /** mean and variance of the part between `low` and `high`, which lie within the support */
  momentsBetween(low: number, high: number): { mean: number; variance: number };
  /**
   * Quantiles of `count` ascending probabilities, each strictly between 0 and 1: the inner loop of sampling, without
   * checks. Agrees with `quantile` to 1e-7 of the range or better.
   */
  fillQuantiles(probabilities: Float64Array, count: number, out: Float64Array): void;
}

export function uniformFamily(low: number, high: number): Family {
  const width = high - low;
  return {
    minimum: low,
    maximum: high,
    quantile: (p) => low + p * width,
    cdf: (x) => (x <= low ? 0 : x >= high ? 1 : (x - low) / width),
    pdf: (x) => (x < low || x > high ? 0 : 1 / width),
    momentsBetween: (a, b) => ({ mean: (a + b) / 2, variance: (b - a) ** 2 / 12 }),
    fillQuantiles(probabilities, count, out) {
      for (let i = 0; i < count; i += 1) out[i] = low + probabilities[i] * width;
    },
  };
}

/** Triangular on [low, high] with its peak at `mode`, which may be an end. */
export function triangularFamily(low: number, mode: number, high: number): Family {
  const width = high - low;
  const left = width * (mode - low);
  const right = width * (high - mode);
  const peak = (mode - low) / width;
  const quantile = (p: number) =>
    p < peak ? low + Math.sqrt(p * left) : high - Math.sqrt((1 - p) * right);
  const pdf = (x: number) => {
    if (x < low || x > high) return 0;
    if (x < mode) return (2 * (x - low)) / left;
    return right > 0 ? (2 * (high - x)) / right : 2 / width;
  };
  return {
    minimum: low,
    maximum: high,
    quantile,
    pdf,
    cdf(x) {
      if (x <= low) return 0;
      if (x >= high) return 1;
      return x < mode ? (x - low) ** 2 / left : 1 - (high - x) ** 2 / right;
    },
    momentsBetween: (a, b) => piecewiseLinearMoments(pdf, a, mode, b),
    fillQuantiles(probabilities, count, out) {
      for (let i = 0; i < count; i += 1) {
        const p = probabilities[i];
        out[i] = p < peak ? low + Math.sqrt(p * left) : high - Math.sqrt((1 - p) * right);
      }
    },
  };
}

/** Moments of a density that is linear on each side of `knot`: three Gauss points are exact for x^2 times linear. */
function piecewiseLinearMoments(
  pdf: (x: number) => number,
  low: number,
  knot: number,
  high: number,
) {
  const pieces =
    knot > low && knot < high
      ? [
          [low, knot],
          [knot, high],
        ]
      : [[low, high]];
  const centre = (low + high) / 2;
  let mass = 0;
  let first = 0;
  let second = 0;
  for (const [a, b] of pieces) {
    for (const [node, weight] of GAUSS_3) {
      const x = (a + b) / 2 + ((b - a) / 2) * node;
      const w = ((weight * (b - a)) / 2) * pdf(x);
      mass += w;
      first += w * (x - centre);
      second += w * (x - centre) ** 2;
    }
  }
  const shift = first / mass;
  return { mean: centre + shift, variance: second / mass - shift * shift };
}

const GAUSS_3: readonly (readonly [number, number])[] = [
  [-Math.sqrt(0.6), 5 / 9],
  [0, 8 / 9],
  [Math.sqrt(0.6), 5 / 9],
];

/**
 * PERT: a beta distribution on [low, high] with shapes 1 + 4 (mode - low) / (high - low) and
 * 1 + 4 (high - mode) / (high - low), so that the mean is (low + 4 mode + high) / 6.
 *
 * @see D. G. Malcolm, J. H. Roseboom, C. E. Clark, W. Fazar, Application of a technique for research and development
 *      program evaluation, Oper. Res. 7 (1959) 646-669 (the mean); the beta form with a weight of 4 is common practice
 */
export function pertFamily(low: number, mode: number, high: number): Family {
  const width = high - low;
  const a = 1 + (4 * (mode - low)) / width;
  const b = 1 + (4 * (high - mode)) / width;
  const logNorm = logBeta(a, b);
  let table: BetaTable | null = null;
  return {
    minimum: low,
    maximum: high,
    quantile: (p) => low + width * betaQuantile(p, a, b),
    cdf: (x) => (x <= low ? 0 : x >= high ? 1 : incompleteBeta((x - low) / width, a, b)),
    pdf(x) {
      if (x < low || x > high) return 0;
      const t = (x - low) / width;
      return (t ** (a - 1) * (1 - t) ** (b - 1) * Math.exp(-logNorm)) / width;
    },
    momentsBetween(from, to) {
      const s = (from - low) / width;
      const t = (to - low) / width;
      const mass = incompleteBeta(t, a, b) - incompleteBeta(s, a, b);
      const share = (shift: number) =>
        (incompleteBeta(t, a + shift, b) - incompleteBeta(s, a + shift, b)) / mass;
      const first = (a / (a + b)) * share(1);
      const second = ((a * (a + 1)) / ((a + b) * (a + b + 1))) * share(2);
      return { mean: low + width * first, variance: width ** 2 * (second - first ** 2) };
    },
    fillQuantiles(probabilities, count, out) {
      table ??= createBetaTable(a, b);
      table.fillQuantiles(probabilities, count, low, width, out);
    },
  };
}

export function normalFamily(mean: number, standardDeviation: number): Family {
  return {
    minimum: -Infinity,
    maximum: Infinity,
    quantile: (p) => mean + standardDeviation * normalQuantile(p),
    cdf: (x) => normalCdf((x - mean) / standardDeviation),
    pdf: (x) => normalPdf((x - mean) / standardDeviation) / standardDeviation,
    momentsBetween(low, high) {
      const a = (low - mean) / standardDeviation;
      const b = (high - mean) / standardDeviation;
      const mass = normalMass(a, b);
      const shift = (normalPdf(a) - normalPdf(b)) / mass;
      const spread = 1 + (timesDensity(a) - timesDensity(b)) / mass - shift ** 2;
      return { mean: mean + standardDeviation * shift, variance: standardDeviation ** 2 * spread };
    },
    fillQuantiles(probabilities, count, out) {
      fillNormalQuantiles(probabilities, count, out);
      for (let i = 0; i < count; i += 1) out[i] = mean + standardDeviation * out[i];
    },
  };
}

/** `mu` and `sigma` belong to the natural logarithm. */
export function lognormalFamily(mu: number, sigma: number): Family {
  const standard = (x: number) => (Math.log(x) - mu) / sigma;
  return {
    minimum: 0,
    maximum: Infinity,
    quantile: (p) => Math.exp(mu + sigma * normalQuantile(p)),
    cdf: (x) => (x <= 0 ? 0 : normalCdf(standard(x))),
    pdf: (x) => (x <= 0 ? 0 : normalPdf(standard(x)) / (x * sigma)),
    momentsBetween(low, high) {
      const a = low > 0 ? standard(low) : -Infinity;
      const b = standard(high);
      const mass = normalMass(a, b);
      const ofFirst = normalMass(a - sigma, b - sigma) / mass;
      const ofSecond = normalMass(a - 2 * sigma, b - 2 * sigma) / mass;
      const mean = Math.exp(mu + sigma ** 2 / 2) * ofFirst;
      // E(x^2) / mean^2 - 1 = e^(sigma^2) ofSecond / ofFirst^2 - 1, whose digits a small sigma would cancel.
      const relative = Math.expm1(sigma ** 2 + Math.log(ofSecond / ofFirst ** 2));
      return { mean, variance: mean ** 2 * relative };
    },
    fillQuantiles(probabilities, count, out) {
      fillNormalQuantiles(probabilities, count, out);
      for (let i = 0; i < count; i += 1) out[i] = Math.exp(mu + sigma * out[i]);
    },
  };
}

/** P(a < Z < b), from the tail that loses nothing to cancellation. */
function normalMass(a: number, b: number): number {
  return a > 0 ? normalCdf(-a) - normalCdf(-b) : normalCdf(b) - normalCdf(a);
}

/** z phi(z), which is 0 at either infinity. */
function timesDensity(z: number): number {
  return Number.isFinite(z) ? z * normalPdf(z) : 0;
}
