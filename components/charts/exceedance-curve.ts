export interface ExceedanceCurve {
  /** rising */
  values: readonly number[];
  /** chance of at least `values[i]`, from 1 down to 0 */
  probabilities: readonly number[];
}

/** Chance of at least `value`, straight between the points of the curve. */
export function chanceOf(curve: ExceedanceCurve, value: number): number {
  const { values, probabilities } = curve;
  const next = values.findIndex((known) => known >= value);
  if (next === -1) return 0;
  if (next === 0) return value < values[0] ? 1 : probabilities[0];
  const share = (value - values[next - 1]) / (values[next] - values[next - 1]);
  return probabilities[next - 1] + share * (probabilities[next] - probabilities[next - 1]);
}
