/** Heptanes plus as a few pseudocomponents: by the gamma distribution, or by lumping a measured distribution. */
import type { HeavyComponent } from "../composition/heptanes-plus";
import { lumpFractions } from "../composition/heptanes-plus";
import type { HeptanesPlus } from "../composition/stream";
import { ConvergenceError, DomainError } from "../errors";

/** Offset and exponent of Soreide's specific gravity: g = 0.2855 + Cf (M - 66)^0.13 */
const SOREIDE = { base: 0.2855, origin: 66, exponent: 0.13 } as const;
/** Least distance of the mean molecular weight from the smallest one of the distribution, lb/lbmol. */
const LEAST_SPREAD = 4;
/** Beyond it no correlation says anything about a fraction, lb/lbmol. */
const LARGEST_MOLECULAR_WEIGHT = 2000;

/**
 * Smallest molecular weight of the gamma distribution that goes with its shape.
 *
 *     eta = 110 (1 - 1 / (1 + 4.043 a^-0.723))
 *
 * 88.2 for shape 1. From memory.
 *
 * @see C. H. Whitson, T. F. Anderson, I. Soreide, AIChE Spring National Meeting (1989), paper 19c
 */
export function smallestMolecularWeight(shape: number): number {
  return 110 * (1 - 1 / (1 + 4.043 * shape ** -0.723));
}

interface Quadrature {
  readonly nodes: readonly number[];
  /** add up to 1 */
  readonly weights: readonly number[];
}

/**
 * Gauss-Laguerre quadrature of the gamma density x^(a-1) e^-x / Gamma(a): n nodes and weights that integrate every
 * polynomial to degree 2n - 1 exactly. The nodes are the roots of the orthogonal polynomials of the recurrence
 *
 *     p(k+1) = (x - 2k - a) p(k) - k (k + a - 1) p(k-1)
 *
 * and the weights follow from the norms (Golub and Welsch 1969, Christoffel numbers).
 *
 * @example gaussLaguerre(2, 1) // => { nodes: [0.585786, 3.414214], weights: [0.853553, 0.146447] }
 */
export function gaussLaguerre(count: number, shape: number): Quadrature {
  const polynomials = (x: number, degree: number) => {
    const values = [1, x - shape];
    for (let k = 1; k < degree; k += 1) {
      values.push((x - 2 * k - shape) * values[k] - k * (k + shape - 1) * values[k - 1]);
    }
    return values;
  };
  // the roots of each degree lie strictly between those of the one before (and its ends)
  let nodes = [shape];
  for (let degree = 2; degree <= count; degree += 1) {
    const value = (x: number) => polynomials(x, degree)[degree];
    const ends = [0, ...nodes, 4 * degree + 2 * shape + 10];
    nodes = ends.slice(1).map((high, index) => bisect(value, ends[index], high));
  }
  const weights = nodes.map((x) => {
    let norm = 1;
    let sum = 1;
    polynomials(x, count - 1)
      .slice(1, count)
      .forEach((value, index) => {
        norm *= (index + 1) * (index + shape);
        sum += (value * value) / norm;
      });
    return 1 / sum;
  });
  return { nodes, weights };
}

/** A root between two points where a function has opposite signs, to the last digit. */
function bisect(value: (x: number) => number, from: number, to: number): number {
  let low = from;
  let high = to;
  const rising = value(high) > 0;
  for (let iteration = 0; iteration < 200; iteration += 1) {
    const middle = 0.5 * (low + high);
    if (middle === low || middle === high) return middle;
    if (value(middle) > 0 === rising) high = middle;
    else low = middle;
  }
  return 0.5 * (low + high);
}

/**
 * Splits heptanes plus into fractions by Whitson's three-parameter gamma distribution, molecular weights at the nodes
 * of its Gauss-Laguerre quadrature, specific gravities by Soreide with the one constant that gives the bulk's. Moles,
 * mass and liquid volume at 60 degF are those of the whole.
 *
 *     p(M) = (M - eta)^(a-1) exp(-(M - eta)/b) / (b^a Gamma(a))        b = (M7+ - eta) / a
 *     M_i = eta + b X_i        z_i = z7+ W_i        g_i = 0.2855 + Cf (M_i - 66)^0.13
 *
 * @param whole      its mole fraction, molecular weight and specific gravity
 * @param fractions  2 to 5
 * @param shape      0.5 to 2.5; condensates have 0.5 to 1.5
 * @throws {DomainError} when the molecular weight leaves no room above the smallest one, or a fraction would be heavier
 *   than 2,000
 * @throws {ConvergenceError} when no distribution of specific gravity has this bulk value
 * @example gammaSplit({ moleFraction: 0.0659, molecularWeight: 140, specificGravity: 0.774 }, 3, 1)
 *   // => moleFraction 0.046861, 0.018354, 0.000685
 * @see C. H. Whitson, SPE J. 23 (Aug. 1983) 683-694; I. Soreide (1989)
 */
