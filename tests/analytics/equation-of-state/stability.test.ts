import { describe, expect, it } from "vitest";
import { Flasher } from "@/analytics/equation-of-state/flash";
import { PengRobinson } from "@/analytics/equation-of-state/peng-robinson";
import { StabilityTest } from "@/analytics/equation-of-state/stability";
import { feedMixture, randomFeeds } from "@/scripts/bench/random-feeds";
import { degR, feeds, mixture, reference } from "./reference-mixture";

const at = (degF: number) => {
  const equation = new PengRobinson(mixture);
  equation.setTemperature(degR(degF));
  return new StabilityTest(equation);
};

describe("StabilityTest", () => {
  it("finds a fluid unstable below its saturation pressure and stable above", () => {
    // saturation pressures of phase_equilibrium.py, a separate implementation
    for (const { feed, temperatureDegF, pressurePsia } of reference.saturations) {
      const z = feeds[feed as keyof typeof feeds];
      const stability = at(temperatureDegF);
      expect(stability.isUnstable(z, 0.9999 * pressurePsia)).toBe(true);
      expect(stability.isUnstable(z, 1.0001 * pressurePsia)).toBe(false);
    }
  });

  it("ends at stationary points: each trial's ln W + ln phi(W) is that of the feed, up to one constant", () => {
    const stability = at(200);
    stability.isUnstable(feeds.gas, 3000);
    const { lnRatio, distance, trivial } = stability.liquid;
    expect(trivial).toBe(false);
    const total = lnRatio.reduce((sum, ratio, i) => sum + feeds.gas[i] * Math.exp(ratio), 0);
    expect(distance).toBeCloseTo(1 - total, 12);
  });

  it("has the slope against ln p that differences give", () => {
    const stability = at(200);
    const distance = (lnP: number) => {
      stability.isUnstable(feeds.gas, Math.exp(lnP));
      return stability.liquid.distance;
    };
    const lnP = Math.log(3500);
    const slope = (distance(lnP + 1e-4) - distance(lnP - 1e-4)) / 2e-4;
    distance(lnP);
    expect(stability.distanceSlope(feeds.gas, 3500) / slope).toBeCloseTo(1, 5);
  });

  it("agrees with the flash on 200 random feeds", () => {
    const flasher = new Flasher(feedMixture);
    const stability = new StabilityTest(new PengRobinson(feedMixture));
    for (const { moleFractions, ...conditions } of randomFeeds(200, 3)) {
      stability.equation.setTemperature(conditions.temperatureDegR);
      const isUnstable = stability.isUnstable(moleFractions, conditions.pressurePsia);
      expect(flasher.flash(moleFractions, conditions).phases === "two").toBe(isUnstable);
    }
  });
});
