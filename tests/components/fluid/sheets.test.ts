import { describe, expect, it } from "vitest";
import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { noStudy } from "@/analytics/fluid/sample-study-schema";
import {
  emptyComposition,
  placeOfPointer,
  readCompositionText,
  textOfComposition,
} from "@/components/fluid/composition-text";
import {
  depletionGrid,
  emptyDepletion,
  readDepletion,
  textOfDepletion,
  withCells,
  withoutRow,
} from "@/components/fluid/depletion-text";
import { cellsOfClipboard, fillFrom, neighbour, turned } from "@/components/fluid/grid-paste";
import { differingParts, mergeSamples } from "@/components/fluid/sample-differences";
import { newSampleText, readSample, textOfSample } from "@/components/fluid/sample-text";
import { readStages, textOfStages, withStageCount } from "@/components/fluid/stages-text";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const stream = {
  light: { CO2: 1.9, N2: 0.6, C1: 74.2, C2: 8.1, C3: 4.2, C6: 0.95 },
  carbonNumbers: [
    { carbonNumber: 7, molePercent: 1.5 },
    { carbonNumber: 8, molePercent: 1.25 },
  ],
  plus: { carbonNumber: 9, molePercent: 3.55, molecularWeight: 181.2, specificGravity: 0.815 },
};
const wellstream: CompositionSheet = { kind: "wellstream", stream };
const streams: CompositionSheet = {
  kind: "separatorStreams",
  gas: { light: { C1: 90, C2: 10 }, carbonNumbers: [], plus: null },
  liquid: stream,
  gasLiquidRatioScfPerSeparatorBarrel: 4428,
  liquidDensityLbPerCubicFoot: 41.2,
  basePressurePsia: 15.025,
};
const table: DepletionTable = {
  temperatureDegF: 255,
  dewPointPsia: 5215,
  rows: [5215, 4200, 600].map((pressurePsia, index) => ({
    pressurePsia,
    liquidPercent: index === 2 ? null : index * 9.8,
    cumulativeProducedMolePercent: index * 11.4,
    gasZ: 0.931,
    twoPhaseZ: null,
    viscosityCp: null,
    producedGas: index === 1 ? stream : null,
  })),
};

describe("textOfComposition(sheet)", () => {
  it.each([
    ["an extended wellstream", wellstream],
    ["separator streams", streams],
  ])("reads %s back as it was", (_, sheet) => {
    const text = textOfComposition(sheet);
    const reading = readCompositionText(text);
    // A light component that the sheet leaves out stays left out.
    expect(reading.sheet).toEqual(sheet);
    expect(reading.incomplete).toEqual([]);
  });
});

describe("readCompositionText(text)", () => {
  const typed = (cells: Record<string, string>) => {
    const empty = emptyComposition();
    return readCompositionText({ ...empty, cells: { ...empty.cells, ...cells } });
  };

  it("is empty and no fault before anything is typed", () => {
    expect(typed({})).toMatchObject({ isEmpty: true, sheet: null });
  });

  it("takes arithmetic and sums what is reported", () => {
    const reading = typed({ "stream.light.C1": "60+30", "stream.light.C2": "9.5 %" });
    expect(reading.fields["stream.light.C1"].preview).toBe("= 90 %");
    expect(reading.totals.stream).toBe(99.5);
    expect(reading.sheet).toEqual({
      kind: "wellstream",
      stream: { light: { C1: 90, C2: 9.5 }, carbonNumbers: [], plus: null },
    });
  });

  it("asks for weight and gravity of a plus fraction that is there", () => {
    const reading = typed({ "stream.light.C1": "95", "stream.plus.molePercent": "5" });
    expect(reading.sheet).toBeNull();
    expect(reading.incomplete).toEqual([
      "stream.plus.molecularWeight",
      "stream.plus.specificGravity",
    ]);
  });

  it("keeps what cannot be read, with a reason at its place", () => {
    const reading = typed({ "stream.light.C1": "9o", "stream.light.C2": "120" });
    expect(reading.fields["stream.light.C1"].problem).toContain("o");
    expect(reading.fields["stream.light.C2"].problem).toBe("A share cannot be more than 100 %.");
    expect(reading.sheet).toBeNull();
  });
});

describe("placeOfPointer(pointer, under)", () => {
  it.each([
    ["#/sheet/stream/plus/molecularWeight", "stream.plus.molecularWeight"],
    ["#/sheet/liquid/carbonNumbers/2/molePercent", "liquid.carbonNumbers.9"],
    ["#/stream/light/C1", "stream.light.C1"],
  ])("takes %s to %s", (pointer, place) => {
    expect(placeOfPointer(pointer, "sheet")).toBe(place);
  });
});

