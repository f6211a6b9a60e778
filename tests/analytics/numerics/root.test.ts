import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ConvergenceError } from "@/analytics/errors";
import { findRoot } from "@/analytics/numerics/root";

describe("findRoot", () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    // x = cos x: the Dottie number, OEIS A003957
    ["cos x - x", (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    // x^3 - 2x - 5: Wallis' own example, root 2.0945514815423265 (OEIS A007493)
    ["x^3 - 2x - 5", (x) => x ** 3 - 2 * x - 5, 2, 3, 2.0945514815423265],
    // A flat approach, closed form
    ["(x - 1)^9", (x) => (x - 1) ** 9, 0, 3, 1],
    ["a root at an end", (x) => x - 2, 2, 5, 2],
  ])("solves %s", (name, f, from, to, root) => {
    // A root of the ninth order is known only to the ninth root of rounding.
    const digits = name === "(x - 1)^9" ? 3 : 14;
    expect(findRoot(f, from, to)).toBeCloseTo(root, digits);
    expect(findRoot(f, to, from)).toBeCloseTo(root, digits);
  });

  it("stays between the ends and finds any root of a rising cubic", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -50, max: 50, noNaN: true }),
        fc.double({ min: 0, max: 10, noNaN: true }),
        (root, curvature) => {
          const found = findRoot(
            (x) => {
              expect(Math.abs(x)).toBeLessThanOrEqual(100);
              return (x - root) * (1 + curvature * (x - root) ** 2);
            },
            -100,
            100,
          );
          expect(Math.abs(found - root)).toBeLessThan(1e-10);
        },
      ),
    );
  });

  it("refuses ends of one sign", () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(ConvergenceError);
  });
});
