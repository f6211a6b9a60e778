import { describe, expect, it } from "vitest";
import {
  formatDate,
  formatFigure,
  formatFull,
  formatPercent,
  fractionDigits,
  splitFigure,
} from "@/components/ui/format";

describe("formatFigure", () => {
  it("writes three significant digits and separates thousands", () => {
    expect(formatFigure(5712)).toBe("5,710");
    expect(formatFigure(1_234_567)).toBe("1,230,000");
    expect(formatFigure(45.23)).toBe("45.2");
    expect(formatFigure(10)).toBe("10.0");
    expect(formatFigure(0.6264)).toBe("0.626");
    expect(formatFigure(0.0001234)).toBe("0.000123");
  });

  it("rounds up into the next digit without gaining one", () => {
    expect(formatFigure(9.996)).toBe("10.0");
    expect(formatFigure(999.6)).toBe("1,000");
  });

  it("writes a real minus sign, and a plus sign only for changes", () => {
    expect(formatFigure(-75.1)).toBe("\u221275.1");
    expect(formatFigure(118, { signed: true })).toBe("+118");
    expect(formatFigure(-34.04, { signed: true })).toBe("\u221234.0");
    expect(formatFigure(0, { signed: true })).toBe("0");
  });

  it("writes an en dash for what is missing, never 0 and never NaN", () => {
    for (const value of [null, undefined, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(formatFigure(value)).toBe("–");
      expect(formatFull(value)).toBe("–");
      expect(formatPercent(value)).toBe("–");
    }
  });

  it("keeps to fixed decimals when asked, without a minus before zero", () => {
    expect(formatFigure(1546.6, { decimals: 0 })).toBe("1,547");
    expect(formatFigure(0, { decimals: 2 })).toBe("0.00");
    expect(formatFigure(-0.001, { decimals: 2 })).toBe("0.00");
  });

  it("turns to powers of ten below a millionth", () => {
    expect(formatFigure(1.234e-7)).toBe("1.23\u00a0×\u00a010⁻⁷");
  });
});

describe("formatFull", () => {
  it("shows the digits that rounding hides", () => {
    expect(formatFull(5712.3456)).toBe("5,712.3456");
    expect(formatFull(-0.1)).toBe("\u22120.1");
  });
});

describe("formatPercent", () => {
  it("turns a fraction into whole percent", () => {
    expect(formatPercent(0.58)).toBe("58\u00a0%");
    expect(formatPercent(0.059, { decimals: 1, signed: true })).toBe("+5.9\u00a0%");
  });

  it("does not call a small share nothing", () => {
    expect(formatPercent(0.004)).toBe("<1\u00a0%");
    expect(formatPercent(0)).toBe("0\u00a0%");
  });
});

describe("splitFigure", () => {
  it("parts a figure at its point", () => {
    expect(splitFigure("45.2")).toEqual({ integer: "45", fraction: ".2" });
    expect(splitFigure("5,710")).toEqual({ integer: "5,710", fraction: "" });
    expect(splitFigure("–")).toEqual({ integer: "–", fraction: "" });
  });

  it("gives a column the width of its longest fraction", () => {
    expect(fractionDigits([5712, 45.23, 0.6264, null])).toBe(3);
    expect(fractionDigits([5712, 480])).toBe(0);
    expect(fractionDigits([])).toBe(0);
  });
});

describe("formatDate", () => {
  it("writes a date of business as it stands, whatever the zone of the reader", () => {
    expect(formatDate("2026-11-02")).toBe("2 Nov 2026");
    expect(formatDate("2027-01-01", "long")).toBe("1 January 2027");
  });

  it("writes an instant in the zone asked for", () => {
    expect(formatDate("2026-11-29T16:20:00Z", "time")).toBe("29 Nov 2026, 16:20");
    expect(formatDate("2026-11-29T16:20:00Z", "time", "Europe/Oslo")).toBe("29 Nov 2026, 17:20");
  });

  it("writes an en dash for what is missing or no date", () => {
    expect(formatDate(null)).toBe("–");
    expect(formatDate("soon")).toBe("–");
  });
});
