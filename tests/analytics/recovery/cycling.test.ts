import fc from "fast-check";
import { describe, expect, it } from "vitest";
import "../../support/property-seed";
import { createCyclingOutcome, cycle, type CyclingCase } from "@/analytics/recovery/cycling";
import {
  contentsAboveDewPoint,
  contentsBelowDewPoint,
  createContents,
  type Reservoir,
} from "@/analytics/recovery/depletion";
import { fineCurve, type FineCurve } from "@/analytics/recovery/fine-curve";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import { buildCycling, psia, publishedCurve } from "./published-curve";

const published = fineCurve(publishedCurve);
const DEW_POINT_OVER_Z = psia(3428) / 0.803;
const saturated: Reservoir = {
  initialPressurePsia: psia(3428),
  initialPressureOverZ: DEW_POINT_OVER_Z,
  dewPointPressureOverZ: DEW_POINT_OVER_Z,
  condensateCurveFactor: 1,
};

/** Injected gas of z 0.87 at the dew point and 0.96 at 700 psig, against p/z 4,287.3 at the beginning. */
const injectedGas = (displaced: number): CyclingCase => ({
  displaced,
  injectedDensityAtStart: psia(3428) / 0.87 / DEW_POINT_OVER_Z,
  injectedDensityAtEnd: psia(700) / 0.96 / DEW_POINT_OVER_Z,
  dryGasFraction: 0.88,
  pseudocriticalPressurePsia: 650,
  reducedTemperature: 1.5,
});

function run(
  cycling: ReturnType<typeof buildCycling>,
  one: CyclingCase,
  { curve = published, reservoir = saturated, startsAt = psia(3428), endsAt = psia(700) } = {},
) {
  const start = createContents();
  const abandoned = createContents();
  contentsBelowDewPoint(curve, reservoir, startsAt, start);
  contentsBelowDewPoint(curve, reservoir, endsAt, abandoned);
  const outcome = createCyclingOutcome();
  cycle(curve, reservoir, cycling, one, start, abandoned, outcome);
  const condensate =
    start.condensateProduced + outcome.condensateWhileCycling + outcome.condensateInBlowdown;
  const gas = start.gasProduced + outcome.gasWhileCycling + outcome.gasInBlowdown;
  return { ...outcome, condensate, gas, start, abandoned };
}

describe("cycle at maintained pressure", () => {
  it("recovers swept vapour and then the blowdown of the rest, worked by hand", () => {
    // E = 0.6 x 0.9 = 0.54 from the dew point: 0.54 x 1 + 0.46 x 29.25/131 = 0.54 + 0.10271 = 0.64271
    const { condensate, condensateWhileCycling, condensateInBlowdown } = run(
      buildCycling(),
      injectedGas(0.54),
    );
    expect(condensateWhileCycling).toBeCloseTo(0.54, 9);
    expect(condensateInBlowdown).toBeCloseTo(0.10271, 5);
    expect(condensate).toBeCloseTo(0.64271, 5);
  });

  it("balances gas, worked by hand", () => {
    // Density of injected gas: (3442.7 / 0.87) / (3442.7 / 0.803) = 0.92299 of the moles, 1.04885 of the dry gas.
    // Injected, one pore volume: 1.04885. Produced: 0.54 of native gas + 0.46 x 1.04885 = 1.02247. Fuel 5 %: 0.05112.
    // Make-up: 1.04885 - 1.02247 + 0.05112 = 0.07750. Left at abandonment: 0.54 x (714.7 / 0.96) / 4287.3 / 0.88 = 0.10656.
    // Sold in the end: 0.54 + 0.46 x 0.80449 - 0.05112 - 0.10656 = 0.75238.
    const outcome = run(buildCycling(), injectedGas(0.54));
    expect(outcome.injected).toBeCloseTo(1.04885, 5);
    expect(outcome.producedWhileCycling).toBeCloseTo(1.02247, 5);
    expect(outcome.fuel).toBeCloseTo(0.05112, 5);
    expect(outcome.makeUp).toBeCloseTo(0.0775, 4);
    expect(outcome.gasWhileCycling).toBeCloseTo(-0.0775, 4);
    expect(outcome.gas).toBeCloseTo(0.75238, 4);
    expect(outcome.pressureAtEndPsia).toBeCloseTo(psia(3428), 9);
    expect(outcome.refusal).toBeNull();
  });

  it("displaces only what is in the gas when it begins below the dew point", () => {
    const late = run(buildCycling({ pressurePsia: psia(3000) }), injectedGas(0.54), {
      startsAt: psia(3000),
    });
    // Produced by then 7.35 / 131 = 0.05611, in the gas 0.4620 (see the published curve).
    expect(late.start.condensateProduced).toBeCloseTo(0.05611, 4);
    expect(late.condensateWhileCycling).toBeCloseTo(0.54 * late.start.condensateInGas, 12);
    expect(late.start.condensateInGas).toBeCloseTo(0.462, 3);
    const early = run(buildCycling(), injectedGas(0.54));
    expect(late.condensate).toBeLessThan(early.condensate - 0.2);
    expect(late.condensateInRock).toBeGreaterThan(early.condensateInRock);
  });

  it("sells what is produced beyond what goes back", () => {
    // Rich in native gas: less than one pore volume of lighter gas goes in.
    const outcome = run(buildCycling({ injectedPoreVolumes: 0.6, fuelFraction: 0 }), {
      ...injectedGas(0.54),
      injectedDensityAtStart: 0.7,
    });
    expect(outcome.makeUp).toBe(0);
    expect(outcome.gasWhileCycling).toBeGreaterThan(0);
  });
});

