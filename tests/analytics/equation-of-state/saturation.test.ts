import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { flash } from "@/analytics/equation-of-state/flash";
import { phaseEnvelope } from "@/analytics/equation-of-state/envelope";
import { saturationPressures } from "@/analytics/equation-of-state/saturation";
import { feedMixture, randomFeeds } from "@/scripts/bench/random-feeds";
import { fittedMixture } from "../depletion/fitted-mixture";
import { degR, feedOf, feeds, mixture, reference, subset } from "./reference-mixture";

describe("saturationPressures", () => {
  it.each(reference.saturations)(
    "agrees with a separate implementation: $kind of $feed at $temperatureDegF °F",
    ({ feed, temperatureDegF, pressurePsia, kind, incipient }) => {
      // phase_equilibrium.py: bisection on the sign of the tangent-plane distance
      const { upper } = saturationPressures(mixture, feedOf(feed), degR(temperatureDegF));
      expect(upper!.kind).toBe(kind);
      expect(upper!.pressurePsia / pressurePsia).toBeCloseTo(1, 8);
      incipient.forEach((fraction, i) => expect(upper!.incipient[i]).toBeCloseTo(fraction, 6));
    },
  );

  it("gives the fitted gas condensate its dew point, 3,428.13 psig at 200 °F", () => {
    // computed separately by plain bisection; the laboratory's is 3,428 psig (Kenyon and Behie 1987)
    const { upper } = saturationPressures(
      fittedMixture.mixture,
      fittedMixture.moleFractions,
      degR(200),
    );
    expect(upper!.pressurePsia - 14.696).toBeCloseTo(3428.13, 1);
    expect(upper!.kind).toBe("dewPoint");
  });

  it("is where the flash changes from one phase to two, on both sides of the two-phase range", () => {
    const temperatureDegR = degR(280);
    const { upper, lower } = saturationPressures(mixture, feeds.gas, temperatureDegR);
    const phases = (pressurePsia: number) =>
      flash(mixture, feeds.gas, { pressurePsia, temperatureDegR }).phases;
    expect(phases(upper!.pressurePsia * 1.000_01)).toBe("gas");
    expect(phases(upper!.pressurePsia * 0.999_99)).toBe("two");
    expect(phases(lower! * 1.000_01)).toBe("two");
    expect(phases(lower! * 0.999_99)).toBe("gas");
  });

  it("has no saturation pressure above the cricondentherm, and both within a degree below it", () => {
    const top = phaseEnvelope(mixture, feeds.gas).cricondentherm!;
    const at = (degF: number) => saturationPressures(mixture, feeds.gas, degR(degF));
    expect(at(top.temperatureDegF + 0.5)).toEqual({ upper: null, lower: null });
    const { upper, lower } = at(top.temperatureDegF - 0.5);
    expect(upper!.pressurePsia).toBeGreaterThan(top.pressurePsia);
    expect(lower!).toBeLessThan(top.pressurePsia);
    expect(at(top.temperatureDegF - 0.01).upper).not.toBeNull();
  });

  it("finds none in a gas that stays one at every pressure", () => {
    const light = subset([2, 3]);
    expect(saturationPressures(light, Float64Array.of(0.05, 0.95), degR(100))).toEqual({
      upper: null,
      lower: null,
    });
  });

  it("puts a liquid of two like components between Raoult's bubble and dew points", () => {
    // At low pressure the ideal law holds to some per cent: propane and n-butane at 60 degF, vapour pressures 107.6
    // and 26.3 psia (reference equations, from memory)
    const { upper, lower } = saturationPressures(
      subset([5, 6]),
      Float64Array.of(0.5, 0.5),
      degR(60),
    );
    expect(upper!.kind).toBe("bubblePoint");
    expect(upper!.pressurePsia / (0.5 * 107.6 + 0.5 * 26.3)).toBeCloseTo(1, 1);
    expect(lower! / (1 / (0.5 / 107.6 + 0.5 / 26.3))).toBeCloseTo(1, 1);
  });

  it("converges for random fluids from 60 to 400 °F, and brackets the two-phase range", () => {
    let found = 0;
    for (const { moleFractions, temperatureDegR } of randomFeeds(80, 5)) {
      const { upper, lower } = saturationPressures(feedMixture, moleFractions, temperatureDegR);
      if (!upper) continue;
      found += 1;
      const phases = (pressurePsia: number) =>
        flash(feedMixture, moleFractions, { pressurePsia, temperatureDegR }).phases;
      expect(phases(upper.pressurePsia * 1.0001)).not.toBe("two");
      expect(phases(upper.pressurePsia * 0.9999)).toBe("two");
      expect(phases(lower! * 1.0001)).toBe("two");
      expect(phases(lower! * 0.9999)).toBe("gas");
    }
    expect(found).toBeGreaterThan(60);
  });

  it("refuses a feed that does not add up", () => {
    expect(() =>
      saturationPressures(
        mixture,
        feeds.gas.map((z) => 2 * z),
        degR(200),
      ),
    ).toThrow(DomainError);
  });
});
