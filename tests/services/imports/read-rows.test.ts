import { describe, expect, it } from "vitest";
import { readNumber } from "@/services/imports/read-cells";
import type { ReservoirRow } from "@/services/imports/read-row";
import { readRows } from "@/services/imports/read-rows";
import { readTable } from "@/services/imports/read-table";
import { goodRow, sheet, type SheetRow } from "../../support/import-sheet";

const TODAY = "2026-12-01";

const read = (rows: readonly SheetRow[], units: SheetRow = {}) =>
  readRows(readTable(new TextEncoder().encode(sheet(rows, { units }))), TODAY);

function good(changes: SheetRow = {}, units: SheetRow = {}): ReservoirRow {
  const [entry] = read([goodRow(changes)], units);
  if (entry.kind === "bad") throw new Error(JSON.stringify(entry.row.problems));
  return entry.row;
}

function problemsOf(changes: SheetRow, units: SheetRow = {}) {
  const [entry] = read([goodRow(changes)], units);
  return entry.kind === "bad" ? entry.row.problems : [];
}

const columnsOf = (changes: SheetRow) => problemsOf(changes).map(({ column }) => column);

describe("a row with more cells than the header", () => {
  it("is refused for that reason alone, not once for every cell that stands askew", () => {
    const text = sheet([goodRow({ area_low: "SPLIT" })]).replace("SPLIT", "1,520");
    const [entry] = readRows(readTable(new TextEncoder().encode(text)), TODAY);
    const problems = entry.kind === "bad" ? entry.row.problems : [];
    expect(problems).toHaveLength(1);
    expect(problems[0]).toMatchObject({ line: 3, column: null });
    expect(problems[0].reason).toContain("more cells than the header");
  });
});

describe("readNumber(cell)", () => {
  it.each([
    ["12.5", 12.5],
    ["-3", -3],
    ["\u22123", -3],
    ["1e3", 1000],
    [".5", 0.5],
  ])("reads %s", (cell, value) => {
    expect(readNumber(cell)).toEqual({ value });
  });

  it.each([
    ["0,25", "0.25"],
    ["1,250", "1.250 or 1250"],
    ["1 250", "1250"],
    ["1.250.000", "without separators"],
    ["12 %", "row 2"],
    ["#REF!", "formula"],
    ["many", "Not a figure"],
  ])("refuses %s and says what to write", (cell, hint) => {
    const result = readNumber(cell);
    expect("reason" in result && result.reason).toContain(hint);
  });
});

describe("a very long cell", () => {
  it.each([
    ["digits", `${"1".repeat(200_000)}x`],
    ["points", `${".".repeat(200_000)}1`],
    ["blanks", `1${" ".repeat(200_000)}1`],
  ])("of %s is refused as a figure without delay", (_, cell) => {
    const start = performance.now();
    expect(readNumber(cell)).toEqual({ reason: "Too long to be a figure." });
    expect(performance.now() - start).toBeLessThan(100);
  });

  it("is cut where a problem or a name repeats it", () => {
    const long = "x".repeat(50_000);
    const [entry] = read([goodRow({ area_low: long, field: long })]);
    expect(JSON.stringify(entry).length).toBeLessThan(2_000);
    const problem = problemsOf({ area_low: long })[0];
    expect(problem.value).toBe(`${"x".repeat(80)}…`);
  });
});

