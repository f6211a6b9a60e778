import { describe, expect, it } from "vitest";
import { acidGasWarnings } from "@/analytics/fluid/acid-gas";

describe("acidGasWarnings", () => {
  it("says nothing of a gas without acid gases", () => {
    expect(acidGasWarnings(0, 0, 8000, "at reservoir pressure")).toEqual([]);
  });

  it("gives hydrogen sulphide in ppm and as partial pressure, as a caution", () => {
    // 1 mol % is 10,000 ppm; immediately dangerous from 100 ppm (NIOSH); 0.01 x 6,000 psia = 60 psia
    const [warning] = acidGasWarnings(0.01, 0, 6000, "at reservoir pressure");
    expect(warning).toMatchObject({ code: "sour_gas", severity: "caution" });
    expect(warning.message).toContain("10,000 ppm");
    expect(warning.message).toContain("60 psia: sour service");
    expect(warning.message).toContain("immediately dangerous");
  });

  it("separates sour service at 0.05 psia", () => {
    // ISO 15156: 0.05 psia (0.34 kPa); 8 ppm of 6,000 psia is 0.048 psia, 9 ppm is 0.054 psia
    const message = (ppm: number) => acidGasWarnings(ppm * 1e-6, 0, 6000, "here")[0].message;
    expect(message(8)).toContain("0.048 psia, below sour service");
    expect(message(9)).toContain("0.054 psia: sour service");
    expect(message(9)).toContain("10 ppm for ten minutes");
  });

  it("warns of corrosion from 7 psi of carbon dioxide, likely above 30", () => {
    expect(acidGasWarnings(0, 0.001, 6000, "here")).toEqual([]);
    expect(acidGasWarnings(0, 0.002, 6000, "here")[0].message).toContain("possible");
    expect(acidGasWarnings(0, 0.02, 6000, "here")[0].message).toContain("likely");
  });
});
