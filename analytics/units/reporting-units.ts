/**
 * The units in which a portfolio is reported. They are fixed, not chosen by size, so that two pages, two files and two
 * years always compare figure by figure.
 */
import {
  CUBIC_METRES_PER_BARREL,
  CUBIC_METRES_PER_CUBIC_FOOT,
  type UnitSystem,
} from "./conversions";
import { CANONICAL_BASE, convertGasVolume, standardConditions } from "./standard-conditions";

/** Standard conditions by the name a basis gives them: a pressure at 60 degF, or `metric` (ISO 13443). */
export type BaseName = keyof typeof standardConditions;

export interface ReportingUnit {
  /** for people: `Bscf` */
  unit: string;
  /** for names of columns in a file: `bscf` */
  suffix: string;
  /** value in this unit = canonical value x factor */
  factor: number;
}

export interface ReportingUnits {
  gas: ReportingUnit;
  condensate: ReportingUnit;
  condensateYield: ReportingUnit;
  /** for people: `14.696 psia, 60 °F` */
  standardConditions: string;
}

/**
 * Units of gas, condensate and yield for a unit system, with gas restated at the standard conditions (same moles, ideal
 * gas).
 *
 * Sm3 means 101.325 kPa and 15 degC (ISO 13443) and nothing else; a cubic metre at another base is written m3.
 *
 * @returns factors from scf (14.696 psia, 60 degF), STB and STB/MMscf
 * @example reportingUnits("field", "14.65").gas.factor // => 1.00314e-9
 */
export function reportingUnits(system: UnitSystem, base: BaseName): ReportingUnits {
  const conditions = standardConditions[base];
  const gasAtBase = convertGasVolume(1, CANONICAL_BASE, conditions);
  if (system === "field") {
    return {
      gas: { unit: "Bscf", suffix: "bscf", factor: gasAtBase / 1e9 },
      condensate: { unit: "MMSTB", suffix: "mmstb", factor: 1e-6 },
      condensateYield: {
        unit: "STB/MMscf",
        suffix: "stb_per_mmscf",
        factor: 1 / gasAtBase,
      },
      standardConditions: conditions.label,
    };
  }
  const cubicMetresPerScf = gasAtBase * CUBIC_METRES_PER_CUBIC_FOOT;
  const symbol = base === "metric" ? "Sm³" : "m³";
  const name = base === "metric" ? "sm3" : "m3";
  return {
    gas: { unit: `10⁹ ${symbol}`, suffix: `billion_${name}`, factor: cubicMetresPerScf / 1e9 },
    condensate: { unit: "10⁶ m³", suffix: "million_m3", factor: CUBIC_METRES_PER_BARREL / 1e6 },
    condensateYield: {
      unit: `m³/10⁶ ${symbol}`,
      suffix: `m3_per_million_${name}`,
      factor: CUBIC_METRES_PER_BARREL / cubicMetresPerScf,
    },
    standardConditions: conditions.label,
  };
}
