import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { checkInputs } from "@/analytics/volumetrics/check-inputs";
import { prepareInputs } from "@/analytics/volumetrics/prepare-inputs";
import { buildPlan } from "../recovery/published-curve";
import { buildInputs } from "./estimate-inputs";

type Case = [name: string, weight: number, p90: number, p10: number];

const contacts = (caseSet: string | undefined, ...cases: Case[]): Distribution => ({
  kind: "scenarios",
  ...(caseSet !== undefined && { caseSet }),
  scenarios: cases.map(([name, weight, p90, p10]) => ({
    name,
    weight,
    distribution: { kind: "lognormalP90P10", p90, p10 },
  })),
});

const area = contacts("Contact", ["Spill", 0.4, 900, 1_600], ["Base", 0.6, 1_800, 3_600]);
const thickness = contacts("Contact", ["Spill", 0.4, 40, 80], ["Base", 0.6, 70, 130]);

function refusal(act: () => unknown): DomainError {
  try {
    act();
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The inputs were accepted.");
}

describe("prepareInputs with cases that inputs share", () => {
  it("lists each set with its cases and inputs", () => {
    const { caseSets } = prepareInputs(buildInputs({ areaAcres: area, netThicknessFt: thickness }));
    expect(caseSets).toEqual([
      {
        name: "Contact",
        cases: [
          { name: "Spill", weight: 0.4 },
          { name: "Base", weight: 0.6 },
        ],
        inputs: ["areaAcres", "netThicknessFt"],
        planInputs: [],
      },
    ]);
  });

  it.each<[string, Distribution, string]>([
    [
      "another number of cases",
      contacts("Contact", ["Spill", 0.4, 40, 80], ["Base", 0.3, 70, 130], ["Deep", 0.3, 90, 150]),
      "has 2 cases for the area and 3 for the net thickness",
    ],
    [
      "another name",
      contacts("Contact", ["Spill", 0.4, 40, 80], ["Bottom", 0.6, 70, 130]),
      "Case 2 of the set “Contact” is “Base” for the area and “Bottom” for the net thickness",
    ],
    [
      "another weight",
      contacts("Contact", ["Spill", 0.5, 40, 80], ["Base", 0.5, 70, 130]),
      "The case “Spill” of the set “Contact” weighs 0.4 for the area and 0.5 for the net thickness",
    ],
  ])("refuses a set with %s", (_, netThicknessFt, message) => {
    const error = refusal(() => prepareInputs(buildInputs({ areaAcres: area, netThicknessFt })));
    expect(error.details.input).toBe("uncertain.netThicknessFt.scenarios");
    expect(error.message).toContain(message);
  });

  it("refuses a rank correlation of an input that takes its case from a set", () => {
    const error = refusal(() =>
      prepareInputs(
        buildInputs(
          { areaAcres: area, netThicknessFt: thickness },
          { correlations: [{ a: "porosity", b: "areaAcres", rank: 0.3 }] },
        ),
      ),
    );
    expect(error.details.input).toBe("correlations");
    expect(error.message).toContain(
      "The area takes its case from the set “Contact”, so it cannot also have a rank correlation with the porosity.",
    );
  });

  it("takes a correlation of 0 as nothing said, and lets scenarios of one input alone correlate", () => {
    const correlations = [
      { a: "porosity" as const, b: "areaAcres" as const, rank: 0 },
      { a: "porosity" as const, b: "temperatureDegF" as const, rank: 0.2 },
    ];
    const shared = prepareInputs(
      buildInputs({ areaAcres: area, netThicknessFt: thickness }, { correlations }),
    );
    expect(shared.blocks.map(({ names }) => names)).toEqual([["porosity", "temperatureDegF"]]);
    const alone = contacts(undefined, ["Spill", 0.4, 900, 1_600], ["Base", 0.6, 1_800, 3_600]);
    const { blocks, caseSets } = prepareInputs(
      buildInputs(
        { areaAcres: alone },
        { correlations: [{ a: "porosity", b: "areaAcres", rank: 0.3 }] },
      ),
    );
    expect(blocks).toHaveLength(1);
    expect(caseSets).toEqual([]);
  });
});

describe("checkInputs of ranges that were fitted", () => {
  const core = Array.from({ length: 40 }, (_, i) => 0.12 + 0.06 * Math.sqrt((i + 0.5) / 40));
  const codes = (distributions: Parameters<typeof buildInputs>[0]) =>
    checkInputs(buildInputs(distributions)).map(({ code, input }) => `${input} ${code}`);

  it.each<[string, Parameters<typeof buildInputs>[0], string]>([
    [
      "fewer than ten values",
      { porosity: { kind: "data", shape: "normal", values: [0.12, 0.14, 0.15, 0.16, 0.17, 0.19] } },
      "uncertain.porosity few_values",
    ],
    [
      "an empirical range of a dozen values",
      {
        pressurePsia: {
          kind: "data",
          shape: "empirical",
          values: [6300, 6340, 6380, 6420, 6440, 6490, 6510, 6550, 6580, 6600, 6640, 6700],
        },
      },
      "uncertain.pressurePsia data_end_at_samples",
    ],
    [
      "plugs where the average is meant",
      { porosity: { kind: "data", shape: "empirical", values: core } },
      "uncertain.porosity spread_of_samples",
    ],
    [
      "a shape that the data contradict",
      {
        condensateYieldStbPerMmscf: {
          kind: "data",
          shape: "normal",
          values: [70, 71, 71, 72, 73, 73, 74, 75, 76, 78, 95, 140],
          minimum: 40,
        },
      },
      "uncertain.condensateYieldStbPerMmscf poor_fit",
    ],
    [
      "a percentile that the family misses",
      {
        areaAcres: {
          kind: "percentiles",
          family: "normal",
          points: [
            { exceedance: 0.9, value: 1_400 },
            { exceedance: 0.5, value: 1_700 },
            { exceedance: 0.1, value: 3_600 },
          ],
          minimum: 200,
        },
      },
      "uncertain.areaAcres poor_fit",
    ],
    [
      "a set that one input alone names",
      { areaAcres: area },
      "uncertain.areaAcres case_set_of_one",
    ],
    [
      "a case that its bounds cut",
      {
        netThicknessFt: {
          kind: "scenarios",
          scenarios: [
            {
              name: "Thin",
              weight: 0.5,
              distribution: { kind: "normalP90P10", p90: 40, p10: 90, minimum: 50 },
            },
            { name: "Thick", weight: 0.5, distribution: { kind: "uniform", low: 60, high: 120 } },
          ],
        },
      },
      "uncertain.netThicknessFt heavy_truncation",
    ],
  ])("asks about %s", (_, distributions, expected) => {
    expect(codes(distributions)).toContain(expected);
  });

  it("asks the same of a recovery plan's inputs", () => {
    const values = [900, 950, 1_000, 1_100, 1_200];
    const plan = buildPlan({
      abandonmentPressurePsia: {
        distribution: { kind: "data", shape: "empirical", values },
        source: "",
      },
    });
    const found = checkInputs(buildInputs({}, { recoveryPlan: plan, correlations: [] }));
    expect(found.map(({ code, input }) => `${input} ${code}`)).toContain(
      "recoveryPlan.abandonmentPressurePsia few_values",
    );
  });

  it("names the case that a question is about", () => {
    const [warning] = checkInputs(
      buildInputs({
        porosity: {
          kind: "scenarios",
          scenarios: [
            {
              name: "North",
              weight: 0.5,
              distribution: {
                kind: "data",
                shape: "normal",
                values: [0.13, 0.14, 0.15, 0.16, 0.17],
              },
            },
            { name: "South", weight: 0.5, distribution: { kind: "constant", value: 0.16 } },
          ],
        },
      }),
    ).filter(({ code }) => code === "few_values");
    expect(warning.message).toMatch(/^In the case “North”: The porosity rests on 5 values\./);
  });

  it("has nothing to ask about three percentiles that the family meets", () => {
    expect(
      checkInputs(
        buildInputs({
          temperatureDegF: {
            kind: "percentiles",
            family: "shiftedLognormal",
            points: [
              { exceedance: 0.9, value: 252 },
              { exceedance: 0.5, value: 260 },
              { exceedance: 0.1, value: 271 },
            ],
          },
        }),
      ),
    ).toEqual([]);
  });
});
