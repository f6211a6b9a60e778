import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import {
  contributionTitle,
  diversificationTitle,
  riskNote,
} from "@/app/(workspace)/portfolio/_components/total-words";
import { StackedTotals } from "@/components/charts/stacked-totals";

describe("diversificationTitle", () => {
  it("states the effect on P90 and P10 in figures", () => {
    expect(
      diversificationTitle({ p90: 3710, p10: 6810 }, { p90: 2230, p10: 8970 }, 22, "$ million"),
    ).toBe(
      "Spread over 22 fields, P90 is 66\u00a0% above the sum of P90s and P10 24\u00a0% below the sum of P10s",
    );
  });

  it("gives the amount where the sum of P90s is nothing", () => {
    expect(diversificationTitle({ p90: 12, p10: 40 }, { p90: 0, p10: 80 }, 3, "MMSTB")).toMatch(
      /P90 is 12\.0 MMSTB above the sum of P90s/,
    );
  });

  it("claims no spreading for a single field", () => {
    expect(diversificationTitle({ p90: 1, p10: 2 }, { p90: 1, p10: 2 }, 1, "MMSTB")).toMatch(
      /^One field/,
    );
  });
});

describe("contributionTitle", () => {
  const field = (name: string, p90: number, p50: number, p10: number) => ({
    fieldId: name,
    slug: name,
    name,
    shareOfVariance: 0.5,
    mean: p50,
    p90,
    p50,
    p10,
  });

  it("names the field whose part of the total shifts most", () => {
    const contributions = [field("Hollin Deep", 8, 14, 27), field("Pellow North", 12, 15, 21)];
    expect(contributionTitle(contributions, { p90: 20, p10: 48 })).toBe(
      "At the portfolio’s P90, Hollin Deep carries 40\u00a0% of the condensate; at P10 56\u00a0%",
    );
  });

  it("claims no shares of a total that is nothing", () => {
    const contributions = [field("A", 0, 1, 3), field("B", 0, 1, 4)];
    expect(contributionTitle(contributions, { p90: 0, p10: 7 })).toBe(
      "What each field brings to the total",
    );
  });
});

describe("riskNote", () => {
  it("says of each choice what is true of it", () => {
    const facts = { classes: 2, chanceOfNothing: null };
    expect(riskNote("unrisked", facts)).toMatch(/as if every field came/);
    expect(riskNote("unrisked", { ...facts, classes: 1 })).toBeNull();
    expect(riskNote("risked", facts)).toMatch(/leave out the chance of nothing/);
  });

  it("gives the chance of nothing of yes or no trials", () => {
    const at = (chanceOfNothing: number) => riskNote("yesNo", { classes: 2, chanceOfNothing });
    expect(at(0.184)).toContain("The chance that none of them comes is 18.4\u00a0%.");
    expect(at(0.0021)).toContain("one in 480.");
    expect(at(1e-9)).toContain("under one in a million");
    expect(at(0)).toContain("the total is never nothing");
  });
});

describe("StackedTotals", () => {
  const html = renderToStaticMarkup(
    <StackedTotals
      label="What fields bring"
      rows={[
        { label: "P90", total: "50.0", parts: [part("Hollin Deep", 20), part("others", 30)] },
        { label: "P10", total: "100", parts: [part("Hollin Deep", 60), part("others", 40)] },
      ]}
    />,
  );

  function part(name: string, value: number) {
    return { name, value };
  }

  it("draws totals on one scale, each cut into its parts", () => {
    expect(html).toContain('class="stacked-bar" style="width:45.00%"');
    expect(html).toContain('class="stacked-bar" style="width:90.00%"');
    expect(html).toContain('title="Hollin Deep, 60\u00a0%"');
  });

  it("reads out each total with its first part", () => {
    expect(html).toContain("P90 50.0, of which Hollin Deep 40\u00a0%");
  });
});
