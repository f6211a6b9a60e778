import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import type { Sensitivity } from "@/analytics/sensitivity/sensitivity-schema";
import { InputBars } from "@/components/charts/input-bars";
import { ConditionalTable } from "@/components/drivers/conditional-table";
import {
  chosenWords,
  conditionalFinding,
  jointWords,
  knowingFinding,
  regressionFinding,
  rSquaredWords,
  samplingWords,
  varianceFinding,
} from "@/components/drivers/driver-findings";
import { factorLabel, togetherWords } from "@/components/drivers/driver-names";
import { VarianceView } from "@/components/drivers/variance-view";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

/** The text that a person reads, without markup and with ordinary spaces. */
const words = (html: string) => html.replace(/<[^>]+>/g, " ").replace(/\s+/g, " ");
const plain = (text: string) => text.replace(/\s/g, " ");

const estimated = (value: number, standardError = 0.004) => ({ value, standardError });
const range = (p90: number, p50: number, p10: number) => ({ p90, p50, p10, mean: p50 });

const shares: Sensitivity["varianceShares"] = {
  baseRuns: 8_192,
  evaluations: 40_960,
  factors: [
    { inputs: ["porosity"], first: estimated(0.05), total: estimated(0.06) },
    {
      inputs: ["areaAcres", "netThicknessFt"],
      first: estimated(0.8),
      total: estimated(0.92),
    },
  ],
};

const conditional: Sensitivity["conditional"] = {
  from: 0.9,
  to: 1,
  trials: 1_000,
  result: range(40e6, 52e6, 90e6),
  inputs: [
    {
      input: "porosity",
      all: range(0.08, 0.1, 0.12),
      chosen: range(0.09, 0.11, 0.13),
      meanRank: 0.6,
    },
    {
      input: "netThicknessFt",
      all: range(50, 98, 160),
      chosen: range(90, 142, 210),
      meanRank: 0.81,
    },
  ],
};

describe("regressionFinding", () => {
  it("names the strongest input with its coefficient, and says when it acts downwards", () => {
    const coefficients = [
      { input: "areaAcres" as const, coefficient: 0.3 },
      { input: "waterSaturation" as const, coefficient: -0.62 },
    ];
    expect(regressionFinding({ rSquared: 0.9, coefficients, leftOut: [] })).toBe(
      "Water saturation moves the ranks most downwards: \u22120.62 for each of its own",
    );
  });
});

describe("rSquaredWords", () => {
  it("warns against the figures when the ranks explain little", () => {
    const of = (rSquared: number) => rSquaredWords({ rSquared, coefficients: [], leftOut: [] });
    expect(of(0.95)).toMatch(/the picture holds/);
    expect(of(0.75)).toMatch(/rough for the figures/);
    expect(of(0.4)).toMatch(/trust the shares of variance instead/);
  });
});

describe("varianceFinding", () => {
  it("tells what a factor makes alone from what it makes with others", () => {
    expect(plain(varianceFinding(shares))).toBe(
      "Area and net thickness together make 80 % of the variance alone, 92 % with what they do through others",
    );
  });

  it("does not call sampling noise an interaction", () => {
    const factors = [
      { inputs: ["areaAcres" as const], first: estimated(0.9, 0.03), total: estimated(0.95, 0.03) },
    ];
    expect(plain(varianceFinding({ ...shares, factors }))).toBe(
      "Area makes 90 % of the variance, next to nothing of it through others",
    );
  });
});

describe("jointWords", () => {
  it("gives what the shares alone leave over", () => {
    expect(plain(jointWords(shares))).toMatch(/add up to 85 %; the other 15 % is inputs/);
  });
});

describe("samplingWords", () => {
  it("says when an estimate is shown otherwise than it came, or above what holds it", () => {
    expect(samplingWords([{ alone: 0.6, inAll: 0.7 }, { alone: -0.0002 }])).toBeNull();
    expect(samplingWords([{ alone: 0.2, inAll: 1.01 }])).toMatch(/outside 0 to 100 %/);
    expect(samplingWords([{ alone: -0.01 }])).toMatch(/outside 0 to 100 %/);
    expect(samplingWords([{ alone: 0.31, inAll: 0.3 }])).toBe(
      "Where a share alone is above the share in all, that is sampling error.",
    );
  });
});

describe("knowingFinding", () => {
  it("says by how much the range would narrow", () => {
    const knowing = [
      { input: "porosity" as const, varianceRemoved: 0.05, remainingWidth: 0.97 },
      { input: "netThicknessFt" as const, varianceRemoved: 0.5, remainingWidth: 0.69 },
    ];
    expect(plain(knowingFinding(knowing))).toBe(
      "If net thickness were known, the P90–P10 width would shrink by 31 % on average",
    );
    expect(knowingFinding([])).toMatch(/next to nothing/);
  });
});

