import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readStream } from "@/analytics/composition/read-sheet";
import { checkTable } from "@/analytics/depletion/check-table";
import { depletionTableSchema } from "@/analytics/depletion/depletion-table-schema";
import {
  defaultPressuresPsia,
  depleteCell,
  simulateDepletion,
  tableOfSimulation,
  type SimulatedDepletion,
} from "@/analytics/depletion/simulate-depletion";
import { characterise } from "@/analytics/equation-of-state/characterise";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { DomainError } from "@/analytics/errors";
// The same equation, written separately in Python with NumPy: constant_volume_depletion.py beside it.
import reference from "../../fixtures/constant-volume-depletion.json";
import { fittedMixture } from "./fitted-mixture";
import { studyStream } from "./third-comparative-study";

const whole: Characterisation = {
  split: { kind: "single" },
  criticals: "keslerLee",
  adjustments: untouched,
};
const three: Characterisation = {
  ...whole,
  split: { kind: "gamma", fractions: 3, shape: 1 },
};

type Reference = typeof reference.fitted;
const pressures = ({ rows }: Reference) => rows.map(({ psig }) => psig + 14.7);

function expectSame(simulated: SimulatedDepletion, expected: Reference) {
  expect(Math.abs(simulated.dewPointPsia - 14.7 - expected.dewPointPsig)).toBeLessThan(0.01);
  expected.rows.forEach((row, index) => {
    const step = simulated.steps[index + 1];
    const heavy = step.gas.slice(10).reduce((sum, y) => sum + y, 0);
    // bisection there stops 0.01 psi from the dew point, which moves everything else by parts in a million
    for (const [found, wanted] of [
      [100 * step.liquidFraction, row.liquidPercent],
      [100 * step.producedFraction, row.producedPercent],
      [step.gasZ, row.gasZ],
      [step.twoPhaseZ, row.twoPhaseZ],
      [100 * step.gas[2], row.producedMethanePercent],
      [100 * heavy, row.producedHeptanesPlusPercent],
    ]) {
      expect(Math.abs(found / wanted - 1)).toBeLessThan(1e-5);
    }
  });
}

