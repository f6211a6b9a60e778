import fc from "fast-check";
import { describe, expect, it } from "vitest";
import "../../support/property-seed";
import { monotoneSlopes, sampleMonotone } from "@/analytics/numerics/monotone-interpolation";

describe("sampleMonotone", () => {
  it("keeps the flat steps of the test data of Fritsch and Carlson (1980), where a cubic spline swings below", () => {
    // Their data RPN 14, from memory: flat, then a steep rise.
    const x = [7.99, 8.09, 8.19, 8.7, 9.2, 10, 12, 15, 20];
    const y = [
      0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.94374, 0.998636, 0.999919, 0.999994,
    ];
    const out = sampleMonotone(x, y, 401);
    for (let i = 1; i < out.length; i += 1) expect(out[i]).toBeGreaterThanOrEqual(out[i - 1]);
    expect(out[0]).toBe(0);
    expect(out[400]).toBe(0.999994);
  });

  it("is a straight line through a straight line, and through two points", () => {
    expect(monotoneSlopes([0, 1, 4], [1, 3, 9])).toEqual([2, 2, 2]);
    expect(Array.from(sampleMonotone([0, 2], [1, 5], 3))).toEqual([1, 3, 5]);
  });

  it("has the slope of the weighted harmonic mean, by hand", () => {
    // widths 1 and 2, secants 1 and 4: 3 x 3 / ((2 x 2 + 1) / 1 + (2 + 2 x 1) / 4) = 9 / 6
    expect(monotoneSlopes([0, 1, 3], [0, 1, 9])[1]).toBeCloseTo(1.5, 12);
    expect(monotoneSlopes([0, 1, 3], [0, 1, 0])[1]).toBe(0);
  });

  it("stays between neighbours whatever the points", () => {
    const steps = fc.array(
      fc.tuple(
        fc.double({ min: 0.01, max: 10, noNaN: true }),
        fc.double({ min: -5, max: 5, noNaN: true }),
      ),
      { minLength: 2, maxLength: 12 },
    );
    fc.assert(
      fc.property(steps, (points) => {
        let at = 0;
        const x = points.map(([width]) => (at += width));
        const y = points.map(([, value]) => value);
        const count = 97;
        const out = sampleMonotone(x, y, count);
        for (let k = 0; k < count; k += 1) {
          const place = x[0] + ((x[x.length - 1] - x[0]) * k) / (count - 1);
          const i = Math.min(Math.max(x.findIndex((one) => one >= place) - 1, 0), x.length - 2);
          expect(out[k]).toBeGreaterThanOrEqual(Math.min(y[i], y[i + 1]) - 1e-9);
          expect(out[k]).toBeLessThanOrEqual(Math.max(y[i], y[i + 1]) + 1e-9);
        }
      }),
      { numRuns: 100 },
    );
  });
});