describe("textOfDepletion(table)", () => {
  it("reads back as the same table, with what was not reported still missing", () => {
    expect(readDepletion(textOfDepletion(table)).table).toEqual(table);
  });

  it("passes over rows without a figure, and says which rows the table's are", () => {
    const text = withCells(emptyDepletion(255, 5215), {
      "rows.0.pressurePsia": "5,215",
      "rows.3.pressurePsia": "290 bar",
    });
    const reading = readDepletion(text);
    expect(reading.rowsOfTable).toEqual([0, 3]);
    expect(reading.table?.rows[1].pressurePsia).toBeCloseTo(4206.1, 1);
  });

  it("opens rows for what is pasted below the last, and closes up when one is taken out", () => {
    const wider = withCells(emptyDepletion(), { "rows.14.pressurePsia": "500" });
    expect(wider.rowCount).toBe(15);
    const without = withoutRow(wider, 2);
    expect(without.cells["rows.13.pressurePsia"]).toBe("500");
    expect(without.cells["rows.14.pressurePsia"]).toBeUndefined();
  });
});

describe("fillFrom(grid, start, block)", () => {
  const grid = depletionGrid(emptyDepletion(), "figures");

  it("lays a spreadsheet's block from the cell on, and counts what found no cell", () => {
    const block = cellsOfClipboard("4,200\t9.8\r\n3,200\t15.6\r\n");
    expect(block && fillFrom(grid, "rows.1.pressurePsia", block)).toEqual({
      changes: {
        "rows.1.pressurePsia": "4,200",
        "rows.1.liquidPercent": "9.8",
        "rows.2.pressurePsia": "3,200",
        "rows.2.liquidPercent": "15.6",
      },
      leftOut: 0,
    });
    expect(fillFrom(grid, "rows.39.viscosityCp", [["1", "2"], ["3"]]).leftOut).toBe(2);
  });

  it("leaves a single figure to its field, and turns a table that runs across", () => {
    expect(cellsOfClipboard("4200\n")).toBeNull();
    expect(turned([["p", "1", "2"], ["s"]])).toEqual([
      ["p", "s"],
      ["1", ""],
      ["2", ""],
    ]);
  });
});

describe("neighbour(grid, from, step)", () => {
  it("passes over rows that have no cell in the column", () => {
    const grid = [
      ["a", "b"],
      ["c", null],
      ["d", "e"],
    ];
    expect(neighbour(grid, "b", 1)).toBe("e");
    expect(neighbour(grid, "a", -1)).toBeNull();
  });
});

describe("withStageCount(text, count)", () => {
  it("puts separators before the tank, which stays the last", () => {
    const stages = [
      { pressurePsia: 815, temperatureDegF: 95 },
      { pressurePsia: 14.696, temperatureDegF: 60 },
    ];
    const three = withStageCount(textOfStages(stages), 3);
    expect(readStages(three)).toMatchObject({
      stages: null,
      incomplete: ["1.pressurePsia", "1.temperatureDegF"],
    });
    expect(three.cells["2.pressurePsia"]).toBe("14.696");
    expect(readStages(withStageCount(three, 2)).stages).toEqual(stages);
  });
});

describe("readSample(text)", () => {
  const stored = {
    name: "HD-2B/07",
    sampledOn: "2026-03-11",
    laboratory: "Marlstane Fluids",
    separatorTest: buildInputs().fluid,
    study: { ...noStudy, composition: wellstream, depletion: table },
  };

  it("reads a stored sample back as it was", () => {
    const reading = readSample(textOfSample(stored));
    expect(reading.study).toEqual(stored.study);
    expect(reading.separator.test).toEqual(stored.separatorTest);
    // Without a list of its own the test's separators are used, and a tank at standard conditions.
    expect(reading.stages?.at(-1)).toEqual({ pressurePsia: 14.696, temperatureDegF: 60 });
  });

  it("does not keep a part that was begun and cannot be read, and names it", () => {
    const text = textOfSample(stored);
    const reading = readSample({
      ...text,
      composition: {
        ...text.composition,
        cells: { ...text.composition.cells, "stream.light.C1": "7x" },
      },
    });
    expect(reading.study).toBeNull();
    expect(reading.unfinished).toEqual(["the composition"]);
  });

  it("proposes no figure for a new sample", () => {
    const reading = readSample(newSampleText(null));
    expect(reading.separator.test).toBeNull();
    expect(reading.composition.isEmpty).toBe(true);
    expect(reading.stages).toBeNull();
  });
});

describe("differingParts(mine, theirs)", () => {
  it("names what differs whatever the order of keys, and merges part by part", () => {
    const mine = {
      name: "A",
      sampledOn: "2026-03-11",
      laboratory: "",
      separatorTest: buildInputs().fluid,
      study: { ...noStudy, composition: wellstream },
    };
    const theirs = {
      ...mine,
      name: "B",
      separatorTest: Object.fromEntries(
        Object.entries(mine.separatorTest).reverse(),
      ) as typeof mine.separatorTest,
      study: { ...noStudy, depletion: table },
    };
    expect(differingParts(mine, theirs)).toEqual(["name", "composition", "depletion"]);
    expect(mergeSamples(mine, theirs, ["depletion"])).toEqual({
      ...mine,
      study: { ...mine.study, depletion: table },
    });
  });
});
