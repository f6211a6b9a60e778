/** A constant-volume depletion by the equation of state. */
import type { LightComponent, ReportedStream } from "../composition/composition-schema";
import { DomainError } from "../errors";
import { Flasher } from "../equation-of-state/flash";
import type { Characterised } from "../equation-of-state/mixture";
import { PengRobinson } from "../equation-of-state/peng-robinson";
import { upperSaturation } from "../equation-of-state/saturation";
import { gasViscosityCp } from "../gas/viscosity";
import { CUBIC_FEET_PER_BARREL, degreesRankine, GAS_CONSTANT } from "../units/conversions";
import {
  AIR_MOLECULAR_WEIGHT,
  CANONICAL_BASE,
  WATER_POUNDS_PER_BARREL,
} from "../units/standard-conditions";
import type { DepletionTable } from "./depletion-table-schema";
import { twoPhaseZFromMoles } from "./two-phase-z";

/** Where a depletion ends unless pressures are given, psia. */
const LOWEST_PSIA = 500;
/** Default steps as shares of the way down: closest below the dew point, where liquid drops out fastest. */
const DEFAULT_STEPS = [0.03, 0.08, 0.16, 0.25, 0.35, 0.45, 0.55, 0.65, 0.75, 0.84, 0.92, 1];
/** A dew point is known to about this, relative; a step no farther below it is the dew point itself. */
const SAME_PRESSURE = 1e-6;

/** State of the cell after one step; moles are per mole of the fluid at the dew point. */
export interface DepletionStep {
  readonly pressurePsia: number;
  /** removed in this step */
  readonly stepMoles: number;
  /** removed so far */
  readonly producedFraction: number;
  /** left in the cell as gas */
  readonly gasMoles: number;
  /** liquid's share of the cell */
  readonly liquidFraction: number;
  readonly gasZ: number;
  readonly twoPhaseZ: number;
  readonly gasMolecularWeight: number;
  /** mole fractions of the gas, in the order of the mixture */
  readonly gas: Float64Array;
}

export interface SimulatedDepletion {
  readonly temperatureDegF: number;
  readonly dewPointPsia: number;
  /** the dew point first, with nothing removed */
  readonly steps: readonly DepletionStep[];
}

/**
 * Pressures of a depletion when none are asked for: twelve from the dew point to 500 psia (or to 30 % of a dew point
 * so low that 500 psia is no depletion), closer together at the top.
 */
export function defaultPressuresPsia(dewPointPsia: number): number[] {
  const lowest = Math.min(LOWEST_PSIA, 0.3 * dewPointPsia);
  return DEFAULT_STEPS.map((share) => dewPointPsia - share * (dewPointPsia - lowest));
}

function upperDewPoint({ mixture, moleFractions }: Characterised, temperatureDegF: number): number {
  const upper = upperSaturation(mixture, moleFractions, degreesRankine(temperatureDegF));
  if (upper === null) {
    throw new DomainError(
      `The fluid has no dew point at ${temperatureDegF} °F: it stays a gas at every pressure, and drops no liquid in the reservoir`,
      { input: "temperatureDegF", value: temperatureDegF },
    );
  }
  if (upper.kind === "bubblePoint") {
    throw new DomainError(
      `By the equation of state the fluid is an oil at ${temperatureDegF} °F, with a bubble point of ` +
        `${Math.round(upper.pressurePsia)} psia. A depletion below a dew point does not apply.`,
      { input: "temperatureDegF", value: temperatureDegF },
    );
  }
  return upper.pressurePsia;
}

/** Pressures below the dew point, falling, none twice. */
function stepsBelow(dewPointPsia: number, pressuresPsia: readonly number[]): number[] {
  for (const [index, value] of pressuresPsia.entries()) {
    if (!(value > 0 && value < Infinity)) {
      throw new DomainError(`A pressure is above zero, not ${value}`, {
        input: `depletionPressuresPsia.${index}`,
        value,
      });
    }
  }
  const below = [...new Set(pressuresPsia)]
    .filter((pressure) => pressure < dewPointPsia * (1 - SAME_PRESSURE))
    .sort((a, b) => b - a);
  if (below.length === 0) {
    throw new DomainError(
      `None of the pressures lies below the dew point, ${Math.round(dewPointPsia)} psia`,
      { input: "depletionPressuresPsia" },
    );
  }
  return below;
}

