/** Dew and bubble points at a temperature. */
import { ConvergenceError, DomainError } from "../errors";
import { normaliseFeed } from "./flash";
import type { Mixture } from "./mixture";
import { PengRobinson } from "./peng-robinson";
import { StabilityTest, type TrialPhase } from "./stability";
import { fillWilson } from "./wilson";

export type SaturationKind = "dewPoint" | "bubblePoint";

export interface SaturationPoint {
  readonly pressurePsia: number;
  /** a denser phase appears at a dew point, a lighter one at a bubble point */
  readonly kind: SaturationKind;
  /** mole fractions of the first drop or bubble */
  readonly incipient: Float64Array;
}

export interface SaturationPressures {
  /** the highest pressure at which a second phase appears; null above the cricondentherm */
  readonly upper: SaturationPoint | null;
  /** psia; below it everything is gas. Null above the cricondentherm */
  readonly lower: number | null;
}

/** Where the search starts, psia. */
const HIGHEST_PSIA = 20_000;
/** A fluid that shows no second phase from the top down to here shows none in a reservoir, psia. */
const LOWEST_PSIA = 0.01;
const LN_STEP = 0.16;
const LN_TOLERANCE = 1e-10;
/** How far outside a saturation pressure the fluid is looked at again. */
const LN_CLEARANCE = 1e-7;
const MAXIMUM_ITERATIONS = 100;
const UNSTABLE = -1e-13;

/**
 * Upper and lower saturation pressure of a fluid at a temperature, by the tangent-plane test: the upper one is the
 * highest pressure at which the fluid is unstable. From the top down in steps of 15 %, with a closer look where the
 * distance to the tangent plane only comes near zero (close to the cricondentherm, where the two-phase range is
 * narrow), then Newton's method on that distance inside the bracket, to 1e-10 of the pressure. A pure component has no
 * two-phase range, and gets null; so does a liquid that boils below 0.01 psia.
 *
 * @param z  mole fractions
 * @throws {DomainError} for a feed or temperature that cannot be, and for a fluid in two phases even at 20,000 psia
 * @throws {ConvergenceError} when the stability test does not settle
 * @see M. L. Michelsen, Fluid Phase Equilib. 9 (1982) 1-19; 23 (1985) 181-192
 */
export function saturationPressures(
  mixture: Mixture,
  z: Float64Array,
  temperatureDegR: number,
): SaturationPressures {
  const search = searchOf(mixture, z, temperatureDegR);
  const found = search.upper();
  return found
    ? { upper: found.point, lower: search.lower(found.lnUnstable) }
    : { upper: null, lower: null };
}

/**
 * The upper one of `saturationPressures` by itself, for those who have no use for the lower: with very heavy ends that
 * lies at pressures where nothing converges.
 *
 * @throws {DomainError | ConvergenceError} as `saturationPressures`
 */
export function upperSaturation(
  mixture: Mixture,
  z: Float64Array,
  temperatureDegR: number,
): SaturationPoint | null {
  return searchOf(mixture, z, temperatureDegR).upper()?.point ?? null;
}

function searchOf(mixture: Mixture, z: Float64Array, temperatureDegR: number): Search {
  const feed = new Float64Array(mixture.names.length);
  normaliseFeed(z, feed);
  const equation = new PengRobinson(mixture);
  equation.setTemperature(temperatureDegR);
  return new Search(equation, feed);
}

class Search {
  private readonly stability: StabilityTest;

  constructor(
    private readonly equation: PengRobinson,
    private readonly z: Float64Array,
  ) {
    this.stability = new StabilityTest(equation);
  }

  /** The upper point, and a pressure below it with two phases. */
  upper(): { point: SaturationPoint; lnUnstable: number } | null {
    let above = Math.log(HIGHEST_PSIA);
    let farther = Infinity;
    let distance = this.distance(above);
    if (distance < UNSTABLE) {
      throw new DomainError(`The fluid is in two phases even at ${HIGHEST_PSIA} psia`, {
        input: "moleFractions",
        value: HIGHEST_PSIA,
      });
    }
    for (let lnP = above - LN_STEP; lnP > Math.log(LOWEST_PSIA); lnP -= LN_STEP) {
      const next = this.distance(lnP);
      if (next < UNSTABLE) return { point: this.pointBetween(lnP, above), lnUnstable: lnP };
      if (distance < farther && distance < next) {
        const unstable = this.lookBetween(lnP, lnP + 2 * LN_STEP);
        if (unstable !== null) {
          const point = this.pointBetween(unstable, lnP + 2 * LN_STEP);
          return { point, lnUnstable: unstable };
        }
      }
      farther = distance;
      distance = next;
      above = lnP;
    }
    return null;
  }

