import { describe, expect, it } from "vitest";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import {
  emptyComposition,
  readCompositionText,
  totalProblem,
} from "@/components/fluid/composition-text";
import { failuresAtCells, rowChecks } from "@/components/fluid/row-checks";
import { newSampleText, readSample } from "@/components/fluid/sample-text";
import { usualStages } from "@/components/fluid/stages-text";
import { takeLabSheet } from "@/components/fluid/take-lab-sheet";

const read = (cells: Record<string, string>) =>
  readCompositionText({ ...emptyComposition(), cells });

describe("readCompositionText(text)", () => {
  it("asks for what heptanes plus lacks, at its field", () => {
    const { fields, sheet } = read({ "stream.light.C1": "93", "stream.plus.molePercent": "7" });
    expect(fields["stream.plus.molecularWeight"].problem).toBe(
      "Heptanes plus needs its molecular weight.",
    );
    expect(fields["stream.plus.specificGravity"].problem).toBe(
      "Heptanes plus needs its specific gravity.",
    );
    expect(sheet).toBeNull();
  });

  it("marks a negative share at its cell", () => {
    expect(read({ "stream.light.C1": "-3" }).fields["stream.light.C1"].problem).not.toBeNull();
  });
});

describe("totalProblem(name, reading)", () => {
  it.each([
    ["93", /Below 95 % something is missing/],
    ["100", null],
    ["95", null],
  ])("of %s mol %%", (share, words) => {
    const problem = totalProblem("stream", read({ "stream.light.C1": share }));
    if (words === null) expect(problem).toBeNull();
    else expect(problem).toMatch(words);
  });

  it("says of more than 105 % that something is counted twice", () => {
    const reading = read({ "stream.light.C1": "90", "stream.light.C2": "20" });
    expect(totalProblem("stream", reading)).toMatch(/counted twice/);
  });

  it("counts the figures that the sum leaves out", () => {
    const reading = read({ "stream.light.C1": "95", "stream.light.C2": "-3" });
    expect(totalProblem("stream", reading)).toBe(
      "One figure cannot be read; the sum leaves it out.",
    );
  });
});

describe("failuresAtCells(findings, rowsOfTable)", () => {
  const table: DepletionTable = {
    temperatureDegF: 220,
    dewPointPsia: 4000,
    rows: [4000, 2000, 3000].map((pressurePsia, index) => ({
      pressurePsia,
      liquidPercent: index,
      cumulativeProducedMolePercent: index * 10,
      gasZ: 0.9,
      twoPhaseZ: null,
      viscosityCp: null,
      producedGas: null,
    })),
  };

  it("finds a pressure out of order without a composition, in the row of the grid it stands in", () => {
    const cells = failuresAtCells(rowChecks(table), [0, 2, 5]);
    expect(Object.keys(cells)).toEqual(["rows.5.pressurePsia"]);
    expect(cells["rows.5.pressurePsia"]).toMatch(/Pressures of a depletion fall/);
  });

  it("leaves checks that passed or only warn out", () => {
    const rows = table.rows.slice(0, 2);
    expect(failuresAtCells(rowChecks({ ...table, rows }), [0, 1])).toEqual({});
  });
});

describe("readSample(text)", () => {
  it("assumes a two-stage train while nobody has given separators, and keeps it with a computed test", () => {
    const composition = { ...emptyComposition(), cells: { "stream.light.C1": "100" } };
    const text = { ...newSampleText(null), composition };
    expect(readSample(text)).toMatchObject({ isStagesAssumed: true, stages: usualStages });
    const computed = readSample({ ...text, origin: "computed" });
    expect(computed.study?.stages).toEqual(usualStages);
  });
});

describe("takeLabSheet(read, now)", () => {
  it("does not call a cell empty into which it puts the file\u2019s words", () => {
    const message = "\u201cl9.9\u201d is not a number. Left empty.";
    const { remarks } = takeLabSheet(
      {
        composition: null,
        depletion: null,
        stages: null,
        separatorTest: null,
        read: [],
        problems: [
          { line: 4, column: 2, value: "l9.9", place: "depletion.rows.1.liquidPercent", message },
        ],
      },
      newSampleText(null),
    );
    expect(remarks.depletion["rows.1.liquidPercent"]).toMatch(/is not a number\.$/);
  });
});