/**
 * Depletes a cell of constant volume from the dew point. At each pressure the cell's content is flashed and as much
 * equilibrium gas removed as brings it back to its volume at the dew point, Vd. With n moles in the cell, liquid and
 * gas volumes VL and VV and the gas's molar volume vV:
 *
 *     dn = (VL + VV - Vd) / vV,   n_i -> n_i - dn y_i,   SL = VL / Vd,   z2 = p Vd / (n R T)
 *
 * Volumes are translated ones.
 *
 * @param pressuresPsia  steps in any order; those at or above the dew point are left out. `null` takes twelve
 * @throws {DomainError} when the fluid has no dew point at this temperature, or no pressure lies below it
 * @throws {ConvergenceError} when a flash or the dew point does not converge
 * @see C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610-620
 */
export function depleteCell(
  characterised: Characterised,
  temperatureDegF: number,
  pressuresPsia: readonly number[] | null,
): SimulatedDepletion {
  const { mixture, moleFractions } = characterised;
  const dewPointPsia = upperDewPoint(characterised, temperatureDegF);
  const temperatureDegR = degreesRankine(temperatureDegF);
  const pressures = stepsBelow(dewPointPsia, pressuresPsia ?? defaultPressuresPsia(dewPointPsia));

  const flasher = new Flasher(mixture);
  const { equation, stability } = flasher;
  equation.setTemperature(temperatureDegR);
  equation.evaluate(moleFractions, dewPointPsia, "stable", stability.feed);
  const cellVolume = equation.molarVolume(moleFractions, dewPointPsia, stability.feed.z);
  const dewPointZ = (dewPointPsia * cellVolume) / (GAS_CONSTANT * temperatureDegR);

  const moles = Float64Array.from(moleFractions);
  let total = 1;
  const steps: DepletionStep[] = [
    {
      pressurePsia: dewPointPsia,
      stepMoles: 0,
      producedFraction: 0,
      gasMoles: 1,
      liquidFraction: 0,
      gasZ: dewPointZ,
      twoPhaseZ: dewPointZ,
      gasMolecularWeight: averageMolecularWeight(characterised, moleFractions),
      gas: Float64Array.from(moleFractions),
    },
  ];
  for (const pressurePsia of pressures) {
    const feed = moles.map((value) => value / total);
    const { vapourFraction, vapour, liquid, phases } = flasher.flash(feed, {
      pressurePsia,
      temperatureDegR,
    });
    // A phase alone fills the cell, whatever its name next to the critical point.
    const gas = (phases === "two" ? vapour : (vapour ?? liquid))!;
    const gasShare = phases === "two" ? vapourFraction : 1;
    const liquidVolume =
      phases === "two" ? (1 - gasShare) * total * liquid!.molarVolumeFt3PerLbmol : 0;
    const gasVolume = gasShare * total * gas.molarVolumeFt3PerLbmol;
    const stepMoles = (liquidVolume + gasVolume - cellVolume) / gas.molarVolumeFt3PerLbmol;
    for (let i = 0; i < moles.length; i += 1) {
      moles[i] -= stepMoles * gas.moleFractions[i];
    }
    total -= stepMoles;
    steps.push({
      pressurePsia,
      stepMoles,
      producedFraction: 1 - total,
      gasMoles: (cellVolume - liquidVolume) / gas.molarVolumeFt3PerLbmol,
      liquidFraction: liquidVolume / cellVolume,
      gasZ: gas.z,
      twoPhaseZ: twoPhaseZFromMoles(pressurePsia, 1 - total, {
        pressurePsia: dewPointPsia,
        gasZ: dewPointZ,
      }),
      gasMolecularWeight: gas.molecularWeight,
      gas: gas.moleFractions,
    });
  }
  return { temperatureDegF, dewPointPsia, steps };
}