  /** The pressure below which all is gas: up from where it is, by Raoult's law, to the first two phases. */
  lower(lnUnstable: number): number {
    const { mixture, temperatureDegR } = this.equation;
    const lnK = new Float64Array(this.z.length);
    fillWilson(mixture, 1, temperatureDegR, lnK);
    const resistance = this.z.reduce((sum, share, i) => sum + share * Math.exp(-lnK[i]), 0);
    let stable = Math.min(-Math.log(resistance), lnUnstable);
    while (this.distance(stable) < UNSTABLE) stable -= Math.LN2;
    let unstable = stable;
    const step = Math.min(0.1, (lnUnstable - stable) / 8);
    do {
      stable = unstable;
      unstable = Math.min(unstable + step, lnUnstable);
    } while (unstable < lnUnstable && this.distance(unstable) >= UNSTABLE);
    return Math.exp(this.root(unstable, stable).lnP);
  }

  /** Lowest distance of both trials; Infinity when both end at the feed. */
  private distance(lnP: number): number {
    const pressurePsia = Math.exp(lnP);
    this.stability.isUnstable(this.z, pressurePsia);
    const phase = this.nearest();
    return phase ? phase.distance : Infinity;
  }

  private nearest(): TrialPhase | null {
    const { gas, liquid } = this.stability;
    if (gas.trivial) return liquid.trivial ? null : liquid;
    return liquid.trivial || gas.distance < liquid.distance ? gas : liquid;
  }

  /** Golden section for a pressure with a negative distance. @returns its logarithm, or null when there is none */
  private lookBetween(low: number, high: number): number | null {
    const section = (Math.sqrt(5) - 1) / 2;
    let [a, b] = [low, high];
    let c = b - section * (b - a);
    let d = a + section * (b - a);
    let atC = this.distance(c);
    let atD = this.distance(d);
    for (let i = 0; i < 24 && b - a > 1e-6; i += 1) {
      if (atC < UNSTABLE) return c;
      if (atD < UNSTABLE) return d;
      if (atC < atD) {
        [b, d, atD] = [d, c, atC];
        c = b - section * (b - a);
        atC = this.distance(c);
      } else {
        [a, c, atC] = [c, d, atD];
        d = a + section * (b - a);
        atD = this.distance(d);
      }
    }
    return null;
  }

  private pointBetween(unstable: number, stable: number): SaturationPoint {
    const { equation, stability, z } = this;
    const { lnP, lnRatio } = this.root(unstable, stable);
    const pressurePsia = Math.exp(lnP);
    const incipient = z.map((fraction, i) => fraction * Math.exp(lnRatio[i]));
    const total = incipient.reduce((sum, fraction) => sum + fraction, 0);
    for (let i = 0; i < incipient.length; i += 1) incipient[i] /= total;
    const density = (x: Float64Array) => {
      equation.evaluate(x, pressurePsia, "stable", stability.feed);
      const mass = x.reduce(
        (sum, share, i) => sum + share * equation.mixture.molecularWeight[i],
        0,
      );
      return mass / equation.molarVolume(x, pressurePsia, stability.feed.z);
    };
    const isDenser = density(incipient) > density(z);
    return { pressurePsia, kind: isDenser ? "dewPoint" : "bubblePoint", incipient };
  }

  /**
   * ln p at which the distance of the trial that is unstable is zero: Newton's method, with bisection when a step
   * leaves the bracket or the trial is lost to the feed.
   */
  private root(unstable: number, stable: number): { lnP: number; lnRatio: Float64Array } {
    const found = this.rootOfNearest(unstable, stable);
    // Next to the critical point both trials are unstable, and the other one may be so farther out.
    const outward = found.lnP + Math.sign(stable - unstable) * LN_CLEARANCE;
    return this.distance(outward) < UNSTABLE ? this.root(outward, stable) : found;
  }

  private rootOfNearest(unstable: number, stable: number): { lnP: number; lnRatio: Float64Array } {
    const { equation, stability, z } = this;
    let inside = unstable;
    let outside = stable;
    this.distance(inside);
    const phase = this.nearest();
    if (!phase) throw this.failure(Math.exp(inside));
    const kept = phase.lnRatio.slice();
    let lnP = inside;
    for (let iteration = 0; iteration < MAXIMUM_ITERATIONS; iteration += 1) {
      const pressurePsia = Math.exp(lnP);
      equation.evaluate(z, pressurePsia, "stable", stability.feed);
      phase.lnRatio.set(kept);
      stability.follow(z, pressurePsia, phase);
      let next = NaN;
      if (!phase.trivial) {
        kept.set(phase.lnRatio);
        next = lnP - phase.distance / stability.distanceSlope(z, pressurePsia);
        if (Math.abs(next - lnP) < LN_TOLERANCE) return { lnP: next, lnRatio: kept };
      }
      if (!phase.trivial && phase.distance < 0) inside = lnP;
      else outside = lnP;
      const isBetween = (next - inside) * (next - outside) < 0;
      lnP = isBetween ? next : 0.5 * (inside + outside);
      if (Math.abs(outside - inside) < LN_TOLERANCE) {
        return { lnP: inside, lnRatio: kept };
      }
    }
    throw this.failure(Math.exp(lnP));
  }

  private failure(pressurePsia: number): ConvergenceError {
    return new ConvergenceError("The saturation pressure did not converge", {
      pressurePsia,
      temperatureDegR: this.equation.temperatureDegR,
    });
  }
}
