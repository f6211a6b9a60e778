import {
  quantities,
  fromCanonical,
  quantityOf,
  toCanonical,
  type QuantityName,
  type UnitSymbol,
} from "@/analytics/units/conversions";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";

/**
 * The columns of the reservoir import: their names, units and meaning. Template, reader and the list on the screen all
 * come from here, so that they cannot drift apart.
 */

/** Shapes a range can take, as the sheet names them. Low and high are P90 and P10, or the ends, as `shapeMeanings` says. */
export const shapes = ["constant", "uniform", "triangular", "pert", "normal", "lognormal"] as const;
export type Shape = (typeof shapes)[number];

export const shapeMeanings: Record<Shape, string> = {
  constant: "best only",
  uniform: "low and high are the ends; best stays blank",
  triangular: "low and high are the ends, best the most likely value",
  pert: "low and high are the ends, best the most likely value",
  normal: "low is P90, high is P10; best stays blank or is their mean",
  lognormal: "low is P90, high is P10; best stays blank or is their geometric mean",
};

/** One of the ten uncertain inputs as the sheet sees it. */
export interface RangeColumns {
  input: InputName;
  /** stem of its five columns: `area_low`, `area_best`, `area_high`, `area_shape`, `area_source` */
  stem: string;
  label: string;
  quantity: QuantityName;
  /** what a blank shape means when low and high are given */
  defaultShape: Shape;
  /** the figures of the template's two example rows, in the engine's unit: low, best, high */
  examples: [ExampleRange, ExampleRange];
}

type ExampleRange = [low: number | null, best: number | null, high: number | null];

export const rangeColumns: readonly RangeColumns[] = [
  {
    input: "areaAcres",
    stem: "area",
    label: "Area",
    quantity: "area",
    defaultShape: "lognormal",
    examples: [
      [1520, null, 3350],
      [640, null, 2100],
    ],
  },
  {
    input: "netThicknessFt",
    stem: "net_thickness",
    label: "Net thickness",
    quantity: "length",
    defaultShape: "lognormal",
    examples: [
      [86, null, 160],
      [34, null, 88],
    ],
  },
  {
    input: "porosity",
    stem: "porosity",
    label: "Porosity",
    quantity: "fraction",
    defaultShape: "normal",
    examples: [
      [0.15, null, 0.2],
      [0.11, null, 0.16],
    ],
  },
  {
    input: "waterSaturation",
    stem: "water_saturation",
    label: "Water saturation",
    quantity: "fraction",
    defaultShape: "normal",
    examples: [
      [0.29, null, 0.41],
      [0.22, null, 0.38],
    ],
  },
  {
    input: "pressurePsia",
    stem: "pressure",
    label: "Initial reservoir pressure",
    quantity: "pressure",
    defaultShape: "normal",
    examples: [
      [4120, null, 4265],
      [null, 6350, null],
    ],
  },
  {
    input: "temperatureDegF",
    stem: "temperature",
    label: "Reservoir temperature",
    quantity: "temperature",
    defaultShape: "normal",
    examples: [
      [226, null, 236],
      [null, 258, null],
    ],
  },
  {
    input: "condensateYieldStbPerMmscf",
    stem: "condensate_yield",
    label: "Condensate yield of the total surface gas",
    quantity: "condensateYield",
    defaultShape: "lognormal",
    examples: [
      [150, null, 182],
      [null, null, null],
    ],
  },
  {
    input: "gasRecovery",
    stem: "gas_recovery",
    label: "Recovery of the dry gas in place",
    quantity: "fraction",
    defaultShape: "pert",
    examples: [
      [0.68, 0.76, 0.83],
      [0.6, 0.72, 0.8],
    ],
  },
  {
    input: "condensateRecovery",
    stem: "condensate_recovery",
    label: "Recovery of the condensate in place",
    quantity: "fraction",
    defaultShape: "pert",
    examples: [
      [0.28, 0.37, 0.46],
      [0.35, 0.45, 0.55],
    ],
  },
  {
    input: "salesGasFraction",
    stem: "sales_gas_fraction",
    label: "Sales gas left after fuel, flare and shrinkage",
    quantity: "fraction",
    defaultShape: "pert",
    examples: [
      [0.9, 0.93, 0.95],
      [null, 0.94, null],
    ],
  },
];

/** What a cell holds. A `number` column has a unit in row 2; the others have none. */
export type ColumnKind = "text" | "choice" | "date" | "number";

export interface Column {
  name: string;
  kind: ColumnKind;
  meaning: string;
  /** `always`: no row without it; `new field`: may stay blank where the field is in the book already */
  needed: "always" | "new field" | "optional";
  /** units row 2 may name, the template's first; empty for a column without unit */
  units: readonly string[];
  quantity?: QuantityName | "apiGravity" | "gasGravity";
  choices?: readonly string[];
  examples: readonly [string, string];
}

