/**
 * Slopes of the piecewise cubic through points that rises where the points rise, falls where they fall and never leaves
 * the range of two neighbours. Inside, the harmonic mean of the neighbouring slopes, weighted by the widths of the
 * intervals (Fritsch and Butland); at the ends the three-point formula, limited to keep the shape.
 *
 *     m[i] = 0 when s[i-1] s[i] <= 0, else 3 (h0 + h1) / ((2 h1 + h0) / s[i-1] + (h1 + 2 h0) / s[i])
 *
 * @param x  strictly rising, at least two
 * @param y  as many
 * @see F. N. Fritsch, R. E. Carlson, Monotone piecewise cubic interpolation, SIAM J. Numer. Anal. 17 (1980) 238-246;
 *      F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300-304 (the mean)
 * @example monotoneSlopes([0, 1, 2], [0, 1, 2]) // => [1, 1, 1]
 */
export function monotoneSlopes(x: readonly number[], y: readonly number[]): number[] {
  const last = x.length - 1;
  const width = (i: number) => x[i + 1] - x[i];
  const secant = (i: number) => (y[i + 1] - y[i]) / width(i);
  if (last === 1) return [secant(0), secant(0)];
  return x.map((_, i) => {
    if (i === 0) return endSlope(width(0), width(1), secant(0), secant(1));
    if (i === last) {
      return endSlope(width(last - 1), width(last - 2), secant(last - 1), secant(last - 2));
    }
    const before = secant(i - 1);
    const after = secant(i);
    if (before * after <= 0) return 0;
    const h0 = width(i - 1);
    const h1 = width(i);
    return (3 * (h0 + h1)) / ((2 * h1 + h0) / before + (h1 + 2 * h0) / after);
  });
}

function endSlope(h0: number, h1: number, near: number, far: number): number {
  const slope = ((2 * h0 + h1) * near - h0 * far) / (h0 + h1);
  if (slope * near <= 0) return 0;
  return near * far <= 0 && Math.abs(slope) > 3 * Math.abs(near) ? 3 * near : slope;
}

/**
 * The curve of `monotoneSlopes` at `count` equally spaced places from the first x to the last, both included.
 *
 * @returns  as long as `count`; its ends are the first and the last y exactly
 */
export function sampleMonotone(
  x: readonly number[],
  y: readonly number[],
  count: number,
): Float64Array {
  const slopes = monotoneSlopes(x, y);
  const out = new Float64Array(count);
  const first = x[0];
  const span = x[x.length - 1] - first;
  let i = 0;
  for (let k = 0; k < count; k += 1) {
    const at = first + (span * k) / (count - 1);
    while (i < x.length - 2 && at > x[i + 1]) i += 1;
    const h = x[i + 1] - x[i];
    const t = Math.min(1, (at - x[i]) / h);
    const rest = 1 - t;
    out[k] =
      rest * rest * ((1 + 2 * t) * y[i] + t * h * slopes[i]) +
      t * t * ((3 - 2 * t) * y[i + 1] - rest * h * slopes[i + 1]);
  }
  out[0] = y[0];
  out[count - 1] = y[y.length - 1];
  return out;
}
