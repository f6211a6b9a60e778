import { DomainError } from "../errors";

const INVERSE_ROOT_TWO_PI = 0.3989422804014327;

/** Density of the standard normal distribution. */
export function normalPdf(z: number): number {
  return INVERSE_ROOT_TWO_PI * Math.exp(-0.5 * z * z);
}

/**
 * Distribution function of the standard normal, for both tails without cancellation: Cody's rational Chebyshev
 * approximations, relative error below 1e-15 down to z = -37.
 *
 * @example normalCdf(1.96) // => 0.97500210485178
 * @see W. J. Cody, Rational Chebyshev approximations for the error function, Math. Comp. 23 (1969) 631-637
 */
export function normalCdf(z: number): number {
  const y = Math.abs(z);
  if (y <= 0.67448975) {
    const s = y > 1e-16 ? z * z : 0;
    const numerator =
      (((0.06568233791820745 * s + 2.2352520354606837) * s + 161.02823106855587) * s +
        1067.6894854603709) *
        s +
      18154.98125334356;
    const denominator =
      (((s + 47.202581904688245) * s + 976.0985517377767) * s + 10260.932208618979) * s +
      45507.78933502673;
    return 0.5 + (z * numerator) / denominator;
  }
  const tail = y > 38.6 ? 0 : upperTail(y);
  return z > 0 ? 1 - tail : tail;
}

/** P(Z > y) for y > 0.674. The exponent is split so that squaring y loses nothing. */
function upperTail(y: number): number {
  const rounded = Math.trunc(y * 16) / 16;
  const remainder = (y - rounded) * (y + rounded);
  return Math.exp(-rounded * rounded * 0.5) * Math.exp(-remainder * 0.5) * scaledTail(y);
}

/** P(Z > y) times exp(y^2 / 2). */
function scaledTail(y: number): number {
  if (y <= 5.656854249492381) {
    let numerator = 1.0765576773720192e-8 * y;
    let denominator = y;
    for (let i = 0; i < 7; i += 1) {
      numerator = (numerator + CODY_C[i]) * y;
      denominator = (denominator + CODY_D[i]) * y;
    }
    return (numerator + CODY_C[7]) / (denominator + CODY_D[7]);
  }
  const s = 1 / (y * y);
  let numerator = 0.02307344176494017 * s;
  let denominator = s;
  for (let i = 0; i < 4; i += 1) {
    numerator = (numerator + CODY_P[i]) * s;
    denominator = (denominator + CODY_Q[i]) * s;
  }
  const correction = (s * (numerator + CODY_P[4])) / (denominator + CODY_Q[4]);
  return (INVERSE_ROOT_TWO_PI - correction) / y;
}

const CODY_C = [
  0.39894151208813466, 8.883149794388377, 93.50665613217785, 597.2702763948002, 2494.5375852903726,
  6848.190450536283, 11602.65143764735, 9842.714838383978,
];
const CODY_D = [
  22.266688044328117, 235.387901782625, 1519.3775994075547, 6485.558298266761, 18615.571640885097,
  34900.952721145979, 38912.00328609327, 19685.429676859992,
];
const CODY_P = [
  0.21589853405795699, 0.12740116116024736, 0.022235277870649807, 0.0014216191932278934,
  2.9112874951168793e-5,
];
const CODY_Q = [
  1.284260096144911, 0.4682382124808651, 0.06598813786892856, 0.0037823963320275824,
  7.297515550839662e-5,
];

/**
 * Quantile of the standard normal distribution without a check of its argument, for inner loops: Wichura's PPND16,
 * relative error about 1e-16 for p in (1e-316, 1).
 *
 * @param p probability, strictly between 0 and 1
 * @see M. J. Wichura, Algorithm AS 241: the percentage points of the normal distribution, Appl. Statist. 37 (1988)
 *      477-484, doi:10.2307/2347330
 */
export function normalQuantileUnchecked(p: number): number {
  const q = p - 0.5;
  if (q >= -0.425 && q <= 0.425) {
    const r = 0.180625 - q * q;
    return (
      (q *
        (((((((2509.0809287301227 * r + 33430.575583588128) * r + 67265.770927008701) * r +
          45921.953931549871) *
          r +
          13731.693765509461) *
          r +
          1971.5909503065514) *
          r +
          133.14166789178438) *
          r +
          3.3871328727963666)) /
      (((((((5226.495278852854 * r + 28729.085735721943) * r + 39307.895800092711) * r +
        21213.794301586596) *
        r +
        5394.1960214247511) *
        r +
        687.1870074920579) *
        r +
        42.313330701600911) *
        r +
        1)
    );
  }
  const r = Math.sqrt(-Math.log(q < 0 ? p : 1 - p));
  const z = r <= 5 ? middleTail(r - 1.6) : farTail(r - 5);
  return q < 0 ? -z : z;
}

function middleTail(r: number): number {
  return (
    (((((((7.7454501427834141e-4 * r + 0.022723844989269184) * r + 0.24178072517745061) * r +
      1.2704582524523684) *
      r +
      3.6478483247632045) *
      r +
      5.7694972214606914) *
      r +
      4.6303378461565453) *
      r +
      1.4234371107496835) /
    (((((((1.0507500716444169e-9 * r + 5.475938084995345e-4) * r + 0.015198666563616457) * r +
      0.14810397642748007) *
      r +
      0.6897673349851) *
      r +
      1.6763848301838038) *
      r +
      2.0531916266377588) *
      r +
      1)
  );
}

function farTail(r: number): number {
  return (
    (((((((2.0103343992922881e-7 * r + 2.7115555687434876e-5) * r + 0.0012426609473880784) * r +
      0.026532189526576123) *
      r +
      0.29656057182850489) *
      r +
      1.7848265399172913) *
      r +
      5.4637849111641144) *
      r +
      6.6579046435011038) /
    (((((((2.0442631033899397e-15 * r + 1.4215117583164459e-7) * r + 1.8463183175100547e-5) * r +
      7.868691311456133e-4) *
      r +
      0.014875361290850615) *
      r +
      0.13692988092273581) *
      r +
      0.59983220655588794) *
      r +
      1)
  );
}

/**
 * Quantile of the standard normal distribution.
 *
 * @param p probability, 0 to 1; the ends give minus and plus infinity
 * @throws {DomainError} when p is not a probability
 * @example normalQuantile(0.9) // => 1.28155156554460
 * @see normalQuantileUnchecked for the method
 */
export function normalQuantile(p: number): number {
  if (!(p >= 0 && p <= 1)) {
    throw new DomainError(`A probability lies between 0 and 1; ${p} does not.`, {
      input: "p",
      value: p,
    });
  }
  if (p === 0) return -Infinity;
  if (p === 1) return Infinity;
  return normalQuantileUnchecked(p);
}
