/**
 * Units of what people type and read. The engine works in the first unit of each quantity (its canonical unit);
 * conversion happens once, at the edge, with exact factors.
 *
 * Exact by definition: the foot (0.3048 m) and the pound (0.453 592 37 kg) of the international yard-pound agreement
 * of 1959, the US gallon (231 in3), the barrel (42 gal), the acre (43,560 ft2), standard gravity (9.806 65 m/s2) and
 * the molar gas constant (SI, 2019). Sm3 is a cubic metre at 15 degC and 101.325 kPa (ISO 13443); scf is a cubic foot
 * at 60 degF and 14.696 psia.
 */
import { DomainError } from "../errors";

export const METRES_PER_FOOT = 0.3048;
/** (0.3048 m)3, exact */
export const CUBIC_METRES_PER_CUBIC_FOOT = 0.028316846592;
/** 42 US gallons of 231 in3: 9,702 in3 over 1,728 in3/ft3, exact as a ratio */
export const CUBIC_FEET_PER_BARREL = 9702 / 1728;
/** 9,702 in3 of (0.0254 m)3 each, exact */
export const CUBIC_METRES_PER_BARREL = 0.158987294928;
export const SQUARE_FEET_PER_ACRE = 43560;
/** 43,560 x (0.3048 m)2, exact */
export const SQUARE_METRES_PER_ACRE = 4046.8564224;
/** 43,560 ft3 in barrels, 7,758.367... */
export const BARRELS_PER_ACRE_FOOT = SQUARE_FEET_PER_ACRE / CUBIC_FEET_PER_BARREL;
/** 0.453 592 37 kg x 9.806 65 m/s2 over (0.0254 m)2 */
export const PASCALS_PER_PSI = 6894.757293168361;
export const KILOGRAMS_PER_POUND = 0.45359237;
/** 0 degF on the Rankine scale */
export const DEGR_AT_ZERO_DEGF = 459.67;
/** 8.314 462 618 153 24 J/(mol K) in psia ft3/(lbmol degR), 10.731 577... */
export const GAS_CONSTANT =
  ((8.31446261815324 / (PASCALS_PER_PSI * CUBIC_METRES_PER_CUBIC_FOOT)) *
    (KILOGRAMS_PER_POUND * 1000)) /
  1.8;

/**
 * scf (14.696 psia, 60 degF) in one Sm3 (101.325 kPa, 15 degC), 35.3826: the ideal-gas ratio of the two states.
 */
export const SCF_PER_SM3 =
  (1 / CUBIC_METRES_PER_CUBIC_FOOT) *
  (101325 / (14.696 * PASCALS_PER_PSI)) *
  (519.67 / (288.15 * 1.8));

interface Unit {
  /** canonical = value x factor + offset */
  readonly factor: number;
  /** 1 / factor where that is the whole number: dividing by it is exact (35 % is 0.35), multiplying is not */
  readonly divisor?: number;
  readonly offset?: number;
  /** other spellings a person may type; case and spaces do not matter */
  readonly aliases?: readonly string[];
}

interface Quantity {
  /** as in "a pressure" */
  readonly noun: string;
  readonly field: string;
  readonly metric: string;
  /** smallest possible value, in the canonical unit */
  readonly minimum?: number;
  /** the first unit is the canonical one */
  readonly units: Readonly<Record<string, Unit>>;
}

const STB_PER_MMSCF_PER_METRIC_YIELD = (SCF_PER_SM3 * CUBIC_METRES_PER_BARREL) ** -1;
const SCF_PER_STB_PER_METRIC_RATIO = SCF_PER_SM3 * CUBIC_METRES_PER_BARREL;
const CUBIC_METRES_PER_ACRE_FOOT = SQUARE_METRES_PER_ACRE * METRES_PER_FOOT;

