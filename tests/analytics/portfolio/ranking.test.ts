import { describe, expect, it } from "vitest";
import {
  matchesFilter,
  scaleRange,
  sortFields,
  sumRanges,
  type RankedField,
  type RankingFilter,
} from "@/analytics/portfolio/ranking";
import {
  estimateWords,
  rankingColumn,
  recoverySourcesOf,
  spreadOf,
} from "@/analytics/portfolio/ranking-columns";

const range = (p90: number, p50: number, p10: number, mean: number) => ({ p90, p50, p10, mean });

function field(values: Partial<RankedField> = {}): RankedField {
  const volume = range(1, 2, 3, 2);
  return {
    id: "f",
    slug: "hollin-deep",
    name: "Hollin Deep",
    basin: { id: "b", slug: "corrith", name: "Corrith" },
    operator: "Quillmere Gas",
    prmsClass: "contingent",
    prmsSubClass: "development_pending",
    workingInterest: 0.6,
    netRevenueInterest: 0.51,
    chanceOfCommerciality: 0.65,
    engineer: { id: "e", name: "Ines Okonrae" },
    condensateYieldStbPerMmscf: 223,
    hydrogenSulphide: 0.034,
    cautions: [],
    recoveryRoute: null,
    chosen: [
      {
        estimateId: "1",
        reservoirName: "Upper sand",
        reservoirSlug: "upper-sand",
        revision: 3,
        state: "approved",
        effectiveOn: "2026-10-13",
        engineVersion: "1.0.0",
        seed: 1,
        trials: 10_000,
        recoveryRoute: null,
        producingConcept: null,
      },
    ],
    leftOut: [],
    open: [],
    ranges: {
      wetGasInPlaceScf: volume,
      dryGasInPlaceScf: volume,
      condensateInPlaceStb: volume,
      salesGasScf: volume,
      condensateRecoverableStb: volume,
      liquidValue: range(100, 200, 600, 250),
      gasValue: null,
    },
    rank: 1,
    rankRange: { low: 1, high: 4 },
    ...values,
  };
}

const everything: RankingFilter = {
  search: "",
  basins: [],
  classes: [],
  states: [],
  engineers: [],
  yieldFromStbPerMmscf: null,
  yieldToStbPerMmscf: null,
};
const matches = (filter: Partial<RankingFilter>, of = field()) =>
  matchesFilter(of, { ...everything, ...filter });

describe("matchesFilter(field, filter)", () => {
  it("lets everything through an empty filter", () => {
    expect(matches({})).toBe(true);
  });

  it("finds part of the name, the basin or the operator, in any case", () => {
    expect(matches({ search: "IN DEE" })).toBe(true);
    expect(matches({ search: "corri" })).toBe(true);
    expect(matches({ search: "quill" })).toBe(true);
    expect(matches({ search: "umber" })).toBe(false);
  });

  it("takes any of several basins, classes and engineers", () => {
    expect(matches({ basins: ["saltmarrow", "corrith"] })).toBe(true);
    expect(matches({ classes: ["reserves"] })).toBe(false);
    expect(matches({ engineers: ["somebody else"] })).toBe(false);
    expect(matches({ engineers: ["e"] }, field({ engineer: null }))).toBe(false);
  });

  it("knows the states of what stands for a field and of what is in work", () => {
    const open = [
      { reservoirName: "Upper sand", reservoirSlug: "upper-sand", revision: 4, state: "draft" },
    ] as const;
    expect(matches({ states: ["approved"] })).toBe(true);
    expect(matches({ states: ["draft"] })).toBe(false);
    expect(matches({ states: ["draft"] }, field({ open: [...open] }))).toBe(true);
    expect(matches({ states: ["none"] }, field({ chosen: [], ranges: null }))).toBe(true);
  });

  it("leaves a field without a yield out of every range of yields", () => {
    expect(matches({ yieldFromStbPerMmscf: 150, yieldToStbPerMmscf: 223 })).toBe(true);
    expect(matches({ yieldFromStbPerMmscf: 224 })).toBe(false);
    const unknown = field({ condensateYieldStbPerMmscf: null });
    expect(matches({ yieldFromStbPerMmscf: 0 }, unknown)).toBe(false);
  });
});

