import "../../support/property-seed";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { vapourFraction } from "@/analytics/equation-of-state/rachford-rice";

const solve = (z: readonly number[], k: readonly number[], start = NaN) =>
  vapourFraction(
    Float64Array.from(z),
    Float64Array.from(k, Math.log),
    new Float64Array(z.length),
    start,
  );

describe("vapourFraction", () => {
  it("solves two components in closed form", () => {
    // V = -(z1/(K2-1) + z2/(K1-1)), by hand
    expect(solve([0.6, 0.4], [3, 0.2])).toBeCloseTo(0.6 / 0.8 - 0.4 / 2, 13);
    expect(solve([0.1, 0.9], [3, 0.2])).toBeCloseTo(0.1 / 0.8 - 0.9 / 2, 13);
  });

  it("goes beyond 0 and 1 in the negative flash, inside the window of positive mole fractions", () => {
    const below = solve([0.1, 0.9], [3, 0.2]);
    expect(below).toBeLessThan(0);
    expect(below).toBeGreaterThan(1 / (1 - 3));
    const above = solve([0.99, 0.01], [3, 0.2]);
    expect(above).toBeGreaterThan(1);
    expect(above).toBeLessThan(1 / (1 - 0.2));
  });

  it("has no answer when nothing prefers the gas, or nothing the liquid", () => {
    expect(solve([0.5, 0.5], [0.9, 0.5])).toBeNaN();
    expect(solve([0.5, 0.5], [1.1, 5])).toBeNaN();
    // a component of which there is nothing makes no window
    expect(solve([1, 0], [2, 0.1])).toBeNaN();
  });

  it("is a root, with both phases adding up to 1, whatever the K-values and the start", () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(
            fc.double({ min: 1e-6, max: 1, noNaN: true }),
            fc.double({ min: -25, max: 12, noNaN: true }),
          ),
          { minLength: 2, maxLength: 14 },
        ),
        fc.double({ min: -1, max: 2, noNaN: true }),
        (components, start) => {
          const lnK = components.map(([, value]) => value);
          fc.pre(Math.max(...lnK) > 0.01 && Math.min(...lnK) < -0.01);
          const total = components.reduce((sum, [weight]) => sum + weight, 0);
          const z = components.map(([weight]) => weight / total);
          const k = lnK.map(Math.exp);
          const v = solve(z, k, start);
          const x = z.map((fraction, i) => fraction / (1 + v * (k[i] - 1)));
          const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);
          expect(Math.min(...x)).toBeGreaterThan(0);
          // (1-V) sum x + V sum y = 1 always; both are 1 at the root, as far as V has digits
          expect(sum(x)).toBeCloseTo(1, 7);
          expect(sum(x.map((fraction, i) => fraction * k[i]))).toBeCloseTo(1, 7);
        },
      ),
      { numRuns: 300 },
    );
  });
});