describe("conditionalFinding", () => {
  it("names what the chosen trials share, against all trials", () => {
    expect(conditionalFinding(conditional)).toBe(
      "Trials above P10 share a high net thickness: 142 ft at P50, against 98.0 ft in all trials",
    );
  });

  it("finds nothing where ranks only scatter", () => {
    const inputs = conditional.inputs.map((input) => ({ ...input, meanRank: 0.51 }));
    expect(conditionalFinding({ ...conditional, inputs })).toMatch(/share nothing/);
  });
});

describe("chosenWords", () => {
  it("names a part of the range by chances of at least", () => {
    expect(chosenWords({ from: 0.5, to: 1 })).toBe("Trials above P50");
    expect(chosenWords({ from: 0, to: 0.1 })).toBe("Trials below P90");
    expect(chosenWords({ from: 0.4, to: 0.8 })).toBe("Trials from P60 to P20");
  });
});

describe("togetherWords", () => {
  it("says why inputs count as one factor", () => {
    expect(factorLabel(["areaAcres", "netThicknessFt"])).toBe("Area and net thickness together");
    expect(togetherWords(shares.factors, buildInputs())).toMatch(/are correlated count as one/);
    expect(togetherWords(shares.factors.slice(0, 1), buildInputs())).toBeNull();
  });
});

describe("ConditionalTable", () => {
  it("puts the input that moved furthest first, chosen under all", () => {
    const html = renderToStaticMarkup(
      <ConditionalTable
        view={conditional}
        trials={10_000}
        storedTrials={10_000}
        name="Condensate to the tank"
        unit="MMSTB"
        factor={1e-6}
        fileName="x"
      />,
    );
    expect(words(html)).toMatch(
      /1,000 of 10,000 trials, condensate to the tank P90 40\.0 to P10 90\.0 MMSTB/,
    );
    expect(html.indexOf("Net thickness of the chosen")).toBeLessThan(
      html.indexOf("Porosity of the chosen"),
    );
    expect(html).toContain(
      "Net thickness of the chosen trials: P90 90.0, P50 142, mean 142, P10 210 ft; in all P90 50.0",
    );
  });
});

describe("ConditionalTable of an estimate with more trials", () => {
  it("says that fewer are looked at, and names the rank on a phone", () => {
    const html = renderToStaticMarkup(
      <ConditionalTable
        view={conditional}
        trials={65_536}
        storedTrials={262_144}
        name="Condensate to the tank"
        unit="MMSTB"
        factor={1e-6}
        fileName="x"
      />,
    );
    expect(words(html)).toMatch(/of 65,536 trials \(drawn anew: the 262,144 of the estimate/);
    expect(words(html)).toMatch(/81 % mean rank/);
  });
});

describe("VarianceView", () => {
  it("shows both shares with their errors, and what they are in words", () => {
    const html = renderToStaticMarkup(
      <VarianceView
        sensitivity={{
          trials: 10_000,
          rankRegression: { rSquared: 1, coefficients: [], leftOut: [] },
          varianceShares: shares,
          knowing: [],
          conditional,
        }}
        inputs={buildInputs()}
        name="Condensate to the tank"
        tone="condensate"
        fileName="x"
      />,
    );
    expect(words(html)).toMatch(/Area and net thickness together 80\.0 % ± 0\.8, 92\.0 % ± 0\.8/);
    expect(words(html)).toContain("40,960 runs of the model");
  });
});

describe("VarianceView beyond the possible", () => {
  it("shows no share above 100 % or below nothing, and says so", () => {
    const factors = [
      { inputs: ["areaAcres" as const], first: estimated(1.004), total: estimated(1.002) },
      { inputs: ["porosity" as const], first: estimated(-0.003), total: estimated(0.001) },
    ];
    const html = renderToStaticMarkup(
      <VarianceView
        sensitivity={{
          trials: 10_000,
          rankRegression: { rSquared: 1, coefficients: [], leftOut: [] },
          varianceShares: { ...shares, factors },
          knowing: [],
          conditional,
        }}
        inputs={buildInputs()}
        name="Condensate to the tank"
        tone="condensate"
        fileName="x"
      />,
    );
    expect(words(html)).toMatch(/Area 100\.0 % ± 0\.8, 100\.0 % ± 0\.8/);
    expect(words(html)).toMatch(/Porosity 0\.0 % ± 0\.8/);
    expect(words(html)).toContain("Sampling put an estimate outside 0 to 100 %");
  });
});

describe("InputBars", () => {
  it("draws a bar to the left of zero for what acts downwards", () => {
    const html = renderToStaticMarkup(
      <InputBars
        label="x"
        figureHeadings={["Coefficient"]}
        scale={{ kind: "linear", domain: [-1, 1] }}
        format={String}
        rows={[{ name: "Water saturation", bar: { value: -0.5 }, figures: ["−0.50"] }]}
      />,
    );
    expect(html).toContain('class="full" style="left:25.00%;width:25.00%"');
  });
});
