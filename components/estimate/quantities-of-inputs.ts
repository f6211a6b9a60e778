import { canonicalUnit, quantityOf, type QuantityName } from "@/analytics/units/conversions";
import { parseQuantity, type ParsedQuantity } from "@/analytics/units/parse-quantity";
import type { DriverName } from "@/analytics/volumetrics/results-schema";

export const quantityOfInput: Record<DriverName, QuantityName> = {
  areaAcres: "area",
  netThicknessFt: "length",
  porosity: "fraction",
  waterSaturation: "fraction",
  pressurePsia: "pressure",
  temperatureDegF: "temperature",
  condensateYieldStbPerMmscf: "condensateYield",
  gasRecovery: "fraction",
  condensateRecovery: "fraction",
  salesGasFraction: "fraction",
  abandonmentPressurePsia: "pressure",
  condensateCurveFactor: "fraction",
  sweepEfficiency: "fraction",
  displacementEfficiency: "fraction",
};

export interface FieldReading {
  /** in the input's own unit; `null` while the field is empty or cannot be read */
  value: number | null;
  /** what arithmetic or another unit comes to, such as "= 3,488 acre"; `null` for a plain number */
  preview: string | null;
  /** why the text cannot be read; `null` while the field is empty */
  problem: string | null;
}

/** A figure as a person would type it back: grouped, with every digit that it has, so that it reads as itself. */
export function typedFigure(value: number): string {
  const text = String(value);
  if (text.includes("e")) return text;
  const [whole, decimals] = text.split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ",");
  return decimals === undefined ? grouped : `${grouped}.${decimals}`;
}

/**
 * Reads what stands in a field of one input.
 *
 * @param name   the input; its unit is assumed where none is typed
 * @param inUnit `false` for a parameter that is a plain number, such as the mean of a logarithm
 * @param unit   printed after the preview
 */
export function readField(
  text: string,
  name: DriverName,
  inUnit: boolean,
  unit: string,
): FieldReading {
  if (!inUnit) return readPlain(text);
  const read = readQuantity(text, quantityOfInput[name], unit);
  const isShare = quantityOfInput[name] === "fraction" && name !== "condensateCurveFactor";
  if (!isShare || read.value === null || read.value <= 1) return read;
  const typed = typedFigure(read.value);
  const meant =
    read.value <= 100
      ? ` Is it in per cent? Enter ${typedFigure(read.value / 100)} for ${typed} %.`
      : "";
  return { ...read, value: null, problem: `A fraction is at most 1.${meant}` };
}

/**
 * Reads a quantity of any kind, such as a separator pressure; as `readField`.
 *
 * @param unit    printed after the preview
 * @param symbol  unit that is assumed where none is typed, and that the preview is in
 */
export function readQuantity(
  text: string,
  quantity: QuantityName,
  unit: string,
  symbol: string = canonicalUnit(quantity),
): FieldReading {
  if (text.trim() === "") return { value: null, preview: null, problem: null };
  const parsed = parseQuantity(text, quantity, symbol);
  return reading(text, parsed, unit, symbol, quantity);
}

/** Reads a number that carries no unit: a gravity, a logarithm. Arithmetic is accepted here too. */
export function readPlain(text: string): FieldReading {
  if (text.trim() === "") return { value: null, preview: null, problem: null };
  // A temperature is the one quantity that may be negative, as a logarithm may.
  return reading(text, parseQuantity(text, "temperature"), "", "degF", "temperature");
}

function reading(
  text: string,
  parsed: ParsedQuantity,
  unit: string,
  symbol: string,
  quantity: QuantityName,
): FieldReading {
  if (!parsed.ok) return { value: null, preview: null, problem: parsed.reason };
  const isPlain = /^[-−]?[\d,.' \u00a0\u2009\u202f]+$/.test(text.trim()) && parsed.unit === symbol;
  const { factor, offset = 0 } = quantityOf(quantity).units[symbol];
  const shown = (parsed.value - offset) / factor;
  const figure = shown.toLocaleString("en-US", { maximumSignificantDigits: 4 });
  return {
    value: parsed.value,
    preview: isPlain ? null : `= ${figure}${unit ? ` ${unit}` : ""}`,
    problem: null,
  };
}