const text = (
  name: string,
  needed: Column["needed"],
  meaning: string,
  examples: readonly [string, string],
): Column => ({ name, kind: "text", needed, meaning, units: [], examples });

const number = (
  name: string,
  quantity: NonNullable<Column["quantity"]>,
  needed: Column["needed"],
  meaning: string,
  examples: readonly [string, string],
): Column => ({
  name,
  kind: "number",
  quantity,
  needed,
  meaning,
  units: unitsOf(quantity),
  examples,
});

/** Units that row 2 may name for a quantity, the one of the template first. */
export function unitsOf(quantity: NonNullable<Column["quantity"]>): readonly string[] {
  if (quantity === "apiGravity") return ["degAPI", "sg"];
  if (quantity === "gasGravity") return ["air=1"];
  return Object.keys(quantities[quantity].units);
}

const exampleText = (value: number | null): string => (value === null ? "" : String(value));

function columnsOfRange(range: RangeColumns): Column[] {
  const [first, second] = range.examples;
  const side = (suffix: string, at: 0 | 1 | 2, meaning: string): Column =>
    number(`${range.stem}_${suffix}`, range.quantity, "optional", meaning, [
      exampleText(first[at]),
      exampleText(second[at]),
    ]);
  return [
    side("low", 0, `${range.label}, low`),
    side("best", 1, `${range.label}, best`),
    side("high", 2, `${range.label}, high`),
    {
      name: `${range.stem}_shape`,
      kind: "choice",
      needed: "optional",
      meaning: `${range.label}, shape of the range; blank is ${range.defaultShape}, or constant when only best is given`,
      units: [],
      choices: shapes,
      examples: ["", ""],
    },
    text(`${range.stem}_source`, "optional", `${range.label}, where the range comes from`, [
      "",
      "",
    ]),
  ];
}

export const prmsClassNames = ["reserves", "contingent", "prospective"] as const;

const subClassNames = [
  "on_production",
  "approved_for_development",
  "justified_for_development",
  "development_pending",
  "development_on_hold",
  "development_unclarified",
  "development_not_viable",
  "prospect",
  "lead",
  "play",
] as const;

/** Every column of the template, in its order. */
export const columns: readonly Column[] = [
  text("basin", "always", "Basin the field lies in; made when it is new", [
    "# Example basin",
    "# Example basin",
  ]),
  text("field", "always", "Name of the field", ["Example North", "Example South"]),
  text("reservoir", "always", "Name of the reservoir within its field", [
    "Main sand",
    "Lower sand",
  ]),
  text("operator", "new field", "Operator of the field", ["Example Gas", "Example Partner"]),
  number("working_interest", "fraction", "new field", "Share of cost and volume", ["0.8", "0.45"]),
  number("net_revenue_interest", "fraction", "new field", "Share of revenue after royalty", [
    "0.704",
    "0.396",
  ]),
  {
    name: "prms_class",
    kind: "choice",
    needed: "new field",
    meaning: "Class of the Petroleum Resources Management System",
    units: [],
    choices: prmsClassNames,
    examples: ["reserves", "contingent"],
  },
  {
    name: "prms_sub_class",
    kind: "choice",
    needed: "new field",
    meaning: "Sub-class, one that belongs to the class",
    units: [],
    choices: subClassNames,
    examples: ["on_production", "development_pending"],
  },
  number("chance_of_commerciality", "fraction", "new field", "Chance that the field is developed", [
    "1",
    "0.7",
  ]),
  number("depth", "length", "optional", "Depth of the reservoir, for the checks on gradients", [
    "9282",
    "12450",
  ]),
  ...rangeColumns.flatMap(columnsOfRange),
  text("sample_name", "always", "Name of the fluid sample", ["EN-3/02", "ES-1/01"]),
  {
    name: "sampled_on",
    kind: "date",
    needed: "always",
    meaning: "Date of the sample, as 2025-03-18",
    units: [],
    examples: ["2025-03-18", "2024-11-05"],
  },
  text("laboratory", "optional", "Laboratory or crew that made the test", [
    "Example Fluids",
    "Well-site crew",
  ]),
  number(
    "base_pressure",
    "pressure",
    "optional",
    "Pressure at which the test's gas volumes are stated; blank is 14.696 psia",
    ["14.696", "14.65"],
  ),
  number("separator_pressure", "pressure", "always", "Primary separator, absolute pressure", [
    "515",
    "815",
  ]),
  number("separator_temperature", "temperature", "always", "Primary separator, temperature", [
    "82",
    "90",
  ]),
  number(
    "separator_gor",
    "gasOilRatio",
    "always",
    "Primary separator gas per STOCK-TANK volume of condensate",
    ["5480", "13900"],
  ),
  number("separator_gas_gravity", "gasGravity", "always", "Primary separator gas gravity", [
    "0.703",
    "0.672",
  ]),
  number(
    "second_separator_pressure",
    "pressure",
    "optional",
    "Second separator, absolute pressure; blank in a two-stage test",
    ["", "95"],
  ),
  number("second_separator_temperature", "temperature", "optional", "Second separator", ["", "75"]),
  number(
    "second_separator_gor",
    "gasOilRatio",
    "optional",
    "Second separator gas per stock-tank volume; blank when not measured",
    ["", "560"],
  ),
  number("second_separator_gas_gravity", "gasGravity", "optional", "Second separator gas gravity", [
    "",
    "0.81",
  ]),
  number(
    "stock_tank_gor",
    "gasOilRatio",
    "optional",
    "Stock tank vapour per stock-tank volume; blank when it was not measured, it is then estimated",
    ["265", ""],
  ),
  number("stock_tank_gas_gravity", "gasGravity", "optional", "Stock tank vapour gravity", [
    "1.18",
    "",
  ]),
  number("condensate_gravity", "apiGravity", "always", "Stock tank condensate gravity", [
    "58.4",
    "52.1",
  ]),
  number(
    "condensate_molecular_weight",
    "molecularWeight",
    "optional",
    "Laboratory value; blank lets the correlation of Cragoe estimate it",
    ["", ""],
  ),
  number("nitrogen", "fraction", "always", "Nitrogen in the wellstream, by mole", ["0.008", "0"]),
  number("carbon_dioxide", "fraction", "always", "Carbon dioxide in the wellstream, by mole", [
    "0.02",
    "0.035",
  ]),
  number(
    "hydrogen_sulphide",
    "fraction",
    "always",
    "Hydrogen sulphide in the wellstream, by mole",
    ["0", "0"],
  ),
  number("dew_point", "pressure", "optional", "Measured dew point at reservoir temperature", [
    "4141",
    "",
  ]),
  text("note", "optional", "Note for the reviewer, kept with the revision", ["", ""]),
];

