/**
 * The wellstream (what the reservoir holds) from a separator test (what the surface sees): an exact balance of moles
 * and mass, and the constants with which a simulation follows it as the condensate yield varies.
 */
import { DomainError } from "../errors";
import {
  baseAtPressure,
  CANONICAL_BASE,
  CANONICAL_CONSTANTS,
  convertGasVolume,
} from "../units/standard-conditions";
import type { Warning } from "../warnings";
import { acidGasWarnings } from "./acid-gas";
import {
  condensateMolecularWeight,
  molecularWeightWarnings,
  specificGravityFromApi,
} from "./condensate-molecular-weight";
import { fluidTypeFromGasOilRatio, type FluidType } from "./fluid-type";
import {
  GOLD_BASE_PRESSURE_PSIA,
  goldThreeStage,
  goldTwoStage,
  type GoldEstimate,
} from "./gold-mccain-jennings";
import { checkFluidValue, checkSeparatorTest } from "./separator-test-checks";
import type { SeparatorTest } from "./separator-test-schema";

/** Gas volumes in scf at 14.696 psia and 60 degF, whatever the base of the sheet. */
export interface Wellstream {
  /** gas of the first separator alone, scf/STB */
  readonly primarySeparatorGasOilRatioScfPerStb: number;
  /** gas of all stages, estimated gas included, scf/STB */
  readonly surfaceGasOilRatioScfPerStb: number;
  /** of all surface gas, air = 1 */
  readonly surfaceGasGravity: number;
  readonly condensateSpecificGravity: number;
  readonly condensateMolecularWeight: number;
  /** gas that one stock-tank barrel would be, scf/STB */
  readonly vapourEquivalentScfPerStb: number;
  /** wellstream that gives one stock-tank barrel, scf/STB */
  readonly wellstreamScfPerStb: number;
  readonly wellstreamGravity: number;
  /** scf of surface gas per scf of wellstream */
  readonly dryGasFraction: number;
  /** STB per million scf of surface gas */
  readonly condensateYieldStbPerMmscf: number;
  /** STB per million scf of wellstream */
  readonly condensateYieldStbPerMmscfWellstream: number;
  /** gas of unmeasured stages as estimated, scf/STB; `null` when every stage was measured */
  readonly unmeasuredVapourScfPerStb: number | null;
  readonly fluidType: FluidType;
  readonly warnings: Warning[];
}

interface GasTotals {
  volume: number;
  /** volume times gravity */
  mass: number;
}

const GOLD_TO_CANONICAL = GOLD_BASE_PRESSURE_PSIA / CANONICAL_BASE.pressurePsia;

function estimate(test: SeparatorTest): GoldEstimate {
  const { primarySeparator: first, secondSeparator: second } = test;
  const input = {
    primarySeparatorPressurePsia: first.pressurePsia,
    primarySeparatorTemperatureDegF: first.temperatureDegF,
    primarySeparatorGasGravity: first.gasGravity,
    condensateApi: test.condensateApi,
  };
  return second
    ? goldThreeStage({ ...input, secondSeparatorTemperatureDegF: second.temperatureDegF })
    : goldTwoStage(input);
}

/**
 * The gas of stages that were not measured: the correlation gives everything after the first separator, condensate
 * included, so what was measured of it and the vapour equivalent of the condensate come off.
 */
function unmeasuredGas(
  test: SeparatorTest,
  measuredAfterFirst: GasTotals,
  vapourEquivalentScfPerStb: number,
): { gas: GasTotals; warnings: Warning[] } {
  const gold = estimate(test);
  const whole = gold.vapourEquivalentScfPerStb * GOLD_TO_CANONICAL;
  const volume = whole - measuredAfterFirst.volume - vapourEquivalentScfPerStb;
  const mass = gold.additionalGasScfPerStb * GOLD_TO_CANONICAL - measuredAfterFirst.mass;
  const warnings = [...gold.warnings];
  if (volume < 0 || mass < 0) {
    warnings.push({
      code: "unmeasured_gas_not_resolved",
      severity: "warning",
      input: "fluid.stockTankGas",
      message:
        (volume < 0
          ? `The correlation gives ${Math.round(whole)} scf/STB for everything after the first separator, but the ` +
            `condensate alone is ${Math.round(vapourEquivalentScfPerStb)} scf/STB and the measured stages ` +
            `${Math.round(measuredAfterFirst.volume)} scf/STB.`
          : "The stages measured after the first separator weigh more than the correlation gives all of them.") +
        " The unmeasured gas counts as nil; measure it.",
    });
    return { gas: { volume: 0, mass: 0 }, warnings };
  }
  const gravity = mass / volume;
  if (!(gravity >= 0.55 && gravity <= 3)) {
    warnings.push({
      code: "unmeasured_gas_implausible_gravity",
      severity: "warning",
      input: "fluid.stockTankGas",
      message:
        `The unmeasured gas is estimated at ${Number(volume.toPrecision(3))} scf/STB, with the weight of a gas of gravity ` +
        `${gravity < 100 ? gravity.toFixed(2) : "above 100"}, which no gas has. Measure the stock-tank gas.`,
    });
  }
  return { gas: { volume, mass }, warnings };
}