/** Every quantity with its units; `field` and `metric` name the unit each display system uses. */
export const quantities = {
  pressure: {
    noun: "a pressure",
    field: "psia",
    metric: "bar",
    minimum: 0,
    units: {
      psia: { factor: 1, aliases: ["psi"] },
      bar: { factor: 1e5 / PASCALS_PER_PSI, aliases: ["bara"] },
      kPa: { factor: 1e3 / PASCALS_PER_PSI, aliases: ["kPaa"] },
      MPa: { factor: 1e6 / PASCALS_PER_PSI, aliases: ["MPaa"] },
      Pa: { factor: 1 / PASCALS_PER_PSI },
      atm: { factor: 101325 / PASCALS_PER_PSI },
    },
  },
  temperature: {
    noun: "a temperature",
    field: "degF",
    metric: "degC",
    minimum: -DEGR_AT_ZERO_DEGF,
    units: {
      degF: { factor: 1, aliases: ["°F", "F", "deg F"] },
      degC: { factor: 1.8, offset: 32, aliases: ["°C", "C", "deg C"] },
      degR: { factor: 1, offset: -DEGR_AT_ZERO_DEGF, aliases: ["°R", "R"] },
      K: { factor: 1.8, offset: -DEGR_AT_ZERO_DEGF, aliases: ["kelvin"] },
    },
  },
  area: {
    noun: "an area",
    field: "acre",
    metric: "km2",
    minimum: 0,
    units: {
      acre: { factor: 1, aliases: ["acres", "ac"] },
      km2: { factor: 1e6 / SQUARE_METRES_PER_ACRE, aliases: ["km²", "sq km"] },
      ha: { factor: 1e4 / SQUARE_METRES_PER_ACRE, aliases: ["hectare", "hectares"] },
      m2: { factor: 1 / SQUARE_METRES_PER_ACRE, aliases: ["m²"] },
      ft2: { factor: 1 / SQUARE_FEET_PER_ACRE, aliases: ["ft²", "sq ft"] },
      mi2: { factor: 640, aliases: ["mi²", "sq mi", "section", "sections"] },
    },
  },
  length: {
    noun: "a length",
    field: "ft",
    metric: "m",
    minimum: 0,
    units: {
      ft: { factor: 1, aliases: ["feet", "foot"] },
      m: { factor: 1 / METRES_PER_FOOT, aliases: ["metre", "metres", "meter", "meters"] },
      km: { factor: 1000 / METRES_PER_FOOT },
    },
  },
  gasVolume: {
    noun: "a gas volume",
    field: "Bscf",
    metric: "1e9 Sm3",
    minimum: 0,
    units: {
      scf: { factor: 1, aliases: ["cf"] },
      Mscf: { factor: 1e3, aliases: ["Mcf"] },
      MMscf: { factor: 1e6, aliases: ["MMcf"] },
      Bscf: { factor: 1e9, aliases: ["Bcf"] },
      Tscf: { factor: 1e12, aliases: ["Tcf"] },
      Sm3: { factor: SCF_PER_SM3, aliases: ["Sm³"] },
      "1e6 Sm3": { factor: 1e6 * SCF_PER_SM3, aliases: ["10⁶ Sm³", "million Sm3"] },
      "1e9 Sm3": { factor: 1e9 * SCF_PER_SM3, aliases: ["10⁹ Sm³", "billion Sm3"] },
    },
  },
  gasRate: {
    noun: "a gas rate",
    field: "MMscf/d",
    metric: "1e3 Sm3/d",
    minimum: 0,
    units: {
      "scf/d": { factor: 1 },
      "Mscf/d": { factor: 1e3, aliases: ["Mcf/d"] },
      "MMscf/d": { factor: 1e6, aliases: ["MMcf/d"] },
      "Sm3/d": { factor: SCF_PER_SM3, aliases: ["Sm³/d"] },
      "1e3 Sm3/d": { factor: 1e3 * SCF_PER_SM3, aliases: ["10³ Sm³/d"] },
      "1e6 Sm3/d": { factor: 1e6 * SCF_PER_SM3, aliases: ["10⁶ Sm³/d"] },
    },
  },
  liquidVolume: {
    noun: "a liquid volume",
    field: "MMSTB",
    metric: "1e6 m3",
    minimum: 0,
    units: {
      STB: { factor: 1, aliases: ["bbl", "barrels"] },
      MSTB: { factor: 1e3, aliases: ["Mbbl"] },
      MMSTB: { factor: 1e6, aliases: ["MMbbl"] },
      m3: { factor: 1 / CUBIC_METRES_PER_BARREL, aliases: ["m³", "Sm3"] },
      "1e3 m3": { factor: 1e3 / CUBIC_METRES_PER_BARREL, aliases: ["10³ m³"] },
      "1e6 m3": { factor: 1e6 / CUBIC_METRES_PER_BARREL, aliases: ["10⁶ m³"] },
    },
  },
  liquidRate: {
    noun: "a liquid rate",
    field: "STB/d",
    metric: "m3/d",
    minimum: 0,
    units: {
      "STB/d": { factor: 1, aliases: ["bbl/d", "bpd"] },
      "m3/d": { factor: 1 / CUBIC_METRES_PER_BARREL, aliases: ["m³/d", "Sm3/d"] },
    },
  },
  gasOilRatio: {
    noun: "a gas-oil ratio",
    field: "scf/STB",
    metric: "Sm3/m3",
    minimum: 0,
    units: {
      "scf/STB": { factor: 1, aliases: ["scf/bbl", "cf/bbl"] },
      "Mscf/STB": { factor: 1e3, aliases: ["Mcf/bbl"] },
      "Sm3/m3": { factor: SCF_PER_STB_PER_METRIC_RATIO, aliases: ["Sm³/m³", "m3/m3", "Sm3/Sm3"] },
    },
  },
  condensateYield: {
    noun: "a condensate yield",
    field: "STB/MMscf",
    metric: "m3/1e6 Sm3",
    minimum: 0,
    units: {
      "STB/MMscf": { factor: 1, aliases: ["bbl/MMscf", "bbl/MMcf"] },
      "STB/Mscf": { factor: 1e3, aliases: ["bbl/Mscf"] },
      "m3/1e6 Sm3": {
        factor: STB_PER_MMSCF_PER_METRIC_YIELD,
        aliases: ["m³/10⁶ Sm³", "cm3/Sm3", "Sm3/1e6 Sm3"],
      },
    },
  },
  gasPerRockVolume: {
    noun: "gas per rock volume",
    field: "Mscf/acre-ft",
    metric: "Sm3/m3",
    minimum: 0,
    units: {
      "scf/acre-ft": { factor: 1 },
      "Mscf/acre-ft": { factor: 1e3 },
      "Sm3/m3": { factor: CUBIC_METRES_PER_ACRE_FOOT * SCF_PER_SM3, aliases: ["Sm³/m³"] },
    },
  },
  liquidPerRockVolume: {
    noun: "liquid per rock volume",
    field: "STB/acre-ft",
    metric: "m3/ha·m",
    minimum: 0,
    units: {
      "STB/acre-ft": { factor: 1 },
      "m3/ha·m": {
        factor: CUBIC_METRES_PER_ACRE_FOOT / 1e4 / CUBIC_METRES_PER_BARREL,
        aliases: ["m3/ha-m", "m³/ha·m"],
      },
    },
  },
  molecularWeight: {
    noun: "a molecular weight",
    field: "lb/lbmol",
    metric: "g/mol",
    minimum: 0,
    units: {
      "lb/lbmol": { factor: 1 },
      "g/mol": { factor: 1, aliases: ["kg/kmol"] },
    },
  },
  fraction: {
    noun: "a fraction",
    field: "fraction",
    metric: "fraction",
    minimum: 0,
    units: {
      fraction: { factor: 1, aliases: ["v/v"] },
      "%": { factor: 0.01, divisor: 100, aliases: ["percent", "mol %", "pu"] },
      ppm: { factor: 1e-6, divisor: 1e6, aliases: ["ppmv"] },
    },
  },
} as const satisfies Readonly<Record<string, Quantity>>;