describe("readRows(table, today)", () => {
  it("reads the shape that a column has by default, and a single best as a constant", () => {
    const { uncertain } = good({
      pressure_low: "",
      pressure_high: "",
      pressure_best: "6350",
    }).inputs;
    expect(uncertain.areaAcres.distribution).toEqual({
      kind: "lognormalP90P10",
      p90: 1520,
      p10: 3350,
    });
    expect(uncertain.gasRecovery.distribution).toEqual({
      kind: "pert",
      low: 0.68,
      mode: 0.76,
      high: 0.83,
    });
    expect(uncertain.pressurePsia.distribution).toEqual({ kind: "constant", value: 6350 });
  });

  it("converts every column by the unit of row 2", () => {
    // 1 ha is 2.471 053 8 acre, 1 bar 14.503 774 psi (NIST SP 811); 100 degC is 212 degF by definition.
    const row = good(
      {
        area_low: "1000",
        area_high: "2000",
        pressure_low: "",
        pressure_high: "",
        pressure_best: "300",
        temperature_low: "",
        temperature_high: "",
        temperature_best: "100",
        carbon_dioxide: "2",
      },
      {
        area_low: "ha",
        area_high: "ha",
        pressure_best: "bara",
        temperature_best: "degC",
        carbon_dioxide: "mol %",
      },
    );
    const { areaAcres, pressurePsia, temperatureDegF } = row.inputs.uncertain;
    const area = areaAcres.distribution;
    expect(area.kind === "lognormalP90P10" && area.p90).toBeCloseTo(2471.0538, 3);
    const pressure = pressurePsia.distribution;
    expect(pressure.kind === "constant" && pressure.value).toBeCloseTo(4351.1321, 3);
    expect(temperatureDegF.distribution).toEqual({ kind: "constant", value: 212 });
    expect(row.sample.separatorTest.carbonDioxide).toBeCloseTo(0.02, 15);
  });

  it("reads a specific gravity as API: water, 1, is 10 degAPI", () => {
    const api = good({ condensate_gravity: "0.75" }, { condensate_gravity: "sg" });
    // 141.5 / 0.75 - 131.5 by the definition of API gravity
    expect(api.sample.separatorTest.condensateApi).toBeCloseTo(57.1667, 4);
  });

  it("takes a blank stock tank as vented and a blank yield from the separator test", () => {
    const row = good({
      stock_tank_gor: "",
      stock_tank_gas_gravity: "",
      condensate_yield_low: "",
      condensate_yield_high: "",
    });
    expect(row.sample.separatorTest.stockTankGas).toBeNull();
    expect(row.inputs.uncertain.condensateYieldStbPerMmscf.distribution.kind).toBe("constant");
    expect(row.warnings.map(({ column }) => column)).toContain("condensate_yield_best");
  });

  it("ends a normal range where physics does, and says with what chance it would go on", () => {
    const row = good({ water_saturation_low: "0.1", water_saturation_high: "0.5" });
    expect(row.inputs.uncertain.waterSaturation.distribution).toMatchObject({ minimum: 0 });
    // mean 0.3, standard deviation 0.4 / (2 x 1.2816) = 0.1561: below 0 with a chance of 2.7 %
    const warning = row.warnings.find(({ column }) => column === "water_saturation_low");
    expect(warning?.reason).toContain("2.7 %");
  });

  it("finds every impossible range of a row, not only the first", () => {
    const columns = columnsOf({
      porosity_low: "15",
      porosity_high: "20",
      gas_recovery_low: "68",
      gas_recovery_best: "76",
      gas_recovery_high: "83",
    });
    expect(columns).toEqual([
      "porosity_low",
      "porosity_high",
      "gas_recovery_low",
      "gas_recovery_best",
      "gas_recovery_high",
    ]);
  });

  it("refuses a figure that no reservoir can have, though most of its range is possible", () => {
    // Cubic packing of equal spheres leaves 1 - pi/6 = 47.6 % of the volume, the loosest there is.
    const problems = problemsOf({ porosity_low: "0.3", porosity_high: "0.6" });
    expect(problems).toMatchObject([{ line: 3, column: "porosity_high", value: "0.6" }]);
    expect(problems[0].reason).toContain("cannot be 0.6: equal spheres");
  });

  it("names an impossible figure in its own unit, and asks about that unit", () => {
    const problems = problemsOf(
      { porosity_low: "30", porosity_high: "60" },
      { porosity_low: "%", porosity_high: "%" },
    );
    expect(problems).toMatchObject([{ column: "porosity_high", value: "60" }]);
    expect(problems[0].reason).toMatch(/cannot be 60 %.*Check the unit in row 2\./);
  });

  it("says of a figure below zero that none is negative", () => {
    const [problem] = problemsOf({ porosity_low: "-0.1" });
    expect(problem).toMatchObject({ column: "porosity_low", value: "-0.1" });
    expect(problem.reason).toContain("no porosity is negative");
  });

  it("refuses a range of possible figures that would lose more than 5 % past what is possible", () => {
    // mean 0.275, standard deviation 0.45 / (2 x 1.2816) = 0.1756: below 0 with a chance of 5.9 %
    const problems = problemsOf({ water_saturation_low: "0.05", water_saturation_high: "0.5" });
    expect(problems).toMatchObject([{ column: "water_saturation_low", value: "0.05" }]);
    expect(problems[0].reason).toContain("below 0 with a chance of 5.9 %");
  });

  it.each([
    ["low", { porosity_low: "0.02", porosity_high: "0.04" }, "porosity_low", "0.02"],
    ["high", { porosity_low: "0.25", porosity_high: "0.35" }, "porosity_high", "0.35"],
    ["wide", { porosity_low: "0.06", porosity_high: "0.2" }, "porosity_high", "0.2"],
  ])("warns of an unusually %s range in a filled cell", (_, changes, column, value) => {
    const { warnings } = good(changes as SheetRow);
    const about = warnings.filter((warning) => warning.column?.startsWith("porosity"));
    expect(about.at(-1)).toMatchObject({ line: 3, column, value });
    expect(about.some((warning) => warning.column === "porosity_best")).toBe(false);
  });

  it.each([
    ["high below low", { area_low: "3000", area_high: "1000" }, "area_high"],
    ["a low without its high", { area_high: "" }, "area_high"],
    ["a best that contradicts P90 and P10", { area_best: "3000" }, "area_best"],
    ["a pert without its best", { gas_recovery_best: "" }, "gas_recovery_best"],
    ["an unknown shape", { area_shape: "bell" }, "area_shape"],
    ["an input that is left out", { area_low: "", area_high: "" }, "area_best"],
    ["a gas without its gravity", { stock_tank_gas_gravity: "" }, "stock_tank_gas_gravity"],
    ["a share above one", { working_interest: "80" }, "working_interest"],
    ["a sub-class of another class", { prms_sub_class: "lead" }, "prms_sub_class"],
    ["a sample of tomorrow", { sampled_on: "2026-12-02" }, "sampled_on"],
    ["a day that is none", { sampled_on: "2025-02-30" }, "sampled_on"],
    ["a base pressure that is no atmosphere", { base_pressure: "515" }, "base_pressure"],
    ["an API gravity of water", { condensate_gravity: "10" }, "condensate_gravity"],
    ["a name without a letter", { reservoir: "—" }, "reservoir"],
  ])("refuses %s in its column", (_, changes, column) => {
    expect(columnsOf(changes as SheetRow)).toContain(column);
  });

  it("refuses the same reservoir twice, whatever its capitals", () => {
    const rows = read([goodRow(), goodRow({ reservoir: "MAIN-SAND" })]);
    expect(rows[1]).toMatchObject({
      kind: "bad",
      row: { line: 4, problems: [{ reason: "Line 3 has this reservoir already." }] },
    });
  });

  it("refuses two values for one field, and takes a blank from the field's other row", () => {
    const rows = read([
      goodRow(),
      goodRow({ reservoir: "B", working_interest: "0.5" }),
      goodRow({ reservoir: "C", operator: "", working_interest: "" }),
    ]);
    expect(rows[1]).toMatchObject({ row: { problems: [{ column: "working_interest" }] } });
    expect(rows[2]).toMatchObject({
      kind: "good",
      row: { fieldData: { operator: "Example Gas", workingInterest: 0.8 } },
    });
  });
});
