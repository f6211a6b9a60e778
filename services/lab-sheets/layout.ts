import type { UnitKind } from "./units";

/**
 * The parts of a laboratory's sheet, and the names by which their lines and columns are known. Reader and template come
 * from here.
 */
export type BlockKind = "composition" | "depletion" | "separators";

/** Headings are compared without capitals and punctuation; the composition of a produced gas belongs to a depletion. */
const headings: Record<BlockKind, RegExp> = {
  depletion:
    /^((constant[ -]volume )?depletion( study| table| data| at [a-z0-9 .]+)?|cvd( study| table| data)?|(composition of (the )?)?produced (gas|wellstream)( composition)?|retrograde (liquid|condensation)( deposition)?( during depletion)?)$/,
  composition:
    /^(compositions?|(wellstream|reservoir fluid|fluid|feed|recombined|separator|gas) compositions?|composition of (the )?[a-z -]+|separator (streams|gas and liquid|fluids)|(compositional|hydrocarbon|molar) analysis)$/,
  separators: /^((multi-?stage )?separator (tests?|stages?|conditions|train)|separators)$/,
};

/** @returns the part that a line begins, or null; a heading stands alone on its line */
export function blockOf(cells: readonly string[]): BlockKind | null {
  if (cells.slice(1).some((cell) => cell !== "")) return null;
  const name = cells[0]
    .toLowerCase()
    .replace(/[:*_]+/g, " ")
    .replace(/\s+/g, " ")
    .trim();
  const found = (Object.entries(headings) as [BlockKind, RegExp][]).find(([, pattern]) =>
    pattern.test(name),
  );
  return found?.[0] ?? null;
}

export interface Named<Key extends string> {
  key: Key;
  /** as messages and the template write it */
  label: string;
  pattern: RegExp;
  unit: UnitKind;
}

/** Finds what a name stands for; the first pattern that fits wins, so order matters. */
export function findNamed<Key extends string>(
  list: readonly Named<Key>[],
  name: string,
): Named<Key> | null {
  const plain = name.toLowerCase().replace(/\s+/g, " ").trim();
  return list.find(({ pattern }) => pattern.test(plain)) ?? null;
}

const molecularWeight =
  /\bmol(ecular|ar|e|\.)? ?(weight|wt\.?|mass)\b|^m\.?w\.?\b|\bm\.?w\.?$|\bmw\b/;
const gravity = /\b(specific|relative) (gravity|density)\b|\bs\.?g\.?$|^sg\b|^gravity\b/;

/** Lines of a composition beside its components. `density` of the plus fraction is read as its specific gravity. */
export const compositionLines: readonly Named<
  | "ratio"
  | "liquidDensity"
  | "basePressure"
  | "plusMolecularWeight"
  | "plusDensity"
  | "plusSpecificGravity"
>[] = [
  {
    key: "ratio",
    label: "gas-liquid ratio",
    pattern: /\b(gas[- /]?(liquid|oil|condensate)|separator gas) ?ratio\b|\b(gor|glr)\b/,
    unit: "gasLiquidRatio",
  },
  {
    key: "basePressure",
    label: "base pressure",
    pattern: /\b(base|standard) pressure\b|\bpressure base\b/,
    unit: "pressure",
  },
  {
    key: "plusMolecularWeight",
    label: "molecular weight of the plus fraction",
    pattern: molecularWeight,
    unit: "molecularWeight",
  },
  {
    key: "plusSpecificGravity",
    label: "specific gravity of the plus fraction",
    pattern: gravity,
    unit: "none",
  },
  {
    key: "liquidDensity",
    label: "liquid density",
    pattern:
      /\b(separator )?(liquid|oil) density\b|\bdensity of (the )?(separator )?(liquid|oil)\b/,
    unit: "density",
  },
  {
    key: "plusDensity",
    label: "density of the plus fraction at 60 degF",
    pattern: /\bdensity\b/,
    unit: "density",
  },
];

export type StreamName = "wellstream" | "gas" | "liquid";

/** Columns of a composition beside the names of its components. */
export const compositionColumns: readonly Named<
  StreamName | "plusMolecularWeight" | "plusSpecificGravity"
>[] = [
  {
    key: "plusMolecularWeight",
    label: "molecular weight",
    pattern: molecularWeight,
    unit: "molecularWeight",
  },
  { key: "plusSpecificGravity", label: "specific gravity", pattern: gravity, unit: "none" },
  {
    key: "wellstream",
    label: "wellstream",
    pattern: /wellstream|reservoir|fluid|recombined|feed|composition|^(mole?|molar)\b|^$|^z ?i?$/,
    unit: "percent",
  },
  { key: "gas", label: "gas", pattern: /gas|vapou?r|^y ?i?$/, unit: "percent" },
  { key: "liquid", label: "liquid", pattern: /liquid|oil|condensate|^x ?i?$/, unit: "percent" },
];

