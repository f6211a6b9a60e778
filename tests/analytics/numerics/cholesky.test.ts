import { describe, expect, it } from "vitest";
import { choleskyFactor, invertLower } from "@/analytics/numerics/cholesky";

describe("choleskyFactor", () => {
  it("factors the textbook matrix with whole numbers", () => {
    // Example of A. L. Cholesky's method in common use: L = [2 0 0; 6 1 0; -8 5 3].
    const matrix = Float64Array.from([4, 12, -16, 12, 37, -43, -16, -43, 98]);
    expect([...(choleskyFactor(matrix, 3) ?? [])]).toEqual([2, 0, 0, 6, 1, 0, -8, 5, 3]);
  });

  it("gives null for correlations that no variables can have", () => {
    const matrix = Float64Array.from([1, 0.9, -0.9, 0.9, 1, 0.9, -0.9, 0.9, 1]);
    expect(choleskyFactor(matrix, 3)).toBeNull();
  });
});

describe("invertLower", () => {
  it("gives the identity with its argument", () => {
    const lower = Float64Array.from([2, 0, 0, 6, 1, 0, -8, 5, 3]);
    const inverse = invertLower(lower, 3);
    for (let i = 0; i < 3; i += 1) {
      for (let j = 0; j < 3; j += 1) {
        const sum = [0, 1, 2].reduce((s, k) => s + lower[i * 3 + k] * inverse[k * 3 + j], 0);
        expect(sum).toBeCloseTo(i === j ? 1 : 0, 14);
      }
    }
  });
});