describe("cycle at declining pressure", () => {
  it("puts back what it produces, and falls by fuel and condensate", () => {
    const outcome = run(buildCycling({ pressure: "declining" }), injectedGas(0.54));
    // Produced = injected / 0.95; lost moles = 0.88 x fuel + 0.12 x 0.54.
    expect(outcome.producedWhileCycling).toBeCloseTo(1.04885 / 0.95, 5);
    expect(outcome.makeUp).toBe(0);
    expect(outcome.gasWhileCycling).toBeCloseTo(0, 12);
    const lost = 0.88 * 0.05 * (1.04885 / 0.95) + 0.12 * 0.54;
    // 11.34 % of the moles: on the published curve between 3,000 psig (9.095 %) and 2,400 psig (24.7 %).
    expect(lost).toBeCloseTo(0.11338, 4);
    expect(outcome.pressureAtEndPsia).toBeGreaterThan(psia(2800));
    expect(outcome.pressureAtEndPsia).toBeLessThan(psia(3000));
  });

  it("recovers less condensate than maintained pressure: liquid drops out ahead of the front", () => {
    const declining = run(buildCycling({ pressure: "declining" }), injectedGas(0.54));
    const maintained = run(buildCycling(), injectedGas(0.54));
    expect(declining.condensate).toBeLessThan(maintained.condensate);
    expect(declining.condensate).toBeGreaterThan(declining.abandoned.condensateProduced);
  });

  it("stays above the dew point when little is lost, at the pressure of p/z", () => {
    // 20 % above the dew point in p/z, nothing burnt: lost 0.12 x 0.1 = 1.2 % of the moles.
    const reservoir = {
      ...saturated,
      initialPressurePsia: 4500,
      initialPressureOverZ: 1.2 * DEW_POINT_OVER_Z,
    };
    const start = createContents();
    const abandoned = createContents();
    contentsAboveDewPoint(4500, 1, start);
    contentsBelowDewPoint(published, reservoir, psia(700), abandoned);
    const outcome = createCyclingOutcome();
    cycle(
      published,
      reservoir,
      buildCycling({ pressure: "declining", fuelFraction: 0, injectedPoreVolumes: 1 }),
      { ...injectedGas(0.1), injectedDensityAtStart: 1 },
      start,
      abandoned,
      outcome,
    );
    expect(outcome.pressureAtEndPsia).toBeGreaterThan(psia(3428));
    expect(outcome.condensateWhileCycling).toBeCloseTo(0.1, 9);
  });
});

