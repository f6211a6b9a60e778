import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { normalCdf, normalQuantile } from "@/analytics/numerics/normal";
import { fillNormalQuantiles } from "@/analytics/numerics/normal-table";
import { betaQuantile, incompleteBeta } from "@/analytics/numerics/beta";
import reference from "../../fixtures/distributions.json";

const relative = (value: number, expected: number) =>
  Math.abs(value - expected) / Math.max(Math.abs(expected), Number.MIN_VALUE);

describe("normalCdf", () => {
  it.each(reference.normalCdf)("agrees with SciPy ndtr at %d", (z, expected) => {
    expect(relative(normalCdf(z), expected)).toBeLessThan(1e-12);
  });

  it("gives the value that every table prints for 1.96", () => {
    // Abramowitz and Stegun (1964), table 26.1.
    expect(normalCdf(1.96)).toBeCloseTo(0.97500210485178, 14);
  });
});

describe("normalQuantile", () => {
  it.each(reference.normalQuantile)("agrees with SciPy ndtri at %d", (p, expected) => {
    expect(Math.abs(normalQuantile(p) - expected)).toBeLessThan(
      2e-15 * Math.max(1, Math.abs(expected)),
    );
  });

  it("gives the 1.28155 standard deviations between P50 and P10", () => {
    // NIST/SEMATECH e-Handbook of Statistical Methods, table of the normal distribution.
    expect(normalQuantile(0.9)).toBeCloseTo(1.2815515655446, 13);
  });

  it("undoes normalCdf", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-12, max: 1 - 1e-12, noNaN: true }), (p) => {
        expect(relative(normalCdf(normalQuantile(p)), p)).toBeLessThan(1e-13);
      }),
    );
  });

  it("gives infinities at the ends and refuses what is no probability", () => {
    expect(normalQuantile(0)).toBe(-Infinity);
    expect(normalQuantile(1)).toBe(Infinity);
    expect(() => normalQuantile(1.1)).toThrow("A probability lies between 0 and 1; 1.1 does not.");
    expect(() => normalQuantile(NaN)).toThrow();
  });
});

describe("fillNormalQuantiles", () => {
  it("agrees with normalQuantile to 1e-8", () => {
    const n = 40_000;
    const p = Float64Array.from({ length: n }, (_, i) => (i + 0.37) / n);
    const out = new Float64Array(n);
    fillNormalQuantiles(p, n, out);
    const worst = p.reduce(
      (most, value, i) => Math.max(most, Math.abs(out[i] - normalQuantile(value))),
      0,
    );
    expect(worst).toBeLessThan(1e-8);
  });
});

describe("incompleteBeta", () => {
  it.each(reference.incompleteBeta)(
    "agrees with SciPy betainc at x = %d, shapes %d and %d",
    (x, a, b, expected) => {
      expect(Math.abs(incompleteBeta(x, a, b) - expected)).toBeLessThan(2e-14);
    },
  );

  it("is the polynomial 1 - (1 - x)^5 - 5 x (1 - x)^4 for shapes 2 and 4", () => {
    const x = 0.25;
    expect(incompleteBeta(x, 2, 4)).toBeCloseTo(1 - (1 - x) ** 5 - 5 * x * (1 - x) ** 4, 14);
    expect(incompleteBeta(x, 2, 4)).toBeCloseTo(0.3671875, 14);
  });

  it("refuses an argument outside 0 to 1 and a shape that is not positive", () => {
    expect(() => incompleteBeta(1.2, 2, 3)).toThrow("needs 0 <= x <= 1");
    expect(() => incompleteBeta(0.2, 0, 3)).toThrow("positive shapes");
  });
});

describe("betaQuantile", () => {
  it("undoes incompleteBeta", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true }),
        fc.double({ min: 1, max: 5, noNaN: true }),
        (p, a) => {
          expect(incompleteBeta(betaQuantile(p, a, 6 - a), a, 6 - a)).toBeCloseTo(p, 12);
        },
      ),
    );
  });
});