export function gammaSplit(whole: HeptanesPlus, fractions: number, shape: number): HeptanesPlus[] {
  const smallest = smallestMolecularWeight(shape);
  if (!(whole.molecularWeight >= smallest + LEAST_SPREAD)) {
    throw new DomainError(
      `Heptanes plus of molecular weight ${whole.molecularWeight.toFixed(1)} cannot be split: the lightest fraction of ` +
        `this distribution already has ${smallest.toFixed(1)}. Keep it whole, or raise the shape.`,
      { input: "characterisation.split", value: whole.molecularWeight },
    );
  }
  const scale = (whole.molecularWeight - smallest) / shape;
  const { nodes, weights } = gaussLaguerre(fractions, shape);
  const molecularWeights = nodes.map((node) => smallest + scale * node);
  const heaviest = molecularWeights[fractions - 1];
  if (!(heaviest <= LARGEST_MOLECULAR_WEIGHT)) {
    throw new DomainError(
      `${fractions} fractions of this shape put the heaviest at a molecular weight of ${Math.round(heaviest)}, where ` +
        "nothing is known of its properties. Take fewer fractions, or raise the shape.",
      { input: "characterisation.split", value: heaviest },
    );
  }
  const factor = gravityFactor(whole, molecularWeights, weights);
  return molecularWeights.map((molecularWeight, index) => ({
    moleFraction: whole.moleFraction * weights[index],
    molecularWeight,
    specificGravity: gravityByWeight(molecularWeight, factor),
  }));
}

const gravityByWeight = (molecularWeight: number, factor: number) =>
  SOREIDE.base + factor * (molecularWeight - SOREIDE.origin) ** SOREIDE.exponent;

/** Soreide's Cf, usually 0.27 to 0.31, at which the fractions' volumes add up to the bulk's. */
function gravityFactor(
  { molecularWeight, specificGravity }: HeptanesPlus,
  molecularWeights: readonly number[],
  weights: readonly number[],
): number {
  const volumeError = (factor: number) =>
    molecularWeights.reduce(
      (sum, weight, index) => sum + (weights[index] * weight) / gravityByWeight(weight, factor),
      0,
    ) -
    molecularWeight / specificGravity;
  const [low, high] = [0.1, 0.6];
  if (!(volumeError(low) > 0 && volumeError(high) < 0)) {
    throw new ConvergenceError("No fractions of heptanes plus have its specific gravity", {
      molecularWeight,
      specificGravity,
    });
  }
  return bisect(volumeError, low, high);
}

/**
 * Lumps the measured fractions of an extended analysis into neighbours of like molecular weight: of all divisions into
 * contiguous groups, the one with the least mass-weighted variance of ln M within them (Fisher 1958, exact by dynamic
 * programming). Fewer fractions than asked for stay as they are.
 *
 * @param measured  in order of carbon number
 * @example lumpMeasured(c7ToC30Plus, 3).length // => 3
 * @see W. D. Fisher, J. Am. Stat. Assoc. 53 (1958) 789-798
 */
export function lumpMeasured(measured: readonly HeavyComponent[], groups: number): HeptanesPlus[] {
  const lump = (from: number, to: number) => lumpFractions(measured.slice(from, to))!;
  const n = measured.length;
  if (n <= groups) return measured.map((_, index) => lump(index, index + 1));
  const spread = (from: number, to: number) => {
    let mass = 0;
    let first = 0;
    let second = 0;
    for (const { moleFraction, molecularWeight } of measured.slice(from, to)) {
      const weight = moleFraction * molecularWeight;
      const ln = Math.log(molecularWeight);
      mass += weight;
      first += weight * ln;
      second += weight * ln * ln;
    }
    return second - (first * first) / mass;
  };
  // best[k][end]: least spread of the first `end` fractions in k + 1 groups; cut[k][end]: where the last one begins
  const best = [Array.from({ length: n + 1 }, (_, end) => (end ? spread(0, end) : Infinity))];
  const cut: number[][] = [new Array<number>(n + 1).fill(0)];
  for (let k = 1; k < groups; k += 1) {
    const costs = new Array<number>(n + 1).fill(Infinity);
    const begins = new Array<number>(n + 1).fill(0);
    for (let end = k + 1; end <= n; end += 1) {
      for (let begin = k; begin < end; begin += 1) {
        const cost = best[k - 1][begin] + spread(begin, end);
        if (cost < costs[end]) {
          costs[end] = cost;
          begins[end] = begin;
        }
      }
    }
    best.push(costs);
    cut.push(begins);
  }
  const lumps: HeptanesPlus[] = [];
  for (let k = groups - 1, end = n; k >= 0; k -= 1) {
    const begin = k === 0 ? 0 : cut[k][end];
    lumps.unshift(lump(begin, end));
    end = begin;
  }
  return lumps;
}
