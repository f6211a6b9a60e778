import { DomainError } from "../errors";
import { TWO_TO_MINUS_32, type RandomStream } from "../numerics/random";
import { JOE_KUO_DIRECTIONS } from "./sobol-directions";

/** Dimensions for which there are direction numbers. */
export const SOBOL_DIMENSIONS = JOE_KUO_DIRECTIONS.length + 1;

const BITS = 32;
const known = new Map<number, Uint32Array>();

/**
 * The 32 direction numbers of one dimension, the binary point before the top bit:
 *
 *     v_j = m_j 2^(32-j),   m_j = 2 a_1 m_(j-1) xor ... xor 2^(s-1) a_(s-1) m_(j-s+1) xor 2^s m_(j-s) xor m_(j-s)
 *
 * @param dimension  0 to `SOBOL_DIMENSIONS` - 1
 * @see I. M. Sobol, On the distribution of points in a cube and the approximate evaluation of integrals, USSR Comput.
 *      Math. Math. Phys. 7 (1967) 86-112; S. Joe, F. Y. Kuo (2008), see `sobol-directions.ts`
 */
export function sobolDirections(dimension: number): Uint32Array {
  const before = known.get(dimension);
  if (before) return before;
  if (!Number.isInteger(dimension) || dimension < 0 || dimension >= SOBOL_DIMENSIONS) {
    throw new DomainError(`Sobol points have ${SOBOL_DIMENSIONS} dimensions, not ${dimension}.`, {
      input: "dimension",
      value: dimension,
    });
  }
  const directions =
    dimension === 0
      ? Uint32Array.from({ length: BITS }, (_, j) => 1 << (BITS - 1 - j))
      : recur(...JOE_KUO_DIRECTIONS[dimension - 1]);
  known.set(dimension, directions);
  return directions;
}

function recur(degree: number, coefficients: number, initial: readonly number[]): Uint32Array {
  const v = new Uint32Array(BITS);
  initial.forEach((m, j) => (v[j] = m << (BITS - 1 - j)));
  for (let j = degree; j < BITS; j += 1) {
    let next = v[j - degree] ^ (v[j - degree] >>> degree);
    for (let i = 1; i < degree; i += 1) {
      if ((coefficients >>> (degree - 1 - i)) & 1) next ^= v[j - i];
    }
    v[j] = next;
  }
  return v;
}

/**
 * The first 2^k points of a digital net in one dimension, as 32-bit fractions, in Gray-code order:
 *
 *     x_0 = shift,   x_(2^j + i) = x_(2^j - 1 - i) xor v_j,   0 <= i < 2^j
 *
 * @param directions  at least k of them
 * @param out         at least 2^k long
 * @see I. A. Antonov, V. M. Saleev, An economic method of computing LP-tau sequences, USSR Comput. Math. Math. Phys. 19
 *      (1979) 252-256 (the order)
 */
export function fillNet(directions: Uint32Array, shift: number, k: number, out: Uint32Array): void {
  out[0] = shift;
  for (let j = 0; j < k; j += 1) {
    const half = 1 << j;
    const v = directions[j];
    for (let i = 0; i < half; i += 1) out[half + i] = out[half - 1 - i] ^ v;
  }
}

const scrambled = new Uint32Array(BITS);
const words = new Uint32Array(BITS + 1);

/**
 * The first 2^k points of one dimension of a scrambled Sobol sequence: a random linear scramble of the digits (a random
 * lower triangular matrix over GF(2) with ones on its diagonal, times the direction numbers) and a random digital shift.
 * Every point is uniform on [0, 1), any number of points 2^j still has one in each of 2^j equal strata of the dimension,
 * and the net keeps its quality in all dimensions together.
 *
 * A scramble takes k + 1 numbers from the stream, so two scrambles from one stream are independent.
 *
 * @param k    0 to 32
 * @param out  at least 2^k long, 32-bit fractions; the stratum of 2^k is the top k bits
 * @see J. Matousek, On the L2-discrepancy for anchored boxes, J. Complexity 14 (1998) 527-556;
 *      A. B. Owen, Variance with alternative scramblings of digital nets, ACM Trans. Model. Comput. Simul. 13 (2003)
 *      363-378
 */
export function fillScrambled(
  dimension: number,
  random: RandomStream,
  k: number,
  out: Uint32Array,
): void {
  const directions = sobolDirections(dimension);
  random.fill(words, k + 1);
  for (let j = 0; j < k; j += 1) {
    // v_j has nothing below bit j, so the matrix's first j + 1 columns are all that it meets.
    let v = 0;
    for (let column = 0; column <= j; column += 1) {
      const diagonal = 0x80000000 >>> column;
      if (directions[j] & diagonal) v ^= diagonal | (words[column] & (diagonal - 1));
    }
    scrambled[j] = v;
  }
  fillNet(scrambled, words[k], k, out);
}

/** A 32-bit fraction as a probability strictly between 0 and 1: the middle of its interval. */
export function toProbability(fraction: number): number {
  return (fraction + 0.5) * TWO_TO_MINUS_32;
}
