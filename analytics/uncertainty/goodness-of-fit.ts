/** Whether values can have come from a normal distribution whose mean and standard deviation they themselves gave. */
import { normalCdf } from "../numerics/normal";

export interface TestResult {
  readonly statistic: number;
  /** chance of a statistic this large when the values do come from the distribution; null where no table reaches */
  readonly pValue: number | null;
}

export interface GoodnessOfFit {
  /** weighs the tails */
  readonly andersonDarling: TestResult;
  /** largest distance between the two distribution functions */
  readonly lilliefors: TestResult;
}

/** Fewer values have no p-value by Anderson and Darling's test. */
export const ANDERSON_DARLING_VALUES = 8;
/** Fewer values have no p-value by Lilliefors' test. */
export const LILLIEFORS_VALUES = 5;
/** A fit with a smaller p-value is contradicted by its data. */
export const CONTRADICTED_BELOW = 0.05;

/**
 * Two tests of normality with estimated mean and standard deviation (divisor n - 1). For a lognormal distribution give
 * the logarithms.
 *
 * How near the p-values come (100,000 simulated samples of each size): up to 0.1, where a fit is judged, both are within
 * 0.01 at every size. Above, Lilliefors' is within 0.035 at 5 values and 0.02 from 6 on, Anderson and Darling's within
 * 0.06 at 8 values, 0.04 at 12 and 0.03 from 20 on.
 *
 * @param values  at least 2, not all the same
 * @see M. A. Stephens, in R. B. D'Agostino, M. A. Stephens (eds), Goodness-of-Fit Techniques (1986), table 4.9
 * @see G. E. Dallal, L. Wilkinson, An analytic approximation to the distribution of Lilliefors's test statistic for
 *      normality, Am. Stat. 40 (1986) 294-296
 */
export function testNormality(values: readonly number[]): GoodnessOfFit {
  const n = values.length;
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const deviation = Math.sqrt(squares / (n - 1));
  const scores = values.map((value) => (value - mean) / deviation).sort((a, b) => a - b);
  return { andersonDarling: andersonDarling(scores), lilliefors: lilliefors(scores) };
}

/** The contradiction of either test counts. */
export function isContradicted({ andersonDarling, lilliefors }: GoodnessOfFit): boolean {
  return [andersonDarling, lilliefors].some(
    ({ pValue }) => pValue !== null && pValue < CONTRADICTED_BELOW,
  );
}

/**
 *     A^2 = -n - (1/n) sum (2i - 1) (ln F(z_i) + ln(1 - F(z_(n+1-i)))),   corrected (1 + 0.75/n + 2.25/n^2) A^2
 *
 * The statistic is A^2 itself; the p-value is that of the corrected one.
 */
function andersonDarling(scores: readonly number[]): TestResult {
  const n = scores.length;
  const sum = scores.reduce(
    (total, score, i) =>
      total + (2 * i + 1) * (logNormalCdf(score) + logNormalCdf(-scores[n - 1 - i])),
    0,
  );
  const statistic = -n - sum / n;
  if (n < ANDERSON_DARLING_VALUES) return { statistic, pValue: null };
  const a = statistic * (1 + 0.75 / n + 2.25 / n ** 2);
  return { statistic, pValue: andersonDarlingChance(a) };
}

/** Beyond, the distribution function leaves the range of doubles; a lone outlier among 2,000 values gets there. */
const FAR_TAIL = -37;

/** ln F(z); in the far tail by the leading term of its asymptotic series, -z^2 / 2 - ln(-z sqrt(2 pi)). */
function logNormalCdf(z: number): number {
  if (z > FAR_TAIL) return Math.log(normalCdf(z));
  return -0.5 * z * z - Math.log(-z * Math.sqrt(2 * Math.PI));
}

function andersonDarlingChance(a: number): number {
  if (a < 0.2) return 1 - Math.exp(-13.436 + 101.14 * a - 223.73 * a ** 2);
  if (a < 0.34) return 1 - Math.exp(-8.318 + 42.796 * a - 59.938 * a ** 2);
  if (a < 0.6) return Math.exp(0.9177 - 4.279 * a - 1.38 * a ** 2);
  // The last polynomial turns upwards beyond; nothing that far out is worth more digits than none.
  return a < 10 ? Math.exp(1.2937 - 5.709 * a + 0.0186 * a ** 2) : 0;
}

/** Largest step between the stairs of the values and the distribution function, on either side of a stair. */
function lilliefors(scores: readonly number[]): TestResult {
  const n = scores.length;
  const statistic = scores.reduce((largest, score, i) => {
    const p = normalCdf(score);
    return Math.max(largest, (i + 1) / n - p, p - i / n);
  }, 0);
  return {
    statistic,
    pValue: n < LILLIEFORS_VALUES ? null : lillieforsChance(statistic, n),
  };
}

/**
 * Dallal and Wilkinson's formula holds for p-values of at most 0.1; above, Stephens' modified statistic with a
 * polynomial for its p-value, as statistical packages use.
 */
function lillieforsChance(statistic: number, n: number): number {
  const d = n > 100 ? statistic * (n / 100) ** 0.49 : statistic;
  const m = Math.min(n, 100);
  const p = Math.exp(
    -7.01256 * d ** 2 * (m + 2.78019) +
      2.99587 * d * Math.sqrt(m + 2.78019) -
      0.122119 +
      0.974598 / Math.sqrt(m) +
      1.67997 / m,
  );
  if (p <= 0.1) return p;
  const k = (Math.sqrt(n) - 0.01 + 0.85 / Math.sqrt(n)) * statistic;
  if (k <= 0.302) return 1;
  if (k <= 0.5) return polynomial(k, [2.76773, -19.828315, 80.709644, -138.55152, 81.218052]);
  if (k <= 0.9) return polynomial(k, [-4.901232, 40.662806, -97.490286, 94.029866, -32.355711]);
  if (k <= 1.31) return polynomial(k, [6.198765, -19.558097, 23.186922, -12.234627, 2.423045]);
  return 0;
}

const polynomial = (x: number, coefficients: readonly number[]) =>
  coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
