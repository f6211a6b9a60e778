/** What separators and stock tank make of a wellstream. */
import type { SeparatorStage } from "../composition/composition-schema";
import { DomainError } from "../errors";
import type { SeparatorTest } from "../fluid/separator-test-schema";
import { CUBIC_FEET_PER_BARREL, DEGR_AT_ZERO_DEGF, degreesRankine } from "../units/conversions";
import {
  AIR_MOLECULAR_WEIGHT,
  CANONICAL_BASE,
  CANONICAL_CONSTANTS,
  WATER_POUNDS_PER_BARREL,
} from "../units/standard-conditions";
import { Flasher, normaliseFeed } from "./flash";
import type { Mixture } from "./mixture";

/** One stage, for one lbmol of wellstream. */
export interface StageSplit {
  readonly pressurePsia: number;
  readonly temperatureDegF: number;
  /** lbmol of gas leaving the stage per lbmol of wellstream */
  readonly gasMoles: number;
  /** null when the stage gives no gas */
  readonly gas: { readonly moleFractions: Float64Array; readonly gravity: number } | null;
  /** lbmol of liquid going on per lbmol of wellstream */
  readonly liquidMoles: number;
  /** null when the stage leaves no liquid */
  readonly liquid: {
    readonly moleFractions: Float64Array;
    /** at stage conditions, ft3/lbmol */
    readonly molarVolumeFt3PerLbmol: number;
  } | null;
}

/** The whole train, for one lbmol of wellstream. */
export interface Separation {
  readonly stages: readonly StageSplit[];
  readonly gasMoles: number;
  /** stages' gases together; null when there is none */
  readonly surfaceGas: { readonly moleFractions: Float64Array; readonly gravity: number } | null;
  /** null for a wellstream that leaves no liquid in the tank */
  readonly condensate: {
    readonly moles: number;
    readonly moleFractions: Float64Array;
    /** lb/lbmol */
    readonly molecularWeight: number;
    /** at 60 degF, water = 1 */
    readonly specificGravity: number;
    /** stock-tank barrels, measured at 14.696 psia and 60 degF */
    readonly barrels: number;
  } | null;
}

/** The train per stock-tank barrel, as separator tests are reported. */
export interface SeparatorTrain {
  readonly stages: readonly {
    readonly pressurePsia: number;
    readonly temperatureDegF: number;
    readonly gasScfPerStb: number;
    /** air = 1; null when the stage gives no gas */
    readonly gasGravity: number | null;
    /** null when the stage gives no gas */
    readonly gasMoleFractions: Float64Array | null;
    /** barrels of the stage's liquid, at its conditions, per stock-tank barrel */
    readonly liquidVolumeFactor: number;
    readonly liquidMoleFractions: Float64Array;
  }[];
  readonly condensateApi: number;
  readonly condensateSpecificGravity: number;
  readonly condensateMolecularWeight: number;
  readonly condensateMoleFractions: Float64Array;
  readonly totalGasScfPerStb: number;
  readonly surfaceGasMoleFractions: Float64Array;
  readonly surfaceGasGravity: number;
  readonly condensateYieldStbPerMmscf: number;
  readonly condensateYieldStbPerMmscfWellstream: number;
  /** surface gas as a fraction of the moles of wellstream */
  readonly surfaceGasFraction: number;
  /** the same as a sheet, for two or three stages; null for other numbers, or without gas in the first */
  readonly separatorTest: SeparatorTest | null;
}

const POUNDS_PER_CUBIC_FOOT_OF_WATER = WATER_POUNDS_PER_BARREL / CUBIC_FEET_PER_BARREL;

