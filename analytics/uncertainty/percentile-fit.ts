import { DomainError } from "../errors";
import { normalQuantile } from "../numerics/normal";
import { findRoot } from "../numerics/root";
import { EXCEEDANCES, type PercentileFamily } from "./distribution-schema";
import {
  lognormalFamily,
  normalFamily,
  pertFamily,
  triangularFamily,
  type Family,
} from "./families";
import { MOST_SIGMA, requireHonestSigma } from "./parameter-checks";
import { unitQuantile, type Limits, type ModeFamily } from "./range-ends";
import { growth, shiftedLognormalFamily } from "./shifted-lognormal";

/** A stated percentile: the chance of at least `value`. */
export interface PercentilePoint {
  /** within `EXCEEDANCES` */
  readonly exceedance: number;
  readonly value: number;
}

export interface PercentileFit {
  readonly family: Family;
  /** what the fitted distribution has at each point, in the order the points were given */
  readonly given: readonly number[];
  /** of a triangular or PERT fit */
  readonly limits: Limits | null;
}

const NAMES: Record<PercentileFamily, string> = {
  normal: "normal",
  lognormal: "lognormal",
  shiftedLognormal: "shifted lognormal",
  triangular: "triangular",
  pert: "PERT",
};

/**
 * A distribution through stated percentiles.
 *
 * Normal and lognormal have two parameters: two points fix them, and through three they are fitted by least squares of
 * the values (of their logarithms) against the normal quantiles. The other families have three: a shifted lognormal
 * goes through any three points in order; a triangular or PERT distribution does where its mode can lie between its
 * limits, and is otherwise the closest one, its mode at a limit, by least squares.
 *
 * @throws {DomainError} when a smaller chance of exceeding goes with a smaller or the same value, points are too few for
 *   the family, a chance lies too far out, a lognormal has a value of 0 or below, or the points are too skew; `input` is a path such as
 *   `points.1.value`
 */
export function fitPercentiles(
  family: PercentileFamily,
  points: readonly PercentilePoint[],
): PercentileFit {
  const ordered = inOrder(points);
  const isPair = family === "normal" || family === "lognormal";
  if (!isPair && points.length < 3) {
    throw new DomainError(
      `A ${NAMES[family]} distribution has three parameters and needs three percentiles; ${points.length} are given. ` +
        "Add one, or choose normal or lognormal.",
      { input: "points", value: points.length },
    );
  }
  const fit = fitOrdered(family, ordered, points);
  return {
    ...fit,
    given: points.map(({ exceedance }) => fit.family.quantile(1 - exceedance)),
  };
}

/** Points from the lowest value to the highest, found to agree with each other. */
function inOrder(points: readonly PercentilePoint[]): PercentilePoint[] {
  const ordered = [...points].sort((a, b) => b.exceedance - a.exceedance);
  const inputOf = (point: PercentilePoint, part: string) =>
    `points.${points.indexOf(point)}.${part}`;
  ordered.forEach((point, i) => {
    if (!(point.exceedance >= EXCEEDANCES[0] && point.exceedance <= EXCEEDANCES[1])) {
      throw new DomainError(
        `The chance of a percentile must lie between 0.0001 and 0.9999; ${point.exceedance} does not. Nobody knows what ` +
          "lies further out.",
        { input: inputOf(point, "exceedance"), value: point.exceedance },
      );
    }
    if (i === 0) return;
    const before = ordered[i - 1];
    if (point.exceedance === before.exceedance) {
      throw new DomainError(`${nameOf(point)} is given twice. Each percentile has one value.`, {
        input: inputOf(point, "exceedance"),
        value: point.exceedance,
      });
    }
    if (!(point.value > before.value)) {
      throw new DomainError(
        `${nameOf(point)} is ${point.value} and ${nameOf(before)} is ${before.value}. A value that is exceeded less ` +
          "often is greater: P10 lies above P50, and P50 above P90.",
        { input: inputOf(point, "value"), value: point.value },
      );
    }
  });
  return ordered;
}

/** P90 for an exceedance of 0.9. */
export function nameOf({ exceedance }: { exceedance: number }): string {
  const percent = Number((100 * exceedance).toPrecision(6));
  return `P${percent < 10 ? `0${percent}` : percent}`;
}

