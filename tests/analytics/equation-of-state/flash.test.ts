import "../../support/property-seed";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { Flasher, flash, type Flash } from "@/analytics/equation-of-state/flash";
import { createPhaseState, PengRobinson } from "@/analytics/equation-of-state/peng-robinson";
import { StabilityTest } from "@/analytics/equation-of-state/stability";
import { feedMixture, randomFeeds, type RandomFeed } from "@/scripts/bench/random-feeds";
import { fittedMixture } from "../depletion/fitted-mixture";
import { degR, feedOf, feeds, mixture, reference, subset } from "./reference-mixture";

/** Largest imbalance of a component and largest difference of ln f, worked out afresh. */
function check(found: Flash, { moleFractions: z, pressurePsia, temperatureDegR }: RandomFeed) {
  const { liquid, vapour, vapourFraction } = found;
  if (!liquid || !vapour) return { imbalance: 0, fugacity: 0 };
  const equation = new PengRobinson(feedMixture);
  equation.setTemperature(temperatureDegR);
  const [x, y] = [createPhaseState(z.length), createPhaseState(z.length)];
  equation.evaluate(liquid.moleFractions, pressurePsia, "stable", x);
  equation.evaluate(vapour.moleFractions, pressurePsia, "stable", y);
  let imbalance = 0;
  let fugacity = 0;
  z.forEach((fraction, i) => {
    const inLiquid = liquid.moleFractions[i];
    const inVapour = vapour.moleFractions[i];
    imbalance = Math.max(
      imbalance,
      Math.abs(fraction - (1 - vapourFraction) * inLiquid - vapourFraction * inVapour),
    );
    if (fraction > 0) {
      const difference = Math.log(inLiquid / inVapour) + x.lnPhi[i] - y.lnPhi[i];
      fugacity = Math.max(fugacity, Math.abs(difference));
    }
  });
  return { imbalance, fugacity };
}

