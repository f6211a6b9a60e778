/** How a fluid parts into gas and liquid at a temperature and pressure. */
import { ConvergenceError, DomainError } from "../errors";
import { GAS_CONSTANT } from "../units/conversions";
import { GibbsDescent } from "./gibbs-descent";
import type { Mixture } from "./mixture";
import { PengRobinson, createPhaseState, type PhaseState } from "./peng-robinson";
import { TwoPhaseSplit } from "./split";
import { StabilityTest } from "./stability";
import { fillWilson } from "./wilson";

export interface FlashConditions {
  readonly pressurePsia: number;
  readonly temperatureDegR: number;
}

export interface FlashPhase {
  readonly moleFractions: Float64Array;
  /** p v / (R T) of the translated volume: what a laboratory measures */
  readonly z: number;
  /** translated */
  readonly molarVolumeFt3PerLbmol: number;
  /** lb/lbmol */
  readonly molecularWeight: number;
}

export interface Flash {
  readonly phases: "gas" | "liquid" | "two";
  /** moles of gas per mole of feed; 1 for a gas, 0 for a liquid */
  readonly vapourFraction: number;
  /** null when there is none */
  readonly liquid: FlashPhase | null;
  readonly vapour: FlashPhase | null;
  /** largest |ln f_liquid - ln f_gas| over the components; 0 for one phase */
  readonly residual: number;
  /** evaluations of both phases */
  readonly iterations: number;
}

/** Below this v/b a single phase is called a liquid where neither trial of the stability test tells. */
const LIQUID_VOLUME_RATIO = 1.75;

/**
 * Flashes of one mixture, one after another, without new work arrays. An instance belongs to one calculation at a time.
 */
export class Flasher {
  readonly equation: PengRobinson;
  readonly stability: StabilityTest;
  readonly split: TwoPhaseSplit;
  private readonly z: Float64Array;
  private readonly feed: PhaseState;
  private readonly descent: GibbsDescent;

  constructor(readonly mixture: Mixture) {
    this.equation = new PengRobinson(mixture);
    this.stability = new StabilityTest(this.equation);
    this.split = new TwoPhaseSplit(this.equation);
    this.z = new Float64Array(this.equation.count);
    this.feed = createPhaseState(this.equation.count);
    this.descent = new GibbsDescent(this.equation);
  }

  /**
   * One flash. A guess of the K-values (Wilson's, or the caller's) that leads to less Gibbs energy than the feed has as
   * one phase proves two phases; else the stability test decides and gives the guess. Two phases are returned only in
   * equilibrium: every |ln f_liquid - ln f_gas| below 1e-9, with z = (1-V) x + V y to rounding.
   *
   * @param feed     mole fractions; adding up to 1 within 1e-6, and made to do so exactly
   * @param startLnK a guess of ln K, such as those of the step before
   * @throws {DomainError} for a feed, pressure or temperature that cannot be
   * @throws {ConvergenceError} when equilibrium is not reached
   */
  flash(feed: Float64Array, conditions: FlashConditions, startLnK?: Float64Array): Flash {
    const { equation, stability, split, z } = this;
    const { pressurePsia, temperatureDegR } = conditions;
    checkPressure(pressurePsia);
    equation.setTemperature(temperatureDegR);
    normaliseFeed(feed, z);
    if (startLnK) split.lnK.set(startLnK);
    else fillWilson(this.mixture, pressurePsia, temperatureDegR, split.lnK);
    let spent = 0;
    if (this.lowersGibbsEnergy(pressurePsia)) {
      spent = split.iterations;
      if (split.solve(z, pressurePsia) === "two" && this.isInside()) {
        return this.twoPhases(pressurePsia, spent);
      }
      spent += split.iterations;
    }
    if (!stability.isUnstable(z, pressurePsia)) return this.onePhase(pressurePsia);
    this.guessFromTrials();
    if (split.solve(z, pressurePsia) === "two" && this.isInside()) {
      return this.twoPhases(pressurePsia, spent);
    }
    spent += split.iterations;
    const { gas, liquid } = stability;
    const trials = gas.distance < liquid.distance ? [gas, liquid] : [liquid, gas];
    for (const { lnRatio, trivial } of trials) {
      if (trivial || !this.descent.solve(z, pressurePsia, lnRatio)) continue;
      split.lnK.set(this.descent.lnK);
      if (split.solve(z, pressurePsia) === "two" && this.isInside()) {
        return this.twoPhases(pressurePsia, spent);
      }
      spent += split.iterations;
    }
    throw new ConvergenceError("The flash did not converge", {
      pressurePsia,
      temperatureDegR,
      residual: split.residual,
      vapourFraction: split.vapourFraction,
    });
  }

  private isInside(): boolean {
    return this.split.vapourFraction >= 0 && this.split.vapourFraction <= 1;
  }

