import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { CorrelationGrid, readRank } from "@/components/estimate/correlation-grid";
import {
  correlationChanges,
  countedPairs,
  fixedInputs,
  fixedWords,
  refusedPairs,
  withNearest,
} from "@/components/estimate/correlation-words";
import { textOfInputs, type Correlation } from "@/components/estimate/estimate-text";
import { textOfDistribution } from "@/components/estimate/input-text";
import { nearestSobolTrials, readWhole, sobolTrials } from "@/components/estimate/sampling-words";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const pairs: Correlation[] = [
  { a: "areaAcres", b: "netThicknessFt", rank: 0.5 },
  { a: "porosity", b: "waterSaturation", rank: -0.6 },
];

const withSharedArea = () => {
  const text = { ...textOfInputs(buildInputs()), correlations: pairs };
  text.inputs.areaAcres = textOfDistribution({
    kind: "scenarios",
    caseSet: "Contact",
    scenarios: [
      { name: "Shallow", weight: 0.5, distribution: { kind: "constant", value: 1_900 } },
      { name: "Deep", weight: 0.5, distribution: { kind: "constant", value: 2_600 } },
    ],
  });
  return text;
};

describe("CorrelationGrid", () => {
  it("shows each pair on both sides of the diagonal, and one of them to the Tab key", () => {
    const html = renderToStaticMarkup(<CorrelationGrid pairs={pairs} onChange={() => undefined} />);
    expect(html.match(/value="−0.60"/g)).toHaveLength(2);
    expect(html).toContain('aria-label="Porosity with Water saturation"');
    expect(html).toContain('aria-label="Water saturation with Porosity"');
    // Ten inputs make 45 pairs, each once above the diagonal.
    expect(html.match(/tabindex="-1"/gi)).toHaveLength(45);
  });

  it("takes nothing for an input that takes no correlation", () => {
    const html = renderToStaticMarkup(
      <CorrelationGrid
        pairs={pairs}
        fixed={{ areaAcres: "takes its case from a set" }}
        onChange={() => undefined}
      />,
    );
    expect(html).not.toContain('aria-label="Area with Net thickness"');
    expect(html.match(/takes none/g)).toHaveLength(18);
  });
});

describe("fixedInputs(text)", () => {
  it("names inputs of a shared set with the reason, and what they still have", () => {
    const text = withSharedArea();
    expect(fixedWords(fixedInputs(text))).toEqual([
      "Area: it takes its case from the set “Contact”.",
    ]);
    expect(refusedPairs(text)).toEqual([pairs[0]]);
    expect(countedPairs(text)).toEqual([pairs[1]]);
  });
});

describe("correlationChanges(before, after)", () => {
  it("lists what changes by as much as is shown, the largest first", () => {
    const after: Correlation[] = [
      { a: "waterSaturation", b: "porosity", rank: -0.4 },
      { a: "areaAcres", b: "netThicknessFt", rank: 0.4999 },
      { a: "areaAcres", b: "porosity", rank: 0.05 },
    ];
    expect(correlationChanges(pairs, after)).toEqual([
      { a: "porosity", b: "waterSaturation", before: -0.6, after: -0.4 },
      { a: "areaAcres", b: "porosity", before: 0, after: 0.05 },
    ]);
  });
});

describe("withNearest(text, nearest)", () => {
  it("replaces what counts, and leaves the pairs that do not", () => {
    const nearest: Correlation[] = [
      { a: "porosity", b: "waterSaturation", rank: -0.55 },
      { a: "porosity", b: "pressurePsia", rank: 0 },
    ];
    expect(withNearest(withSharedArea(), nearest)).toEqual([pairs[0], nearest[0]]);
  });
});

describe("readRank(text)", () => {
  it("reads decimals as people type them, and nothing outside −1 to 1", () => {
    expect(["0.4", ".4", "−0,4", "1.2", "1", "", "x"].map(readRank)).toEqual([
      0.4,
      0.4,
      -0.4,
      null,
      null,
      null,
      null,
    ]);
  });
});

describe("how trials are drawn", () => {
  it("offers Sobol points in powers of two, the nearest by ratio first", () => {
    expect(sobolTrials().at(0)).toBe(1_024);
    expect(sobolTrials().at(-1)).toBe(1_048_576);
    expect(sobolTrials()).toHaveLength(11);
    expect(nearestSobolTrials(10_000)).toBe(8_192);
    expect(nearestSobolTrials(100)).toBe(1_024);
  });

  it("reads whole numbers as people group them", () => {
    expect(readWhole("10,000", [1_000, 1_048_576])).toBe(10_000);
    expect(readWhole("12.5", [1_000, 1_048_576])).toContain("A whole number from 1,000");
    expect(readWhole("500", [1_000, 1_048_576])).toContain("1,048,576");
  });
});
