import { describe, expect, it } from "vitest";
import { basisHref, basisParams, defaultBasis, parseBasis } from "@/components/basis/basis";

const deck = "0198f0aa-5c1e-7000-8000-000000000001";

describe("parseBasis", () => {
  it("gives the approved default for an empty address", () => {
    expect(parseBasis(new URLSearchParams())).toEqual({
      deck: "latest",
      case: "mid",
      estimates: "approved",
      interest: "net",
      risk: "unrisked",
      dependence: "default",
      units: "field",
      base: "14.696",
    });
  });

  it("reads the same from URLSearchParams and from a page's searchParams", () => {
    const expected = { ...defaultBasis, deck, interest: "gross", base: "15.025" };
    expect(parseBasis(new URLSearchParams({ deck, interest: "gross", base: "15.025" }))).toEqual(
      expected,
    );
    expect(parseBasis({ deck, interest: ["gross", "net"], base: "15.025" })).toEqual(expected);
  });

  it("falls back part by part where the address is not understood", () => {
    const search = new URLSearchParams("deck=../x&case=best&units=metric&base=14.7");
    expect(parseBasis(search)).toEqual({ ...defaultBasis, units: "metric" });
  });
});

describe("basisParams", () => {
  it("omits what is the default", () => {
    expect(basisParams(defaultBasis).toString()).toBe("");
    expect(basisParams({ ...defaultBasis, risk: "risked", case: "low" }).toString()).toBe(
      "case=low&risk=risked",
    );
  });

  it("comes back the same through an address", () => {
    const basis = { ...defaultBasis, deck, estimates: "latest", units: "metric" } as const;
    expect(parseBasis(basisParams(basis))).toEqual(basis);
  });
});

describe("basisHref", () => {
  const risked = { ...defaultBasis, risk: "risked" } as const;

  it("carries the basis on and keeps what else is in the address", () => {
    expect(basisHref("/fields", risked)).toBe("/fields?risk=risked");
    expect(basisHref("/fields?sort=mean&risk=unrisked#total", risked)).toBe(
      "/fields?sort=mean&risk=risked#total",
    );
  });

  it("drops the parts that went back to their default", () => {
    expect(basisHref("/fields?case=high&sort=mean", defaultBasis)).toBe("/fields?sort=mean");
  });
});
