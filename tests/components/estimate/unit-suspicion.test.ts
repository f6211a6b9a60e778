import { describe, expect, it } from "vitest";
import { suspectUnit } from "@/components/estimate/unit-suspicion";

const thickness = { low: 10, high: 500, ratioHigh: 6 };

describe("suspectUnit(name, values, usual)", () => {
  it("asks whether one figure out of line is in metres, and offers it in feet", () => {
    const values = [
      { key: "low", value: 31 },
      { key: "mode", value: 127 },
      { key: "high", value: 222 },
    ];
    const suspicion = suspectUnit("netThicknessFt", values, thickness);
    // 31 m is 101.7 ft
    expect(suspicion).toMatchObject({ keys: ["low"], words: "metres", converted: { low: 102 } });
    expect(suspicion?.ratio).toBeCloseTo(222 / 31, 9);
  });

  it("asks about all figures together when none is in a usual range", () => {
    const values = [
      { key: "p90", value: 290 },
      { key: "p10", value: 310 },
    ];
    const usual = { low: 2000, high: 15_000, ratioHigh: null };
    const suspicion = suspectUnit("pressurePsia", values, usual);
    // 290 bar is 4,206 psi, 310 bar is 4,496 psi
    expect(suspicion).toMatchObject({
      keys: ["p90", "p10"],
      words: "bar",
      converted: { p90: 4210, p10: 4500 },
      ratio: null,
    });
  });

  it("asks whether a porosity of 8 is in per cent", () => {
    const usual = { low: 0.05, high: 0.3, ratioHigh: 2 };
    const values = [
      { key: "p90", value: 8 },
      { key: "p10", value: 14 },
    ];
    expect(suspectUnit("porosity", values, usual)?.converted).toEqual({ p90: 0.08, p10: 0.14 });
  });

  it("keeps quiet about a usual range, and about one that no unit explains", () => {
    const usualValues = [
      { key: "p90", value: 40 },
      { key: "p10", value: 120 },
    ];
    const odd = [
      { key: "p90", value: 4000 },
      { key: "p10", value: 9000 },
    ];
    expect(suspectUnit("netThicknessFt", usualValues, thickness)).toBeNull();
    expect(suspectUnit("netThicknessFt", odd, thickness)).toBeNull();
  });
});
