import { describe, expect, it } from "vitest";
import { chanceOf } from "@/components/charts/exceedance-curve";
import { linePath, positionOn, scaleFor, ticksOf, valueAt } from "@/components/charts/scale";

describe("scaleFor", () => {
  it("turns to log where a column spans more than a decade", () => {
    expect(scaleFor([12, 1810]).kind).toBe("log");
    expect(scaleFor([106, 195]).kind).toBe("linear");
  });

  it("stays linear where a value is zero or below, which has no logarithm", () => {
    expect(scaleFor([-5, 0.1, 1000]).kind).toBe("linear");
    expect(scaleFor([0, 1000], { kind: "log" }).kind).toBe("linear");
  });

  it("starts a linear scale at zero, and keeps the room asked for at the other side", () => {
    const scale = scaleFor([40, 90], { pad: 0.1 });
    expect(scale.domain[0]).toBe(0);
    expect(positionOn(scale, 90)).toBeLessThan(100);
  });

  it("leaves 14 % free at each side of a before-and-after row", () => {
    for (const kind of ["linear", "log"] as const) {
      const scale = scaleFor([92, 236], { pad: 0.14, fromZero: false, kind });
      expect(positionOn(scale, 92)).toBeCloseTo(14, 6);
      expect(positionOn(scale, 236)).toBeCloseTo(86, 6);
    }
  });

  it("gives a scale for one value, and for none", () => {
    const one = scaleFor([5], { fromZero: false });
    expect(Number.isFinite(positionOn(one, 5))).toBe(true);
    expect(scaleFor([null, undefined, Number.NaN])).toEqual({ kind: "linear", domain: [0, 1] });
  });
});

describe("positionOn", () => {
  it("puts a decade at equal steps on a log scale", () => {
    const scale = { kind: "log", domain: [1, 1000] } as const;
    expect(positionOn({ ...scale, domain: [1, 1000] }, 10)).toBeCloseTo(100 / 3, 9);
    expect(valueAt({ ...scale, domain: [1, 1000] }, 50)).toBeCloseTo(Math.sqrt(1000), 9);
  });

  it("puts zero off the left end of a log scale", () => {
    expect(positionOn({ kind: "log", domain: [1, 10] }, 0)).toBe(Number.NEGATIVE_INFINITY);
  });
});

describe("ticksOf", () => {
  const labels = (domain: [number, number], count = 4, kind: "log" | "linear" = "log") =>
    ticksOf({ kind, domain }, count).map(({ label }) => label);

  it("marks decades of a wide log scale", () => {
    expect(labels([9, 2400])).toEqual(["10", "100", "1,000"]);
  });

  it("marks threes between decades where decades alone are too few", () => {
    expect(labels([25, 1200])).toEqual(["30", "100", "300", "1,000"]);
  });

  it("thins decades where there are too many", () => {
    expect(labels([1e-3, 1e6], 4).length).toBeLessThanOrEqual(4);
  });

  it("marks round steps of a linear scale", () => {
    expect(labels([0, 2000], 4, "linear")).toEqual(["0", "500", "1,000", "1,500", "2,000"]);
  });

  it("always gives at least two ticks", () => {
    for (const domain of [
      [4.1, 4.9],
      [11, 19],
      [100, 1000],
    ] as [number, number][]) {
      expect(labels(domain).length).toBeGreaterThanOrEqual(2);
    }
  });
});

describe("linePath", () => {
  it("writes an svg path to a hundredth of a percent", () => {
    expect(
      linePath([
        [0, 0],
        [33.333, 66.667],
      ]),
    ).toBe("M0.00 0.00L33.33 66.67");
  });
});

describe("chanceOf", () => {
  const curve = { values: [10, 20, 40], probabilities: [1, 0.5, 0] };

  it("reads straight between the points of the curve", () => {
    expect(chanceOf(curve, 15)).toBeCloseTo(0.75, 12);
    expect(chanceOf(curve, 30)).toBeCloseTo(0.25, 12);
  });

  it("is certain below the smallest trial and nothing above the largest", () => {
    expect(chanceOf(curve, 5)).toBe(1);
    expect(chanceOf(curve, 41)).toBe(0);
  });
});