describe("cycle", () => {
  it.each([
    [{ injectedPoreVolumes: 0.5 }, 0.54, "sweepAboveInjected"],
    [
      { pressure: "declining", fuelFraction: 0.5, injectedPoreVolumes: 1.5 },
      0.54,
      "endBelowAbandonment",
    ],
    [{ fuelFraction: 0.5, injectedPoreVolumes: 3 }, 0.54, "noNetGas"],
  ] as const)("says why %j cannot be", (changes, displaced, reason) => {
    expect(run(buildCycling(changes), injectedGas(displaced)).refusal).toBe(reason);
  });

  it("never recovers less condensate than depletion, accounts for all of it, and closes the gas", () => {
    const accepted = { maintained: 0, declining: 0 };
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 0.95, noNaN: true }),
        fc.double({ min: 720, max: 1500, noNaN: true }),
        fc.double({ min: 1700, max: 3442, noNaN: true }),
        fc.constantFrom("maintained" as const, "declining" as const),
        fc.double({ min: 0, max: 0.1, noNaN: true }),
        fc.double({ min: 1, max: 1.6, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (
          displaced,
          endsAt,
          startsAt,
          pressure,
          fuelFraction,
          injectedPoreVolumes,
          revaporisation,
        ) => {
          const cycling = buildCycling({
            pressure,
            fuelFraction,
            injectedPoreVolumes,
            revaporisation,
          });
          const outcome = run(cycling, injectedGas(displaced), { startsAt, endsAt });
          fc.pre(outcome.refusal === null);
          accepted[pressure] += 1;
          const { condensate, condensateInRock, condensateInGas, abandoned } = outcome;
          expect(condensate).toBeGreaterThanOrEqual(abandoned.condensateProduced - 1e-12);
          expect(condensate + condensateInRock + condensateInGas).toBeCloseTo(1, 10);
          for (const share of [condensate, condensateInRock, condensateInGas, outcome.gas]) {
            expect(share).toBeGreaterThanOrEqual(-1e-12);
            expect(share).toBeLessThanOrEqual(1 + 1e-12);
          }
          const { injected, producedWhileCycling, fuel, makeUp, gasWhileCycling } = outcome;
          expect(producedWhileCycling - fuel + makeUp).toBeGreaterThanOrEqual(injected - 1e-12);
          expect(producedWhileCycling - fuel - injected).toBeCloseTo(gasWhileCycling, 12);
        },
      ),
      { numRuns: 200 },
    );
    expect(accepted.maintained).toBeGreaterThan(50);
    expect(accepted.declining).toBeGreaterThan(50);
  });
});

