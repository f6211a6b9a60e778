import { describe, expect, it } from "vitest";
import { simulate } from "@/analytics/volumetrics/simulate";
import { simulateUntilSettled, type SettleStep } from "@/analytics/volumetrics/until-settled";
import { buildInputs, constants } from "./estimate-inputs";

const inputs = buildInputs();

describe("simulateUntilSettled", () => {
  it.each(["latinHypercube", "sobol"] as const)(
    "doubles the trials until six percentiles are known, and gives the plain run, by %s",
    (sampling) => {
      const told: SettleStep[] = [];
      const { simulation, settled, steps } = simulateUntilSettled(inputs, {
        seed: 4,
        sampling,
        tolerance: 0.03,
        mostTrials: 65_536,
        onStep: (step) => told.push(step),
      });
      expect(settled).toBe(true);
      expect(told).toEqual(steps);
      expect(steps.map(({ trials }) => trials)).toEqual(steps.map((_, i) => 1024 * 2 ** i));
      expect(steps.length).toBeGreaterThan(1);
      expect(steps.slice(0, -1).every(({ worst }) => worst > 0.03)).toBe(true);
      const last = steps[steps.length - 1];
      expect(last.worst).toBeLessThanOrEqual(0.03);
      expect(simulation).toEqual(simulate(inputs, { trials: last.trials, seed: 4, sampling }));
      // Student's t with 15 degrees of freedom, 0.975: 2.131 (any table).
      const { wetGasInPlaceScf, condensateRecoverableStb } = simulation.summary.results;
      const widths = [wetGasInPlaceScf, condensateRecoverableStb].flatMap((result) =>
        (["p90", "p50", "p10"] as const).map(
          (level) => (2.131 * result.standardErrors[level]) / result[level],
        ),
      );
      expect(last.worst).toBeCloseTo(Math.max(...widths), 4);
    },
  );

  it("stops at the most trials, and says that it has not settled", () => {
    const options = { seed: 4, sampling: "sobol", tolerance: 1e-6, mostTrials: 5000 } as const;
    const { settled, steps } = simulateUntilSettled(inputs, options);
    expect(settled).toBe(false);
    expect(steps.map(({ trials }) => trials)).toEqual([1024, 2048, 4096]);
  });

  it("is settled at once where nothing varies", () => {
    const fixed = buildInputs(
      constants({
        areaAcres: 2000,
        netThicknessFt: 80,
        porosity: 0.1,
        waterSaturation: 0.25,
        pressurePsia: 6500,
        temperatureDegF: 260,
        condensateYieldStbPerMmscf: 80,
        gasRecovery: 0.7,
        condensateRecovery: 0,
        salesGasFraction: 0.9,
      }),
      { correlations: [] },
    );
    const options = { seed: 4, sampling: "sobol", tolerance: 0.01, mostTrials: 65_536 } as const;
    const { settled, steps } = simulateUntilSettled(fixed, options);
    expect(settled).toBe(true);
    expect(steps).toHaveLength(1);
    expect(steps[0].worst).toBe(0);
  });

  it.each([
    [{ tolerance: 0 }, "The tolerance is above 0; 0 is not."],
    [{ tolerance: NaN }, "The tolerance is above 0"],
    [{ mostTrials: 1000 }, "At least 1024 trials are needed to begin."],
  ])("refuses %j", (options, message) => {
    const whole = { seed: 1, sampling: "sobol", tolerance: 0.01, mostTrials: 4096, ...options };
    expect(() =>
      simulateUntilSettled(inputs, whole as Parameters<typeof simulateUntilSettled>[1]),
    ).toThrow(message);
  });
});