const columnsByName = new Map(columns.map((column) => [column.name, column]));

/** The column of a name, or `null` when the sheet has no such column. */
export function findColumn(name: string): Column | null {
  return columnsByName.get(name) ?? null;
}

const folded = (symbol: string): string => symbol.replace(/\s+/g, "").toLowerCase();

/**
 * The unit a cell of row 2 names, in the spelling of `analytics/units`, or `null` when the column does not take it.
 * Capitals matter only where two units differ by nothing else (kPa and KPA are one unit, m and M never meet).
 *
 * @example resolveUnit(findColumn("depth"), "feet") // => "ft"
 */
export function resolveUnit(column: Column, cell: string): string | null {
  const wanted = folded(cell);
  if (column.quantity === "apiGravity") {
    if (["degapi", "°api", "api"].includes(wanted)) return "degAPI";
    return ["sg", "sg60/60", "specificgravity"].includes(wanted) ? "sg" : null;
  }
  if (column.quantity === "gasGravity") {
    return ["air=1", "sg", "fraction", "-", "gravity"].includes(wanted) ? "air=1" : null;
  }
  if (!column.quantity) return null;
  // "psi" does not say whether it is absolute, and a table of figures has nobody to ask.
  if (column.quantity === "pressure" && wanted === "psi") return null;
  const { units } = quantityOf(column.quantity);
  const found = Object.entries(units).find(([symbol, { aliases = [] }]) =>
    [symbol, ...aliases].some((spelling) => folded(spelling) === wanted),
  );
  return found ? found[0] : null;
}

/** Specific gravity of water at 60 degF over which API gravity is defined: API = 141.5/sg - 131.5 (ASTM D1250). */
function apiFromSpecificGravity(specificGravity: number): number {
  return 141.5 / specificGravity - 131.5;
}

/**
 * A figure of a cell in the engine's unit.
 *
 * @param symbol  a unit that `resolveUnit` gave for this column
 */
export function toEngineUnit(column: Column, value: number, symbol: string): number {
  if (column.quantity === "apiGravity") {
    return symbol === "sg" ? apiFromSpecificGravity(value) : value;
  }
  if (!column.quantity || column.quantity === "gasGravity") return value;
  // Taken from the same table of units that `resolveUnit` reads, so the symbol belongs to the quantity.
  return toCanonical(value, column.quantity, symbol as UnitSymbol<QuantityName>);
}

/** The inverse of `toEngineUnit`, for messages that answer in the person's own unit. */
export function fromEngineUnit(column: Column, value: number, symbol: string): number {
  if (column.quantity === "apiGravity") return symbol === "sg" ? 141.5 / (value + 131.5) : value;
  if (!column.quantity || column.quantity === "gasGravity") return value;
  return fromCanonical(value, column.quantity, symbol as UnitSymbol<QuantityName>);
}
