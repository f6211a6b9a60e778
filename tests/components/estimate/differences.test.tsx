import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { CorrelationDifferences } from "@/components/estimate/difference-correlations";
import { DifferenceTable } from "@/components/estimate/difference-table";
import { distributionWords } from "@/components/estimate/difference-words";
import { inputDifferences } from "@/components/estimate/differences";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const words = (html: string) => html.replace(/<[^>]+>/g, " ").replace(/\s+/g, " ");
const plain = (text: string) => text.replace(/\s/g, " ");
const inputs = buildInputs();
const of = (distribution: Distribution) =>
  plain(distributionWords(distribution, "porosity", inputs));

describe("distributionWords", () => {
  it("gives the figures that were typed, with what they mean", () => {
    expect(of({ kind: "pert", low: 0.34, mode: 0.45, high: 0.56 })).toBe(
      "PERT: lowest 0.34, most likely 0.45, highest 0.56",
    );
    expect(of({ kind: "triangular", low: 1, mode: 2, high: 3, ends: "p90p10" })).toBe(
      "Triangular: P90 1, most likely 2, P10 3",
    );
    expect(of({ kind: "lognormalP90P10", p90: 1400, p10: 4200, maximum: 9000 })).toBe(
      "Lognormal: P90 1,400, P10 4,200, bounded: at most 9,000",
    );
    expect(
      of({
        kind: "percentiles",
        family: "shiftedLognormal",
        points: [
          { exceedance: 0.95, value: 10 },
          { exceedance: 0.5, value: 20 },
          { exceedance: 0.05, value: 50 },
        ],
      }),
    ).toBe("Shifted lognormal through P95 10, P50 20 and P05 50");
    expect(of({ kind: "data", shape: "empirical", values: [1, 2, 3, 4, 5, 6] })).toBe(
      "6 measured values as they are",
    );
  });

  it("names the cases with their chances, and the inputs that take the same one", () => {
    const cases = (low: number, high: number): Distribution => ({
      kind: "scenarios",
      caseSet: "Gas-water contact",
      scenarios: [
        { name: "Low", weight: 0.3, distribution: { kind: "constant", value: low } },
        { name: "High", weight: 0.7, distribution: { kind: "uniform", low, high } },
      ],
    });
    const tied = buildInputs({ areaAcres: cases(1500, 3000), netThicknessFt: cases(60, 90) });
    expect(plain(distributionWords(cases(60, 90), "netThicknessFt", tied))).toBe(
      "Cases: Low 30 % (constant 60), High 70 % (uniform: lowest 60, highest 90); the same case as area (Gas-water contact)",
    );
  });
});

describe("DifferenceTable", () => {
  const before = buildInputs({ porosity: { kind: "lognormalP90P10", p90: 0.1, p10: 0.2 } });
  const now = buildInputs({ porosity: { kind: "pert", low: 0.34, mode: 0.45, high: 0.56 } });
  const differences = inputDifferences(now, before);

  it("shows the shape before and now beside the percentiles, and the source beside a warning", () => {
    now.uncertain.porosity.source = "Log analysis of well 3";
    const html = renderToStaticMarkup(
      <DifferenceTable
        differences={inputDifferences(now, before)}
        warnings={[
          {
            severity: "warning",
            code: "usual-range",
            message: "Unusually high.",
            input: "porosity",
          },
        ]}
      />,
    );
    expect(words(html)).toMatch(
      /Unusually high\. Was Lognormal: P90 0\.1, P10 0\.2\. Now PERT: lowest 0\.34, most likely 0\.45, highest 0\.56\. Log analysis of well 3/,
    );
  });

  it("leaves a shape out that the percentiles say", () => {
    const typedOf = (p10: number) =>
      inputDifferences(
        buildInputs({ porosity: { kind: "lognormalP90P10", p90: 0.1, p10 } }),
        before,
      ).find(({ name }) => name === "porosity")?.typed;
    expect(typedOf(0.2)).toBeNull();
    expect(typedOf(0.25)).toBeNull();
    expect(differences.find(({ name }) => name === "porosity")?.typed).not.toBeNull();
  });
});

describe("CorrelationDifferences", () => {
  it("says of each pair what it was and what became of it", () => {
    const pair = (rank: number) => ({ a: "porosity", b: "waterSaturation", rank }) as const;
    const area = { a: "areaAcres", b: "netThicknessFt", rank: 0.4 } as const;
    const html = renderToStaticMarkup(
      <CorrelationDifferences
        now={{ pairs: [pair(-0.3)], label: "r5" }}
        before={{ pairs: [pair(-0.5), area], label: "r4" }}
      />,
    );
    expect(words(html)).toMatch(/Area with net thickness 0\.40 – removed/);
    expect(words(html)).toMatch(/Porosity with water saturation \u22120\.50 \u22120\.30 changed/);
    const same = { pairs: [area], label: "r4" };
    expect(renderToStaticMarkup(<CorrelationDifferences now={same} before={same} />)).toBe("");
  });
});