function checkStages(stages: readonly SeparatorStage[]): void {
  if (stages.length === 0) {
    throw new DomainError("A separator train has at least a stock tank", { input: "stages" });
  }
  stages.forEach(({ pressurePsia, temperatureDegF }, index) => {
    if (!(temperatureDegF > -DEGR_AT_ZERO_DEGF)) {
      throw new DomainError(`A stage is above absolute zero, not at ${temperatureDegF} degF`, {
        input: `stages.${index}.temperatureDegF`,
        value: temperatureDegF,
      });
    }
    const before = stages[index - 1]?.pressurePsia ?? Infinity;
    if (pressurePsia > before) {
      throw new DomainError(
        `Liquid flows from high pressure to low; ${pressurePsia} psia follows ${before} psia`,
        { input: `stages.${index}.pressurePsia`, value: pressurePsia },
      );
    }
  });
}

function mean(moleFractions: Float64Array, property: Float64Array): number {
  return moleFractions.reduce((sum, fraction, i) => sum + fraction * property[i], 0);
}

/**
 * Flashes a wellstream through separators, the liquid of each going to the next; the last stage is the stock tank. A
 * stock-tank barrel is measured at 14.696 psia and 60 degF, whatever the tank's temperature.
 *
 * @param flasher  of the mixture; its work arrays are used
 * @param z        mole fractions of the wellstream
 * @throws {DomainError} for stages or a feed that cannot be
 * @throws {ConvergenceError} when a flash does not reach equilibrium
 */
export function separate(
  flasher: Flasher,
  z: Float64Array,
  stages: readonly SeparatorStage[],
): Separation {
  checkStages(stages);
  const { mixture, equation } = flasher;
  const n = z.length;
  const surface = new Float64Array(n);
  let feed = new Float64Array(n);
  normaliseFeed(z, feed);
  let moles = 1;
  let gasMoles = 0;
  const splits = stages.map(({ pressurePsia, temperatureDegF }): StageSplit => {
    if (moles === 0) {
      const nothing = { gasMoles: 0, gas: null, liquidMoles: 0, liquid: null };
      return { pressurePsia, temperatureDegF, ...nothing };
    }
    const { vapour, liquid, vapourFraction } = flasher.flash(feed, {
      pressurePsia,
      temperatureDegR: degreesRankine(temperatureDegF),
    });
    const leaving = moles * vapourFraction;
    moles = liquid ? moles * (1 - vapourFraction) : 0;
    gasMoles += leaving;
    if (vapour) for (let i = 0; i < n; i += 1) surface[i] += leaving * vapour.moleFractions[i];
    if (liquid) feed = liquid.moleFractions.slice();
    return {
      pressurePsia,
      temperatureDegF,
      gasMoles: leaving,
      gas: vapour && {
        moleFractions: vapour.moleFractions,
        gravity: vapour.molecularWeight / AIR_MOLECULAR_WEIGHT,
      },
      liquidMoles: moles,
      liquid,
    };
  });
  const last = splits[splits.length - 1].liquid;
  for (let i = 0; i < n; i += 1) surface[i] /= gasMoles;
  const surfaceGas = {
    moleFractions: surface,
    gravity: mean(surface, mixture.molecularWeight) / AIR_MOLECULAR_WEIGHT,
  };
  return {
    stages: splits,
    gasMoles,
    surfaceGas: gasMoles > 0 ? surfaceGas : null,
    condensate: last && { moles, ...measure(last.moleFractions, moles) },
  };

  function measure(moleFractions: Float64Array, liquidMoles: number) {
    const molecularWeight = mean(moleFractions, mixture.molecularWeight);
    const volume = equation.liquidVolume(
      moleFractions,
      CANONICAL_BASE.pressurePsia,
      CANONICAL_BASE.temperatureDegR,
    );
    return {
      moleFractions,
      molecularWeight,
      specificGravity: molecularWeight / volume / POUNDS_PER_CUBIC_FOOT_OF_WATER,
      barrels: (liquidMoles * volume) / CUBIC_FEET_PER_BARREL,
    };
  }
}

/**
 * Flashes a wellstream through separators and reports it per stock-tank barrel.
 *
 * @param z       mole fractions of the wellstream
 * @param stages  in the direction of flow; the last one is the stock tank
 * @throws {DomainError} for stages or a feed that cannot be, and for a wellstream that leaves no liquid or gives no gas
 * @throws {ConvergenceError} when a flash does not reach equilibrium
 */
