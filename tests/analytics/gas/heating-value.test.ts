import "../../support/property-seed";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lightConstants } from "@/analytics/composition/components";
import type { LightComponent } from "@/analytics/composition/composition-schema";
import { readStream } from "@/analytics/composition/read-sheet";
import { DomainError } from "@/analytics/errors";
import {
  calorificProperties,
  heatingValue,
  type GasComponent,
} from "@/analytics/gas/heating-value";

const pure = (light: LightComponent): GasComponent[] => [
  {
    light,
    moleFraction: 1,
    molecularWeight: lightConstants[light].molecularWeight,
    specificGravity: null,
  },
];
const alkane = (molecularWeight: number): GasComponent => ({
  light: null,
  moleFraction: 1,
  molecularWeight,
  specificGravity: 0.7,
});
const gasOf = (fractions: Partial<Record<LightComponent, number>>) =>
  (Object.entries(fractions) as [LightComponent, number][]).map(([light, moleFraction]) => ({
    ...pure(light)[0],
    moleFraction,
  }));

describe("calorificProperties", () => {
  it("comes to the figures of the standard's first worked example", () => {
    // ISO 6976:2016, Annex D, example 1 (15/15 degC, 101.325 kPa): 17.3884301 kg/kmol, 906.1799588 kJ/mol,
    // 52.113961 MJ/kg and 38.410611 MJ/m3 of real gas; from memory. Z, G and Wobbe computed separately in Python
    const gas = gasOf({ C1: 0.933212, C2: 0.025656, C3: 0.015368, N2: 0.01035, CO2: 0.015414 });
    const result = calorificProperties(gas, "15 degC");
    expect(result.molarMass).toBeCloseTo(17.3884301, 7);
    expect(result.grossMolar).toBeCloseTo(906.1799588, 7);
    expect(result.grossMass).toBeCloseTo(52.113961, 6);
    expect(result.grossReal).toBeCloseTo(38.410611, 6);
    expect(result.compressionFactor).toBeCloseTo(0.997762244, 9);
    expect(result.relativeDensity).toBeCloseTo(0.601419, 6);
    expect(result.wobbe).toBeCloseTo(49.5294, 4);
  });

  it("takes the heat of its water vapour off the net value", () => {
    // methane burns to two molecules of water: 891.51 - 2 x 44.431 kJ/mol at 15 degC (ISO 6976:2016)
    const { grossMolar, netMolar } = calorificProperties(pure("C1"), "15 degC");
    expect(grossMolar - netMolar).toBeCloseTo(88.862, 9);
    // carbon dioxide burns to nothing
    expect(calorificProperties(pure("CO2"), "15 degC").netMolar).toBe(0);
  });

  it("gives heavy fractions the values of the n-alkanes between them", () => {
    // n-octane: 5516.01 kJ/mol at 15 degC (ISO 6976:2016). n-dodecane, beyond the standard: 8086.5 kJ/mol of combustion
    // as liquid and 61.5 of vaporisation at 25 degC (NIST, from memory), 6 more at 15 degC
    const dilute = (molecularWeight: number) => {
      const components = [
        { ...pure("N2")[0], moleFraction: 0.99 },
        { ...alkane(molecularWeight), moleFraction: 0.01 },
      ];
      return 100 * calorificProperties(components, "15 degC").grossMolar;
    };
    expect(dilute(114.22852)).toBeCloseTo(5516.01, 6);
    expect(Math.abs(dilute(170.335) / 8154 - 1)).toBeLessThan(0.001);
    expect(dilute(107.2)).toBeGreaterThan(4857.18);
    expect(dilute(107.2)).toBeLessThan(5516.01);
  });

  it("does not care about the order of the components", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0.01, max: 1, noNaN: true }), { minLength: 6, maxLength: 6 }),
        (parts) => {
          const names = ["C1", "C2", "C3", "nC4", "N2", "CO2"] as const;
          const total = parts.reduce((sum, part) => sum + part, 0);
          const gas = names.map((name, index) => ({
            ...pure(name)[0],
            moleFraction: parts[index] / total,
          }));
          const forwards = calorificProperties(gas, "60 degF");
          const backwards = calorificProperties([...gas].reverse(), "60 degF");
          expect(backwards.grossReal / forwards.grossReal).toBeCloseTo(1, 12);
          expect(forwards.netReal).toBeLessThanOrEqual(forwards.grossReal);
          expect(forwards.grossReal).toBeGreaterThanOrEqual(forwards.grossIdeal);
        },
      ),
      { numRuns: 100 },
    );
  });

  it("refuses fractions that do not add up and liquids", () => {
    expect(() => calorificProperties(gasOf({ C1: 0.9 }), "15 degC")).toThrow(DomainError);
    expect(() => calorificProperties([alkane(142.28)], "15 degC")).toThrow(DomainError);
    expect(() => calorificProperties(gasOf({ C1: Number.NaN }), "15 degC")).toThrow(DomainError);
  });
});

describe("heatingValue", () => {
  it.each([
    // ideal gross Btu/scf at 14.696 psia and 60 degF: GPA 2145, from memory
    ["C1", 1010.0],
    ["C2", 1769.7],
    ["C3", 2516.1],
    ["iC4", 3251.9],
    ["nC4", 3262.3],
    ["iC5", 4000.9],
    ["nC5", 4008.7],
    ["C6", 4755.9],
    ["H2S", 637.1],
    ["N2", 0],
    ["CO2", 0],
  ] as const)("gives %s %d Btu/scf", (name, btu) => {
    const gas = gasOf({ N2: 0.9, [name]: name === "N2" ? 1 : 0.1 });
    const share = name === "N2" ? 1 : 0.1;
    expect(Math.abs(heatingValue(gas).grossIdealBtuPerScf / share - btu)).toBeLessThan(0.2);
  });

  it("agrees with GPA 2172 on the compression of a lean gas at 60 degF", () => {
    // Z = 1 - 14.696 (sum x b)2 with b of GPA 2145, from memory: methane 0.0116, ethane 0.0238, propane 0.0347
    const gas = gasOf({ C1: 0.9, C2: 0.07, C3: 0.03 });
    const gpa = 1 - 14.696 * (0.9 * 0.0116 + 0.07 * 0.0238 + 0.03 * 0.0347) ** 2;
    expect(Math.abs(heatingValue(gas).compressionFactor - gpa)).toBeLessThan(1e-4);
  });

  it("warns where the heavy end matters", () => {
    const rich = readStream(
      {
        light: { C1: 90, C2: 6, C3: 3 },
        carbonNumbers: [],
        plus: { carbonNumber: 7, molePercent: 1, molecularWeight: 110, specificGravity: 0.73 },
      },
      "gas",
    ).stream.components;
    expect(heatingValue(rich).warnings).toMatchObject([{ code: "heating_value_of_heavy_end" }]);
    expect(heatingValue(pure("C1")).warnings).toEqual([]);
    expect(heatingValue(pure("N2")).warnings).toEqual([]);
  });
});