describe("cycling of the third comparative study, as published with an open data set", () => {
  /**
   * Open simulation data set of the third comparative solution project (Open Database Licence 1.0, copyright 2015
   * Statoil): 22.73 Bscf of gas and 3.797 MMSTB in place; 6.2 MMscf/d produced and 4.7 put back for ten years, then blown down for five. Published recoveries of
   * condensate: 0.574 after ten years, 0.665 after fifteen; by depletion alone 0.22 to 0.29.
   *
   * The curve is a tank balance of that data set's black-oil properties, done apart in Python: gas and condensate
   * left in one reservoir barrel, gas removed as the pressure falls.
   */
  const steps = [
    [3427.6, 0, 0, 0, 1, 0, 167.05],
    [3000, 0.0895, 0.0919, 0.0757, 0.4381, 0.2468, 104.4],
    [2500, 0.2131, 0.2248, 0.1441, 0.2402, 0.2573, 67.93],
    [2000, 0.3501, 0.376, 0.1961, 0.1374, 0.2357, 47.33],
    [1500, 0.4939, 0.5374, 0.2362, 0.0788, 0.2081, 35.76],
    [1000, 0.6391, 0.7015, 0.2692, 0.0458, 0.1796, 31.42],
    [500, 0.7801, 0.8607, 0.3024, 0.0271, 0.1517, 38.29],
  ];
  const blackOil: RecoveryCurve = {
    route: "laboratory",
    temperatureDegF: 200,
    dewPointPsia: 3427.6,
    points: steps.map(([pressurePsia, wellstream, gas, condensate, inGas, liquid, barrels]) => ({
      pressurePsia,
      wellstreamProduced: wellstream,
      gasProduced: gas,
      condensateProduced: condensate,
      condensateInGas: inGas,
      liquidSaturation: liquid,
      producingYieldStbPerMmscf: barrels,
      gasZ: 0.8,
      twoPhaseZ: 0.8,
    })),
  };
  const curve: FineCurve = fineCurve(blackOil);
  const reservoir: Reservoir = {
    initialPressurePsia: 3565,
    initialPressureOverZ: 1.012 * 4280,
    dewPointPressureOverZ: 4280,
    condensateCurveFactor: 1,
  };
  // 4.7 x 3,652.5 / 22,731 = 0.755 of the gas in place goes back; a quarter of what is produced, 1.5 of 6.2, does not.
  const dryGasFraction = 0.855;
  const density = 0.93;
  const cycling = {
    ...buildCycling(),
    pressurePsia: 3565,
    pressure: "declining" as const,
    injectedPoreVolumes: (0.755 * dryGasFraction) / density,
    fuelFraction: 1.5 / 6.2,
  };
  const recovered = (displaced: number, revaporisation = 0) => {
    const start = createContents();
    const abandoned = createContents();
    contentsAboveDewPoint(3565, 1, start);
    contentsBelowDewPoint(curve, reservoir, 1000, abandoned);
    const outcome = createCyclingOutcome();
    cycle(
      curve,
      reservoir,
      { ...cycling, revaporisation },
      {
        displaced,
        injectedDensityAtStart: density,
        injectedDensityAtEnd: 1000 / 0.93 / reservoir.initialPressureOverZ,
        dryGasFraction,
        pseudocriticalPressurePsia: 650,
        reducedTemperature: 1.5,
      },
      start,
      abandoned,
      outcome,
    );
    const { condensateWhileCycling, condensateInBlowdown, refusal, producedWhileCycling } = outcome;
    expect(refusal).toBeNull();
    return {
      after: condensateWhileCycling,
      final: condensateWhileCycling + condensateInBlowdown,
      depletion: abandoned.condensateProduced,
      producedWhileCycling,
      pressure: outcome.pressureAtEndPsia,
    };
  };

  it("produces in ten years the gas in place once, as the rates do", () => {
    // 6.2 x 3,652.5 / 22,731
    expect(recovered(0.5).producedWhileCycling).toBeCloseTo(0.996, 2);
  });

  it("depletes to a recovery in the published range", () => {
    expect(recovered(0.5).depletion).toBeGreaterThan(0.22);
    expect(recovered(0.5).depletion).toBeLessThan(0.29);
  });

  it("cycles to less than was published, and more than depletion, because it lets no liquid vaporise again", () => {
    // Published 0.574 and 0.665. The simulator saturates injected gas with liquid at once and completely; here liquid
    // that has dropped out in the swept part is lost. What that is worth is the next test.
    const poor = recovered(0.4);
    const good = recovered(0.68);
    expect(poor.final).toBeGreaterThan(poor.depletion + 0.1);
    expect(good.after).toBeGreaterThan(poor.after + 0.1);
    expect(good.after).toBeLessThan(0.574);
    expect(good.final).toBeLessThan(0.665);
    expect(good.final).toBeGreaterThan(0.4);
  });

  it("comes near the published recoveries with usual efficiencies and complete revaporisation", () => {
    // 0.6 swept and 0.9 of it displaced, as planners begin. Published 0.574 after ten years and 0.665 after fifteen; the
    // split between the two is coarser, because what the unswept part gives in ten years is counted as blowdown here.
    const { after, final } = recovered(0.54, 1);
    expect(Math.abs(after - 0.574)).toBeLessThan(0.04);
    expect(Math.abs(final - 0.665)).toBeLessThan(0.02);
  });

  it("comes to the published recovery when every produced cubic foot carries what it can hold", () => {
    // Complete revaporisation: the gas of ten years, 0.996 of that in place, at the yield of its pressure, averaged over
    // equal steps of moles from the dew point to the pressure at the end. Published 0.574; 0.03 for reading a
    // three-dimensional simulation with one pressure.
    const { pressure, producedWhileCycling } = recovered(0.5);
    const end = steps.findIndex(([pressurePsia]) => pressurePsia < pressure);
    const share = (steps[end - 1][0] - pressure) / (steps[end - 1][0] - steps[end][0]);
    const between = (column: number) =>
      steps[end - 1][column] + share * (steps[end][column] - steps[end - 1][column]);
    const path = [
      ...steps.slice(0, end).map((row) => ({ moles: row[1], yield: row[6] })),
      { moles: between(1), yield: between(6) },
    ];
    let sum = 0;
    for (let i = 1; i < path.length; i += 1) {
      sum += ((path[i].moles - path[i - 1].moles) * (path[i].yield + path[i - 1].yield)) / 2;
    }
    const average = sum / path[path.length - 1].moles / steps[0][6];
    expect(Math.abs(average * producedWhileCycling - 0.574)).toBeLessThan(0.03);
  });
});
