import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import type { ChangeExplanation as Explanation } from "@/analytics/sensitivity/sensitivity-schema";
import { ChangeExplanation } from "@/components/drivers/change-explanation";
import {
  changeExplained,
  changeLabel,
  explainedSteps,
  methodWords,
  remarksOn,
} from "@/components/drivers/change-words";

const input = (name: "netThicknessFt" | "porosity" | "areaAcres") => ({
  kind: "input" as const,
  input: name,
});

const explanation: Explanation = {
  from: 30e6,
  to: 37e6,
  own: { from: 30e6, to: 37e6 },
  trials: 10_000,
  orders: "all",
  changes: [
    { change: input("porosity"), effect: 1e6, standardError: null },
    { change: input("netThicknessFt"), effect: 6e6, standardError: null },
  ],
};

describe("changeExplained", () => {
  it("gives the largest effect and the whole move", () => {
    expect(changeExplained(explanation, 1e-6, "MMSTB")).toBe(
      "Net thickness explains 6.00 of the 7.00 MMSTB by which P50 rises",
    );
  });

  it("says when others take part of it back, or turn it round", () => {
    const with2 = (first: number, second: number) =>
      changeExplained(
        {
          ...explanation,
          to: 30e6 + first + second,
          changes: [
            { change: input("netThicknessFt"), effect: first, standardError: null },
            { change: input("porosity"), effect: second, standardError: null },
          ],
        },
        1e-6,
        "MMSTB",
      );
    expect(with2(8e6, -2e6)).toBe(
      "Net thickness raises P50 by 8.00 MMSTB; the other differences take back 2.00",
    );
    expect(with2(4e6, -4e6)).toMatch(/^P50 stands: net thickness moves it by 4\.00 MMSTB/);
  });

  it("speaks of several differences in the plural", () => {
    const both = { kind: "together" as const, changes: [input("areaAcres"), input("porosity")] };
    const changes = [{ change: both, effect: 7e6, standardError: null }];
    expect(changeExplained({ ...explanation, changes }, 1e-6, "MMSTB")).toBe(
      "Area and porosity together explain all of the 7.00 MMSTB by which P50 rises",
    );
  });

  it("says nothing of a move where nothing differs", () => {
    expect(changeExplained({ ...explanation, to: 30e6, changes: [] }, 1e-6, "MMSTB")).toBe(
      "Nothing differs, so P50 stands",
    );
  });
});

describe("remarksOn", () => {
  it("names what has no effect, says what sampling is, and that the runs have more trials", () => {
    const changes = [
      ...explanation.changes,
      { change: { kind: "sampling" as const }, effect: 2e4, standardError: null },
      { change: input("areaAcres"), effect: 0, standardError: null },
    ];
    const all = { ...explanation, changes };
    expect(explainedSteps(all).map(({ label }) => label)).toEqual([
      "Net thickness",
      "Porosity",
      "Sampling",
    ]);
    expect(remarksOn(all, 262_144)).toBe(
      " No effect on it: area. Sampling is another seed, method or number of trials: what it moves is sampling error." +
        " The runs have up to 262,144 trials; with fewer, both ends stand a little off the stored P50.",
    );
    expect(remarksOn(explanation, 10_000)).toBe("");
  });
});

describe("explainedSteps", () => {
  it("makes one step of the smallest, so that all still add up", () => {
    const changes = Array.from({ length: 10 }, (_, index) => ({
      change: input("areaAcres"),
      effect: 10 - index,
      standardError: 0.1,
    }));
    const steps = explainedSteps({ ...explanation, orders: 64, changes });
    expect(steps).toHaveLength(7);
    expect(steps.at(-1)).toMatchObject({ label: "4 others", effect: 10 });
    expect(steps.reduce((sum, { effect }) => sum + effect, 0)).toBe(55);
  });
});

describe("changeLabel", () => {
  it("names differences that only make an estimate together", () => {
    expect(
      changeLabel({ kind: "together", changes: [input("areaAcres"), input("netThicknessFt")] }),
    ).toBe("Area and net thickness together");
    expect(changeLabel({ kind: "sampling" })).toBe("Sampling");
  });
});

describe("methodWords", () => {
  it("says over which orders effects were averaged", () => {
    expect(methodWords(explanation)).toMatch(/averaged over all orders/);
    expect(methodWords({ ...explanation, orders: 64 })).toMatch(/64 orders .* drawn at random/);
  });
});

describe("ChangeExplanation", () => {
  it("draws bars that add up from one P50 to the other", () => {
    const html = renderToStaticMarkup(
      <ChangeExplanation
        explanation={explanation}
        from="r4"
        to="r5"
        name="Condensate to the tank"
        factor={1e-6}
        unit="MMSTB"
        storedTrials={10_000}
        fileName="x"
      />,
    );
    expect(html.replace(/<[^>]+>/g, " ").replace(/\s+/g, " ")).toContain(
      "r4 30.0 Net thickness +6.0 Porosity +1.0 r5 37.0",
    );
  });
});
