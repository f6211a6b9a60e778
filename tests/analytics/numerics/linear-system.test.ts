import { describe, expect, it } from "vitest";
import { solveLinear, solveShifted } from "@/analytics/numerics/linear-system";

// A x = b with x = (1, 2, 3), multiplied out by hand.
const matrix = [0, 2, 1, 4, 1, 0, 1, 1, 1];
const right = [7, 6, 6];

describe("solveLinear", () => {
  it("solves a system that needs its rows exchanged", () => {
    const b = Float64Array.from(right);
    expect(solveLinear(Float64Array.from(matrix), b, 3)).toBe(true);
    [1, 2, 3].forEach((value, i) => expect(b[i]).toBeCloseTo(value, 14));
  });

  it("says when there is no solution", () => {
    expect(solveLinear(Float64Array.of(1, 2, 2, 4), Float64Array.of(1, 1), 2)).toBe(false);
    expect(solveLinear(Float64Array.of(NaN, 0, 0, 1), Float64Array.of(1, 1), 2)).toBe(false);
  });
});

describe("solveShifted", () => {
  const symmetric = Float64Array.of(4, 1, 1, 3);

  it("solves a positive definite system, and the shifted one", () => {
    // (4 1; 1 3) x = (6, 7) has x = (1, 2); with 1 added to the diagonal (5 1; 1 4) x = (7, 9) has it, too
    const b = Float64Array.of(6, 7);
    expect(solveShifted(symmetric, 0, new Float64Array(4), b, 2)).toBe(true);
    expect(b[0]).toBeCloseTo(1, 14);
    expect(b[1]).toBeCloseTo(2, 14);
    const shifted = Float64Array.of(7, 9);
    solveShifted(symmetric, 1, new Float64Array(4), shifted, 2);
    expect(shifted[0]).toBeCloseTo(1, 14);
    expect(shifted[1]).toBeCloseTo(2, 14);
  });

  it("leaves the right-hand side alone when the matrix is not positive definite", () => {
    const b = Float64Array.of(1, 2);
    expect(solveShifted(Float64Array.of(1, 2, 2, 1), 0, new Float64Array(4), b, 2)).toBe(false);
    expect([...b]).toEqual([1, 2]);
  });
});