function fitOrdered(
  family: PercentileFamily,
  ordered: readonly PercentilePoint[],
  points: readonly PercentilePoint[],
): Omit<PercentileFit, "given"> {
  const scores = ordered.map(({ exceedance }) => -normalQuantile(exceedance));
  const values = ordered.map(({ value }) => value);
  switch (family) {
    case "normal": {
      const { intercept, slope } = straightLine(scores, values);
      return { family: normalFamily(intercept, slope), limits: null };
    }
    case "lognormal": {
      if (!(values[0] > 0)) {
        throw new DomainError(
          `A lognormal distribution lies above 0 throughout; ${nameOf(ordered[0])} is ${values[0]}.`,
          { input: `points.${points.indexOf(ordered[0])}.value`, value: values[0] },
        );
      }
      const { intercept, slope } = straightLine(
        scores,
        values.map((value) => Math.log(value)),
      );
      requireHonestSigma("points", slope);
      return { family: lognormalFamily(intercept, slope), limits: null };
    }
    case "shiftedLognormal":
      return { family: throughThree(scores, values), limits: null };
    case "triangular":
    case "pert": {
      const limits = limitsThrough(family, ordered);
      const { low, mode, high } = limits;
      const make = family === "pert" ? pertFamily : triangularFamily;
      return { family: make(low, mode, high), limits };
    }
  }
}

/** Least squares of y on x. */
function straightLine(x: readonly number[], y: readonly number[]) {
  const mean = (values: readonly number[]) =>
    values.reduce((sum, value) => sum + value, 0) / values.length;
  const [meanX, meanY] = [mean(x), mean(y)];
  let covariance = 0;
  let variance = 0;
  x.forEach((value, i) => {
    covariance += (value - meanX) * (y[i] - meanY);
    variance += (value - meanX) ** 2;
  });
  const slope = covariance / variance;
  return { intercept: meanY - slope * meanX, slope };
}

/**
 * The shifted lognormal through three points. Its sigma is where
 *
 *     (e^(sigma z3) - e^(sigma z2)) / (e^(sigma z2) - e^(sigma z1)) = (x3 - x2) / (x2 - x1)
 *
 * whose left side rises with sigma from 0 to infinity, so there is one for any three points in order. One beyond
 * `MOST_SIGMA` is refused: with P90, P50 and P10 one gap is then more than 13 times the other.
 */
function throughThree([z1, z2, z3]: readonly number[], [x1, x2, x3]: readonly number[]): Family {
  const skew = Math.log((x3 - x2) / (x2 - x1));
  const shape = (sigma: number) =>
    Math.log(((z3 - z2) * growth(sigma * (z3 - z2))) / ((z2 - z1) * growth(-sigma * (z2 - z1))));
  if (!(skew > shape(-MOST_SIGMA) && skew < shape(MOST_SIGMA))) {
    const ratio = Math.exp(Math.abs(skew));
    const times = ratio < 1e6 ? `${Number(ratio.toPrecision(3))}` : "more than a million";
    throw new DomainError(
      `The three values are too skew for a distribution: one of the two gaps is ${times} times the other, so its long end ` +
        "would reach far beyond what was stated and carry the mean. Check the middle value.",
      { input: "points", value: x2 },
    );
  }
  const sigma = findRoot((candidate) => shape(candidate) - skew, -MOST_SIGMA, MOST_SIGMA);
  const scale = (x2 - x1) / (Math.exp(sigma * z1) * (z2 - z1) * growth(sigma * (z2 - z1)));
  return shiftedLognormalFamily(x2 - scale * z2 * growth(sigma * z2), scale, sigma);
}

/**
 * Limits and mode of the family through three points: with q1, q2, q3 the unit quantiles, the place t of the mode solves
 *
 *     (q2(t) - q1(t)) / (q3(t) - q1(t)) = (x2 - x1) / (x3 - x1)
 *
 * Where no t from 0 to 1 does, the nearer end is the closest fit, and low and width follow by least squares.
 */
function limitsThrough(family: ModeFamily, ordered: readonly PercentilePoint[]): Limits {
  const values = ordered.map(({ value }) => value);
  const quantilesAt = (share: number) =>
    ordered.map(({ exceedance }) => unitQuantile(family, 1 - exceedance, share));
  const wanted = (values[1] - values[0]) / (values[2] - values[0]);
  const middle = (share: number) => {
    const [q1, q2, q3] = quantilesAt(share);
    return (q2 - q1) / (q3 - q1);
  };
  const [first, last] = [middle(0), middle(1)];
  const share =
    wanted <= first ? 0 : wanted >= last ? 1 : findRoot((t) => middle(t) - wanted, 0, 1);
  const { intercept: low, slope: width } = straightLine(quantilesAt(share), values);
  return { low, mode: low + share * width, high: low + width };
}