function averageMolecularWeight({ mixture }: Characterised, x: Float64Array): number {
  return x.reduce((sum, fraction, i) => sum + fraction * mixture.molecularWeight[i], 0);
}

/** Liquid of each heavy fraction by itself at 60 degF, ft3/lbmol: what its specific gravity is measured on. */
function heavyVolumes({ mixture, firstHeavy }: Characterised): Float64Array {
  const equation = new PengRobinson(mixture);
  const { pressurePsia, temperatureDegR } = CANONICAL_BASE;
  const pure = new Float64Array(mixture.names.length);
  return Float64Array.from(mixture.names.slice(firstHeavy), (_, offset) => {
    pure.fill(0);
    pure[firstHeavy + offset] = 1;
    return equation.liquidVolume(pure, pressurePsia, temperatureDegR);
  });
}

function reportedStream(
  { mixture, firstHeavy }: Characterised,
  x: Float64Array,
  volumes: Float64Array,
): ReportedStream {
  const light: Partial<Record<LightComponent, number>> = {};
  for (let i = 0; i < firstHeavy; i += 1) {
    light[mixture.names[i] as LightComponent] = 100 * x[i];
  }
  let moles = 0;
  let pounds = 0;
  let cubicFeet = 0;
  for (let i = firstHeavy; i < x.length; i += 1) {
    moles += x[i];
    pounds += x[i] * mixture.molecularWeight[i];
    cubicFeet += x[i] * volumes[i - firstHeavy];
  }
  return {
    light,
    carbonNumbers: [],
    plus:
      moles > 0
        ? {
            carbonNumber: 7,
            molePercent: 100 * moles,
            molecularWeight: pounds / moles,
            specificGravity:
              (pounds / cubicFeet) * (CUBIC_FEET_PER_BARREL / WATER_POUNDS_PER_BARREL),
          }
        : null,
  };
}

/**
 * A simulated depletion as a laboratory would report it, heptanes plus of the produced gases as one.
 *
 * Their specific gravity is that of the heavy fractions' liquids at 60 degF by the equation of state, which an untuned
 * characterisation gives exactly. Gas viscosity by Lee, Gonzalez and Eakin.
 */
export function tableOfSimulation(
  characterised: Characterised,
  { temperatureDegF, dewPointPsia, steps }: SimulatedDepletion,
): DepletionTable {
  const volumes = heavyVolumes(characterised);
  return {
    temperatureDegF,
    dewPointPsia,
    rows: steps.map((step) => ({
      pressurePsia: step.pressurePsia,
      liquidPercent: 100 * step.liquidFraction,
      cumulativeProducedMolePercent: 100 * step.producedFraction,
      gasZ: step.gasZ,
      twoPhaseZ: step.twoPhaseZ,
      viscosityCp: gasViscosityCp(
        step.gasMolecularWeight / AIR_MOLECULAR_WEIGHT,
        step.pressurePsia,
        temperatureDegF,
        step.gasZ,
      ),
      producedGas: reportedStream(characterised, step.gas, volumes),
    })),
  };
}

/**
 * Constant-volume depletion by the equation of state, as a table. See `depleteCell` for the method and
 * `tableOfSimulation` for the columns.
 *
 * @param pressuresPsia  steps in any order; those at or above the dew point are left out. `null` takes twelve from the
 *                       dew point to 500 psia
 * @throws {DomainError} when the fluid has no dew point at this temperature, or no pressure lies below it
 * @throws {ConvergenceError} when a flash or the dew point does not converge
 */
export function simulateDepletion(
  characterised: Characterised,
  temperatureDegF: number,
  pressuresPsia: readonly number[] | null,
): DepletionTable {
  return tableOfSimulation(
    characterised,
    depleteCell(characterised, temperatureDegF, pressuresPsia),
  );
}