export type DepletionColumn =
  | "liquidPercent"
  | "cumulativeProducedMolePercent"
  | "gasZ"
  | "twoPhaseZ"
  | "viscosityCp";

/** Columns (or, when pressures run across, rows) of a depletion table beside the components. */
export const depletionColumns: readonly Named<
  DepletionColumn | "pressurePsia" | "plusMolecularWeight" | "plusSpecificGravity"
>[] = [
  {
    key: "plusMolecularWeight",
    label: "molecular weight of the plus fraction",
    pattern: molecularWeight,
    unit: "molecularWeight",
  },
  {
    key: "twoPhaseZ",
    label: "two-phase z",
    pattern: /\btwo[- ]?phase\b|\b2[- ]?phase\b/,
    unit: "none",
  },
  { key: "viscosityCp", label: "viscosity", pattern: /\bviscosity\b/, unit: "viscosity" },
  {
    key: "liquidPercent",
    label: "liquid",
    pattern: /\bliquid\b|\bdrop-?out\b|\bretrograde\b/,
    unit: "percent",
  },
  {
    key: "gasZ",
    label: "gas z",
    pattern:
      /^((gas|vapou?r|equilibrium gas|produced gas) )?(z|z[- ]?factor)( gas)?$|\b(deviation|compressibility) factor\b/,
    unit: "none",
  },
  {
    key: "cumulativeProducedMolePercent",
    label: "cumulative produced",
    pattern: /\bcumulative\b|\bproduced\b|\bproduction\b/,
    unit: "percent",
  },
  {
    key: "plusSpecificGravity",
    label: "specific gravity of the plus fraction",
    pattern: gravity,
    unit: "none",
  },
  { key: "pressurePsia", label: "pressure", pattern: /\bpressure\b|^p$/, unit: "pressure" },
];

/** Single figures of a depletion study. */
export const depletionLines: readonly Named<"temperatureDegF" | "dewPointPsia">[] = [
  {
    key: "dewPointPsia",
    label: "dew point",
    pattern: /\b(dew ?-?point|saturation)( pressure)?\b/,
    unit: "pressure",
  },
  { key: "temperatureDegF", label: "temperature", pattern: /\btemperature\b/, unit: "temperature" },
];

export type StageColumn = "pressurePsia" | "temperatureDegF" | "gasOilRatio" | "gasGravity";

/** Columns of the table of separators, stock tank last. */
export const stageColumns: readonly Named<StageColumn>[] = [
  { key: "pressurePsia", label: "pressure", pattern: /\bpressure\b|^p$/, unit: "pressure" },
  {
    key: "temperatureDegF",
    label: "temperature",
    pattern: /\btemp(erature)?\b|^t$/,
    unit: "temperature",
  },
  {
    key: "gasOilRatio",
    label: "gas-oil ratio per stock-tank barrel",
    pattern: /\bgas[- /]?(oil|liquid|condensate) ?ratio\b|\b(gor|glr)\b|\bratio\b/,
    unit: "gasLiquidRatio",
  },
  {
    key: "gasGravity",
    label: "gas gravity",
    pattern: /\bgravity\b/,
    unit: "none",
  },
];

export type SeparatorLine =
  | "basePressurePsia"
  | "condensateApi"
  | "condensateMolecularWeight"
  | "nitrogen"
  | "carbonDioxide"
  | "hydrogenSulphide"
  | "dewPointPsia";

/** Single figures of a separator test, under its table of stages. */
export const separatorLines: readonly Named<SeparatorLine>[] = [
  {
    key: "basePressurePsia",
    label: "base pressure",
    pattern: /\b(base|standard) pressure\b|\bpressure base\b/,
    unit: "pressure",
  },
  {
    key: "condensateMolecularWeight",
    label: "condensate molecular weight",
    pattern: molecularWeight,
    unit: "molecularWeight",
  },
  {
    key: "condensateApi",
    label: "condensate gravity",
    pattern: /\b(condensate|oil|liquid|tank) .*gravity\b|\bapi( gravity)?\b/,
    unit: "api",
  },
  { key: "nitrogen", label: "nitrogen", pattern: /^(nitrogen|n2)\b/, unit: "percent" },
  {
    key: "carbonDioxide",
    label: "carbon dioxide",
    pattern: /^(carbon dioxide|co2)\b/,
    unit: "percent",
  },
  {
    key: "hydrogenSulphide",
    label: "hydrogen sulphide",
    pattern: /^(hydrogen sul(ph|f)ide|h2s)\b/,
    unit: "percent",
  },
  {
    key: "dewPointPsia",
    label: "dew point",
    pattern: /\b(dew ?-?point|saturation)( pressure)?\b/,
    unit: "pressure",
  },
];