export type QuantityName = keyof typeof quantities;
export type UnitSystem = "field" | "metric";
/** Symbols of the units of one quantity (of any of them, when Q is a union). */
export type UnitSymbol<Q extends QuantityName> = Q extends QuantityName
  ? keyof (typeof quantities)[Q]["units"] & string
  : never;

/** The entry of `quantities` with its literal types widened, for code that treats quantities alike. */
export function quantityOf(name: QuantityName): Quantity {
  return quantities[name];
}

function unitOf(name: QuantityName, symbol: string): Unit {
  const { units, noun } = quantityOf(name);
  if (!Object.hasOwn(units, symbol)) {
    throw new DomainError(
      `“${symbol}” is not a unit of ${noun.replace(/^an? /, "")}; use ${Object.keys(units).join(", ")}`,
      { input: "unit" },
    );
  }
  return units[symbol];
}

/** The unit in which the engine keeps a quantity: the first of its units. */
export function canonicalUnit(name: QuantityName): string {
  return Object.keys(quantities[name].units)[0];
}

/** The unit in which a display system shows a quantity. */
export function displayUnit(name: QuantityName, system: UnitSystem): string {
  return quantities[name][system];
}

/**
 * Converts a value to the engine's unit: value x factor + offset.
 *
 * @throws {DomainError} when the unit does not belong to the quantity
 * @example toCanonical(38, "pressure", "bar") // => 551.1434
 */
export function toCanonical<Q extends QuantityName>(
  value: number,
  quantity: Q,
  unit: UnitSymbol<Q>,
): number {
  return scaleToCanonical(value, unitOf(quantity, unit));
}

/** `toCanonical` for a unit that has been found already. */
export function scaleToCanonical(value: number, { factor, divisor, offset = 0 }: Unit): number {
  return (divisor === undefined ? value * factor : value / divisor) + offset;
}

/**
 * Converts a value from the engine's unit, the inverse of `toCanonical`.
 *
 * @throws {DomainError} when the unit does not belong to the quantity
 * @example fromCanonical(1, "condensateYield", "m3/1e6 Sm3") // => 5.62539
 */
export function fromCanonical<Q extends QuantityName>(
  value: number,
  quantity: Q,
  unit: UnitSymbol<Q>,
): number {
  const { factor, offset = 0 } = unitOf(quantity, unit);
  return (value - offset) / factor;
}

/**
 * Converts between two units of one quantity.
 *
 * @throws {DomainError} when a unit does not belong to the quantity
 * @example convert(15, "temperature", "degC", "degF") // => 59
 */
export function convert<Q extends QuantityName>(
  value: number,
  quantity: Q,
  from: UnitSymbol<Q>,
  to: UnitSymbol<Q>,
): number {
  return from === to ? value : fromCanonical(toCanonical(value, quantity, from), quantity, to);
}

/**
 * degF to degR, the absolute temperature of the gas correlations.
 *
 * @example degreesRankine(60) // => 519.67
 */
export function degreesRankine(temperatureDegF: number): number {
  return temperatureDegF + DEGR_AT_ZERO_DEGF;
}
