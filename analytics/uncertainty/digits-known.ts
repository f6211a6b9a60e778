/** What a screen shows of a volume. */
const DIGITS_SHOWN = 3;

export interface DigitsKnown {
  /** significant digits that the sampling error leaves standing, 0 or more */
  digits: number;
  /** whether that is at least as many as are shown */
  enough: boolean;
  /** trials after which they would be, if the error falls as the root of their number; null when it is enough */
  trialsNeeded: number | null;
}

/**
 * Whether a figure's standard error is too large for the digits it is shown with. A digit counts as known when one
 * standard error is at most half a unit of it, so that rounding and sampling move it about as much:
 *
 *     error <= 0.5 x 10^(floor(log10 |value|) - digits + 1)
 *
 * @param value          the figure, such as a P90
 * @param standardError  0 or more, in its unit
 * @param trials         that it comes from
 * @param shown          significant digits that are shown
 * @see Joint Committee for Guides in Metrology, Evaluation of measurement data, Supplement 1: propagation of
 *      distributions using a Monte Carlo method, JCGM 101:2008, section 7.9.2 (the tolerance of half a unit; the supplement asks
 *      twice the standard error to stay below it)
 */
export function digitsKnown(
  value: number,
  standardError: number,
  trials: number,
  shown: number = DIGITS_SHOWN,
): DigitsKnown {
  if (value === 0 || standardError === 0) return { digits: 15, enough: true, trialsNeeded: null };
  const magnitude = Math.floor(Math.log10(Math.abs(value)));
  const unit = Math.log10(2 * standardError);
  const digits = Math.max(0, Math.floor(magnitude + 1 - unit));
  if (digits >= shown) return { digits, enough: true, trialsNeeded: null };
  const largest = 0.5 * 10 ** (magnitude - shown + 1);
  return {
    digits,
    enough: false,
    trialsNeeded: Math.ceil(trials * (standardError / largest) ** 2),
  };
}
