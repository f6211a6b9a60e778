import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import {
  acidGasDepressionDegR,
  correctForAcidGas,
  hydrocarbonGravity,
  pseudocritical,
  pseudocriticalConstants,
  pseudocriticalPressurePsia,
  pseudocriticalTemperatureDegR,
  pseudocriticalWarnings,
} from "@/analytics/gas/pseudocritical";

const sweet = { nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0 };
const sour = { nitrogen: 0.02, carbonDioxide: 0.04, hydrogenSulphide: 0.05 };

describe("hydrocarbonGravity", () => {
  it("answers its example", () => {
    // (0.8 - 0.9672 x 0.02 - 1.5195 x 0.04 - 1.1767 x 0.05) / 0.89
    expect(hydrocarbonGravity(0.8, sour)).toBeCloseTo(0.742743, 6);
  });

  it("refuses a gas lighter than its own impurities", () => {
    expect(() => hydrocarbonGravity(0.6, { ...sweet, carbonDioxide: 0.5 })).toThrow(DomainError);
  });
});

describe("pseudocritical", () => {
  it("answers its example", () => {
    const { temperatureDegR, pressurePsia } = pseudocritical(0.65, sweet);
    expect(temperatureDegR).toBeCloseTo(368.2018, 3);
    expect(pressurePsia).toBeCloseTo(664.9828, 3);
  });

  it.each([
    // Sutton, SPE 97099 (2007), gas condensates: coefficients of the paper, values computed from them
    ["sutton-2007-condensate", 0.8, 407.132, 647.456],
    ["sutton-2007-condensate", 1.2, 496.052, 602.016],
    // Sutton, SPE 14265 (1985)
    ["sutton-1985", 0.65, 365.11, 670.129],
    ["sutton-1985", 0.8, 401.44, 649.696],
    ["sutton-1985", 1.2, 482.04, 594.416],
  ] as const)("evaluates %s at a gravity of %d", (method, gravity, temperature, pressure) => {
    const result = pseudocritical(gravity, sweet, method);
    expect(result.temperatureDegR).toBeCloseTo(temperature, 3);
    expect(result.pressurePsia).toBeCloseTo(pressure, 3);
  });

  it("evaluates the gravity form of Piper, McCain and Corredor with sour gas", () => {
    // SPE 26668 (1993): coefficients of the paper, value computed separately
    const result = pseudocritical(0.8, sour, "piper-mccain-corredor");
    expect(result.temperatureDegR / 396.2755).toBeCloseTo(1, 6);
    expect(result.pressurePsia / 681.2569).toBeCloseTo(1, 6);
  });

  it("brings the critical point of methane within 3 % from its gravity alone", () => {
    // methane: 343.01 degR and 667.06 psia (Setzmann and Wagner 1991); gravity 16.0425 / 28.9647
    const { temperatureDegR, pressurePsia } = pseudocritical(0.55386, sweet);
    expect(Math.abs(temperatureDegR / 343.01 - 1)).toBeLessThan(0.03);
    expect(Math.abs(pressurePsia / 667.06 - 1)).toBeLessThan(0.03);
  });

  it("gives trials the same numbers through its allocation-free form", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.65, max: 1.4, noNaN: true }),
        fc.double({ min: 0, max: 0.1, noNaN: true }),
        fc.double({ min: 0, max: 0.1, noNaN: true }),
        fc.double({ min: 0, max: 0.1, noNaN: true }),
        (gravity, nitrogen, carbonDioxide, hydrogenSulphide) => {
          const impurities = { nitrogen, carbonDioxide, hydrogenSulphide };
          const { temperatureDegR, pressurePsia } = pseudocritical(gravity, impurities);
          const constants = pseudocriticalConstants(impurities);
          expect(pseudocriticalTemperatureDegR(gravity, constants) / temperatureDegR).toBeCloseTo(
            1,
            12,
          );
          expect(pseudocriticalPressurePsia(gravity, constants) / pressurePsia).toBeCloseTo(1, 12);
        },
      ),
    );
  });

  it.each([
    ["gasGravity", 0, sweet],
    ["gasGravity", Number.NaN, sweet],
    ["nitrogen", 0.8, { ...sweet, nitrogen: -0.01 }],
    ["hydrogenSulphide", 0.8, { ...sweet, hydrogenSulphide: 1.2 }],
    ["nitrogen", 1.2, { ...sweet, carbonDioxide: 0.5, hydrogenSulphide: 0.3 }],
  ])("refuses an impossible %s", (input, gravity, impurities) => {
    let caught: unknown;
    try {
      pseudocritical(gravity, impurities);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(DomainError);
    expect((caught as DomainError).details.input).toBe(input);
  });
});

describe("correctForAcidGas", () => {
  const uncorrected = { temperatureDegR: 400, pressurePsia: 680 };

  it("answers its example: Wichert and Aziz 1972", () => {
    expect(acidGasDepressionDegR(0.05, 0.1, "wichert-aziz-1972")).toBeCloseTo(20.735443, 6);
    const result = correctForAcidGas(uncorrected, 0.05, 0.1, "wichert-aziz-1972");
    expect(result.temperatureDegR).toBeCloseTo(379.264557, 6);
    expect(result.pressurePsia).toBeCloseTo(641.755653, 6);
  });

  it("evaluates the refit of Sutton 2007", () => {
    const result = correctForAcidGas(uncorrected, 0.08, 0.11);
    expect(acidGasDepressionDegR(0.08, 0.11)).toBeCloseTo(21.510362, 6);
    expect(result.temperatureDegR).toBeCloseTo(378.489638, 6);
    expect(result.pressurePsia).toBeCloseTo(640.062671, 6);
  });

  it("leaves a sweet gas alone", () => {
    expect(correctForAcidGas(uncorrected, 0, 0)).toEqual(uncorrected);
    expect(correctForAcidGas(uncorrected, 0, 0, "wichert-aziz-1972")).toEqual(uncorrected);
  });
});

describe("pseudocriticalWarnings", () => {
  it("warns outside the gravities of the data and is silent inside", () => {
    expect(pseudocriticalWarnings(0.9, sour)).toEqual([]);
    expect(pseudocriticalWarnings(3, sweet)[0].code).toBe("pseudocritical_outside_range");
    expect(pseudocriticalWarnings(1.8, sweet, "sutton-1985")[0].message).toContain("0.57 to 1.68");
  });
});
