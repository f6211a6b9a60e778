import { describe, expect, it } from "vitest";
import type { LightComponent } from "@/analytics/composition/composition-schema";
import { readStream } from "@/analytics/composition/read-sheet";
import { plantLiquids } from "@/analytics/gas/plant-liquids";

describe("plantLiquids", () => {
  it.each([
    // gal/Mscf of the pure gas: 1000 over the ft3/gal of GPA 2145, from memory
    ["C2", 26.675],
    ["C3", 27.479],
    ["iC4", 32.64],
    ["nC4", 31.446],
    ["iC5", 36.478],
    ["nC5", 36.156],
    ["C6", 41.017],
  ] as const)("finds %d gallons in a thousand cubic feet of %s", (name, gallons) => {
    const light: Partial<Record<LightComponent, number>> = { C1: 90, [name]: 10 };
    const { stream } = readStream({ light, carbonNumbers: [], plus: null }, "gas");
    const liquids = plantLiquids(stream.components);
    expect(liquids).toHaveLength(1);
    expect(liquids[0].name).toBe(name);
    expect(liquids[0].gallonsPerMscf).toBeCloseTo(gallons / 10, 3);
  });

  it("takes every heavy fraction as one, by its density", () => {
    // n-heptane (M 100.2019, g 0.6882) has 21.729 ft3/gal in GPA 2145: 46.02 gal/Mscf; n-octane (114.2285, 0.70696)
    // 19.582 ft3/gal: 51.07 gal/Mscf
    const { stream } = readStream(
      {
        light: { C1: 98 },
        carbonNumbers: [],
        plus: {
          carbonNumber: 7,
          molePercent: 2,
          molecularWeight: 100.2019,
          specificGravity: 0.6882,
        },
      },
      "gas",
    );
    const [heavy] = plantLiquids(stream.components);
    expect(heavy.name).toBe("C7+");
    expect(Math.abs(heavy.gallonsPerMscf / (0.02 * 46.02) - 1)).toBeLessThan(1e-3);
    const twice = [
      { ...stream.components[1], moleFraction: 0.01 },
      {
        ...stream.components[1],
        moleFraction: 0.01,
        molecularWeight: 114.2285,
        specificGravity: 0.70696,
      },
    ];
    const [both] = plantLiquids(twice);
    expect(Math.abs(both.gallonsPerMscf / (0.01 * (46.02 + 51.07)) - 1)).toBeLessThan(1e-3);
  });

  it("finds none in methane and non-hydrocarbons", () => {
    const light = { C1: 90, N2: 5, CO2: 4, H2S: 1 };
    const { stream } = readStream({ light, carbonNumbers: [], plus: null }, "gas");
    expect(plantLiquids(stream.components)).toEqual([]);
  });
});
