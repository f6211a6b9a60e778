import "../../support/property-seed";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lumpFractions, type HeavyComponent } from "@/analytics/composition/heptanes-plus";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import {
  gammaSplit,
  gaussLaguerre,
  lumpMeasured,
  smallestMolecularWeight,
} from "@/analytics/equation-of-state/heavy-split";

const expectAll = (actual: readonly number[], expected: readonly number[], digits: number) => {
  expect(actual).toHaveLength(expected.length);
  actual.forEach((value, index) => expect(value).toBeCloseTo(expected[index], digits));
};

describe("gaussLaguerre", () => {
  it.each([
    // Abramowitz and Stegun (1964), table 25.9
    [2, [0.585786437627, 3.414213562373], [0.853553390593, 0.146446609407]],
    [
      3,
      [0.415774556783, 2.294280360279, 6.289945082937],
      [0.711093009929, 0.278517733569, 0.0103892565016],
    ],
    [
      5,
      [0.26356031972, 1.413403059107, 3.596425771041, 7.085810005859, 12.640800844276],
      [0.521755610583, 0.398666811083, 0.0759424496817, 0.00361175867992, 0.0000233699723858],
    ],
  ])("has the %d nodes and weights of the tables for shape 1", (count, nodes, weights) => {
    const quadrature = gaussLaguerre(count, 1);
    expectAll(quadrature.nodes, nodes, 11);
    expectAll(quadrature.weights, weights, 11);
  });

  it("integrates the moments of the gamma density exactly", () => {
    // E x^k = a (a + 1) … (a + k - 1)
    fc.assert(
      fc.property(
        fc.integer({ min: 2, max: 5 }),
        fc.double({ min: 0.5, max: 2.5, noNaN: true }),
        (count, shape) => {
          const { nodes, weights } = gaussLaguerre(count, shape);
          let moment = 1;
          for (let k = 0; k < 2 * count; k += 1) {
            const sum = nodes.reduce((total, x, index) => total + weights[index] * x ** k, 0);
            expect(sum / moment).toBeCloseTo(1, 10);
            moment *= shape + k;
          }
        },
      ),
      { numRuns: 100 },
    );
  });
});

describe("gammaSplit", () => {
  const whole = { moleFraction: 0.0659, molecularWeight: 140, specificGravity: 0.774 };

  it("answers its example", () => {
    // z7+ times the weights of table 25.9 of Abramowitz and Stegun
    expectAll(
      gammaSplit(whole, 3, 1).map(({ moleFraction }) => moleFraction),
      [0.046861, 0.018354, 0.000685],
      6,
    );
  });

  it("keeps moles, mass and volume", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 2, max: 5 }),
        fc.double({ min: 0.5, max: 2.5, noNaN: true }),
        fc.double({ min: 105, max: 170, noNaN: true }),
        fc.double({ min: 0.72, max: 0.86, noNaN: true }),
        (count, shape, molecularWeight, specificGravity) => {
          const fractions = gammaSplit(
            { moleFraction: 0.05, molecularWeight, specificGravity },
            count,
            shape,
          );
          const lump = lumpFractions(fractions)!;
          expect(lump.moleFraction / 0.05).toBeCloseTo(1, 11);
          expect(lump.molecularWeight / molecularWeight).toBeCloseTo(1, 10);
          expect(lump.specificGravity / specificGravity).toBeCloseTo(1, 10);
          fractions.slice(1).forEach((fraction, index) => {
            expect(fraction.molecularWeight).toBeGreaterThan(fractions[index].molecularWeight);
            expect(fraction.specificGravity).toBeGreaterThan(fractions[index].specificGravity);
          });
        },
      ),
      { numRuns: 100 },
    );
  });

  it("refuses to split what is lighter than its lightest fraction", () => {
    expect(smallestMolecularWeight(1)).toBeCloseTo(88.19, 2);
    expect(() => gammaSplit({ ...whole, molecularWeight: 91 }, 3, 1)).toThrow(DomainError);
  });

  it("refuses fractions that nothing is known of", () => {
    expect(() =>
      gammaSplit({ ...whole, molecularWeight: 260, specificGravity: 0.85 }, 5, 0.5),
    ).toThrow(/Take fewer fractions/);
  });

  it("says so when no fractions have the gravity of the whole", () => {
    expect(() => gammaSplit({ ...whole, specificGravity: 3 }, 3, 1)).toThrow(ConvergenceError);
  });
});

describe("lumpMeasured", () => {
  const measured = Array.from(
    { length: 12 },
    (_, index): HeavyComponent => ({
      name: `C${7 + index}`,
      light: null,
      carbonNumber: 7 + index,
      moleFraction: 0.02 * 0.8 ** index,
      molecularWeight: 96 + 13 * index,
      specificGravity: 0.727 + 0.01 * index,
    }),
  );

  it("keeps moles, mass and volume in contiguous groups", () => {
    for (const groups of [1, 2, 3, 5]) {
      const lumps = lumpMeasured(measured, groups);
      expect(lumps).toHaveLength(groups);
      const [before, after] = [lumpFractions(measured)!, lumpFractions(lumps)!];
      expect(after.moleFraction).toBeCloseTo(before.moleFraction, 12);
      expect(after.molecularWeight).toBeCloseTo(before.molecularWeight, 9);
      expect(after.specificGravity).toBeCloseTo(before.specificGravity, 12);
      lumps.slice(1).forEach((lump, index) => {
        expect(lump.molecularWeight).toBeGreaterThan(lumps[index].molecularWeight);
      });
    }
  });

  it("finds the division with the least spread of all", () => {
    const spread = (rows: readonly HeavyComponent[]) => {
      const mass = rows.map((row) => row.moleFraction * row.molecularWeight);
      const total = mass.reduce((a, b) => a + b, 0);
      const mean =
        rows.reduce((sum, row, i) => sum + mass[i] * Math.log(row.molecularWeight), 0) / total;
      return rows.reduce(
        (sum, row, i) => sum + mass[i] * (Math.log(row.molecularWeight) - mean) ** 2,
        0,
      );
    };
    let best = { cost: Infinity, weights: [] as number[] };
    for (let first = 1; first < 11; first += 1) {
      for (let second = first + 1; second < 12; second += 1) {
        const groups = [
          measured.slice(0, first),
          measured.slice(first, second),
          measured.slice(second),
        ];
        const cost = groups.reduce((sum, rows) => sum + spread(rows), 0);
        if (cost < best.cost) {
          best = { cost, weights: groups.map((rows) => lumpFractions(rows)!.molecularWeight) };
        }
      }
    }
    expectAll(
      lumpMeasured(measured, 3).map(({ molecularWeight }) => molecularWeight),
      best.weights,
      9,
    );
  });

  it("leaves fewer fractions than groups as they are", () => {
    expect(lumpMeasured(measured.slice(0, 2), 3)).toHaveLength(2);
  });
});
