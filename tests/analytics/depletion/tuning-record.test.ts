import { describe, expect, it } from "vitest";
import { tuningKey, tuningStanding, type TuningRecord } from "@/analytics/depletion/tuning-record";
import { templateFluid, untunedCharacterisation } from "../../support/fluids";

const { sheet, table } = templateFluid();
const characterisation = {
  ...untunedCharacterisation,
  adjustments: { ...untunedCharacterisation.adjustments, heavyCriticalTemperatureFactor: 1.02 },
};
const fluid = { sheet, table, characterisation };
const record: TuningRecord = {
  measuredDewPointPsia: 5000,
  fittedDewPointPsia: 5010,
  averageLiquidErrorPoints: 0.4,
  fittedTo: tuningKey(fluid),
};

describe("tuningStanding(fluid, tuning)", () => {
  it("counts a fluid as tuned when its fit was kept and met the figures that stand", () => {
    expect(tuningStanding(fluid, record)).toEqual({ isTuned: true, doubt: null });
    expect(tuningStanding(fluid, record, 4950).isTuned).toBe(true);
  });

  it("has nothing to say about a fluid that nobody adjusted", () => {
    const untouched = { ...fluid, characterisation: untunedCharacterisation };
    expect(tuningStanding(untouched, record)).toEqual({ isTuned: false, doubt: null });
  });

  it.each([
    ["no record", null, undefined, "nothing says"],
    ["a dew point missed by 30 %", { fittedDewPointPsia: 3500 }, undefined, "by 30.0 %"],
    ["another computed dew point", {}, 4800, "by 4.0 %"],
    ["a dew point that is no more", {}, 0, "by 100.0 %"],
    ["liquid missed by far", { averageLiquidErrorPoints: 7 }, undefined, "7.0 points"],
    ["no measured liquid", { averageLiquidErrorPoints: null }, undefined, "No measured liquid"],
    ["a record that does not say of what", { fittedTo: null }, undefined, "Run the tuning again"],
  ])("does not with %s", (_, change, computed, words) => {
    const standing = tuningStanding(fluid, change && { ...record, ...change }, computed);
    expect(standing.isTuned).toBe(false);
    expect(standing.doubt).toContain(words);
  });

  it("does not when the least factor is moved without a fit", () => {
    const adjustments = {
      ...untunedCharacterisation.adjustments,
      heavyCriticalTemperatureFactor: 1.000001,
    };
    const nudged = { ...fluid, characterisation: { ...characterisation, adjustments } };
    expect(tuningStanding(nudged, null).isTuned).toBe(false);
    expect(tuningStanding(nudged, record).isTuned).toBe(false);
  });

  it("does not once composition, heavy end or table are others", () => {
    const [first, ...rest] = table.rows;
    const edited = [
      { ...fluid, table: { ...table, rows: [{ ...first, gasZ: 0.99 }, ...rest] } },
      { ...fluid, table: null },
      { ...fluid, characterisation: { ...characterisation, criticals: "twu" as const } },
      { ...fluid, sheet: JSON.parse(JSON.stringify(sheet).replace(/"C1":/, '"C2":')) as never },
    ];
    for (const other of edited) {
      expect(tuningStanding(other, record).doubt).toContain("Run the tuning again");
    }
  });
});

describe("tuningKey(fluid)", () => {
  it("is the same for the same figures in another order, and after a way through text", () => {
    const turned = Object.fromEntries(Object.entries(fluid).reverse()) as typeof fluid;
    const rows = table.rows.map((row) =>
      Object.fromEntries(Object.entries(row).reverse()),
    ) as typeof table.rows;
    expect(tuningKey({ ...turned, table: { ...table, rows } })).toBe(record.fittedTo);
    expect(
      tuningKey({ ...fluid, table: { ...table, dewPointPsia: table.dewPointPsia + 1e-9 } }),
    ).toBe(record.fittedTo);
  });
});
