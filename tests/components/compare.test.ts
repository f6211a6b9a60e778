import { describe, expect, it } from "vitest";
import { possibleRevisions } from "@/app/(workspace)/compare/_components/side-picker";
import type { RevisionRangeView } from "@/app/api/v1/fields/file-schema";
import {
  comparisonFinding,
  distinctLabels,
  inputsFinding,
  otherDifferences,
  shortLabels,
} from "@/components/compare/comparison-words";
import { comparisonHref, readComparison, readSide, writeSide } from "@/components/compare/sides";
import { inputDifferences } from "@/components/estimate/differences";
import { buildInputs } from "../analytics/volumetrics/estimate-inputs";

const id = "0b0f6b3e-3c1d-4a52-9c3c-0d9c7e1f5a11";
const other = "8a9d3a0e-7d0b-4d57-8a53-5a0c1f7f2b22";
const plain = (text: string) => text.replace(/\s/g, " ");
const range = (p50: number) => ({ p90: p50 / 2, p50, p10: p50 * 2, mean: p50 });

describe("readSide", () => {
  it("reads what writeSide wrote", () => {
    for (const side of [
      { kind: "estimate", estimateId: id },
      { kind: "concept", estimateId: id, concept: "cycling" },
      { kind: "field", fieldId: id },
    ] as const) {
      expect(readSide(writeSide(side))).toEqual(side);
    }
  });

  it("takes nothing for what it does not understand", () => {
    for (const text of [null, "", "estimate:7", `concept:${id}:magic`, `well:${id}`]) {
      expect(readSide(text)).toBeNull();
    }
  });
});

describe("comparisonHref", () => {
  it("holds both sides and the result, and reads back", () => {
    const address = {
      left: { kind: "field", fieldId: id },
      right: { kind: "concept", estimateId: other, concept: "depletion" },
      result: "salesGasScf",
    } as const;
    const href = comparisonHref(address);
    expect(readComparison(new URL(href, "http://localhost").searchParams)).toEqual(address);
    expect(comparisonHref({ left: null, right: null })).toBe("/compare");
  });
});

describe("comparisonFinding", () => {
  it("says which has more at P50, or that both have the same", () => {
    const of = (left: number, right: number) =>
      plain(
        comparisonFinding(
          { label: "Larkhaven", range: range(left) },
          { label: "Pellow North", range: range(right) },
          "MMSTB",
        ),
      );
    expect(of(30, 36)).toBe("Pellow North has 20 % more at P50: 36.0 against 30.0 MMSTB");
    expect(of(30, 15)).toMatch(/^Pellow North has 50 % less/);
    expect(of(30, 30.01)).toMatch(/^Both have the same P50/);
  });
});

describe("inputsFinding", () => {
  it("counts the inputs that differ", () => {
    const left = buildInputs();
    const right = buildInputs({ porosity: { kind: "constant", value: 0.1 } });
    expect(inputsFinding(inputDifferences(left, left))).toBe("No input differs");
    expect(inputsFinding(inputDifferences(right, left))).toBe("One of ten inputs differs");
  });
});

describe("otherDifferences", () => {
  it("names the correlations and the separator test where they differ", () => {
    const left = buildInputs();
    const right = {
      ...left,
      correlations: [{ a: "areaAcres" as const, b: "netThicknessFt" as const, rank: 0.123 }],
    };
    expect(otherDifferences(left, left)).toBeNull();
    expect(otherDifferences(left, right)).toBe("The rank correlations differ too.");
  });

  it("does not mind in which order a pair is named", () => {
    const pair = (a: "areaAcres" | "porosity", b: "areaAcres" | "porosity") => ({
      ...buildInputs(),
      correlations: [{ a, b, rank: 0.3 }],
    });
    expect(
      otherDifferences(pair("areaAcres", "porosity"), pair("porosity", "areaAcres")),
    ).toBeNull();
  });
});

describe("possibleRevisions", () => {
  it("takes for a concept only revisions with a recovery plan that were run", () => {
    const revision = (
      estimateId: string,
      recoveryRoute: "depletionExperiment" | null,
      p50: number | null,
    ) =>
      ({
        estimateId,
        recoveryRoute,
        condensateRecoverableStb: p50 === null ? null : range(p50),
      }) as RevisionRangeView;
    const revisions = [
      revision("typed", null, 30),
      revision("planned", "depletionExperiment", 30),
      revision("not run", "depletionExperiment", null),
    ];
    const idsOf = (kind: "estimate" | "concept") =>
      possibleRevisions(revisions, kind).map(({ estimateId }) => estimateId);
    expect(idsOf("estimate")).toEqual(["typed", "planned"]);
    expect(idsOf("concept")).toEqual(["planned"]);
  });
});

describe("distinctLabels", () => {
  it("names the two however long their names are", () => {
    expect(distinctLabels("Larkhaven, Main sand, r3", "Pellow North, Marrow sand, r2")).toEqual([
      "Larkhaven, Main sand, r3",
      "Pellow North, Marrow sand, r2",
    ]);
    expect(distinctLabels("Larkhaven", "Larkhaven")).toEqual(["Left", "Right"]);
  });
});

describe("shortLabels", () => {
  it("leaves out what both have in common", () => {
    expect(shortLabels("Larkhaven, Main sand, r3", "Larkhaven, Main sand, r5")).toEqual([
      "r3",
      "r5",
    ]);
    expect(shortLabels("Larkhaven, Main sand, r3", "Larkhaven, Main sand, r3, cycling")).toEqual([
      "r3",
      "r3, cycling",
    ]);
    expect(shortLabels("Larkhaven", "Pellow North")).toEqual(["Larkhaven", "Pellow North"]);
    expect(shortLabels("Larkhaven, Main sand, r3", "Pellow North, Marrow sand, r2")).toEqual([
      "Left",
      "Right",
    ]);
  });
});
