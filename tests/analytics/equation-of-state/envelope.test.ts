import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { phaseEnvelope, type EnvelopePoint } from "@/analytics/equation-of-state/envelope";
import { flash } from "@/analytics/equation-of-state/flash";
import { PengRobinson, createPhaseState } from "@/analytics/equation-of-state/peng-robinson";
import { saturationPressures } from "@/analytics/equation-of-state/saturation";
import { feedMixture, randomFeeds } from "@/scripts/bench/random-feeds";
import { degR, feeds, mixture, pure, subset } from "./reference-mixture";

/** Rich enough to have its critical point inside the diagram. */
const rich = feeds.gas.map((z, i) => 0.85 * z + 0.15 * feeds.oil[i]);
const envelope = phaseEnvelope(mixture, rich, { liquidVolumeFractions: [0.05, 0.1, 0.2] });

/** Determinant of delta_ij + sqrt(z_i z_j) d ln phi_i / d n_j: zero where the fluid is at the limit of stability. */
function stabilityDeterminant(z: Float64Array, { temperatureDegF, pressurePsia }: EnvelopePoint) {
  const n = z.length;
  const equation = new PengRobinson(mixture);
  const state = createPhaseState(n);
  equation.setTemperature(degR(temperatureDegF));
  equation.evaluate(z, pressurePsia, "stable", state);
  equation.differentiateByMoles(pressurePsia, state);
  const rows = Array.from({ length: n }, (_, i) =>
    Array.from(
      { length: n },
      (__, j) => (i === j ? 1 : 0) + Math.sqrt(z[i] * z[j]) * state.byMoles[i * n + j],
    ),
  );
  let determinant = 1;
  for (let i = 0; i < n; i += 1) {
    determinant *= rows[i][i];
    for (let r = i + 1; r < n; r += 1) {
      const factor = rows[r][i] / rows[i][i];
      for (let c = i; c < n; c += 1) rows[r][c] -= factor * rows[i][c];
    }
  }
  return determinant;
}

