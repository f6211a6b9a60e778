import type { InputName } from "@/analytics/volumetrics/inputs-schema";
import { rangeColumns } from "./columns";

/** Columns of the separator test by the path the engine names in its messages. */
const fluidColumns: Record<string, string> = {
  basePressurePsia: "base_pressure",
  "primarySeparator.pressurePsia": "separator_pressure",
  "primarySeparator.temperatureDegF": "separator_temperature",
  "primarySeparator.gasOilRatioScfPerStb": "separator_gor",
  "primarySeparator.gasGravity": "separator_gas_gravity",
  "secondSeparator.pressurePsia": "second_separator_pressure",
  "secondSeparator.temperatureDegF": "second_separator_temperature",
  "secondSeparator.gas.gasOilRatioScfPerStb": "second_separator_gor",
  "secondSeparator.gas.gasGravity": "second_separator_gas_gravity",
  "stockTankGas.gasOilRatioScfPerStb": "stock_tank_gor",
  "stockTankGas.gasGravity": "stock_tank_gas_gravity",
  condensateApi: "condensate_gravity",
  condensateMolecularWeight: "condensate_molecular_weight",
  nitrogen: "nitrogen",
  carbonDioxide: "carbon_dioxide",
  hydrogenSulphide: "hydrogen_sulphide",
  dewPointPsia: "dew_point",
};

/** The uncertain input a path of the engine is about, or `null`. */
export function inputOfPath(path: string | undefined): InputName | null {
  const parts = path?.split(".") ?? [];
  return rangeColumns.find(({ input }) => parts.includes(input))?.input ?? null;
}

/**
 * The column a message of the engine is about, or `null` when it is about the row as a whole.
 *
 * @example columnOfPath("uncertain.porosity.distribution.p90") // => "porosity_low"
 */
export function columnOfPath(path: string | undefined): string | null {
  if (!path) return null;
  if (path === "depthFt") return "depth";
  const range = rangeColumns.find(({ input }) => input === inputOfPath(path));
  if (range) {
    const last = path.split(".").at(-1) ?? "";
    const side = ["p90", "low", "minimum"].includes(last)
      ? "low"
      : ["p10", "high", "maximum"].includes(last)
        ? "high"
        : "best";
    return `${range.stem}_${side}`;
  }
  return fluidColumns[path.replace(/^fluid\./, "")] ?? null;
}
