import { describe, expect, it } from "vitest";
import { digitsKnown } from "@/analytics/uncertainty/digits-known";

describe("digitsKnown", () => {
  // Half a unit of the last of three digits of 12.3 is 0.05 (JCGM 101:2008, 7.9.2, gives the rule and such examples).
  it("knows three digits while one standard error is at most half a unit of the third", () => {
    expect(digitsKnown(12.3, 0.05, 10_000)).toEqual({
      digits: 3,
      enough: true,
      trialsNeeded: null,
    });
    expect(digitsKnown(12.3, 0.06, 10_000)).toMatchObject({ digits: 2, enough: false });
    expect(digitsKnown(9.87e9, 0.004e9, 10_000)).toMatchObject({ digits: 3, enough: true });
  });

  it("says how many trials it would take, by the root of their number", () => {
    expect(digitsKnown(12.3, 0.1, 10_000).trialsNeeded).toBe(40_000);
    expect(digitsKnown(-12.3, 0.1, 1000, 2)).toMatchObject({ digits: 2, enough: true });
  });

  it("knows nothing of a value that drowns in its error, and all of one without", () => {
    expect(digitsKnown(12, 900, 1000)).toMatchObject({ digits: 0, enough: false });
    expect(digitsKnown(12, 0, 1000).enough).toBe(true);
    expect(digitsKnown(0, 0, 1000).enough).toBe(true);
  });
});