describe("depleteCell", () => {
  it("reproduces a separate implementation with a fitted fluid to five digits", () => {
    expectSame(depleteCell(fittedMixture, 200, pressures(reference.fitted)), reference.fitted);
  });

  it("does so from the correlations on, with heptanes plus whole", () => {
    expectSame(
      depleteCell(characterise(studyStream, whole), 200, pressures(reference.untunedWhole)),
      reference.untunedWhole,
    );
  });

  it("does so with heptanes plus in three fractions", () => {
    expectSame(
      depleteCell(characterise(studyStream, three), 200, pressures(reference.untunedThree)),
      reference.untunedThree,
    );
  });

  it.each([
    // dew point psig; liquid % and produced % at 3,000 / 2,400 / 1,800 / 1,200 / 700 psig: another independent
    // implementation, to 0.1 %
    [
      "fitted",
      depleteCell(fittedMixture, 200, pressures(reference.fitted)),
      3428.13,
      [16.254, 19.177, 18.516, 16.688, 14.651],
      [9.6102, 24.8624, 41.6471, 59.0913, 73.5629],
      0.001,
    ],
    // 0.2 %: its figures are printed to four digits, from the correlations on
    [
      "untuned whole",
      depleteCell(characterise(studyStream, whole), 200, pressures(reference.untunedWhole)),
      3516.0,
      [30.23],
      [NaN, NaN, NaN, NaN, 72.783],
      0.002,
    ],
  ])(
    "gives the figures of a second implementation, %s",
    (_, simulated, dewPointPsig, liquid, produced, tolerance) => {
      expect(Math.abs((simulated.dewPointPsia - 14.7) / dewPointPsig - 1)).toBeLessThan(tolerance);
      const [, ...below] = simulated.steps;
      below.forEach(({ liquidFraction, producedFraction }, i) => {
        if (liquid[i] > 0) {
          expect(Math.abs((100 * liquidFraction) / liquid[i] - 1)).toBeLessThan(tolerance);
        }
        if (produced[i] > 0) {
          expect(Math.abs((100 * producedFraction) / produced[i] - 1)).toBeLessThan(tolerance);
        }
      });
    },
  );

  it("starts with nothing produced and no liquid at the dew point", () => {
    const [first] = depleteCell(characterise(studyStream, three), 200, null).steps;
    expect(first).toMatchObject({ stepMoles: 0, producedFraction: 0, liquidFraction: 0 });
    expect(first.gasZ).toBe(first.twoPhaseZ);
  });

  it("begins its liquid at the dew point without a jump", () => {
    const fluid = characterise(studyStream, three);
    const { dewPointPsia } = depleteCell(fluid, 200, null);
    const liquid = [1e-5, 1e-4, 1e-3].map(
      (share) => depleteCell(fluid, 200, [dewPointPsia * (1 - share)]).steps[1].liquidFraction,
    );
    expect(liquid[0]).toBeLessThan(0.001);
    expect(liquid[1]).toBeGreaterThan(liquid[0]);
    expect(liquid[2]).toBeGreaterThan(liquid[1]);
  });

  it("keeps every component's moles, only ever produces, and never leaves more liquid than cell", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.95, max: 1.05, noNaN: true }),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        fc.integer({ min: 150, max: 280 }),
        (criticalTemperature, interaction, temperatureDegF) => {
          const fluid = characterise(studyStream, {
            ...three,
            adjustments: {
              ...untouched,
              heavyCriticalTemperatureFactor: criticalTemperature,
              methaneHeavyInteractionFactor: interaction,
            },
          });
          const { steps } = depleteCell(fluid, temperatureDegF, [3000, 2000, 1000, 400]);
          const produced = new Float64Array(fluid.moleFractions.length);
          let before = steps[0];
          for (const step of steps.slice(1)) {
            expect(step.pressurePsia).toBeLessThan(before.pressurePsia);
            expect(step.stepMoles).toBeGreaterThan(0);
            expect(step.producedFraction - before.producedFraction).toBeCloseTo(step.stepMoles, 12);
            expect(step.liquidFraction).toBeGreaterThan(0);
            expect(step.liquidFraction).toBeLessThan(0.6);
            expect(step.gasMoles + step.producedFraction).toBeLessThan(1);
            step.gas.forEach((y, i) => {
              produced[i] += step.stepMoles * y;
              const inLiquid = fluid.moleFractions[i] - produced[i] - step.gasMoles * y;
              expect(inLiquid).toBeGreaterThan(0);
            });
            before = step;
          }
        },
      ),
      { numRuns: 40 },
    );
  });

  it("depletes a gas with an end so heavy that its lower dew point is next to vacuum", () => {
    const { stream } = readStream({
      light: {
        H2S: 3.52,
        CO2: 3.95,
        N2: 1.91,
        C1: 72.09,
        C2: 7.13,
        C3: 4.46,
        iC4: 0.66,
        nC4: 2.21,
        iC5: 0.8,
        nC5: 0.49,
        C6: 0.58,
      },
      carbonNumbers: [],
      plus: {
        carbonNumber: 7,
        molePercent: 2.2,
        molecularWeight: 161.2,
        specificGravity: 0.779,
      },
    });
    const fluid = characterise(stream, {
      ...whole,
      split: { kind: "gamma", fractions: 5, shape: 0.769 },
    });
    const { steps } = depleteCell(fluid, 152.3, null);
    expect(steps).toHaveLength(13);
    expect(Math.max(...steps.map(({ liquidFraction }) => liquidFraction))).toBeGreaterThan(0.02);
  });

  it("refuses a temperature at which there is no dew point, and says what the fluid is", () => {
    expect(() => depleteCell(characterise(studyStream, whole), 700, null)).toThrow(
      /no dew point at 700 °F/,
    );
    const oil = characterise(
      {
        ...studyStream,
        components: studyStream.components.map((component) => ({
          ...component,
          moleFraction: component.name === "C7+" ? 0.4 : component.moleFraction * (0.6 / 0.9341),
        })),
        heptanesPlus: { ...studyStream.heptanesPlus!, moleFraction: 0.4 },
      },
      whole,
    );
    expect(() => depleteCell(oil, 200, null)).toThrow(/bubble point/);
  });

  it("leaves out pressures above the dew point, and refuses a list with none below", () => {
    const fluid = characterise(studyStream, whole);
    const { steps } = depleteCell(fluid, 200, [1000, 5000, 2000, 1000]);
    expect(steps.slice(1).map(({ pressurePsia }) => pressurePsia)).toEqual([2000, 1000]);
    expect(() => depleteCell(fluid, 200, [5000])).toThrow(DomainError);
    expect(() => depleteCell(fluid, 200, [-100])).toThrow(DomainError);
  });

  it("takes fifteen steps of twelve components in less than 50 ms", () => {
    const fluid = characterise(studyStream, {
      ...three,
      split: { kind: "gamma", fractions: 2, shape: 1 },
    });
    expect(fluid.moleFractions).toHaveLength(12);
    const steps = Array.from({ length: 15 }, (_, i) => 3400 - i * 200);
    const times = Array.from({ length: 7 }, () => {
      const start = performance.now();
      simulateDepletion(fluid, 200, steps);
      return performance.now() - start;
    }).sort((a, b) => a - b);
    expect(times[3]).toBeLessThan(50);
  });
});

describe("defaultPressuresPsia", () => {
  it("takes twelve steps to 500 psia, closest at the dew point", () => {
    const steps = defaultPressuresPsia(4000);
    expect(steps).toHaveLength(12);
    expect(steps[11]).toBe(500);
    expect(4000 - steps[0]).toBeLessThan(steps[4] - steps[5]);
  });
});

describe("tableOfSimulation", () => {
  const table = simulateDepletion(characterise(studyStream, three), 200, null);

  it("is a table that can be stored, and passes every check of a laboratory's", () => {
    expect(depletionTableSchema.parse(table)).toEqual(table);
    const questions = checkTable(table, studyStream).filter(
      ({ severity }) => severity !== "passed",
    );
    expect(questions).toEqual([]);
  });

  it("gives back the wellstream's heptanes plus at the dew point, specific gravity and all", () => {
    const { plus, light } = table.rows[0].producedGas!;
    expect(plus!.molePercent).toBeCloseTo(6.59, 9);
    expect(plus!.molecularWeight).toBeCloseTo(140, 6);
    expect(plus!.specificGravity).toBeCloseTo(0.774, 6);
    expect(light.C1).toBeCloseTo(65.99, 9);
  });

  it("thins the gas out: viscosity falls with pressure from about 0.04 cp", () => {
    // 0.0386 cp at 3,428 psig in the open data set made for the same fluid (ODbL 1.0, copyright 2015 Statoil)
    const viscosities = table.rows.map(({ viscosityCp }) => viscosityCp!);
    expect(viscosities).toEqual([...viscosities].sort((a, b) => b - a));
    const fitted = tableOfSimulation(fittedMixture, depleteCell(fittedMixture, 200, null));
    expect(Math.abs(fitted.rows[0].viscosityCp! / 0.03865 - 1)).toBeLessThan(0.15);
  });
});