  /** Three substitutions from the guess; true when the split they give has less Gibbs energy than one phase. */
  private lowersGibbsEnergy(pressurePsia: number): boolean {
    const { equation, split, z, feed } = this;
    split.begin();
    if (!split.substitute(z, pressurePsia, 3) || !this.isInside()) return false;
    equation.evaluate(z, pressurePsia, "stable", feed);
    let change = 0;
    const { x, y, liquid, gas, vapourFraction } = split;
    for (let i = 0; i < z.length; i += 1) {
      if (!(z[i] > 0)) continue;
      const reference = Math.log(z[i]) + feed.lnPhi[i];
      if (x[i] > 0) {
        change += (1 - vapourFraction) * x[i] * (Math.log(x[i]) + liquid.lnPhi[i] - reference);
      }
      if (y[i] > 0) {
        change += vapourFraction * y[i] * (Math.log(y[i]) + gas.lnPhi[i] - reference);
      }
    }
    return change < -1e-9;
  }

  /** K-values from the trial phases: against each other, or of the one that is not the feed against the feed. */
  private guessFromTrials(): void {
    const { gas, liquid } = this.stability;
    const { lnK } = this.split;
    for (let i = 0; i < lnK.length; i += 1) {
      if (gas.trivial) lnK[i] = -liquid.lnRatio[i];
      else if (liquid.trivial) lnK[i] = gas.lnRatio[i];
      else lnK[i] = gas.lnRatio[i] - liquid.lnRatio[i];
    }
  }

  private twoPhases(pressurePsia: number, spent: number): Flash {
    const { split } = this;
    // The lighter phase is the gas, whatever the guess called it.
    const liquid = this.phase(split.x, pressurePsia, split.liquid.z);
    const vapour = this.phase(split.y, pressurePsia, split.gas.z);
    const swapped = density(liquid) < density(vapour);
    return {
      phases: "two",
      vapourFraction: swapped ? 1 - split.vapourFraction : split.vapourFraction,
      liquid: swapped ? vapour : liquid,
      vapour: swapped ? liquid : vapour,
      residual: split.residual,
      iterations: spent + split.iterations,
    };
  }

  private onePhase(pressurePsia: number): Flash {
    const { z } = this;
    const { feed, gas, liquid } = this.stability;
    let isGas = feed.z / feed.b > LIQUID_VOLUME_RATIO;
    if (gas.trivial !== liquid.trivial) isGas = gas.trivial;
    const phase = this.phase(z, pressurePsia, feed.z);
    return {
      phases: isGas ? "gas" : "liquid",
      vapourFraction: isGas ? 1 : 0,
      liquid: isGas ? null : phase,
      vapour: isGas ? phase : null,
      residual: 0,
      iterations: 0,
    };
  }

  private phase(x: Float64Array, pressurePsia: number, z: number): FlashPhase {
    const { equation, mixture } = this;
    const volume = equation.molarVolume(x, pressurePsia, z);
    let molecularWeight = 0;
    for (let i = 0; i < x.length; i += 1) molecularWeight += x[i] * mixture.molecularWeight[i];
    return {
      moleFractions: x.slice(),
      z: (volume * pressurePsia) / (GAS_CONSTANT * equation.temperatureDegR),
      molarVolumeFt3PerLbmol: volume,
      molecularWeight,
    };
  }
}

const density = (phase: FlashPhase) => phase.molecularWeight / phase.molarVolumeFt3PerLbmol;

function checkPressure(pressurePsia: number): void {
  if (!(pressurePsia > 0 && pressurePsia < Infinity)) {
    throw new DomainError(`A pressure is above zero, not ${pressurePsia} psia`, {
      input: "pressurePsia",
      value: pressurePsia,
    });
  }
}

/**
 * Copies a feed with a sum of exactly 1.
 *
 * @throws {DomainError} when a fraction is negative or not a number, or the sum is off by more than 1e-6
 */
export function normaliseFeed(feed: Float64Array, into: Float64Array): void {
  let total = 0;
  for (const fraction of feed) {
    if (!(fraction >= 0)) {
      throw new DomainError(`A mole fraction is not negative; ${fraction} is`, {
        input: "moleFractions",
        value: fraction,
      });
    }
    total += fraction;
  }
  if (feed.length !== into.length || !(Math.abs(total - 1) < 1e-6)) {
    throw new DomainError(
      `Mole fractions of ${into.length} components add up to 1; ${feed.length} add up to ${total}`,
      { input: "moleFractions", value: total },
    );
  }
  for (let i = 0; i < feed.length; i += 1) into[i] = feed[i] / total;
}

/**
 * Flashes one feed. For many flashes of one mixture keep a `Flasher`.
 *
 * @param z  mole fractions
 * @throws {DomainError} for a feed, pressure or temperature that cannot be
 * @throws {ConvergenceError} when equilibrium is not reached
 * @see M. L. Michelsen, Fluid Phase Equilib. 9 (1982) 1-19 and 21-40
 */
export function flash(mixture: Mixture, z: Float64Array, conditions: FlashConditions): Flash {
  return new Flasher(mixture).flash(z, conditions);
}
