import { describe, expect, it } from "vitest";
import { checkTable } from "@/analytics/depletion/check-table";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { studyStream, studyTable } from "./third-comparative-study";

const spoiled = (spoil: (table: DepletionTable) => void) => {
  const table = studyTable();
  spoil(table);
  return checkTable(table, studyStream).filter(({ severity }) => severity !== "passed");
};
const gas = (table: DepletionTable, row: number) => table.rows[row].producedGas!;

describe("checkTable", () => {
  it("finds nothing wrong with the published study, and says what it looked at", () => {
    const findings = checkTable(studyTable(), studyStream);
    expect(findings.filter(({ severity }) => severity !== "passed")).toEqual([]);
    expect(new Set(findings.map(({ code }) => code)).size).toBe(findings.length);
    expect(findings.length).toBeGreaterThanOrEqual(15);
    for (const { title, message, row, column } of findings) {
      expect(title).not.toBe("");
      expect(message).toMatch(/\d/);
      expect([row, column]).toEqual([null, null]);
    }
  });

  it("says the densities of the study's liquids: 36 to 41 lb/ft3 (from memory, Kenyon and Behie 1987)", () => {
    const density = checkTable(studyTable(), studyStream).find(
      ({ code }) => code === "liquid_density",
    );
    expect(density?.message).toContain("35.9 to 41.0 lb/ft³");
  });

  it.each<[string, (table: DepletionTable) => void, { code: string; row: number; column: string }]>(
    [
      [
        "pressures out of order",
        (table) => (table.rows[3].pressurePsia = 2814.7),
        { code: "pressures_fall", row: 3, column: "pressurePsia" },
      ],
      [
        "a first row that is not the dew point",
        (table) => (table.rows[0].pressurePsia = 3400),
        { code: "starts_at_dew_point", row: 0, column: "pressurePsia" },
      ],
      [
        "liquid at the dew point",
        (table) => (table.rows[0].liquidPercent = 0.5),
        { code: "starts_at_dew_point", row: 0, column: "liquidPercent" },
      ],
      [
        "production at the dew point",
        (table) => (table.rows[0].cumulativeProducedMolePercent = 0.5),
        { code: "starts_at_dew_point", row: 0, column: "cumulativeProducedMolePercent" },
      ],
      [
        "production that goes back",
        (table) => (table.rows[4].cumulativeProducedMolePercent = 39.687),
        { code: "produced_grows", row: 4, column: "cumulativeProducedMolePercent" },
      ],
      [
        "two digits of a cumulative production exchanged",
        (table) => (table.rows[3].cumulativeProducedMolePercent = 40.226),
        { code: "two_phase_z", row: 3, column: "twoPhaseZ" },
      ],
      [
        "a two-phase z one hundredth off",
        (table) => (table.rows[3].twoPhaseZ = 0.74),
        { code: "two_phase_z", row: 3, column: "twoPhaseZ" },
      ],
      [
        "a pressure 100 psi off",
        (table) => (table.rows[3].pressurePsia = 1914.7),
        { code: "two_phase_z", row: 3, column: "twoPhaseZ" },
      ],
      [
        "a gas that adds up to 102.7 %",
        (table) => (gas(table, 4).light.C1 = 76.38),
        { code: "produced_gas_total", row: 4, column: "producedGas" },
      ],
      [
        "a gas 0.45 % too rich",
        (table) => (gas(table, 3).light.C3 = 5.83),
        { code: "produced_gas_total", row: 3, column: "producedGas" },
      ],
      [
        "a wellstream that is another gas",
        (table) => {
          gas(table, 0).light.C1 = 66.99;
          gas(table, 0).light.C2 = 7.69;
        },
        { code: "dew_point_composition", row: 0, column: "producedGas.light.C1" },
      ],
      [
        "two components exchanged, the sum kept",
        (table) => {
          const { light } = gas(table, 4);
          [light.iC4, light.nC5] = [light.nC5, light.iC4];
        },
        { code: "component_balance", row: 4, column: "producedGas.light.nC5" },
      ],
      [
        "the same on the Hoffmann plot",
        (table) => {
          const { light } = gas(table, 4);
          [light.iC4, light.nC5] = [light.nC5, light.iC4];
        },
        { code: "hoffmann_plot", row: 4, column: "producedGas.light.iC4" },
      ],
      [
        "a liquid percentage ten points off",
        (table) => (table.rows[3].liquidPercent = 29.2),
        { code: "liquid_density", row: 3, column: "liquidPercent" },
      ],
      [
        "liquid that rises twice",
        (table) => (table.rows[4].liquidPercent = 19.9),
        { code: "liquid_curve", row: 4, column: "liquidPercent" },
      ],
      [
        "more gas and produced moles than there were",
        (table) => (table.rows[5].gasZ = 0.524),
        { code: "moles_close", row: 5, column: "gasZ" },
      ],
      [
        "a gas z out of its curve",
        (table) => (table.rows[3].gasZ = 0.88),
        { code: "gas_z_curve", row: 4, column: "gasZ" },
      ],
      [
        "an impossible gas z",
        (table) => (table.rows[3].gasZ = 8.3),
        { code: "gas_z_curve", row: 3, column: "gasZ" },
      ],
      [
        "heptanes plus that comes back",
        (table) => {
          gas(table, 5).plus!.molePercent = 2.27;
          gas(table, 5).light.C1 = 70.36;
        },
        { code: "heptanes_plus_falls", row: 5, column: "producedGas.plus.molePercent" },
      ],
      [
        "heptanes plus that grows heavier",
        (table) => (gas(table, 3).plus!.molecularWeight = 121),
        { code: "heptanes_plus_weight_falls", row: 3, column: "producedGas.plus.molecularWeight" },
      ],
      [
        "heptanes plus that grows denser",
        (table) => (gas(table, 3).plus!.specificGravity = 0.775),
        { code: "heptanes_plus_weight_falls", row: 3, column: "producedGas.plus.specificGravity" },
      ],
    ],
  )("detects %s", (_, spoil, expected) => {
    expect(spoiled(spoil)).toContainEqual(expect.objectContaining(expected));
  });

  it("names the component, the row and how negative its liquid is", () => {
    const findings = spoiled((table) => {
      const { light } = gas(table, 4);
      [light.iC4, light.nC5] = [light.nC5, light.iC4];
    });
    expect(findings.find(({ code }) => code === "component_balance")).toMatchObject({
      severity: "failed",
      message: expect.stringMatching(
        /^nC5 in row 5 \(1,214\.7 psia\): the balance leaves -0\.115 mole per cent/,
      ),
    });
  });

  it("passes over rows that are only liquid readings", () => {
    const table = studyTable();
    const reading = (psig: number, liquidPercent: number) => ({
      pressurePsia: psig + 14.7,
      liquidPercent,
      cumulativeProducedMolePercent: null,
      gasZ: null,
      twoPhaseZ: null,
      viscosityCp: null,
      producedGas: null,
    });
    table.rows.splice(1, 0, reading(3400, 0.9), reading(3350, 2.7), reading(3200, 8.1));
    table.rows.push(reading(0, 10.2));
    expect(checkTable(table, studyStream).filter(({ severity }) => severity !== "passed")).toEqual(
      [],
    );
  });

  it("says what is missing instead of judging without it", () => {
    const findings = spoiled((table) => {
      table.rows.forEach((row) => {
        row.producedGas = null;
        row.twoPhaseZ = null;
      });
    });
    expect(findings.every(({ severity }) => severity === "warning")).toBe(true);
    expect(findings.map(({ code }) => code)).toEqual([
      "produced_gas_total",
      "dew_point_composition",
      "two_phase_z",
      "moles_close",
      "component_balance",
      "liquid_density",
      "hoffmann_plot",
      "heptanes_plus_falls",
      "heptanes_plus_weight_falls",
    ]);
    for (const { message } of findings) expect(message).toMatch(/^Not checked: /);
  });

  it("stops the balance at the row that lacks a figure, and says so once", () => {
    const findings = spoiled((table) => (table.rows[3].gasZ = null));
    expect(findings).toEqual([
      expect.objectContaining({ code: "moles_close", severity: "warning", row: 3, column: "gasZ" }),
    ]);
  });
});
