import type { Distribution, SimpleDistribution } from "./distribution-schema";

/** A value that is taken with a chance of its own, above 0: a constant, a tie in data. */
export interface Atom {
  readonly value: number;
  /** 0 to 1 */
  readonly probability: number;
}

/** One case of a set of scenarios, ready for use. */
export interface CompiledCase {
  readonly name: string;
  /** chance of the case; those of one set add up to exactly 1 but for rounding */
  readonly weight: number;
  readonly compiled: CompiledDistribution;
}

/**
 * A distribution ready for use. `quantile(0.1)` is P90, the value that is reached with a chance of 90 %.
 */
export interface CompiledDistribution {
  readonly definition: Distribution;
  /** @param p cumulative probability, 0 to 1; where values have chances of their own, the smallest value with `cdf` >= p */
  quantile(p: number): number;
  /** chance of at most `x` */
  cdf(x: number): number;
  /** density per unit of x of what is not in `atoms`; 0 everywhere for a constant, which has none */
  pdf(x: number): number;
  readonly mean: number;
  readonly standardDeviation: number;
  /** after truncation, so a truncated `lognormalP90P10` need not return the figures it was given */
  readonly range: { p90: number; p50: number; p10: number };
  /** the interval it lies in; infinite where it has no end */
  readonly support: { minimum: number; maximum: number };
  /**
   * probability that truncation removed from the distribution as described, 0 to 0.99; of scenarios, the mean over all
   * cases by their weights
   */
  readonly lostMass: number;
  /** values with chances of their own, ascending; empty for a distribution that has a density everywhere */
  readonly atoms: readonly Atom[];
  /**
   * the scenarios that this is a mixture of, in the order they were given; null for every other kind. A trial of a set
   * that inputs share takes the same case in each of them and then a quantile of `cases[i].compiled`
   */
  readonly cases: readonly CompiledCase[] | null;
  /** what the shared set of cases is called; null for other kinds, and for scenarios of this input alone */
  readonly caseSet: string | null;
  /**
   * Quantiles of `count` ascending probabilities strictly between 0 and 1, written to `out`: for sampling. The
   * probabilities are overwritten when the distribution is truncated.
   */
  fillQuantiles(probabilities: Float64Array, count: number, out: Float64Array): void;
}

/** A kind that can be cut off at bounds. */
export type Bounded = Exclude<SimpleDistribution, { kind: "constant" }>;