/**
 * Recombines a two- or three-stage separator test into the wellstream. Per stock-tank barrel, with stage gases R and
 * g, specific gravity go and molecular weight Mo of the condensate:
 *
 *     Veq = Kv go / Mo                                   Kv = 350.162 Vm
 *     wellstream = sum R + Veq                           fg = sum R / (sum R + Veq)
 *     gravity = (sum R g + Kg go) / (sum R + Veq)        Kg = Kv / 28.9647
 *
 * Exact where every stage was measured. Where the stock-tank gas (or that of a second separator) was not, the
 * correlation of Gold, McCain and Jennings estimates it: its Veq is all gas after the first separator plus the vapour
 * equivalent of the condensate, its Gpa the same gas times its gravity. Should that leave less than nothing, the
 * unmeasured gas counts as nil and a warning says so.
 *
 * @returns  gas volumes at 14.696 psia and 60 degF
 * @throws {DomainError} when a value is impossible, or the fluid is an oil (yield above 400 STB/MMscf)
 * @example recombine({ basePressurePsia: 14.696, primarySeparator: { pressurePsia: 514.696, temperatureDegF: 80,
 *   gasOilRatioScfPerStb: 12000, gasGravity: 0.68 }, secondSeparator: null,
 *   stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 1.15 }, condensateApi: 56,
 *   condensateMolecularWeight: null, nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0, dewPointPsia: null })
 *   .wellstreamGravity // => 0.914422
 * @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 7; D. K. Gold, W. D. McCain,
 *   J. W. Jennings, J. Pet. Technol. 41 (July 1989) 747-752
 */
export function recombine(test: SeparatorTest): Wellstream {
  const warnings = checkSeparatorTest(test);
  const base = baseAtPressure(test.basePressurePsia);
  const canonical = (gasOilRatio: number) => convertGasVolume(gasOilRatio, base, CANONICAL_BASE);

  const condensateSpecificGravity = specificGravityFromApi(test.condensateApi);
  const molecularWeight =
    test.condensateMolecularWeight ?? condensateMolecularWeight(test.condensateApi);
  if (test.condensateMolecularWeight === null) {
    warnings.push(...molecularWeightWarnings(test.condensateApi));
  }
  const vapourEquivalentScfPerStb =
    (CANONICAL_CONSTANTS.vapourConstant * condensateSpecificGravity) / molecularWeight;

  const primary = canonical(test.primarySeparator.gasOilRatioScfPerStb);
  const afterFirst: GasTotals = { volume: 0, mass: 0 };
  for (const gas of [test.secondSeparator?.gas, test.stockTankGas]) {
    if (!gas) continue;
    const volume = canonical(gas.gasOilRatioScfPerStb);
    afterFirst.volume += volume;
    afterFirst.mass += volume * gas.gasGravity;
  }

  const secondUnmeasured = test.secondSeparator !== null && test.secondSeparator.gas === null;
  let unmeasuredVapourScfPerStb: number | null = null;
  if (test.stockTankGas === null || secondUnmeasured) {
    const estimated = unmeasuredGas(test, afterFirst, vapourEquivalentScfPerStb);
    unmeasuredVapourScfPerStb = estimated.gas.volume;
    afterFirst.volume += estimated.gas.volume;
    afterFirst.mass += estimated.gas.mass;
    warnings.push(...estimated.warnings);
  }

  const surfaceGas = primary + afterFirst.volume;
  const surfaceGasMass = primary * test.primarySeparator.gasGravity + afterFirst.mass;
  const wellstreamScfPerStb = surfaceGas + vapourEquivalentScfPerStb;
  const wellstreamGravity =
    (surfaceGasMass + CANONICAL_CONSTANTS.gravityConstant * condensateSpecificGravity) /
    wellstreamScfPerStb;
  const condensateYieldStbPerMmscf = 1e6 / surfaceGas;

  warnings.push(
    ...checkFluidValue(
      "yield",
      condensateYieldStbPerMmscf,
      "primarySeparator.gasOilRatioScfPerStb",
    ),
    ...checkFluidValue("wellstreamGravity", wellstreamGravity, "primarySeparator.gasGravity"),
    ...fluidTypeWarnings(surfaceGas),
    ...acidGasWarnings(
      test.hydrogenSulphide,
      test.carbonDioxide,
      test.primarySeparator.pressurePsia,
      "at the first separator's pressure",
    ),
  );

  return {
    primarySeparatorGasOilRatioScfPerStb: primary,
    surfaceGasOilRatioScfPerStb: surfaceGas,
    surfaceGasGravity: surfaceGasMass / surfaceGas,
    condensateSpecificGravity,
    condensateMolecularWeight: molecularWeight,
    vapourEquivalentScfPerStb,
    wellstreamScfPerStb,
    wellstreamGravity,
    dryGasFraction: surfaceGas / wellstreamScfPerStb,
    condensateYieldStbPerMmscf,
    condensateYieldStbPerMmscfWellstream: 1e6 / wellstreamScfPerStb,
    unmeasuredVapourScfPerStb,
    fluidType: fluidTypeFromGasOilRatio(surfaceGas),
    warnings,
  };
}

