import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { checkDependence, loadingsOf, scoreCorrelation } from "@/analytics/portfolio/factor-model";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { independent } from "./book";

const factor = (name: string, rank: number, ...fieldIds: string[]) => ({
  name,
  note: "",
  rank,
  fieldIds,
});

describe("scoreCorrelation(rankCorrelation)", () => {
  it("is 2 sin(pi r / 6) (Pearson 1907), the identity at 0 and 1", () => {
    expect(scoreCorrelation(0)).toBe(0);
    expect(scoreCorrelation(0.5)).toBeCloseTo(0.517638, 6);
    expect(scoreCorrelation(1)).toBeCloseTo(1, 12);
  });

  it("refuses what is no share", () => {
    expect(() => scoreCorrelation(1.2)).toThrow(DomainError);
    expect(() => scoreCorrelation(Number.NaN)).toThrow(DomainError);
  });
});

describe("loadingsOf(dependence, field)", () => {
  const place = { fieldId: "a", basinId: "id-north", basinSlug: "north" };
  const dependence: Dependence = {
    portfolioRank: 0.1,
    basinRanks: { "id-north": 0.3 },
    otherBasinsRank: 0.2,
    sharedFactors: [factor("One survey", 0.25, "a", "b"), factor("Plant", 0.2, "b", "c")],
  };
  const shares = (values: Partial<typeof place>, set = dependence) =>
    Object.fromEntries(
      loadingsOf(set, { ...place, ...values }).map((one) => [one.factor, one.share]),
    );

  it("splits the basin's correlation into the portfolio's part and its own, and adds shared factors", () => {
    const all = shares({});
    expect(Object.keys(all)).toEqual(["portfolio", "group north", "shared one survey"]);
    expect(all.portfolio).toBeCloseTo(2 * Math.sin((Math.PI * 0.1) / 6), 12);
    expect(all.portfolio + all["group north"]).toBeCloseTo(2 * Math.sin((Math.PI * 0.3) / 6), 12);
    expect(all["shared one survey"]).toBeCloseTo(2 * Math.sin((Math.PI * 0.25) / 6), 12);
  });

  it("takes the rank of other basins for a basin that is not listed", () => {
    const all = shares({ fieldId: "z", basinId: "id-south", basinSlug: "south" });
    expect(all.portfolio + all["group south"]).toBeCloseTo(2 * Math.sin((Math.PI * 0.2) / 6), 12);
  });

  it("has no factors where nothing is shared", () => {
    expect(shares({}, independent)).toEqual({});
  });

  it("refuses shares of more than 1, and a basin below the portfolio", () => {
    const heavy = { ...dependence, sharedFactors: [factor("One", 0.8, "a", "b")] };
    expect(() => shares({}, heavy)).toThrow(DomainError);
    expect(() => shares({}, { ...independent, portfolioRank: 0.2 })).toThrow(DomainError);
  });
});

describe("checkDependence(dependence, fields)", () => {
  const fields = [
    { id: "a", name: "Hollin Deep", basinId: "n", basinName: "Corrith" },
    { id: "b", name: "Larkhaven", basinId: "s", basinName: "Ilmarsh" },
  ];
  const check = (values: Partial<Dependence>) =>
    checkDependence({ ...independent, ...values }, fields);

  it("finds nothing wrong with a set that can be had", () => {
    const sharedFactors = [factor("Survey", 0.4, "a", "b")];
    expect(check({ basinRanks: { n: 0.5 }, sharedFactors })).toEqual([]);
  });

  it("names a basin that lies below the portfolio, and the other basins", () => {
    const problems = check({ portfolioRank: 0.2, basinRanks: { n: 0.1 }, otherBasinsRank: 0.1 });
    expect(problems.map(({ input }) => input)).toEqual(["basinRanks.n", "otherBasinsRank"]);
    expect(problems[0].message).toMatch(/^Corrith has 0.1, below the 0.2/);
  });

  it("names the field, its basin and the factors that ask for more than there is to share", () => {
    const sharedFactors = [factor("Survey", 0.5, "a", "b"), factor("Plant", 0.3, "a", "b")];
    const [problem, ...others] = check({ basinRanks: { n: 0.35 }, sharedFactors });
    expect(others).toEqual([]);
    expect(problem.input).toBe("sharedFactors.1.fieldIds");
    expect(problem.message).toContain("Hollin Deep");
    expect(problem.message).toContain("basin Corrith (0.35) with Survey (0.5), Plant (0.3)");
    // 2 sin(pi r / 6) of 0.35, 0.5 and 0.3: 0.36435 + 0.51764 + 0.31287 (by hand).
    expect(problem.message).toContain("1.19");
  });

  it("refuses two factors of one name, whose draws would be the same, and a field named twice", () => {
    const sharedFactors = [factor("Survey", 0.1, "a", "a"), factor("survey", 0.1, "a", "b")];
    expect(check({ sharedFactors }).map(({ input }) => input)).toEqual([
      "sharedFactors.0.fieldIds",
      "sharedFactors.1.name",
    ]);
  });
});
