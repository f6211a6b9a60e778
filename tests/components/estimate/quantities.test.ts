import { describe, expect, it } from "vitest";
import {
  readField,
  readPlain,
  readQuantity,
  typedFigure,
} from "@/components/estimate/quantities-of-inputs";

describe("typedFigure(value)", () => {
  it("groups thousands and keeps every digit", () => {
    expect(typedFigure(3488)).toBe("3,488");
    expect(typedFigure(1234567.125)).toBe("1,234,567.125");
    expect(typedFigure(0.1)).toBe("0.1");
    expect(typedFigure(999)).toBe("999");
  });

  it("reads back as itself", () => {
    for (const value of [0.1 + 0.2, 1 / 3, 43_560, 6.02e-7, 0.0282795, 123_456.789]) {
      expect(readPlain(typedFigure(value)).value).toBe(value);
    }
  });
});

describe("readField(text, name, inUnit, unit)", () => {
  it("shows what arithmetic comes to", () => {
    expect(readField("5.45*640", "areaAcres", true, "acre")).toEqual({
      value: 3488,
      preview: "= 3,488 acre",
      problem: null,
    });
  });

  it("converts another unit: 38 bar is 551.1 psia", () => {
    // 1 bar = 100,000 / 6,894.757 psi
    const { value, preview } = readField("38 bar", "pressurePsia", true, "psia");
    expect(value).toBeCloseTo(551.143, 2);
    expect(preview).toBe("= 551.1 psia");
  });

  it("takes per cent as a fraction", () => {
    expect(readField("18 %", "porosity", true, "").value).toBeCloseTo(0.18, 12);
  });

  it("shows no preview for a plain number, and no problem for an empty field", () => {
    expect(readField("1,640", "areaAcres", true, "acre").preview).toBeNull();
    expect(readField("  ", "areaAcres", true, "acre")).toEqual({
      value: null,
      preview: null,
      problem: null,
    });
  });

  it("says why a text cannot be read", () => {
    expect(readField("38 psig", "pressurePsia", true, "psia").problem).toMatch(/gauge/);
    expect(readField("12*", "areaAcres", true, "acre").problem).not.toBeNull();
  });
});

describe("readQuantity(text, quantity, unit, symbol)", () => {
  it("assumes the unit of the field and previews in it", () => {
    expect(readQuantity("3", "fraction", "%", "%")).toEqual({
      value: 0.03,
      preview: null,
      problem: null,
    });
    expect(readQuantity("30,000 ppm", "fraction", "%", "%").preview).toBe("= 3 %");
  });
});
