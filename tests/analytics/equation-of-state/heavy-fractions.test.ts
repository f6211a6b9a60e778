import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { boilingPointDegR, keslerLee, twu } from "@/analytics/equation-of-state/heavy-fractions";

describe("boilingPointDegR", () => {
  it("answers its example", () => {
    // Soreide (1989), constants from memory; value computed separately in Python
    expect(boilingPointDegR(140, 0.774)).toBeCloseTo(803.78, 2);
  });

  it.each([
    // generalised fractions of Katz and Firoozabadi (1978) and Whitson (1983), from memory; Soreide claims about
    // 20 degR on average
    [96, 0.727, 658],
    [134, 0.782, 791],
    [206, 0.836, 971],
    [275, 0.866, 1101],
    [394, 0.905, 1294],
  ])("boils M %d, g %d within 25 degR of the generalised table", (m, g, boilingPoint) => {
    expect(Math.abs(boilingPointDegR(m, g) - boilingPoint)).toBeLessThan(25);
  });

  it("refuses what is no petroleum fraction", () => {
    expect(() => boilingPointDegR(40, 0.774)).toThrow(DomainError);
    expect(() => boilingPointDegR(140, 1.5)).toThrow(DomainError);
    expect(() => boilingPointDegR(Number.NaN, 0.774)).toThrow(DomainError);
  });
});

describe("keslerLee", () => {
  it.each([
    // computed separately in Python from the constants of the paper (from memory)
    [805.1, 0.7342, 1108.708, 296.149, 0.49175],
    [803.78, 0.774, 1127.52, 343.692, 0.46117],
  ])("evaluates Tb %d degR, g %d", (tb, g, temperature, pressure, omega) => {
    const result = keslerLee(tb, g);
    expect(result.criticalTemperatureDegR / temperature).toBeCloseTo(1, 5);
    expect(result.criticalPressurePsia / pressure).toBeCloseTo(1, 5);
    expect(result.acentricFactor).toBeCloseTo(omega, 5);
  });

  it("joins its two acentric factors within 0.02 where they meet", () => {
    // Tb/Tc crosses 0.8 between these boiling points at g = 0.87
    const values = [1200, 1220, 1240, 1260, 1280, 1300, 1320, 1340].map(
      (tb) => keslerLee(tb, 0.87).acentricFactor,
    );
    values.slice(1).forEach((value, index) => {
      expect(value - values[index]).toBeGreaterThan(0);
      expect(value - values[index]).toBeLessThan(0.06);
    });
  });
});

describe("twu", () => {
  it("evaluates the fraction of n-decane", () => {
    // computed separately in Python from the constants of the paper (from memory)
    const result = twu(805.1, 0.7342);
    expect(result.criticalTemperatureDegR / 1114.348).toBeCloseTo(1, 5);
    expect(result.criticalPressurePsia / 307.84).toBeCloseTo(1, 5);
  });

  it.each([
    // normal boiling point, specific gravity at 60 degF, critical constants and acentric factor of pure n-alkanes
    // (reference equations of state; GPA 2145), degR and psia
    ["n-heptane", 668.9, 0.6882, 972.36, 396.8, 0.349],
    ["n-octane", 717.9, 0.70696, 1023.7, 360.2, 0.398],
    ["n-decane", 805.1, 0.73421, 1111.9, 305, 0.4884],
  ] as const)("comes to the critical point of %s, as does Kesler-Lee", (_, tb, g, tc, pc, w) => {
    for (const [correlation, pressureError] of [
      [twu, 0.015],
      [keslerLee, 0.035],
    ] as const) {
      const result = correlation(tb, g);
      expect(Math.abs(result.criticalTemperatureDegR / tc - 1)).toBeLessThan(0.005);
      expect(Math.abs(result.criticalPressurePsia / pc - 1)).toBeLessThan(pressureError);
      expect(Math.abs(result.acentricFactor - w)).toBeLessThan(0.02);
    }
  });
});
