import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import type { MaterialBalanceResponse } from "@/app/api/v1/calculations/material-balance-schema";
import { cellsOfClipboard, fillFrom } from "@/components/fluid/grid-paste";
import {
  balanceAdvice,
  balanceTitle,
  balanceWarnings,
  placeInRange,
} from "@/components/recovery/pressure-over-z/balance-words";
import { PressureOverZChart } from "@/components/recovery/pressure-over-z/pressure-over-z-chart";
import {
  emptyRecords,
  hasEntries,
  placeOfRecord,
  readRecords,
  recordsGrid,
  withoutRecord,
  withRecordCells,
} from "@/components/recovery/pressure-over-z/records-text";

const pasted = "6,500\t0\t0\n5900\t3.4\t410\n\t\t\n5200\t8\t0.98 MMSTB\n4500\t14.7\t1650";
const { changes } = fillFrom(recordsGrid, "records.0.pressurePsia", cellsOfClipboard(pasted) ?? []);
const text = withRecordCells(emptyRecords, changes);

describe("readRecords(text)", () => {
  it("reads a block from a spreadsheet in the units of its columns, or in those typed", () => {
    const { records, rowsOfRecords } = readRecords(text);
    expect(records).toEqual([
      { pressurePsia: 6500, surfaceGasScf: 0, condensateStb: 0 },
      { pressurePsia: 5900, surfaceGasScf: 3.4e9, condensateStb: 410_000 },
      { pressurePsia: 5200, surfaceGasScf: 8e9, condensateStb: 980_000 },
      { pressurePsia: 4500, surfaceGasScf: 14.7e9, condensateStb: 1_650_000 },
    ]);
    expect(rowsOfRecords).toEqual([0, 1, 3, 4]);
  });

  it("gives no records while a figure is missing or no figure, and says where", () => {
    const gap = readRecords(withRecordCells(text, { "records.3.condensateStb": "" }));
    expect(gap).toMatchObject({ records: null, incomplete: [4] });
    const words = readRecords(withRecordCells(text, { "records.1.pressurePsia": "shut in" }));
    expect(words.records).toBeNull();
    expect(words.fields["records.1.pressurePsia"].problem).not.toBeNull();
  });

  it("is empty until something is typed", () => {
    expect(hasEntries(emptyRecords)).toBe(false);
    expect(hasEntries(text)).toBe(true);
    expect(readRecords(emptyRecords)).toMatchObject({ records: [], rowsOfRecords: [] });
  });
});

describe("withoutRecord(text, row)", () => {
  it("moves the rows below up", () => {
    const { records } = readRecords(withoutRecord(text, 1));
    expect(records?.map(({ pressurePsia }) => pressurePsia)).toEqual([6500, 5200, 4500]);
  });
});

describe("placeOfRecord(pointer, rows)", () => {
  it("finds the cell that the server refuses past an empty row", () => {
    const rows = readRecords(text).rowsOfRecords;
    expect(placeOfRecord("#/records/2/surfaceGasScf", rows)).toBe("records.3.surfaceGasScf");
    expect(placeOfRecord("#/records", rows)).toBeNull();
    expect(placeOfRecord("#/records/9/surfaceGasScf", rows)).toBeNull();
  });
});

const result: MaterialBalanceResponse = {
  wellstreamInPlaceScf: 1e11,
  dryGasInPlaceScf: 0.9e11,
  condensateInPlaceStb: 11e6,
  line: { initialPressureOverZ: 6000, rSquared: 0.9987 },
  producedFraction: 0.4,
  dewPointPsia: 4800,
  vapourEquivalentScfPerStb: 790,
  points: [0, 2e10, 4e10].map((produced, i) => ({
    pressurePsia: 6500 - 1500 * i,
    wellstreamProducedScf: produced,
    z: 0.9,
    pressureOverZ: 6000 * (1 - produced / 1e11),
    linePressureOverZ: 6000 * (1 - produced / 1e11),
    gasZ: i === 2 ? 0.95 : 0.9,
    gasPressureOverZ: i === 2 ? 3400 : 6000 * (1 - produced / 1e11),
    isBelowDewPoint: i === 2,
  })),
  withGasZ: {
    wellstreamInPlaceScf: 9.3e10,
    initialPressureOverZ: 6050,
    rSquared: 0.996,
    bias: -0.07,
  },
  warnings: [
    { code: "few_pressures", severity: "warning", input: "records", message: "Few." },
    {
      code: "corrosive_gas",
      severity: "warning",
      input: "separatorTest.carbonDioxide",
      message: "Acid.",
    },
  ],
};

describe("words of a p/z line", () => {
  const range = { p90: 8e10, p50: 1.1e11, p10: 1.5e11 };

  it("say where the gas in place lies in the volumetric range", () => {
    expect(balanceTitle(result, range)).toBe(
      "Pressures show 100 Bscf in place, within the volumetric range, 9\u00a0% below its P50",
    );
    expect(balanceTitle(result, null)).toBe("Pressures show 100 Bscf in place");
    expect(placeInRange(7e10, range)).toBe("below the volumetric P90 of 80.0");
    expect(placeInRange(2e11, range)).toBe("above the volumetric P10 of 150");
    expect(placeInRange(1.1e11, range)).toBe("at the volumetric P50");
    expect(balanceAdvice(1e11, range)).toBeNull();
    expect(balanceAdvice(7e10, range)).toMatch(/connected/);
    expect(balanceAdvice(2e11, range)).toMatch(/water/);
  });

  it("leave out what stands beside the separator sheet already", () => {
    expect(balanceWarnings(result).map(({ code }) => code)).toEqual(["few_pressures"]);
  });
});

describe("PressureOverZChart", () => {
  const draw = (volumetric: { p90: number; p50: number; p10: number } | null) =>
    renderToStaticMarkup(
      <PressureOverZChart
        result={result}
        volumetric={volumetric}
        source="Laboratory"
        fileName="x"
      />,
    );

  it("reads out its line and the range that it stands beside", () => {
    const drawn = draw({ p90: 8e10, p50: 1.1e11, p10: 1.5e11 });
    expect(drawn).toContain("on a line from 6,000 psia to 100 Bscf");
    expect(drawn).toContain("Volumetric P90 80.0, P50 110, P10 150 Bscf.");
    expect(drawn).toContain('class="area"');
  });

  it("stands alone without an estimate, with the bent line of the gas's own z", () => {
    const drawn = draw(null);
    expect(drawn).not.toContain('class="area"');
    expect(drawn).toContain("line-dashed");
    expect(drawn.match(/data-shape="open"/g)).toHaveLength(1);
  });
});
