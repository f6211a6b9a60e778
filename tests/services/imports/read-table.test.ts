import { describe, expect, it } from "vitest";
import { MAX_COLUMNS, MAX_ROWS, readTable } from "@/services/imports/read-table";
import { templateCsv } from "@/services/imports/template";
import { goodRow, sheet } from "../../support/import-sheet";

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
const read = (text: string) => readTable(bytes(text));

describe("readTable(bytes)", () => {
  it.each([",", ";", "\t"])("finds the separator %j by itself", (delimiter) => {
    const table = read(sheet([goodRow()], { delimiter }));
    expect(table).toMatchObject({ delimiter, problems: [] });
    expect(table.rows[0].cells.field).toBe("Test field");
  });

  it("passes over a byte order mark and a line that names the separator", () => {
    const table = read(`\ufeffsep=;\r\n${sheet([goodRow()], { delimiter: ";" })}`);
    expect(table.problems).toEqual([]);
    expect(table.rows[0].line).toBe(4);
  });

  it("reads UTF-16 as spreadsheets save it", () => {
    const text = `\ufeff${sheet([goodRow({ field: "Ås" })], { delimiter: "\t" })}`;
    const table = readTable(new Uint8Array(Buffer.from(text, "utf16le")));
    expect(table).toMatchObject({ encoding: "utf-16le", problems: [] });
    expect(table.rows[0].cells.field).toBe("Ås");
  });

  it("reads Windows-1252 and says that it did", () => {
    const table = readTable(
      new Uint8Array(Buffer.from(sheet([goodRow({ field: "Ås" })]), "latin1")),
    );
    expect(table.rows[0].cells.field).toBe("Ås");
    expect(table.warnings[0].reason).toContain("Windows-1252");
  });

  it("counts lines of the file, through line breaks inside quoted cells and blank lines", () => {
    const text = sheet([
      goodRow({ area_source: "map,\nedition 2" }),
      goodRow({ reservoir: "Second" }),
    ]);
    expect(read(text).rows.map(({ line }) => line)).toEqual([3, 5]);
    const blank = `${sheet([goodRow()])}\r\n${sheet([goodRow()]).split("\r\n")[2]}\r\n`;
    expect(read(blank).rows.map(({ line }) => line)).toEqual([3, 5]);
  });

  it("leaves rows alone whose first cell begins with #", () => {
    const table = read(sheet([goodRow({ basin: "# remark" }), goodRow()]));
    expect(table).toMatchObject({ remarkLines: [3], rows: [{ line: 4 }] });
  });

  it("reads its own template", () => {
    expect(read(templateCsv().replaceAll("# ", ""))).toMatchObject({
      problems: [],
      rows: [{ line: 3 }, { line: 4 }],
    });
  });

  it("names a misspelt column and the one that was meant", () => {
    const [problem] = read(sheet([goodRow()]).replace("area_low", "are_low")).problems;
    expect(problem).toMatchObject({ line: 1, column: "are_low" });
    expect(problem.reason).toContain("Did you mean area_low?");
  });

  it("names a unit that the column does not take, with those it takes", () => {
    const [problem] = read(sheet([goodRow()], { units: { depth: "furlong" } })).problems;
    expect(problem).toEqual({
      line: 2,
      column: "depth",
      value: "furlong",
      reason: "Not a unit of this column; use one of ft, m, km.",
    });
  });

  it("refuses gauge pressures, and a missing unit", () => {
    const gauge = read(sheet([goodRow()], { units: { pressure_low: "psig" } })).problems;
    expect(gauge[0].reason).toContain("absolute");
    const missing = read(sheet([goodRow()], { units: { area_low: "" } })).problems;
    expect(missing[0]).toMatchObject({ line: 2, column: "area_low", value: "" });
  });

  it.each([
    ["an empty file", ""],
    ["a header alone", sheet([]).split("\r\n")[0]],
    ["a sheet without a units row", sheet([goodRow()], { units: { basin: "Somewhere" } })],
    ["an unclosed quotation mark", `${sheet([goodRow()])}"open`],
    ["binary data", "a\0b"],
    ["a column that is there twice", sheet([goodRow()]).replace("area_best", "area_low")],
  ])("refuses %s with a reason", (_, text) => {
    const table = read(text);
    expect(table.rows).toEqual([]);
    expect(table.problems[0].reason).not.toBe("");
  });

  it("refuses a heading without end, at once and without repeating it", () => {
    const { problems } = read(sheet([goodRow()]).replace("area_low", "a".repeat(200_000)));
    expect(problems).toEqual([
      {
        line: 1,
        column: null,
        value: `${"a".repeat(80)}…`,
        reason: "A heading has 200000 characters; up to 200 are read. Is the first row the header?",
      },
    ]);
  });

  it("suggests no column for a name that is no slip of one", () => {
    const [problem] = read(sheet([goodRow()]).replace("area_low", "a".repeat(200))).problems;
    expect(problem.reason).toContain("Begin the heading with #");
    expect(problem.column).toBe(`${"a".repeat(80)}…`);
  });

  it("refuses more columns than it reads", () => {
    const { problems } = read(sheet([goodRow()]).replace("area_low", ",".repeat(MAX_COLUMNS)));
    expect(problems).toHaveLength(1);
    expect(problems[0]).toMatchObject({ line: 1 });
    expect(problems[0].reason).toContain("more than 300 columns");
  });

  it.each([
    ["one row", ",".repeat(5_000_000), "columns"],
    ["many rows", `${",".repeat(200)}\n`.repeat(20_000), "cells"],
  ])("refuses millions of empty cells in %s without reading them", (_, text, what) => {
    expect(read(text).problems[0].reason).toContain(what);
  });

  it("keeps the first hundred problems and counts the others", () => {
    const wrong = Array.from({ length: 150 }, (_, index) => `own ${index}`).join(",");
    const { problems } = read(sheet([goodRow()]).replace("area_low", wrong));
    expect(problems).toHaveLength(101);
    expect(problems.at(-1)).toMatchObject({ line: null, reason: "And 50 more." });
  });

  it("refuses more rows than it takes at a time", () => {
    const lines = sheet([goodRow()]).split("\r\n");
    const rows = Array.from({ length: MAX_ROWS + 1 }, () => lines[2]);
    const table = read([lines[0], lines[1], ...rows].join("\r\n"));
    expect(table.problems[0].reason).toContain("2001 rows");
  });
});
