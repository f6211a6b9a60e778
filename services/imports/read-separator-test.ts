import { DomainError } from "@/analytics/errors";
import { separatorTestSchema, type SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { baseAtPressure, CANONICAL_BASE } from "@/analytics/units/standard-conditions";
import { inputWords } from "../input-words";
import { columnOfPath } from "./columns-of-paths";
import type { CellReader } from "./read-cells";

/** A gas volume and its gravity belong together; neither means anything alone. */
function readMeasuredGas(
  reader: CellReader,
  stem: "second_separator" | "stock_tank",
): { gasOilRatioScfPerStb: number; gasGravity: number } | null {
  const [ratioColumn, gravityColumn] = [`${stem}_gor`, `${stem}_gas_gravity`];
  const gasOilRatioScfPerStb = reader.number(ratioColumn);
  const gasGravity = reader.number(gravityColumn);
  if (gasOilRatioScfPerStb !== null && reader.isBlank(gravityColumn)) {
    reader.refuse(gravityColumn, `Needed with ${ratioColumn}: a measured gas has a gravity.`);
  }
  if (gasGravity !== null && reader.isBlank(ratioColumn)) {
    reader.refuse(ratioColumn, `Needed with ${gravityColumn}; leave both blank when not measured.`);
  }
  return gasOilRatioScfPerStb !== null && gasGravity !== null
    ? { gasOilRatioScfPerStb, gasGravity }
    : null;
}

const metricRatio = "Sm3/m3";

function readBasePressure(reader: CellReader, units: Record<string, string>): number {
  const given = reader.number("base_pressure");
  if (given === null) return CANONICAL_BASE.pressurePsia;
  const statesOwnBase = ["separator_gor", "second_separator_gor", "stock_tank_gor"].some(
    (column) => units[column] === metricRatio && !reader.isBlank(column),
  );
  if (statesOwnBase && Math.abs(given - CANONICAL_BASE.pressurePsia) > 0.0005) {
    reader.refuse(
      "base_pressure",
      `Gas volumes in ${metricRatio} carry their own base (15 degC, 101.325 kPa) and are restated; leave this cell blank.`,
    );
  }
  try {
    return baseAtPressure(given).pressurePsia;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    reader.refuse("base_pressure", error.message);
    return CANONICAL_BASE.pressurePsia;
  }
}

function readSecondSeparator(reader: CellReader): SeparatorTest["secondSeparator"] {
  const names = ["pressure", "temperature", "gor", "gas_gravity"].map(
    (suffix) => `second_separator_${suffix}`,
  );
  if (names.every((name) => reader.isBlank(name))) return null;
  const pressurePsia = reader.number("second_separator_pressure", { needed: true });
  const temperatureDegF = reader.number("second_separator_temperature", { needed: true });
  const gas = readMeasuredGas(reader, "second_separator");
  return pressurePsia === null || temperatureDegF === null
    ? null
    : { pressurePsia, temperatureDegF, gas };
}

/** The separator test of a row; `null` when something in it was refused. */
export function readSeparatorTest(
  reader: CellReader,
  units: Record<string, string>,
): SeparatorTest | null {
  const before = reader.problems.length;
  const needed = (name: string): number | null => reader.number(name, { needed: true });
  const draft = {
    basePressurePsia: readBasePressure(reader, units),
    primarySeparator: {
      pressurePsia: needed("separator_pressure"),
      temperatureDegF: needed("separator_temperature"),
      gasOilRatioScfPerStb: needed("separator_gor"),
      gasGravity: needed("separator_gas_gravity"),
    },
    secondSeparator: readSecondSeparator(reader),
    stockTankGas: readMeasuredGas(reader, "stock_tank"),
    condensateApi: needed("condensate_gravity"),
    condensateMolecularWeight: reader.number("condensate_molecular_weight"),
    nitrogen: needed("nitrogen"),
    carbonDioxide: needed("carbon_dioxide"),
    hydrogenSulphide: needed("hydrogen_sulphide"),
    dewPointPsia: reader.number("dew_point"),
  };
  if (reader.problems.length > before) return null;
  const parsed = separatorTestSchema.safeParse(draft, { error: inputWords });
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) {
    reader.refuse(columnOfPath(issue.path.join(".")), `${capitalised(issue.message)}.`);
  }
  return null;
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
