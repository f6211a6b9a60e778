/** Quantile of the standard normal distribution at 0.975. */
const HALF_WIDTH_95 = 1.959964;
/** More than these are never shown. */
const MOST_DIGITS = 12;

/**
 * How many significant digits of an estimate hold: those whose last place the 95 % interval leaves within one. 0 when
 * not even the first does. Common practice, no source.
 *
 * @param value          in any unit
 * @param standardError  of sampling, in the same unit, 0 or more; 0 knows every digit
 * @returns 0 to 12
 */
export function digitsKnown(value: number, standardError: number): number {
  if (standardError <= 0) return MOST_DIGITS;
  if (value === 0) return 0;
  const leading = Math.floor(Math.log10(Math.abs(value)));
  const place = Math.ceil(Math.log10(HALF_WIDTH_95 * standardError) - 1e-12);
  return Math.min(MOST_DIGITS, Math.max(0, leading - place + 1));
}
