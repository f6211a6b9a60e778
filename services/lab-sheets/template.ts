import { stringify } from "csv-stringify/sync";
import { lightComponents } from "@/analytics/composition/composition-schema";
import {
  compositionLines,
  depletionColumns,
  depletionLines,
  separatorLines,
  stageColumns,
  type Named,
} from "./layout";
import { unitSymbols, type UnitKind } from "./units";

export const LAB_SHEET_TEMPLATE_NAME = "dewledger-laboratory-sheet.csv";

/** An invented rich gas condensate. Mole per cent by component, the plus fraction last. */
const wellstream = [0, 1.9, 0.6, 74.2, 8.1, 4.2, 0.85, 1.55, 0.7, 0.65, 0.95, 6.3];
const plus = { molecularWeight: 158, specificGravity: 0.792 };

const labelOf = <Key extends string>(list: readonly Named<Key>[], key: Key) =>
  list.find((named) => named.key === key)?.label ?? key;

/** A name with its unit, as headings and lines are written. */
const withUnit = (label: string, unit: string) => `${label} [${unit}]`;

/**
 * The sheet to fill in: every part with its names and units, filled with an example, and a remark above each part that
 * lists the units it takes. What the reader knows and what the template says come from the same lists.
 */
export function labSheetTemplate(): string {
  const remark = (text: string) => [`# ${text}`];
  const takes = (kind: UnitKind) => unitSymbols(kind).join(", ");
  const composition = (key: (typeof compositionLines)[number]["key"]) =>
    labelOf(compositionLines, key);
  const separator = (key: (typeof separatorLines)[number]["key"]) => labelOf(separatorLines, key);
  const names = [...lightComponents, "C7+"];
  const rows: (string | number)[][] = [
    remark("Laboratory sheet. Replace the example's figures; leave out the parts you do not have."),
    remark(
      "Lines that begin with # are not read. Decimals with a point, no separators of thousands.",
    ),
    remark(
      "An empty cell or a dash means: not reported. Cells copied from a spreadsheet work too.",
    ),
    [""],
    remark(
      `mol per cent or fraction. Single carbon numbers (C7, C8, …) go before the plus fraction.`,
    ),
    ["composition"],
    ["component", withUnit("wellstream", "mol %")],
    ...names.map((name, index) => [name, wellstream[index]]),
    [withUnit(composition("plusMolecularWeight"), "lb/lbmol"), plus.molecularWeight],
    [composition("plusSpecificGravity"), plus.specificGravity],
    [""],
    remark("Instead of the wellstream: the separator's gas and liquid, with the columns"),
    remark("component, gas [mol %], liquid [mol %] and the lines"),
    remark(
      `${withUnit(composition("ratio"), "scf/bbl")} per barrel of SEPARATOR liquid (${takes("gasLiquidRatio")}),`,
    ),
    remark(
      `${withUnit(composition("liquidDensity"), "lb/ft3")} at separator conditions (${takes("density")}),`,
    ),
    remark(`${withUnit(composition("basePressure"), "psia")} of the gas volumes.`),
    [""],
    remark(`Pressures: ${takes("pressure")}. Temperatures: ${takes("temperature")}.`),
    remark(
      "Pressures may also run across: then the first row holds them, and each row below one quantity.",
    ),
    ["depletion"],
    [withUnit(labelOf(depletionLines, "temperatureDegF"), "degF"), 255],
    [withUnit(labelOf(depletionLines, "dewPointPsia"), "psia"), 5215],
    depletionHeader(names),
    ...depletionExample,
    [""],
    remark(
      "One row a stage in the direction of flow, the stock tank last. Ratios are per STOCK-TANK barrel.",
    ),
    remark("For stages alone, leave the columns of ratio and gravity out."),
    ["separator test"],
    [
      "stage",
      withUnit(labelOf(stageColumns, "pressurePsia"), "psig"),
      withUnit(labelOf(stageColumns, "temperatureDegF"), "degF"),
      withUnit(labelOf(stageColumns, "gasOilRatio"), "scf/STB"),
      labelOf(stageColumns, "gasGravity"),
    ],
    ["separator", 600, 85, 8850, 0.712],
    ["stock tank", 0, 60, 410, 1.18],
    [withUnit(separator("basePressurePsia"), "psia"), 14.696],
    [withUnit(separator("condensateApi"), "degAPI"), 56.5],
    [withUnit(separator("condensateMolecularWeight"), "lb/lbmol"), 128],
    [withUnit(separator("nitrogen"), "mol %"), 0.6],
    [withUnit(separator("carbonDioxide"), "mol %"), 1.9],
    [withUnit(separator("hydrogenSulphide"), "mol %"), 0],
    [withUnit(separator("dewPointPsia"), "psia"), 5215],
  ];
  return stringify(rows, { record_delimiter: "\r\n" });
}

function depletionHeader(names: readonly string[]): string[] {
  const units: Partial<Record<(typeof depletionColumns)[number]["key"], string>> = {
    pressurePsia: "psia",
    liquidPercent: "% of volume at dew point",
    cumulativeProducedMolePercent: "mol %",
    gasZ: "",
    twoPhaseZ: "",
    viscosityCp: "cP",
  };
  const values = Object.entries(units).map(([key, unit]) => {
    const label = labelOf(depletionColumns, key as (typeof depletionColumns)[number]["key"]);
    return unit === "" ? label : withUnit(label, unit);
  });
  return [
    ...values,
    ...names.map((name) => withUnit(name, "mol %")),
    withUnit(labelOf(depletionColumns, "plusMolecularWeight"), "lb/lbmol"),
    labelOf(depletionColumns, "plusSpecificGravity"),
  ];
}

/** Pressure, liquid, produced, gas z, two-phase z, viscosity, twelve components, weight and gravity of C7+. */
const depletionExample: number[][] = [
  [5215, 0, 0, 1.012, 1.012, 0.0442, ...wellstream, plus.molecularWeight, plus.specificGravity],
  [
    ...[4200, 9.8, 11.4, 0.931, 0.909, 0.0343],
    ...[0, 1.93, 0.63, 76.26, 8.12, 4.12, 0.82, 1.48, 0.65, 0.6, 0.85, 4.54, 142, 0.779],
  ],
  [
    ...[3200, 15.6, 26.9, 0.889, 0.838, 0.0264],
    ...[0, 1.95, 0.65, 77.72, 8.16, 4.05, 0.79, 1.41, 0.61, 0.56, 0.76, 3.34, 130, 0.768],
  ],
  [
    ...[2200, 17.4, 46.1, 0.878, 0.785, 0.0202],
    ...[0, 1.97, 0.65, 78.56, 8.25, 4.03, 0.77, 1.37, 0.57, 0.52, 0.68, 2.63, 121, 0.759],
  ],
  [
    ...[1200, 16.5, 68.2, 0.904, 0.729, 0.0161],
    ...[0, 1.98, 0.64, 78.58, 8.46, 4.15, 0.79, 1.41, 0.57, 0.52, 0.66, 2.24, 115, 0.753],
  ],
  [
    ...[600, 14.9, 81.7, 0.942, 0.634, 0.0142],
    ...[0, 1.98, 0.62, 77.4, 8.84, 4.5, 0.88, 1.59, 0.65, 0.59, 0.73, 2.22, 112, 0.75],
  ],
];
