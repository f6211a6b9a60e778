import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { DetailPanel, panelSummary } from "@/components/estimate/detail-panel";
import { inputCatalogue } from "@/components/estimate/input-catalogue";
import { readInput } from "@/components/estimate/input-reading";
import { textOfDistribution } from "@/components/estimate/input-text";

const readOnly = (distribution: Distribution) => {
  const text = textOfDistribution(distribution);
  const reading = readInput("porosity", text);
  const html = renderToStaticMarkup(
    <DetailPanel
      about={inputCatalogue.porosity}
      name="porosity"
      text={text}
      reading={reading}
      notesId="notes"
      caseSets={[]}
    />,
  );
  return { html, summary: panelSummary(text, reading) };
};

describe("DetailPanel for a reviewer", () => {
  it("shows each percentile asked beside what the curve gives", () => {
    const { html, summary } = readOnly({
      kind: "percentiles",
      family: "lognormal",
      points: [
        { exceedance: 0.9, value: 0.1 },
        { exceedance: 0.1, value: 0.2 },
      ],
    });
    expect(html).toContain("The lognormal curve goes through both percentiles.");
    expect(html).not.toContain("<input");
    expect(summary).toBe("Lognormal through P90, P10");
  });

  it("shows cases with their chances, and nothing to change", () => {
    const { html, summary } = readOnly({
      kind: "scenarios",
      scenarios: [
        { name: "Tight", weight: 1 / 3, distribution: { kind: "constant", value: 0.1 } },
        { name: "Open", weight: 2 / 3, distribution: { kind: "uniform", low: 0.15, high: 0.2 } },
      ],
    });
    expect(html).toContain("Tight");
    expect(html).toContain("One value");
    expect(html).toContain("The chances add up to 100 %.");
    expect(html).not.toContain("<button");
    expect(summary).toBe("Tight 33.33 %, Open 66.67 %");
  });

  it("shows measured values against the fitted curve, with both tests", () => {
    const { html, summary } = readOnly({
      kind: "data",
      shape: "normal",
      values: [0.11, 0.12, 0.13, 0.13, 0.14, 0.15, 0.15, 0.16, 0.18],
    });
    expect(html).toContain("9 values, 0.110 to 0.180.");
    expect(html).toContain("Anderson–Darling, p = ");
    expect(html).toContain("Lilliefors, p ");
    expect(summary).toBe("9 values, normal curve");
  });
});
