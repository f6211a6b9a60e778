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
const wellstream = [0, 1.7, 1.1, 74.74, 8.15, 4.25, 0.85, 1.56, 0.67, 0.64, 0.89, 5.45];
const plus = { molecularWeight: 169, specificGravity: 0.802 };

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
    [withUnit(labelOf(depletionLines, "temperatureDegF"), "degF"), 220],
    [withUnit(labelOf(depletionLines, "dewPointPsia"), "psia"), 4350],
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
    ["separator", 475, 79, 8738, 0.703],
    ["stock tank", 0, 60, 270, 1.143],
    [withUnit(separator("basePressurePsia"), "psia"), 14.696],
    [withUnit(separator("condensateApi"), "degAPI"), 52.7],
    [withUnit(separator("condensateMolecularWeight"), "lb/lbmol"), 141],
    [withUnit(separator("nitrogen"), "mol %"), 1.1],
    [withUnit(separator("carbonDioxide"), "mol %"), 1.7],
    [withUnit(separator("hydrogenSulphide"), "mol %"), 0],
    [withUnit(separator("dewPointPsia"), "psia"), 4350],
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
  [4350, 0, 0, 0.942, 0.942, 0.0361, ...wellstream, plus.molecularWeight, plus.specificGravity],
  [
    ...[4014.7, 7.6, 5.22, 0.913, 0.918, 0.0315],
    ...[0, 1.71, 1.13, 75.8, 8.12, 4.18, 0.83, 1.51, 0.64, 0.61, 0.84, 4.63, 159, 0.795],
  ],
  [
    ...[3514.7, 12, 14.04, 0.882, 0.886, 0.0266],
    ...[0, 1.72, 1.15, 77, 8.11, 4.11, 0.8, 1.46, 0.61, 0.58, 0.77, 3.69, 148, 0.785],
  ],
  [
    ...[2914.7, 13.6, 26.2, 0.861, 0.856, 0.0223],
    ...[0, 1.74, 1.17, 78.05, 8.12, 4.06, 0.78, 1.41, 0.58, 0.54, 0.7, 2.85, 137, 0.775],
  ],
  [
    ...[2314.7, 13.5, 39.86, 0.856, 0.834, 0.0191],
    ...[0, 1.75, 1.18, 78.75, 8.18, 4.05, 0.77, 1.38, 0.55, 0.51, 0.63, 2.25, 128, 0.767],
  ],
  [
    ...[1714.7, 12.7, 54.56, 0.867, 0.817, 0.0167],
    ...[0, 1.77, 1.18, 79.08, 8.28, 4.09, 0.77, 1.37, 0.54, 0.5, 0.58, 1.84, 122, 0.76],
  ],
  [
    ...[1214.7, 11.7, 67.15, 0.889, 0.801, 0.0152],
    ...[0, 1.79, 1.16, 78.9, 8.44, 4.21, 0.79, 1.42, 0.55, 0.5, 0.57, 1.67, 119, 0.756],
  ],
  [
    ...[714.7, 10.5, 79.63, 0.922, 0.76, 0.014],
    ...[0, 1.8, 1.13, 77.88, 8.67, 4.49, 0.87, 1.57, 0.61, 0.57, 0.63, 1.78, 117, 0.754],
  ],
];
