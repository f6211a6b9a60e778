/**
 * Standard conditions, and the constants of gas accounting that follow from them. None of these constants is written
 * down anywhere else: tables that print 379.4, 133,316 or 0.00502 mix bases.
 */
import { DomainError } from "../errors";
import {
  CUBIC_FEET_PER_BARREL,
  DEGR_AT_ZERO_DEGF,
  GAS_CONSTANT,
  PASCALS_PER_PSI,
} from "./conversions";

/** Molecular weight of dry air behind every gas gravity, lb/lbmol (GPA 2145 gives 28.9647 to 28.9625 by edition). */
export const AIR_MOLECULAR_WEIGHT = 28.9647;
/** Weight of one barrel of water at 60 degF, lb: 999.016 kg/m3 in a barrel of 0.158 987 m3 (common practice). */
export const WATER_POUNDS_PER_BARREL = 350.162;

export interface StandardConditions {
  /** short name for a basis strip or a column heading */
  readonly label: string;
  readonly pressurePsia: number;
  readonly temperatureDegR: number;
}

const SIXTY_DEGF_IN_DEGR = 60 + DEGR_AT_ZERO_DEGF;

const atSixtyDegF = (pressurePsia: number): StandardConditions => ({
  label: `${pressurePsia} psia, 60 °F`,
  pressurePsia,
  temperatureDegR: SIXTY_DEGF_IN_DEGR,
});

/** The bases in use: US engineering, older US reports, interstate pipelines, Louisiana, ISO 13443. */
export const standardConditions = {
  "14.65": atSixtyDegF(14.65),
  "14.696": atSixtyDegF(14.696),
  "14.73": atSixtyDegF(14.73),
  "15.025": atSixtyDegF(15.025),
  metric: {
    label: "101.325 kPa, 15 °C",
    pressurePsia: 101325 / PASCALS_PER_PSI,
    temperatureDegR: 288.15 * 1.8,
  },
} as const satisfies Readonly<Record<string, StandardConditions>>;

/** The base in which the engine keeps every gas volume. */
export const CANONICAL_BASE: StandardConditions = standardConditions["14.696"];

/**
 * A base at 60 degF and any pressure, for laboratory sheets that state their own.
 *
 * @param pressurePsia  12 to 16 psia: atmospheric pressures, not separator pressures
 * @throws {DomainError} outside that range
 */
export function baseAtPressure(pressurePsia: number): StandardConditions {
  if (!(pressurePsia >= 12 && pressurePsia <= 16)) {
    throw new DomainError(
      `A base pressure of ${pressurePsia} psia is not an atmospheric pressure; sheets use 14.65, 14.696, 14.73 or 15.025`,
      { input: "basePressurePsia", value: pressurePsia },
    );
  }
  return atSixtyDegF(pressurePsia);
}

export interface StandardConstants {
  /** Vm = R Tsc / psc, scf/lbmol: 379.4828 at 14.696 psia and 60 degF */
  readonly molarVolumeScfPerLbmol: number;
  /** Kv = 350.162 Vm; vapour equivalent of a liquid = Kv (specific gravity) / M, scf/STB */
  readonly vapourConstant: number;
  /** Kg = Kv / 28.9647; mass of a liquid as gas gravity x scf per STB and unit specific gravity */
  readonly gravityConstant: number;
  /** psc / Tsc, so that Bg = this x z T / p in cf/scf */
  readonly volumeFactorCfPerScf: number;
  /** the same in rb/scf */
  readonly volumeFactorRbPerScf: number;
}

/**
 * Constants that follow from the base: Vm = R Tsc/psc, Kv = 350.162 Vm, Kg = Kv/28.9647 and psc/Tsc.
 *
 * @example standardConstants(CANONICAL_BASE).molarVolumeScfPerLbmol // => 379.4828
 */
export function standardConstants(base: StandardConditions): StandardConstants {
  const molarVolumeScfPerLbmol = (GAS_CONSTANT * base.temperatureDegR) / base.pressurePsia;
  const vapourConstant = WATER_POUNDS_PER_BARREL * molarVolumeScfPerLbmol;
  const volumeFactorCfPerScf = base.pressurePsia / base.temperatureDegR;
  return {
    molarVolumeScfPerLbmol,
    vapourConstant,
    gravityConstant: vapourConstant / AIR_MOLECULAR_WEIGHT,
    volumeFactorCfPerScf,
    volumeFactorRbPerScf: volumeFactorCfPerScf / CUBIC_FEET_PER_BARREL,
  };
}

/** Constants of the canonical base, computed once. */
export const CANONICAL_CONSTANTS: StandardConstants = standardConstants(CANONICAL_BASE);

/**
 * Restates a gas volume, or a ratio with gas in its numerator, at another base: the same moles, ideal gas.
 *
 *     V2 = V1 (p1 / p2) (T2 / T1)
 *
 * @example convertGasVolume(1, standardConditions.metric, CANONICAL_BASE) // => 1.001925 (cubic feet to cubic feet)
 */
export function convertGasVolume(
  volume: number,
  from: StandardConditions,
  to: StandardConditions,
): number {
  return (
    (volume * (from.pressurePsia / to.pressurePsia) * to.temperatureDegR) / from.temperatureDegR
  );
}
