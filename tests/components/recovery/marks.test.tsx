import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { startingPlan } from "@/analytics/recovery/starting-plan";
import { simulate } from "@/analytics/volumetrics/simulate";
import { resultGroups } from "@/components/estimate/result-rows";
import { ResultTable } from "@/components/estimate/result-table";
import { RouteFlag } from "@/components/estimate/route-flag";
import { PlaceBar } from "@/components/recovery/concept-bars";
import { PhaseTable } from "@/components/recovery/phase-table";
import { publishedCurve } from "../../analytics/recovery/published-curve";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

/** The text that a person reads, without markup. */
const words = (html: string) => html.replace(/<[^>]+>/g, "");

describe("RouteFlag", () => {
  it("says nothing of a measured or tuned recovery, nor of one that was typed", () => {
    for (const route of ["laboratory", "tunedEquationOfState", null] as const) {
      expect(renderToStaticMarkup(<RouteFlag route={route} />)).toBe("");
    }
  });

  it("marks the others in words, and in one word in a list", () => {
    expect(words(renderToStaticMarkup(<RouteFlag route="correlation" />))).toBe(
      "Recovery from a correlation",
    );
    const short = renderToStaticMarkup(<RouteFlag route="untunedEquationOfState" short />);
    expect(words(short)).toBe("Untuned recovery");
    expect(short).toContain("fitted to no measurement");
  });
});

describe("PlaceBar", () => {
  it("reads out where the condensate goes, and writes no figure where there is no room", () => {
    const shares = { toTank: 0.31, leftInRock: 0.6, leftInGas: 0.09 };
    const html = renderToStaticMarkup(<PlaceBar name="Depletion" shares={shares} />);
    expect(html).toMatch(
      /aria-label="Depletion: to the tank 31.%, left in the rock 60.%, left in the gas 9.%"/,
    );
    expect(words(html).replace(/\s/g, " ")).toBe("31 %60 %");
  });
});

describe("PhaseTable", () => {
  it("adds the phases up, with a dash where a concept has none", () => {
    const html = renderToStaticMarkup(
      <PhaseTable
        concepts={[
          {
            concept: "depletion",
            phases: [
              { name: "aboveDewPoint", condensateShare: 0.1, gasShare: 0.1 },
              { name: "belowDewPoint", condensateShare: 0.15, gasShare: 0.5 },
            ],
          },
          {
            concept: "cycling",
            phases: [{ name: "cycling", condensateShare: 0.5, gasShare: -0.08 }],
          },
        ]}
      />,
    );
    const total = words(html.slice(html.indexOf("Recovered"))).replace(/\s/g, " ");
    expect(total).toBe("Recovered25.0 %60.0 % of gas50.0 %−8.0 % of gas");
    expect(html).toContain("–");
  });
});

describe("resultGroups(summary, before, basis) of a screened recovery", () => {
  const basis = { units: "field", base: "14.696", factor: 1, words: "Gross, unrisked" } as const;

  it("marks what a recovery is part of, and not what is in place", () => {
    const start = {
      curve: { ...publishedCurve, route: "correlation" as const },
      sampleName: null,
      pressurePsia: null,
      depthFt: 12_500,
      criticalSaturation: { low: 0.1, high: 0.2 },
    };
    const inputs = buildInputs({}, { recoveryPlan: startingPlan("depletion", start) });
    const { summary } = simulate(inputs, { trials: 200, seed: 1 });
    const rows = resultGroups(summary, null, basis).flatMap((group) => group.rows);
    expect(rows.filter(({ mark }) => mark !== null).map(({ name }) => name)).toEqual([
      "salesGasScf",
      "condensateRecoverableStb",
      "condensateLeftStb",
    ]);
    const html = renderToStaticMarkup(
      <ResultTable caption="Results" groups={resultGroups(summary, null, basis)} />,
    );
    expect(html.match(/from a correlation/g)).toHaveLength(3);
  });
});
