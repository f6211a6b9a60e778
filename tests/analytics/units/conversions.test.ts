import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import {
  BARRELS_PER_ACRE_FOOT,
  canonicalUnit,
  convert,
  CUBIC_FEET_PER_BARREL,
  CUBIC_METRES_PER_BARREL,
  CUBIC_METRES_PER_CUBIC_FOOT,
  degreesRankine,
  displayUnit,
  fromCanonical,
  GAS_CONSTANT,
  PASCALS_PER_PSI,
  quantities,
  quantityOf,
  SCF_PER_SM3,
  SQUARE_METRES_PER_ACRE,
  toCanonical,
  type QuantityName,
} from "@/analytics/units/conversions";

const names = Object.keys(quantities) as QuantityName[];

describe("factors of conversion", () => {
  it("are those of the yard-pound agreement of 1959 and the 42-gallon barrel", () => {
    // NIST Special Publication 811 (2008), Appendix B.8
    expect(CUBIC_FEET_PER_BARREL).toBeCloseTo(5.614583333333333, 14);
    expect(CUBIC_METRES_PER_BARREL).toBe(0.158987294928);
    expect(CUBIC_METRES_PER_CUBIC_FOOT).toBe(0.028316846592);
    expect(PASCALS_PER_PSI / 6894.757293168).toBeCloseTo(1, 12);
    expect(SQUARE_METRES_PER_ACRE).toBe(4046.8564224);
    expect(BARRELS_PER_ACRE_FOOT).toBeCloseTo(7758.367346938776, 9);
  });

  it("agree with one another: a barrel is the same in cubic feet and in cubic metres", () => {
    expect(CUBIC_FEET_PER_BARREL * CUBIC_METRES_PER_CUBIC_FOOT).toBeCloseTo(
      CUBIC_METRES_PER_BARREL,
      15,
    );
  });

  it("give the gas constant of oilfield units from the exact SI constant", () => {
    // CODATA 2018: 8.314 462 618 153 24 J/(mol K)
    expect(GAS_CONSTANT).toBeCloseTo(10.731577, 6);
  });

  it("give 35.3826 scf in a standard cubic metre", () => {
    // ISO 13443:1996 reference conditions (288.15 K, 101.325 kPa) against 14.696 psia and 60 degF
    expect(SCF_PER_SM3).toBeCloseTo(35.38263036, 8);
  });
});

describe("toCanonical", () => {
  it("answers its example", () => {
    expect(toCanonical(38, "pressure", "bar")).toBeCloseTo(551.1434, 4);
  });

  it("takes a temperature through its zero", () => {
    expect(toCanonical(100, "temperature", "degC")).toBe(212);
    expect(toCanonical(0, "temperature", "K")).toBe(-459.67);
    expect(toCanonical(519.67, "temperature", "degR")).toBeCloseTo(60, 12);
    expect(degreesRankine(60)).toBeCloseTo(519.67, 12);
  });

  it("takes every whole per cent to the nearest number there is to its hundredth", () => {
    expect(toCanonical(35, "fraction", "%")).toBe(0.35);
    for (let percent = 0; percent <= 100; percent += 1) {
      expect(toCanonical(percent, "fraction", "%")).toBe(Number(`${percent}e-2`));
      expect(toCanonical(percent, "fraction", "ppm")).toBe(Number(`${percent}e-6`));
    }
  });

  it("refuses a unit of another quantity", () => {
    const metre: string = "m";
    expect(() => toCanonical(1, "pressure" as QuantityName, metre as "psia")).toThrow(DomainError);
    expect(() => toCanonical(1, "pressure" as QuantityName, "toString" as "psia")).toThrow(
      "“toString” is not a unit of pressure; use psia, bar, kPa, MPa, Pa, atm",
    );
  });
});

describe("fromCanonical", () => {
  it("answers its example: 1 STB/MMscf is 5.6254 m3 per million Sm3", () => {
    expect(fromCanonical(1, "condensateYield", "m3/1e6 Sm3")).toBeCloseTo(5.62539, 5);
  });

  it("keeps a yield and its gas-oil ratio reciprocal in metric units", () => {
    const yieldMetric = fromCanonical(80, "condensateYield", "m3/1e6 Sm3");
    const ratioMetric = fromCanonical(1e6 / 80, "gasOilRatio", "Sm3/m3");
    expect(yieldMetric * ratioMetric).toBeCloseTo(1e6, 6);
  });

  it("gives gas per rock volume from the two volumes it is made of", () => {
    const sm3 = fromCanonical(1000, "gasVolume", "Sm3");
    expect(fromCanonical(1000, "gasPerRockVolume", "Sm3/m3")).toBeCloseTo(
      sm3 / (SQUARE_METRES_PER_ACRE * 0.3048),
      12,
    );
    expect(fromCanonical(1, "liquidPerRockVolume", "m3/ha·m")).toBeCloseTo(
      CUBIC_METRES_PER_BARREL / ((SQUARE_METRES_PER_ACRE * 0.3048) / 1e4),
      12,
    );
  });
});

describe("convert", () => {
  it("answers its example", () => {
    expect(convert(15, "temperature", "degC", "degF")).toBe(59);
  });

  it.each([
    // NIST Special Publication 811 (2008), Appendix B.8, unless said otherwise
    [1, "area", "mi2", "acre", 640],
    [1, "area", "km2", "acre", 247.105381467],
    [1, "area", "ha", "acre", 2.47105381467],
    [1, "length", "m", "ft", 3.28083989501],
    [1, "pressure", "atm", "psia", 14.69594877551],
    [1, "pressure", "bar", "psia", 14.50377377302],
    [1, "liquidVolume", "m3", "STB", 6.28981077043],
    [1e6, "gasVolume", "scf", "MMscf", 1],
    [1, "fraction", "%", "ppm", 10000],
    // 1 scf/STB = (1 / 35.38263036) / 0.158987294928 Sm3/m3
    [1000, "gasOilRatio", "scf/STB", "Sm3/m3", 177.765494],
  ] as const)("turns %d (%s) %s into %s", (value, quantity, from, to, expected) => {
    const actual = convert<QuantityName>(value, quantity, from, to);
    expect(actual / expected).toBeCloseTo(1, 8);
  });

  it("returns what it was given after going to any other unit and back", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...names),
        fc.nat(),
        fc.nat(),
        fc.double({ min: 1e-3, max: 1e9, noNaN: true }),
        (name, i, j, value) => {
          const symbols = Object.keys(quantityOf(name).units);
          const from = symbols[i % symbols.length] as "psia";
          const to = symbols[j % symbols.length] as "psia";
          const there = convert<QuantityName>(value, name, from, to);
          const back = convert<QuantityName>(there, name, to, from);
          // temperature loses digits where the scale crosses zero
          const scale = Math.abs(value) + (name === "temperature" ? 500 : 0);
          expect(Math.abs(back - value) / scale).toBeLessThan(1e-13);
        },
      ),
    );
  });
});

describe("displayUnit and canonicalUnit", () => {
  it.each(names)("name units that %s has", (name) => {
    const symbols = Object.keys(quantityOf(name).units);
    expect(symbols).toContain(displayUnit(name, "field"));
    expect(symbols).toContain(displayUnit(name, "metric"));
    expect(quantityOf(name).units[canonicalUnit(name)]).toMatchObject({ factor: 1 });
  });
});
