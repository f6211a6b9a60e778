import {
  CUBIC_METRES_PER_CUBIC_FOOT,
  KILOGRAMS_PER_POUND,
  PASCALS_PER_PSI,
  quantityOf,
  scaleToCanonical,
  type QuantityName,
} from "@/analytics/units/conversions";
import { CANONICAL_BASE } from "@/analytics/units/standard-conditions";

/** What a figure of a laboratory's sheet can be. The reader hands everything on in the first unit of its kind. */
export type UnitKind =
  | "pressure"
  | "temperature"
  | "percent"
  | "gasLiquidRatio"
  | "density"
  | "molecularWeight"
  | "viscosity"
  | "api"
  | "none";

export interface SheetUnit {
  /** as the page and the list of what was read write it */
  symbol: string;
  spellings: readonly string[];
  /** to the first unit of the kind */
  convert: (value: number) => number;
  /** what the conversion assumes, for the list of what was read */
  remark?: string;
}

const same = (value: number) => value;
const scaled = (factor: number) => (value: number) => value * factor;
const PSI_PER_BAR = 1e5 / PASCALS_PER_PSI;
const gauge = (factor: number) => (value: number) => value * factor + CANONICAL_BASE.pressurePsia;
const gaugeRemark = `gauge pressures were made absolute with an atmosphere of ${CANONICAL_BASE.pressurePsia} psi`;

/** The units of one quantity of `analytics/units`, spellings and factors included. */
function unitsOfQuantity(name: QuantityName, symbols?: readonly string[]): SheetUnit[] {
  return Object.entries(quantityOf(name).units)
    .filter(([symbol]) => symbols?.includes(symbol) ?? true)
    .map(([symbol, unit]) => ({
      symbol,
      spellings: [symbol, ...(unit.aliases ?? [])],
      convert: (value) => scaleToCanonical(value, unit),
    }));
}

const POUNDS_PER_CUBIC_FOOT_PER_KILOGRAM_PER_CUBIC_METRE =
  CUBIC_METRES_PER_CUBIC_FOOT / KILOGRAMS_PER_POUND;

const units: Record<UnitKind, readonly SheetUnit[]> = {
  pressure: [
    ...unitsOfQuantity("pressure"),
    { symbol: "psig", spellings: ["psig", "psi g"], convert: gauge(1), remark: gaugeRemark },
    { symbol: "barg", spellings: ["barg"], convert: gauge(PSI_PER_BAR), remark: gaugeRemark },
    {
      symbol: "kPag",
      spellings: ["kPag"],
      convert: gauge(PSI_PER_BAR / 100),
      remark: gaugeRemark,
    },
    { symbol: "MPag", spellings: ["MPag"], convert: gauge(PSI_PER_BAR * 10), remark: gaugeRemark },
  ],
  temperature: unitsOfQuantity("temperature"),
  percent: [
    {
      symbol: "%",
      spellings: [
        ...["%", "percent", "per cent", "pct"],
        ...["mol %", "mol percent", "mol per cent", "mole %", "mole percent", "mole per cent"],
        ...["vol %", "volume %", "volume percent", "% of volume", "% of volume at dew point"],
        ...["% of dew point volume", "% of original moles", "% of initial", "mol pct"],
      ],
      convert: same,
    },
    {
      symbol: "fraction",
      spellings: ["fraction", "mol fraction", "mole fraction", "volume fraction", "mol/mol", "v/v"],
      convert: scaled(100),
    },
  ],
  gasLiquidRatio: [
    ...unitsOfQuantity("gasOilRatio", ["scf/STB", "Mscf/STB"]),
    // A barrel of separator liquid or of the stock tank: the row says which, not the unit.
    { symbol: "scf/bbl", spellings: ["scf/sep bbl", "scf/sepbbl", "cf/bbl"], convert: same },
    ...unitsOfQuantity("gasOilRatio", ["Sm3/m3"]),
  ],
  density: [
    { symbol: "lb/ft3", spellings: ["lb/ft3", "lb/ft³", "lb/cuft", "lb/cu ft"], convert: same },
    {
      symbol: "kg/m3",
      spellings: ["kg/m3", "kg/m³"],
      convert: scaled(POUNDS_PER_CUBIC_FOOT_PER_KILOGRAM_PER_CUBIC_METRE),
    },
    {
      symbol: "g/cm3",
      spellings: ["g/cm3", "g/cm³", "g/cc", "g/ml", "kg/l"],
      convert: scaled(1000 * POUNDS_PER_CUBIC_FOOT_PER_KILOGRAM_PER_CUBIC_METRE),
    },
  ],
  molecularWeight: unitsOfQuantity("molecularWeight"),
  viscosity: [
    { symbol: "cP", spellings: ["cp", "cpoise", "centipoise", "mPa.s", "mPa s"], convert: same },
    { symbol: "uPa.s", spellings: ["uPa.s", "µPa.s", "μPa.s", "uPa s"], convert: scaled(1e-3) },
  ],
  api: [{ symbol: "degAPI", spellings: ["degAPI", "°API", "API", "deg API"], convert: same }],
  none: [
    {
      symbol: "1",
      spellings: ["1", "dimensionless", "ratio", "air=1", "air = 1", "water=1", "water = 1"],
      convert: same,
    },
  ],
};

const fold = (text: string) => text.toLowerCase().replace(/[\s_]+/g, "");

/** Folded once: a sheet has thousands of cells, and each is looked up several times. The first of two spellings wins. */
const foldedUnits: ReadonlyMap<UnitKind, ReadonlyMap<string, SheetUnit>> = new Map(
  (Object.keys(units) as UnitKind[]).map((kind) => [
    kind,
    new Map(
      units[kind]
        .flatMap((unit) => unit.spellings.map((spelling) => [fold(spelling), unit] as const))
        .reverse(),
    ),
  ]),
);

const everySpelling: ReadonlySet<string> = new Set(
  [...foldedUnits.values()].flatMap((spellings) => [...spellings.keys()]),
);
const LONGEST_SPELLING = Math.max(
  ...Object.values(units).flatMap((list) =>
    list.flatMap(({ spellings }) => spellings.map(({ length }) => length)),
  ),
);

/** Spaces beyond those of any spelling are not a way of writing it. */
const canBeUnit = (text: string) => text.length <= 2 * LONGEST_SPELLING;

/** @returns the unit that a text names, or null; case and spaces do not matter */
export function findUnit(text: string, kind: UnitKind): SheetUnit | null {
  return canBeUnit(text) ? (foldedUnits.get(kind)?.get(fold(text)) ?? null) : null;
}

/** Whether a text is a unit of anything: to tell a row of units from a row of names. */
export function isUnit(text: string): boolean {
  return canBeUnit(text) && everySpelling.has(fold(text));
}

/** The units that can be written for a kind, for a message or the template. */
export function unitSymbols(kind: UnitKind): string[] {
  return [...new Set(units[kind].map(({ symbol }) => symbol))];
}

/** The unit in which the reader hands a kind on. */
export function firstUnit(kind: UnitKind): SheetUnit {
  return units[kind][0];
}
