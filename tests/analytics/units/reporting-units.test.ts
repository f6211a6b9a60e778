import { describe, expect, it } from "vitest";
import { reportingUnits } from "@/analytics/units/reporting-units";

describe("reportingUnits(system, base)", () => {
  it("shows field units at the canonical base without touching them", () => {
    const { gas, condensate, condensateYield } = reportingUnits("field", "14.696");
    expect(gas).toEqual({ unit: "Bscf", suffix: "bscf", factor: 1e-9 });
    expect(condensate.factor).toBe(1e-6);
    expect(condensateYield.factor).toBe(1);
  });

  it("has more cubic feet at a lower base pressure, in the ratio of the pressures (ideal gas)", () => {
    const { gas, condensateYield } = reportingUnits("field", "14.65");
    expect(gas.factor * 1e9).toBeCloseTo(14.696 / 14.65, 12);
    expect(gas.factor * 1e9 * condensateYield.factor).toBeCloseTo(1, 12);
  });

  it("names Sm3 only at 101.325 kPa and 15 degC (ISO 13443)", () => {
    expect(reportingUnits("metric", "metric").gas.unit).toBe("10⁹ Sm³");
    expect(reportingUnits("metric", "14.696").gas.unit).toBe("10⁹ m³");
  });

  it("has 0.158987294928 m3 in a barrel, exactly (42 US gallons of 231 cubic inches)", () => {
    expect(reportingUnits("metric", "metric").condensate.factor).toBeCloseTo(1.58987294928e-7, 18);
  });

  // 60 degF is 288.7056 K: 35.3147 ft3/m3 x 288.7056/288.15 x 14.69595/14.696 = 35.3826 scf per Sm3.
  it("has 35.3826 scf in one Sm3", () => {
    expect(1 / (reportingUnits("metric", "metric").gas.factor * 1e9)).toBeCloseTo(35.3826, 3);
  });
});
