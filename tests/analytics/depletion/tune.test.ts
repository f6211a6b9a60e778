import { describe, expect, it } from "vitest";
import { simulateDepletion } from "@/analytics/depletion/simulate-depletion";
import { tune } from "@/analytics/depletion/tune";
import { characterise } from "@/analytics/equation-of-state/characterise";
import {
  tuningBounds,
  untouched,
  type Characterisation,
  type TunableName,
} from "@/analytics/equation-of-state/characterisation-schema";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import { studyStream, studyTable } from "./third-comparative-study";

const three: Characterisation = {
  split: { kind: "gamma", fractions: 3, shape: 1 },
  criticals: "keslerLee",
  adjustments: untouched,
};
const usual: TunableName[] = [
  "heavyCriticalTemperatureFactor",
  "heavyCriticalPressureFactor",
  "methaneHeavyInteractionFactor",
];
const tuneStudy = (change: Partial<Parameters<typeof tune>[0]> = {}) =>
  tune({
    stream: studyStream,
    characterisation: three,
    table: studyTable(),
    tunables: usual,
    ...change,
  });

describe("tune", () => {
  it.each<[string, Characterisation]>([
    ["three fractions by Kesler and Lee", three],
    ["three fractions by Twu", { ...three, criticals: "twu" }],
    ["heptanes plus whole", { ...three, split: { kind: "single" } }],
  ])("brings %s to the dew point within 0.2 % and the liquid within 1.5 points", (_, from) => {
    const { before, after } = tuneStudy({ characterisation: from });
    expect(Math.abs(after.dewPointPsia / 3442.7 - 1)).toBeLessThan(0.002);
    expect(after.averageLiquidErrorPoints).toBeLessThan(1.5);
    expect(before.averageLiquidErrorPoints).toBeGreaterThan(4);
    expect(after.objective).toBeLessThan(0.05 * before.objective);
    after.rows.slice(1).forEach((row, index) => {
      const measured = studyTable().rows[index + 1].cumulativeProducedMolePercent!;
      expect(Math.abs(row.cumulativeProducedMolePercent! - measured)).toBeLessThan(1);
    });
  });

  it("moves what was declared and nothing else, within its bounds, and says how far", () => {
    const { characterisation, changes } = tuneStudy();
    expect(changes.map(({ name }) => name)).toEqual(usual);
    for (const { name, from, to, atBound } of changes) {
      const { lowest, highest } = tuningBounds[name];
      expect(from).toBe(1);
      expect(characterisation.adjustments[name]).toBe(to);
      expect(to).toBeGreaterThanOrEqual(lowest);
      expect(to).toBeLessThanOrEqual(highest);
      expect(atBound).toBe(to === lowest || to === highest);
    }
    expect(characterisation).toMatchObject({ split: three.split, criticals: three.criticals });
    expect(characterisation.adjustments.heavyAcentricFactorFactor).toBe(1);
    expect(characterisation.adjustments.heavyVolumeShiftFactor).toBe(1);
    expect(three.adjustments).toEqual(untouched);
  });

  it("flags an adjustment that ends at its bound", () => {
    const { changes, warnings } = tuneStudy({
      characterisation: { ...three, split: { kind: "single" } },
    });
    const atBound = changes.filter((change) => change.atBound);
    expect(atBound.map(({ name }) => name)).toEqual(["heavyCriticalPressureFactor"]);
    expect(warnings).toContainEqual(
      expect.objectContaining({
        code: "adjustment_at_bound",
        input: "characterisation.adjustments.heavyCriticalPressureFactor",
      }),
    );
  });

  it("finds the adjustments back with which a table was made", () => {
    const made: Characterisation = {
      ...three,
      adjustments: {
        ...untouched,
        heavyCriticalTemperatureFactor: 0.97,
        methaneHeavyInteractionFactor: 1.4,
      },
    };
    const table = simulateDepletion(characterise(studyStream, made), 200, null);
    const { changes, after } = tuneStudy({
      table,
      tunables: ["heavyCriticalTemperatureFactor", "methaneHeavyInteractionFactor"],
    });
    expect(changes[0].to).toBeCloseTo(0.97, 4);
    expect(changes[1].to).toBeCloseTo(1.4, 3);
    expect(after.objective).toBeLessThan(1e-4);
  });

  it("reports every improvement as it comes", () => {
    const seen: number[] = [];
    const { after } = tuneStudy({ onProgress: ({ objective }) => seen.push(objective) });
    expect(seen.length).toBeGreaterThan(2);
    expect(seen).toEqual([...seen].sort((a, b) => b - a));
    expect(after.objective).toBeCloseTo(seen[seen.length - 1], 9);
  });

  it("fits liquid readings between the steps, and leaves the blow-down to atmosphere alone", () => {
    const table = studyTable();
    const reading = (psig: number, liquidPercent: number) => ({
      pressurePsia: psig + 14.7,
      liquidPercent,
      cumulativeProducedMolePercent: null,
      gasZ: null,
      twoPhaseZ: null,
      viscosityCp: null,
      producedGas: null,
    });
    // Kenyon and Behie (1987), from memory
    table.rows.splice(1, 0, reading(3400, 0.9), reading(3350, 2.7), reading(3200, 8.1));
    table.rows.push(reading(0, 10.2));
    const { after } = tuneStudy({ table });
    expect(after.rows).toHaveLength(10);
    expect(after.rows[9]).toMatchObject({ liquidPercent: null });
    expect(after.averageLiquidErrorPoints).toBeLessThan(1.5);
  });

  it("says so when nothing comes nearer, instead of answering with the start", () => {
    const { characterisation } = tuneStudy();
    const table = simulateDepletion(characterise(studyStream, characterisation), 200, null);
    expect(() => tuneStudy({ characterisation, table })).toThrow(ConvergenceError);
  });

  it.each<[string, Partial<Parameters<typeof tune>[0]>]>([
    ["nothing to move", { tunables: [] }],
    ["one thing twice", { tunables: [usual[0], usual[0]] }],
    [
      "a start outside the bounds",
      {
        characterisation: {
          ...three,
          adjustments: { ...untouched, heavyCriticalTemperatureFactor: 1.3 },
        },
      },
    ],
    ["a gas without heptanes plus", { stream: { ...studyStream, heptanesPlus: null } }],
    [
      "a table with no row below the dew point",
      { table: { ...studyTable(), rows: [studyTable().rows[0], studyTable().rows[0]] } },
    ],
  ])("refuses %s", (_, change) => {
    expect(() => tuneStudy(change)).toThrow(DomainError);
  });

  it("takes less than three seconds with all five adjustments", () => {
    const start = performance.now();
    tuneStudy({ tunables: Object.keys(tuningBounds) as TunableName[] });
    expect(performance.now() - start).toBeLessThan(3000);
  });
});
