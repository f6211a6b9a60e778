/**
 * Spearman's rank correlation of two sets of ranks 0..n-1 without ties: 1 - 6 sum (a - b)^2 / (n (n^2 - 1)). For arrays
 * that are too long for a library's.
 */
export function spearman(a: Uint32Array, b: Uint32Array, count: number): number {
  let sum = 0;
  for (let i = 0; i < count; i += 1) sum += (a[i] - b[i]) ** 2;
  return 1 - (6 * sum) / (count * (count * count - 1));
}