export function flashTrain(
  mixture: Mixture,
  z: Float64Array,
  stages: readonly SeparatorStage[],
): SeparatorTrain {
  const {
    stages: splits,
    gasMoles,
    surfaceGas,
    condensate,
  } = separate(new Flasher(mixture), z, stages);
  if (!condensate) {
    throw new DomainError("This wellstream leaves no liquid in the stock tank", {
      input: "stages",
    });
  }
  if (!surfaceGas) {
    throw new DomainError("This wellstream gives no gas in these separators", { input: "stages" });
  }
  const { molarVolumeScfPerLbmol } = CANONICAL_CONSTANTS;
  const scfPerStb = (lbmol: number) => (lbmol * molarVolumeScfPerLbmol) / condensate.barrels;
  const train = {
    stages: splits.map(({ gas, liquid, liquidMoles, ...stage }) => ({
      pressurePsia: stage.pressurePsia,
      temperatureDegF: stage.temperatureDegF,
      gasScfPerStb: scfPerStb(stage.gasMoles),
      gasGravity: gas && gas.gravity,
      gasMoleFractions: gas && gas.moleFractions,
      liquidVolumeFactor: liquid
        ? (liquidMoles * liquid.molarVolumeFt3PerLbmol) / CUBIC_FEET_PER_BARREL / condensate.barrels
        : 0,
      liquidMoleFractions: liquid ? liquid.moleFractions : condensate.moleFractions,
    })),
    condensateApi: 141.5 / condensate.specificGravity - 131.5,
    condensateSpecificGravity: condensate.specificGravity,
    condensateMolecularWeight: condensate.molecularWeight,
    condensateMoleFractions: condensate.moleFractions,
    totalGasScfPerStb: scfPerStb(gasMoles),
    surfaceGasMoleFractions: surfaceGas.moleFractions,
    surfaceGasGravity: surfaceGas.gravity,
    condensateYieldStbPerMmscf: 1e6 / scfPerStb(gasMoles),
    condensateYieldStbPerMmscfWellstream: (1e6 * condensate.barrels) / molarVolumeScfPerLbmol,
    surfaceGasFraction: gasMoles,
  };
  return { ...train, separatorTest: asSheet(train, mixture, z) };
}

function asSheet(
  train: Omit<SeparatorTrain, "separatorTest">,
  mixture: Mixture,
  z: Float64Array,
): SeparatorTest | null {
  const { stages } = train;
  const [first, second] = stages;
  const tank = stages[stages.length - 1];
  if (stages.length < 2 || stages.length > 3 || first.gasGravity === null) return null;
  const fractionOf = (name: string) => {
    const index = mixture.names.indexOf(name);
    return index < 0 ? 0 : z[index];
  };
  // A stage without gas has measured none, which a sheet can only say with a gravity beside it.
  const measured = ({ gasScfPerStb, gasGravity }: SeparatorTrain["stages"][number]) => ({
    gasOilRatioScfPerStb: gasScfPerStb,
    gasGravity: gasGravity ?? train.surfaceGasGravity,
  });
  const at = ({ pressurePsia, temperatureDegF }: SeparatorTrain["stages"][number]) => ({
    pressurePsia,
    temperatureDegF,
  });
  return {
    basePressurePsia: CANONICAL_BASE.pressurePsia,
    primarySeparator: { ...at(first), ...measured(first) },
    secondSeparator: stages.length === 3 ? { ...at(second), gas: measured(second) } : null,
    stockTankGas: measured(tank),
    condensateApi: train.condensateApi,
    condensateMolecularWeight: train.condensateMolecularWeight,
    nitrogen: fractionOf("N2"),
    carbonDioxide: fractionOf("CO2"),
    hydrogenSulphide: fractionOf("H2S"),
    dewPointPsia: null,
  };
}
