import { describe, expect, it } from "vitest";
import { carbonNumberProperties, lightConstants } from "@/analytics/composition/components";
import { lightComponents } from "@/analytics/composition/composition-schema";
import { DomainError } from "@/analytics/errors";

describe("lightConstants", () => {
  it("holds methane and n-hexane in field units", () => {
    // Setzmann and Wagner (1991): 190.564 K, 4.5992 MPa; n-hexane 507.82 K, 3.0441 MPa; by hand in degR and psia
    expect(lightConstants.C1.criticalTemperatureDegR).toBeCloseTo(343.015, 3);
    expect(lightConstants.C1.criticalPressurePsia).toBeCloseTo(667.057, 2);
    expect(lightConstants.C6.criticalTemperatureDegR).toBeCloseTo(914.076, 3);
    expect(lightConstants.C6.criticalPressurePsia).toBeCloseTo(441.51, 2);
  });

  it.each([
    // atomic weights of IUPAC (2013 conventional): C 12.0107, H 1.00794, N 14.0067, O 15.9994, S 32.065
    ["H2S", 2 * 1.00794 + 32.065],
    ["CO2", 12.0107 + 2 * 15.9994],
    ["N2", 2 * 14.0067],
    ["C1", 12.0107 + 4 * 1.00794],
    ["C2", 2 * 12.0107 + 6 * 1.00794],
    ["C3", 3 * 12.0107 + 8 * 1.00794],
    ["iC4", 4 * 12.0107 + 10 * 1.00794],
    ["nC4", 4 * 12.0107 + 10 * 1.00794],
    ["iC5", 5 * 12.0107 + 12 * 1.00794],
    ["nC5", 5 * 12.0107 + 12 * 1.00794],
    ["C6", 6 * 12.0107 + 14 * 1.00794],
  ] as const)("weighs %s as its atoms do", (name, molecularWeight) => {
    expect(Math.abs(lightConstants[name].molecularWeight - molecularWeight)).toBeLessThan(2e-3);
  });

  it("puts heavier paraffins at higher critical temperatures and lower critical pressures", () => {
    const paraffins = ["C2", "C3", "nC4", "nC5", "C6"] as const;
    paraffins.slice(1).forEach((name, index) => {
      const lighter = lightConstants[paraffins[index]];
      expect(lightConstants[name].criticalTemperatureDegR).toBeGreaterThan(
        lighter.criticalTemperatureDegR,
      );
      expect(lightConstants[name].criticalPressurePsia).toBeLessThan(lighter.criticalPressurePsia);
    });
    expect(Object.keys(lightConstants)).toEqual([...lightComponents]);
  });
});

describe("carbonNumberProperties", () => {
  it.each([
    // Watson factors printed in the same table (Katz and Firoozabadi 1978, Whitson 1983; from memory), which tie the
    // recalled boiling points to the recalled gravities: K = Tb^(1/3) / g
    [7, 11.96],
    [8, 11.87],
    [9, 11.82],
    [10, 11.83],
    [11, 11.85],
    [12, 11.86],
    [13, 11.85],
    [14, 11.84],
    [15, 11.84],
    [20, 11.92],
    [25, 11.99],
    [30, 12.04],
    [35, 12.07],
  ])("gives C%d the Watson factor %d", (carbonNumber, watson) => {
    const { boilingPointDegR, specificGravity } = carbonNumberProperties(carbonNumber);
    expect(Math.abs(Math.cbrt(boilingPointDegR) / specificGravity - watson)).toBeLessThan(0.02);
  });

  it("rises from number to number", () => {
    for (let n = 8; n <= 36; n += 1) {
      const [lighter, heavier] = [carbonNumberProperties(n - 1), carbonNumberProperties(n)];
      expect(heavier.molecularWeight).toBeGreaterThan(lighter.molecularWeight);
      expect(heavier.specificGravity).toBeGreaterThan(lighter.specificGravity);
      expect(heavier.boilingPointDegR).toBeGreaterThan(lighter.boilingPointDegR);
    }
  });

  it("refuses numbers outside its table", () => {
    expect(() => carbonNumberProperties(6)).toThrow(DomainError);
    expect(() => carbonNumberProperties(37)).toThrow(DomainError);
  });
});
