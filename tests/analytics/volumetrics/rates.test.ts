import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { wellstreamRates } from "@/analytics/volumetrics/rates";

const wellstream = {
  primarySeparatorGasOilRatioScfPerStb: 12000,
  surfaceGasOilRatioScfPerStb: 12450,
  wellstreamScfPerStb: 13275.781,
};

describe("wellstreamRates", () => {
  it("answers its example: 100 STB/d take 1.3275781 MMscf/d of wellstream with them", () => {
    const rates = wellstreamRates({ stream: "condensate", stbPerDay: 100 }, wellstream, 0.00350679);
    expect(rates.surfaceGasScfPerDay).toBeCloseTo(1245000, 6);
    expect(rates.wetGasScfPerDay).toBeCloseTo(1327578.1, 6);
    // 1,327,578.1 scf x 0.00350679 cf/scf = 4,655.537 cf; over 5.614583 cf/bbl
    expect(rates.voidageRbPerDay).toBeCloseTo(829.187, 3);
  });

  it("gives the same streams whichever was metered", () => {
    const byCondensate = wellstreamRates(
      { stream: "condensate", stbPerDay: 803.2129 },
      wellstream,
      0.0035,
    );
    const bySeparator = wellstreamRates(
      { stream: "primary-separator-gas", scfPerDay: 803.2129 * 12000 },
      wellstream,
      0.0035,
    );
    const bySurface = wellstreamRates(
      { stream: "surface-gas", scfPerDay: 803.2129 * 12450 },
      wellstream,
      0.0035,
    );
    for (const name of Object.keys(byCondensate) as (keyof typeof byCondensate)[]) {
      expect(bySeparator[name] / byCondensate[name]).toBeCloseTo(1, 12);
      expect(bySurface[name] / byCondensate[name]).toBeCloseTo(1, 12);
    }
  });

  it("gives no voidage to a well that is shut in", () => {
    const rates = wellstreamRates({ stream: "surface-gas", scfPerDay: 0 }, wellstream, 0.0035);
    expect(rates.voidageRbPerDay).toBe(0);
  });

  it("refuses a negative rate and a formation volume factor of nil", () => {
    expect(() =>
      wellstreamRates({ stream: "condensate", stbPerDay: -1 }, wellstream, 0.0035),
    ).toThrow(DomainError);
    expect(() => wellstreamRates({ stream: "condensate", stbPerDay: 1 }, wellstream, 0)).toThrow(
      DomainError,
    );
  });
});
