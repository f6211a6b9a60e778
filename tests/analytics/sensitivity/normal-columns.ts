import { normalQuantile } from "@/analytics/numerics/normal";
import { fillUniforms } from "@/analytics/sensitivity/base-samples";

/** Columns of independent standard normal numbers. */
export function normalColumns(count: number, trials: number, seed = 1): Float64Array[] {
  const columns = Array.from({ length: count }, () => new Float64Array(trials));
  fillUniforms(seed, 0, columns);
  return columns.map((column) => column.map(normalQuantile));
}

/** Column by column sums. */
export function combine(...terms: [weight: number, column: Float64Array][]): Float64Array {
  return terms[0][1].map((_, t) => terms.reduce((sum, [w, column]) => sum + w * column[t], 0));
}