describe("phaseEnvelope", () => {
  it("lies on the saturation pressures that the stability test finds, all along", () => {
    const points = [...envelope.dew, ...envelope.bubble].filter(
      ({ temperatureDegF }) => temperatureDegF > 40,
    );
    expect(points.length).toBeGreaterThan(30);
    for (const { temperatureDegF, pressurePsia } of points.filter((_, i) => i % 4 === 0)) {
      const { upper, lower } = saturationPressures(mixture, rich, degR(temperatureDegF));
      const nearest = Math.min(
        Math.abs(upper!.pressurePsia / pressurePsia - 1),
        Math.abs(lower! / pressurePsia - 1),
      );
      expect(nearest).toBeLessThan(1e-5);
    }
  });

  it("has its critical point at the limit of stability, which no other point of the line is", () => {
    const { critical, dew, bubble } = envelope;
    expect(Math.abs(stabilityDeterminant(rich, critical!))).toBeLessThan(1e-6);
    expect(stabilityDeterminant(rich, dew[dew.length - 8])).toBeGreaterThan(1e-4);
    expect(stabilityDeterminant(rich, bubble[8])).toBeGreaterThan(1e-4);
    expect(dew[dew.length - 1]).toEqual(critical);
    expect(bubble[0]).toEqual(critical);
  });

  it("tends to the critical point of ethane as everything else goes", () => {
    // Buecker and Wagner (2006), from memory: 305.322 K, 4.8722 MPa
    const { critical } = phaseEnvelope(subset([4, 5]), Float64Array.of(1 - 1e-4, 1e-4));
    expect(critical!.temperatureDegF).toBeCloseTo(305.322 * 1.8 - 459.67, 1);
    expect(critical!.pressurePsia / 706.65).toBeCloseTo(1, 3);
  });

  it("goes to the cold end without a critical point where a lean gas has it farther down", () => {
    const lean = phaseEnvelope(mixture, feeds.gas, { liquidVolumeFractions: [0.02] });
    expect(lean.critical).toBeNull();
    expect(lean.bubble).toEqual([]);
    expect(lean.dew[lean.dew.length - 1].temperatureDegF).toBeLessThan(-129);
    expect(lean.quality[0].points.length).toBeGreaterThan(20);
  });

  it("has the extremes that no point of the line exceeds and the saturation pressure confirms", () => {
    const { cricondentherm, cricondenbar, dew, bubble } = envelope;
    for (const { temperatureDegF, pressurePsia } of [...dew, ...bubble]) {
      expect(temperatureDegF).toBeLessThanOrEqual(cricondentherm!.temperatureDegF + 1e-9);
      expect(pressurePsia).toBeLessThanOrEqual(cricondenbar!.pressurePsia + 1e-9);
    }
    const at = (degF: number) => saturationPressures(mixture, rich, degR(degF)).upper!.pressurePsia;
    const top = cricondenbar!.temperatureDegF;
    expect(at(top) / cricondenbar!.pressurePsia).toBeCloseTo(1, 5);
    expect(at(top + 3)).toBeLessThan(at(top));
    expect(at(top - 3)).toBeLessThan(at(top));
  });

  it("calls the cold side bubble points and the warm side dew points", () => {
    const kind = (degF: number) => saturationPressures(mixture, rich, degR(degF)).upper!.kind;
    const { temperatureDegF } = envelope.critical!;
    expect(kind(temperatureDegF + 20)).toBe("dewPoint");
    expect(kind(temperatureDegF - 20)).toBe("bubblePoint");
  });

  it("draws lines on which the flash finds that share of liquid by volume", () => {
    for (const { liquidVolumeFraction, points } of envelope.quality) {
      expect(points[points.length - 1]).toEqual(envelope.critical);
      expect(points.length).toBeGreaterThan(10);
      for (const { pressurePsia, temperatureDegF } of points.slice(0, -1)) {
        const found = flash(mixture, rich, {
          pressurePsia,
          temperatureDegR: degR(temperatureDegF),
        });
        const liquid = (1 - found.vapourFraction) * found.liquid!.molarVolumeFt3PerLbmol;
        const gas = found.vapourFraction * found.vapour!.molarVolumeFt3PerLbmol;
        expect(liquid / (liquid + gas)).toBeCloseTo(liquidVolumeFraction, 4);
      }
    }
  });

  it("is smooth enough to draw: no step of more than 40 °F or 25 % in pressure", () => {
    for (const line of [envelope.dew, envelope.bubble]) {
      for (let i = 1; i < line.length; i += 1) {
        const [from, to] = [line[i - 1], line[i]];
        expect(Math.abs(to.temperatureDegF - from.temperatureDegF)).toBeLessThan(40);
        expect(Math.abs(Math.log(to.pressurePsia / from.pressurePsia))).toBeLessThan(0.25);
      }
    }
  });

  it("closes for random fluids: the line ends at a limit of the diagram, not on the way", () => {
    for (const { moleFractions } of randomFeeds(60, 9)) {
      const { dew, bubble } = phaseEnvelope(feedMixture, moleFractions);
      const last = (bubble.length > 0 ? bubble : dew).at(-1)!;
      const isAtLimit =
        last.temperatureDegF < -85 || last.pressurePsia < 18 || last.pressurePsia > 16_000;
      expect(isAtLimit).toBe(true);
    }
  });

  it("has no lines for a pure component, whose critical point is the only extreme", () => {
    const { dew, bubble, critical, cricondentherm } = phaseEnvelope(pure("C3"), Float64Array.of(1));
    expect([...dew, ...bubble]).toEqual([]);
    // Lemmon and others (2009), from memory: 369.89 K, 4.2512 MPa
    expect(critical!.temperatureDegF).toBeCloseTo(369.89 * 1.8 - 459.67, 6);
    expect(critical!.pressurePsia).toBeCloseTo(616.58, 1);
    expect(cricondentherm).toEqual(critical);
  });

  it("leaves out a line of liquid that a dry gas never has in the diagram", () => {
    const dry = phaseEnvelope(subset([2, 3]), Float64Array.of(0.5, 0.5), {
      liquidVolumeFractions: [0.1],
    });
    expect(dry.quality).toEqual([{ liquidVolumeFraction: 0.1, points: [] }]);
    expect(dry.cricondentherm!.temperatureDegF).toBeLessThan(-100);
  });

  it("refuses a share of liquid that is none", () => {
    expect(() => phaseEnvelope(mixture, feeds.gas, { liquidVolumeFractions: [1] })).toThrow(
      DomainError,
    );
  });
});
