import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  quantities,
  quantityOf,
  toCanonical,
  type QuantityName,
} from "@/analytics/units/conversions";
import { parseQuantity } from "@/analytics/units/parse-quantity";

const names = Object.keys(quantities) as QuantityName[];

function read(text: string, quantity: QuantityName, defaultUnit?: string) {
  const parsed = parseQuantity(text, quantity, defaultUnit);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed;
}

function reasonFor(text: string, quantity: QuantityName) {
  const parsed = parseQuantity(text, quantity);
  return parsed.ok ? `read as ${parsed.value} ${parsed.unit}` : parsed.reason;
}

describe("parseQuantity", () => {
  it("answers its examples", () => {
    expect(parseQuantity("12*640", "area")).toEqual({ ok: true, value: 7680, unit: "acre" });
    expect(parseQuantity("52 %", "fraction")).toEqual({ ok: true, value: 0.52, unit: "%" });
    expect(parseQuantity("35 %", "fraction")).toEqual({ ok: true, value: 0.35, unit: "%" });
  });

  it.each([
    ["12,640", 12640],
    ["1,234,567.8", 1234567.8],
    ["12 640", 12640],
    ["12 640", 12640],
    ["12’640", 12640],
    ["1.2e3", 1200],
    [".5", 0.5],
    ["2+3*4", 14],
    ["(2+3)*4", 20],
    ["2*(3+4)^2", 98],
    ["2^3^2", 512],
    ["10/4", 2.5],
    ["6 − 2", 4],
    ["3 × 4 ÷ 2", 6],
    ["2 - -3", 5],
  ])("reads %s as %d", (text, value) => {
    expect(read(text, "area").value).toBeCloseTo(value, 9);
  });

  it.each([
    ["38 bar", "pressure", 551.1434],
    ["38bara", "pressure", 551.1434],
    ["31 m", "length", 101.70604],
    ["2 * 19 bar", "pressure", 551.1434],
    ["-5 °C", "temperature", 23],
    ["150 deg C", "temperature", 302],
    ["4 sections", "area", 2560],
    ["450 m3/1e6 Sm3", "condensateYield", 79.994472],
    ["80 stb / mmscf", "condensateYield", 80],
    ["2.5e6 Sm3", "gasVolume", 88456575.9],
    ["3 1e9 Sm3", "gasVolume", 1.0614789e11],
    ["350 ppm", "fraction", 0.00035],
  ] as const)("reads %s with its unit", (text, quantity, value) => {
    expect(read(text, quantity).value / value).toBeCloseTo(1, 7);
  });

  it("assumes the unit the field shows", () => {
    expect(read("18", "fraction", "%").value).toBeCloseTo(0.18, 12);
    expect(read("18", "fraction").value).toBe(18);
    expect(read("0.18 fraction", "fraction", "%").value).toBe(0.18);
  });

  it.each([
    ["", "area", "Enter an area."],
    ["12*", "area", "A number is missing at the end."],
    ["(4", "area", "A bracket is not closed."],
    ["5/0", "area", "This divides by zero."],
    ["10^400", "area", "The result is too large to be a number."],
    ["(0-8)^0.5", "area", "This power has no value."],
    [
      "0,15",
      "fraction",
      "A comma separates thousands, in groups of three digits. Use a point for decimals.",
    ],
    [
      "12,64",
      "area",
      "A comma separates thousands, in groups of three digits. Use a point for decimals.",
    ],
    ["31 m", "pressure", "“m” is not a unit of pressure here; use psia, bar, kPa, MPa, Pa, atm."],
    ["-3", "area", "An area cannot be negative."],
    ["-500 F", "temperature", "This is below absolute zero."],
    ["3 4", "area", "“4” is not a number."],
    ["NaN", "length", "“NaN” is not a unit of length here; use ft, m, km."],
    ["Infinity", "length", "“Infinity” is not a unit of length here; use ft, m, km."],
  ] as const)("refuses “%s” with a reason", (text, quantity, reason) => {
    expect(reasonFor(text, quantity)).toBe(reason);
  });

  it("explains that a gauge pressure is not absolute", () => {
    expect(reasonFor("500 psig", "pressure")).toContain("gauge pressure");
    expect(reasonFor("38 barg", "pressure")).toContain("gauge pressure");
  });

  it("refuses very long and deeply nested texts", () => {
    expect(reasonFor("1+".repeat(100) + "1", "area")).toBe("This is longer than 120 characters.");
    expect(reasonFor("(".repeat(55) + "1" + ")".repeat(55), "area")).toBe(
      "There are too many brackets or signs.",
    );
  });

  it("reads back any number it is shown, in any unit", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...names),
        fc.nat(),
        fc.double({ min: 1e-6, max: 1e12, noNaN: true }),
        (name, pick, value) => {
          const symbols = Object.keys(quantityOf(name).units);
          const symbol = symbols[pick % symbols.length];
          const parsed = read(`${value} ${symbol}`, name);
          expect(parsed.unit).toBe(symbol);
          expect(parsed.value).toBe(toCanonical<QuantityName>(value, name, symbol as "psia"));
        },
      ),
    );
  });

  it("never throws and never answers NaN, whatever is typed", () => {
    fc.assert(
      fc.property(
        fc.oneof(fc.string(), fc.string({ unit: fc.constantFrom(..."0123456789+-*/^().,e %mf") })),
        fc.constantFrom(...names),
        (text, name) => {
          const parsed = parseQuantity(text, name);
          if (parsed.ok) expect(Number.isFinite(parsed.value)).toBe(true);
          else expect(parsed.reason).toMatch(/[.]$/);
        },
      ),
      { numRuns: 500 },
    );
  });
});