describe("sortFields(fields, value, direction)", () => {
  const named = (name: string, condensateYieldStbPerMmscf: number | null) =>
    field({ name, condensateYieldStbPerMmscf });
  const names = (fields: RankedField[]) => fields.map(({ name }) => name);
  const rows = [named("C", null), named("B", 10), named("A", 10), named("D", 90)];

  it("puts what is missing last in either direction, and equals in the order of their names", () => {
    const { value } = rankingColumn("yield");
    expect(names(sortFields(rows, value, "ascending"))).toEqual(["A", "B", "D", "C"]);
    expect(names(sortFields(rows, value, "descending"))).toEqual(["D", "A", "B", "C"]);
  });

  it("leaves the given array as it was", () => {
    sortFields(rows, rankingColumn("name").value, "ascending");
    expect(names(rows)).toEqual(["C", "B", "A", "D"]);
  });
});

describe("scaleRange(range, factor)", () => {
  it("multiplies every percentile and the mean", () => {
    expect(scaleRange(range(1, 2, 4, 3), 10)).toEqual(range(10, 20, 40, 30));
  });

  it("turns the low case into the high one under a negative factor", () => {
    expect(scaleRange(range(1, 2, 4, 3), -1)).toEqual(range(-4, -2, -1, -3));
  });
});

describe("sumRanges(ranges)", () => {
  it("adds column by column and is nothing for none", () => {
    expect(sumRanges([range(1, 2, 4, 3), range(1, 1, 1, 1)])).toEqual(range(2, 3, 5, 4));
    expect(sumRanges([])).toEqual(range(0, 0, 0, 0));
  });
});

describe("spreadOf(field)", () => {
  it("is P10 over P90 of the liquid value, unknown without one", () => {
    expect(spreadOf(field())).toBe(6);
    expect(spreadOf(field({ ranges: null }))).toBeNull();
  });
});

describe("estimateWords(field)", () => {
  it("says what stands and what is in work, by reservoir only when there are several", () => {
    const open = [
      { reservoirName: "Upper sand", reservoirSlug: "upper-sand", revision: 4, state: "draft" },
    ] as const;
    expect(estimateWords(field({ open: [...open] }))).toBe("approved r3; draft r4");
    const several = field({ leftOut: [{ reservoirName: "Lower sand" }] });
    expect(estimateWords(several)).toBe("Upper sand: approved r3");
  });

  it("does not name a revision twice that stands and is open", () => {
    const standing = field().chosen.map((chosen) => ({ ...chosen, state: "draft" as const }));
    const open = standing.map(({ reservoirName, reservoirSlug, revision }) => ({
      reservoirName,
      reservoirSlug,
      revision,
      state: "draft" as const,
    }));
    expect(estimateWords(field({ chosen: standing, open }))).toBe("draft r3");
  });
});

describe("recoverySourcesOf", () => {
  const [one] = field().chosen;
  const from = (...routes: RankedField["recoveryRoute"][]) =>
    routes.map((recoveryRoute) => ({ ...one, recoveryRoute }));

  it("names every source once, in the order of trust, entered ones last", () => {
    expect(recoverySourcesOf(from(null, "correlation", "laboratory", null))).toEqual([
      "laboratory",
      "correlation",
      null,
    ]);
    expect(recoverySourcesOf([])).toEqual([]);
  });

  it("is what the ranking says of a field", () => {
    const words = (chosen: RankedField["chosen"]) =>
      rankingColumn("recoveryRoute").value(field({ chosen }));
    expect(words(from("tunedEquationOfState", null))).toBe("tuned equation of state; entered");
    expect(words([])).toBeNull();
  });
});