function fluidTypeWarnings(surfaceGasOilRatioScfPerStb: number): Warning[] {
  const type = fluidTypeFromGasOilRatio(surfaceGasOilRatioScfPerStb);
  const ratio = `${Math.round(surfaceGasOilRatioScfPerStb).toLocaleString("en-GB")} scf/STB`;
  if (type !== "volatile-oil" && type !== "near-critical") return [];
  return [
    {
      code: type === "volatile-oil" ? "probably_oil" : "near_critical",
      severity: "warning",
      input: "fluid.primarySeparator.gasOilRatioScfPerStb",
      message:
        type === "volatile-oil"
          ? `At ${ratio} the fluid is probably a volatile oil; below 3,300 a gas-condensate estimate misleads.`
          : `At ${ratio} the fluid is close to its critical point, where small changes in pressure move much liquid; ` +
            "have it studied in the laboratory.",
    },
  ];
}

/** What stays fixed while a simulation varies the condensate yield: the gas and the liquid as the test found them. */
export interface YieldConstants {
  readonly surfaceGasGravity: number;
  readonly vapourEquivalentScfPerStb: number;
  /** Kg go: mass of a stock-tank barrel as gas gravity x scf/STB */
  readonly condensateMassScfPerStb: number;
}

/**
 * Constants of `dryGasFractionAtYield` and `wellstreamGravityAtYield` for one fluid.
 *
 * @throws {DomainError} when the wellstream's numbers are not positive
 */
export function yieldConstants(
  wellstream: Pick<
    Wellstream,
    "surfaceGasGravity" | "vapourEquivalentScfPerStb" | "condensateSpecificGravity"
  >,
): YieldConstants {
  const { surfaceGasGravity, vapourEquivalentScfPerStb, condensateSpecificGravity } = wellstream;
  for (const [input, value] of Object.entries({
    surfaceGasGravity,
    vapourEquivalentScfPerStb,
    condensateSpecificGravity,
  })) {
    if (!(value > 0 && value < Infinity)) {
      throw new DomainError(`${input} is above zero, not ${value}`, { input, value });
    }
  }
  return {
    surfaceGasGravity,
    vapourEquivalentScfPerStb,
    condensateMassScfPerStb: CANONICAL_CONSTANTS.gravityConstant * condensateSpecificGravity,
  };
}

/**
 * Surface gas in a scf of wellstream, for loops over trials: fg = 1 / (1 + Veq Y / 1e6). No checks, no allocation.
 *
 * @param condensateYieldStbPerMmscf  STB per million scf of surface gas; 0 is a dry gas
 */
export function dryGasFractionAtYield(
  condensateYieldStbPerMmscf: number,
  constants: YieldConstants,
): number {
  return 1 / (1 + condensateYieldStbPerMmscf * 1e-6 * constants.vapourEquivalentScfPerStb);
}

/**
 * Gravity of the wellstream, for loops over trials: (gs + Kg go Y / 1e6) / (1 + Veq Y / 1e6). No checks, no
 * allocation.
 *
 * @param condensateYieldStbPerMmscf  STB per million scf of surface gas; 0 is a dry gas
 */
export function wellstreamGravityAtYield(
  condensateYieldStbPerMmscf: number,
  constants: YieldConstants,
): number {
  const barrels = condensateYieldStbPerMmscf * 1e-6;
  return (
    (constants.surfaceGasGravity + barrels * constants.condensateMassScfPerStb) /
    (1 + barrels * constants.vapourEquivalentScfPerStb)
  );
}