describe("flash", () => {
  it.each(reference.flashes)(
    "agrees with a separate implementation: $feed at $temperatureDegF °F and $pressurePsia psia",
    ({ feed, temperatureDegF, pressurePsia, ...expected }) => {
      // phase_equilibrium.py: plain successive substitution, the vapour fraction by bisection
      const found = flash(mixture, feedOf(feed), {
        pressurePsia,
        temperatureDegR: degR(temperatureDegF),
      });
      expect(found.phases).toBe("two");
      expect(found.vapourFraction).toBeCloseTo(expected.vapourFraction, 8);
      expected.liquid.forEach((x, i) => expect(found.liquid!.moleFractions[i]).toBeCloseTo(x, 8));
      expected.vapour.forEach((y, i) => expect(found.vapour!.moleFractions[i]).toBeCloseTo(y, 8));
      expect(found.liquid!.molarVolumeFt3PerLbmol / expected.liquidVolume).toBeCloseTo(1, 7);
      expect(found.vapour!.molarVolumeFt3PerLbmol / expected.vapourVolume).toBeCloseTo(1, 7);
    },
  );

  it("converges on every one of 300 random feeds, balances and has equal fugacities", () => {
    const flasher = new Flasher(feedMixture);
    const counts = { gas: 0, liquid: 0, two: 0 };
    for (const feed of randomFeeds(300, 7)) {
      const found = flasher.flash(feed.moleFractions, feed);
      counts[found.phases] += 1;
      expect(found.vapourFraction).toBeGreaterThanOrEqual(0);
      expect(found.vapourFraction).toBeLessThanOrEqual(1);
      const { imbalance, fugacity } = check(found, feed);
      expect(imbalance).toBeLessThan(1e-12);
      expect(fugacity).toBeLessThan(1e-9);
    }
    // The generator asks something: most feeds are two phases, and all kinds are there.
    expect(counts.two).toBeGreaterThan(150);
    expect(Math.min(counts.gas, counts.liquid)).toBeGreaterThan(15);
  });

  it("leaves two phases that are stable themselves", () => {
    const stability = new StabilityTest(new PengRobinson(feedMixture));
    const flasher = new Flasher(feedMixture);
    let tried = 0;
    for (const { moleFractions, ...conditions } of randomFeeds(60, 11)) {
      const { liquid, vapour } = flasher.flash(moleFractions, conditions);
      if (!liquid || !vapour) continue;
      tried += 1;
      for (const { moleFractions: phase } of [liquid, vapour]) {
        stability.equation.setTemperature(conditions.temperatureDegR);
        stability.isUnstable(phase, conditions.pressurePsia);
        // Its partner lies on the tangent plane, to rounding; nothing may lie below.
        const lowest = Math.min(stability.gas.distance, stability.liquid.distance);
        expect(lowest).toBeGreaterThan(-1e-8);
      }
    }
    expect(tried).toBeGreaterThan(30);
  });

  it("does not depend on the order of the components", () => {
    const order = [9, 3, 0, 7, 1, 8, 2, 6, 4, 5];
    const conditions = { pressurePsia: 1200, temperatureDegR: degR(140) };
    const straight = flash(mixture, feeds.oil, conditions);
    const shuffled = flash(
      subset(order),
      Float64Array.from(order, (i) => feeds.oil[i]),
      conditions,
    );
    expect(shuffled.vapourFraction).toBeCloseTo(straight.vapourFraction, 10);
    order.forEach((i, at) =>
      expect(shuffled.liquid!.moleFractions[at]).toBeCloseTo(straight.liquid!.moleFractions[i], 10),
    );
  });

  it("does not see a component of which there is nothing", () => {
    const conditions = { pressurePsia: 1200, temperatureDegR: degR(140) };
    const present = [3, 4, 5, 6, 7, 8, 9];
    const share = present.reduce((sum, i) => sum + feeds.oil[i], 0);
    const without = flash(
      subset(present),
      Float64Array.from(present, (i) => feeds.oil[i] / share),
      conditions,
    );
    const withNothing = flash(
      mixture,
      feeds.oil.map((z, i) => (present.includes(i) ? z / share : 0)),
      conditions,
    );
    expect(withNothing.vapourFraction).toBeCloseTo(without.vapourFraction, 10);
  });

  it("gives less gas at every higher pressure, and more at every higher temperature, of an oil", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 20, max: 2000, noNaN: true }),
        fc.double({ min: 60, max: 250, noNaN: true }),
        (pressurePsia, degF) => {
          const at = (p: number, t: number) =>
            flash(mixture, feeds.oil, { pressurePsia: p, temperatureDegR: degR(t) }).vapourFraction;
          const gas = at(pressurePsia, degF);
          expect(at(1.1 * pressurePsia, degF)).toBeLessThanOrEqual(gas);
          expect(at(pressurePsia, degF + 10)).toBeGreaterThanOrEqual(gas);
        },
      ),
      { numRuns: 60 },
    );
  });

  it("gives the same from any start of its K-values", () => {
    const flasher = new Flasher(mixture);
    const conditions = { pressurePsia: 2000, temperatureDegR: degR(150) };
    const usual = flasher.flash(feeds.gas, conditions);
    for (const scale of [-2, 0, 0.3, 3]) {
      const start = Float64Array.from(mixture.names, (_, i) => scale * (5 - i));
      const found = flasher.flash(feeds.gas, conditions, start);
      expect(found.vapourFraction).toBeCloseTo(usual.vapourFraction, 9);
    }
  });

  it("reaches equilibrium next to the phase boundary, within a thousandth of a psi", () => {
    // the fitted fluid's dew point at 200 degF, 3,428.13 psig in a separate computation
    const { mixture: fluid, moleFractions } = fittedMixture;
    const at = (pressurePsia: number) =>
      flash(fluid, moleFractions, { pressurePsia, temperatureDegR: degR(200) });
    let [inside, outside] = [3400, 3500];
    while (outside - inside > 1e-3) {
      const middle = 0.5 * (inside + outside);
      if (at(middle).phases === "two") inside = middle;
      else outside = middle;
    }
    expect(inside - 14.696).toBeCloseTo(3428.13, 1);
    expect(at(inside).vapourFraction).toBeGreaterThan(0.999_99);
    expect(at(outside).phases).toBe("gas");
  });

  it("calls a single phase by what could leave it", () => {
    const at = (feed: Float64Array, pressurePsia: number, degF: number) =>
      flash(mixture, feed, { pressurePsia, temperatureDegR: degR(degF) });
    expect(at(feeds.gas, 4000, 200)).toMatchObject({ phases: "gas", vapourFraction: 1 });
    expect(at(feeds.oil, 2600, 150)).toMatchObject({ phases: "liquid", vapourFraction: 0 });
    expect(at(feeds.oil, 2600, 150).vapour).toBeNull();
  });

  it("refuses what is no feed, pressure or temperature", () => {
    const conditions = { pressurePsia: 1000, temperatureDegR: 600 };
    const negative = feeds.gas.map((z, i) => (i === 0 ? -z : z));
    expect(() => flash(mixture, negative, conditions)).toThrow(DomainError);
    expect(() =>
      flash(
        mixture,
        feeds.gas.map((z) => 1.01 * z),
        conditions,
      ),
    ).toThrow(/add up to 1/);
    expect(() => flash(mixture, feeds.gas, { ...conditions, pressurePsia: 0 })).toThrow(
      DomainError,
    );
    expect(() => flash(mixture, feeds.gas, { ...conditions, temperatureDegR: NaN })).toThrow(
      DomainError,
    );
    expect(() =>
      flash(
        mixture,
        feeds.gas.map(() => NaN),
        conditions,
      ),
    ).toThrow(DomainError);
  });

  it("reaches equilibrium with interactions far beyond any real fluid's", () => {
    for (const k of [-40, -10, 0.5, 0.9, 1.5]) {
      const wild = { ...mixture, interactions: mixture.interactions.map((own) => (own ? k : 0)) };
      const found = flash(wild, feeds.gas, { pressurePsia: 1000, temperatureDegR: 560 });
      expect(found.phases).toBe("two");
      expect(found.residual).toBeLessThan(1e-9);
    }
  });
});
