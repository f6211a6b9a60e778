/**
 * A separator test as it stands in the fields of its sheet: text, beside the test that it reads as. Fields are named by
 * their paths in the test, so that what the engine says about a value lands at its field.
 */
import { separatorTestSchema, type SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { QuantityName } from "@/analytics/units/conversions";
import { readPlain, readQuantity, typedFigure, type FieldReading } from "./quantities-of-inputs";

interface SheetField {
  label: string;
  unit: string;
  /** `null`: a plain number, such as a gravity */
  quantity: QuantityName | null;
  /** unit that is assumed where none is typed, when it is not the engine's */
  symbol?: string;
  /** may stay empty */
  optional?: boolean;
}

const pressure = (label: string): SheetField => ({ label, unit: "psia", quantity: "pressure" });
const temperature = (label: string): SheetField => ({ label, unit: "°F", quantity: "temperature" });
const gas = (label: string): SheetField => ({ label, unit: "scf/STB", quantity: "gasOilRatio" });
const gravity = (label: string): SheetField => ({ label, unit: "", quantity: null });
const share = (label: string): SheetField => ({
  label,
  unit: "%",
  quantity: "fraction",
  symbol: "%",
});

export const sheetFields = {
  basePressurePsia: pressure("Base pressure of the gas volumes"),
  "primarySeparator.pressurePsia": pressure("First separator, pressure"),
  "primarySeparator.temperatureDegF": temperature("First separator, temperature"),
  "primarySeparator.gasOilRatioScfPerStb": gas("First separator, gas per barrel"),
  "primarySeparator.gasGravity": gravity("First separator, gas gravity"),
  "secondSeparator.pressurePsia": pressure("Second separator, pressure"),
  "secondSeparator.temperatureDegF": temperature("Second separator, temperature"),
  "secondSeparator.gas.gasOilRatioScfPerStb": gas("Second separator, gas per barrel"),
  "secondSeparator.gas.gasGravity": gravity("Second separator, gas gravity"),
  "stockTankGas.gasOilRatioScfPerStb": gas("Stock tank, gas per barrel"),
  "stockTankGas.gasGravity": gravity("Stock tank, gas gravity"),
  condensateApi: { label: "Condensate gravity", unit: "°API", quantity: null },
  condensateMolecularWeight: {
    label: "Condensate molecular weight, laboratory",
    unit: "",
    quantity: "molecularWeight",
    optional: true,
  },
  nitrogen: share("Nitrogen"),
  carbonDioxide: share("Carbon dioxide"),
  hydrogenSulphide: share("Hydrogen sulphide"),
  dewPointPsia: { ...pressure("Dew point at reservoir temperature"), optional: true },
} as const satisfies Record<string, SheetField>;

export type SheetFieldName = keyof typeof sheetFields;
export const sheetFieldNames = Object.keys(sheetFields) as SheetFieldName[];

export interface SheetText {
  stages: 2 | 3;
  secondStageMeasured: boolean;
  tankMeasured: boolean;
  fields: Record<SheetFieldName, string>;
}

export interface SheetReading {
  fields: Record<SheetFieldName, FieldReading>;
  /** `null` while something is missing or cannot be read */
  test: SeparatorTest | null;
  incomplete: SheetFieldName[];
}

const emptyFields = () =>
  Object.fromEntries(sheetFieldNames.map((name) => [name, ""])) as Record<SheetFieldName, string>;

/** A sheet to fill in: two stages, tank not measured, at the usual base; no figure is proposed but the base and no impurities. */
export function emptySheet(): SheetText {
  return {
    stages: 2,
    secondStageMeasured: true,
    tankMeasured: false,
    fields: {
      ...emptyFields(),
      basePressurePsia: "14.696",
      nitrogen: "0",
      carbonDioxide: "0",
      hydrogenSulphide: "0",
    },
  };
}

/** Text of a stored test. Reading it back gives the same test. */
export function textOfTest(test: SeparatorTest): SheetText {
  const written = (value: number | null | undefined) =>
    value === null || value === undefined ? "" : typedFigure(value);
  const percent = (value: number) => typedFigure(Number((value * 100).toPrecision(12)));
  const { primarySeparator: first, secondSeparator: second, stockTankGas: tank } = test;
  return {
    stages: second ? 3 : 2,
    secondStageMeasured: second?.gas !== null,
    tankMeasured: tank !== null,
    fields: {
      basePressurePsia: written(test.basePressurePsia),
      "primarySeparator.pressurePsia": written(first.pressurePsia),
      "primarySeparator.temperatureDegF": written(first.temperatureDegF),
      "primarySeparator.gasOilRatioScfPerStb": written(first.gasOilRatioScfPerStb),
      "primarySeparator.gasGravity": written(first.gasGravity),
      "secondSeparator.pressurePsia": written(second?.pressurePsia),
      "secondSeparator.temperatureDegF": written(second?.temperatureDegF),
      "secondSeparator.gas.gasOilRatioScfPerStb": written(second?.gas?.gasOilRatioScfPerStb),
      "secondSeparator.gas.gasGravity": written(second?.gas?.gasGravity),
      "stockTankGas.gasOilRatioScfPerStb": written(tank?.gasOilRatioScfPerStb),
      "stockTankGas.gasGravity": written(tank?.gasGravity),
      condensateApi: written(test.condensateApi),
      condensateMolecularWeight: written(test.condensateMolecularWeight),
      nitrogen: percent(test.nitrogen),
      carbonDioxide: percent(test.carbonDioxide),
      hydrogenSulphide: percent(test.hydrogenSulphide),
      dewPointPsia: written(test.dewPointPsia),
    },
  };
}

/** Whether the sheet asks for a field as it stands. */
export function isShown(sheet: SheetText, name: SheetFieldName): boolean {
  if (name.startsWith("secondSeparator.gas."))
    return sheet.stages === 3 && sheet.secondStageMeasured;
  if (name.startsWith("secondSeparator.")) return sheet.stages === 3;
  if (name.startsWith("stockTankGas.")) return sheet.tankMeasured;
  return true;
}

/** Reads every field, and all of them as a separator test. */
export function readSheet(sheet: SheetText): SheetReading {
  const fields = Object.fromEntries(
    sheetFieldNames.map((name) => [name, readSheetField(name, sheet.fields[name])]),
  ) as Record<SheetFieldName, FieldReading>;
  const shown = sheetFieldNames.filter((name) => isShown(sheet, name));
  const incomplete = shown.filter(
    (name) => fields[name].value === null && !isOptional(name) && fields[name].problem === null,
  );
  const isReadable = shown.every((name) => fields[name].problem === null);
  return {
    fields,
    incomplete,
    test: incomplete.length === 0 && isReadable ? testOf(sheet, fields) : null,
  };
}

const isOptional = (name: SheetFieldName) =>
  "optional" in sheetFields[name] && sheetFields[name].optional;

function readSheetField(name: SheetFieldName, text: string): FieldReading {
  const { quantity, unit, symbol }: SheetField = sheetFields[name];
  if (quantity === null) return readPlain(text);
  const reading = readQuantity(text, quantity, unit, symbol);
  // A share is stored as a fraction and typed in per cent: 1.504 % is 0.01504, not 0.015040000000000001.
  return symbol === "%" && reading.value !== null
    ? { ...reading, value: Number(reading.value.toPrecision(12)) }
    : reading;
}

function testOf(
  sheet: SheetText,
  fields: Record<SheetFieldName, FieldReading>,
): SeparatorTest | null {
  const value = (name: SheetFieldName) => fields[name].value;
  const test = separatorTestSchema.safeParse({
    basePressurePsia: value("basePressurePsia"),
    primarySeparator: {
      pressurePsia: value("primarySeparator.pressurePsia"),
      temperatureDegF: value("primarySeparator.temperatureDegF"),
      gasOilRatioScfPerStb: value("primarySeparator.gasOilRatioScfPerStb"),
      gasGravity: value("primarySeparator.gasGravity"),
    },
    secondSeparator:
      sheet.stages === 3
        ? {
            pressurePsia: value("secondSeparator.pressurePsia"),
            temperatureDegF: value("secondSeparator.temperatureDegF"),
            gas: sheet.secondStageMeasured
              ? {
                  gasOilRatioScfPerStb: value("secondSeparator.gas.gasOilRatioScfPerStb"),
                  gasGravity: value("secondSeparator.gas.gasGravity"),
                }
              : null,
          }
        : null,
    stockTankGas: sheet.tankMeasured
      ? {
          gasOilRatioScfPerStb: value("stockTankGas.gasOilRatioScfPerStb"),
          gasGravity: value("stockTankGas.gasGravity"),
        }
      : null,
    condensateApi: value("condensateApi"),
    condensateMolecularWeight: value("condensateMolecularWeight"),
    nitrogen: value("nitrogen"),
    carbonDioxide: value("carbonDioxide"),
    hydrogenSulphide: value("hydrogenSulphide"),
    dewPointPsia: value("dewPointPsia"),
  });
  return test.success ? test.data : null;
}

/** `#/separatorTest/primarySeparator/gasGravity` -> `primarySeparator.gasGravity`; `null` for another place. */
export function fieldOfPointer(pointer: string): SheetFieldName | null {
  const path = pointer
    .replace(/^#\//, "")
    .replace(/^separatorTest\//, "")
    .split("/")
    .join(".");
  return sheetFieldNames.find((name) => name === path) ?? null;
}
