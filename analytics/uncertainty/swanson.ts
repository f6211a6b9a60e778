/**
 * Swanson's mean of a range: 0.3 P90 + 0.4 P50 + 0.3 P10. Exact for a normal distribution; within about 1 % for a
 * lognormal with P10/P90 up to about 10, and too low beyond (Hurst, Brown and Swanson 2000, AAPG Bulletin 84(12),
 * 1883-1891).
 *
 * @param range  three percentiles in any one unit; the answer has that unit
 */
export function swansonMean({ p90, p50, p10 }: { p90: number; p50: number; p10: number }): number {
  return 0.3 * p90 + 0.4 * p50 + 0.3 * p10;
}
