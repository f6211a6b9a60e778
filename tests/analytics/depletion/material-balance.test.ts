import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cellRows } from "@/analytics/depletion/cell-rows";
import { lumpStream } from "@/analytics/depletion/lumped-gas";
import { balanceCell } from "@/analytics/depletion/material-balance";
import { twoPhaseZFromMoles } from "@/analytics/depletion/two-phase-z";
import { DomainError } from "@/analytics/errors";
import { studyStream, studyTable } from "./third-comparative-study";

describe("twoPhaseZFromMoles", () => {
  it.each(
    // reported two-phase z, Kenyon and Behie (1987), from memory; the last digit is 0.001
    studyTable().rows.map(
      (row) => [row.pressurePsia, row.cumulativeProducedMolePercent!, row.twoPhaseZ!] as const,
    ),
  )("gives the reported figure at %d psia within 0.0006", (pressurePsia, produced, reported) => {
    const z = twoPhaseZFromMoles(pressurePsia, produced / 100, {
      pressurePsia: 3442.7,
      gasZ: 0.803,
    });
    expect(Math.abs(z - reported)).toBeLessThan(0.0006);
  });

  it("answers its example", () => {
    expect(twoPhaseZFromMoles(1814.7, 0.42026, { pressurePsia: 3442.7, gasZ: 0.803 })).toBeCloseTo(
      0.730109,
      6,
    );
  });

  it.each([
    [0, 0.1, 3442.7, 0.8],
    [1000, 1, 3442.7, 0.8],
    [1000, -0.1, 3442.7, 0.8],
    [1000, 0.1, NaN, 0.8],
    [1000, 0.1, 3442.7, 0],
  ])("refuses %d psia, %d produced, a dew point of %d psia with z %d", (p, n, pd, zd) => {
    expect(() => twoPhaseZFromMoles(p, n, { pressurePsia: pd, gasZ: zd })).toThrow(DomainError);
  });
});

describe("balanceCell", () => {
  const { cell, rows } = cellRows(studyTable());
  const feed = lumpStream(studyStream);
  const states = balanceCell(
    feed,
    cell!,
    rows.map(({ values }) => values),
  );

  it.each([
    // liquid moles, lb/lbmol and lb/ft3, worked out separately in Python with NumPy from the same table
    [3014.7, 0.160059, 55.75, 36.027],
    [2414.7, 0.19046, 61.853, 35.851],
    [1814.7, 0.167686, 71.143, 37.629],
    [1214.7, 0.135312, 83.11, 39.828],
    [714.7, 0.10682, 96.325, 40.996],
  ])("follows the study's liquid at %d psia", (pressure, moles, molecularWeight, density) => {
    const state = states.find(({ pressurePsia }) => Math.abs(pressurePsia - pressure) < 0.01)!;
    expect(state.liquidMoles).toBeCloseTo(moles, 5);
    // molecular weights of the light components are rounded to two decimals there
    expect(state.liquid!.molecularWeight).toBeCloseTo(molecularWeight, 1);
    expect(state.liquid!.densityLbPerCubicFoot).toBeCloseTo(density, 1);
  });

  it("gives every component back what it took", () => {
    const produced = new Float64Array(feed.moleFractions.length);
    let before = 0;
    rows.forEach(({ values }, index) => {
      values.gas.moleFractions.forEach((y, i) => {
        produced[i] += (values.producedFraction - before) * y;
        const whole =
          produced[i] + states[index].gasMoles * y + states[index].liquidComponentMoles[i];
        expect(whole).toBeCloseTo(feed.moleFractions[i], 12);
      });
      before = values.producedFraction;
    });
  });

  it("leaves liquid moles that add up over the components, whatever the table says", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 1.2, noNaN: true }),
        fc.double({ min: 0, max: 0.4, noNaN: true }),
        fc.double({ min: 0, max: 0.9, noNaN: true }),
        fc.double({ min: 100, max: 3400, noNaN: true }),
        (gasZ, liquidFraction, producedFraction, pressurePsia) => {
          const [state] = balanceCell(feed, cell!, [
            { pressurePsia, producedFraction, gasZ, liquidFraction, gas: rows[0].values.gas },
          ]);
          const sum = state.liquidComponentMoles.reduce((total, moles) => total + moles, 0);
          expect(Math.abs(sum - state.liquidMoles)).toBeLessThan(1e-12);
          const left = 1 - producedFraction;
          expect(Math.abs(state.gasMoles + state.liquidMoles - left)).toBeLessThan(1e-12);
        },
      ),
      { numRuns: 100 },
    );
  });

  it("gives the two-phase z of a gas that drops no liquid its own z", () => {
    // a dry gas: what is left is gas alone, 1 - n = (p/pd)(zd/z)
    const left = (1000 / 3442.7) * (0.803 / 0.9);
    const [state] = balanceCell(feed, cell!, [
      {
        pressurePsia: 1000,
        producedFraction: 1 - left,
        gasZ: 0.9,
        liquidFraction: 0,
        gas: feed,
      },
    ]);
    expect(state.twoPhaseZ).toBeCloseTo(0.9, 12);
    expect(state.liquidMoles).toBeCloseTo(0, 12);
    expect(state.liquid).toBeNull();
  });

  it("refuses a gas z of nought", () => {
    const [first] = rows;
    expect(() => balanceCell(feed, cell!, [{ ...first.values, gasZ: 0 }])).toThrow(DomainError);
  });
});
