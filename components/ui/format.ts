import { DateTime } from "luxon";

/** What stands where there is no value. Never 0. */
export const MISSING = "–";
const MINUS = "\u2212";
const NO_BREAK_SPACE = "\u00a0";

type Value = number | null | undefined;

export interface FigureFormat {
  /** significant digits; 3 unless told otherwise */
  digits?: number;
  /** a fixed number of decimals instead of significant digits */
  decimals?: number;
  /** writes a plus sign before what is above zero, for changes */
  signed?: boolean;
}

const isFigure = (value: Value): value is number =>
  typeof value === "number" && Number.isFinite(value);

const withSigns = (text: string, positive: boolean, signed = false) =>
  text.startsWith("-") ? MINUS + text.slice(1) : signed && positive ? `+${text}` : text;

/** Three significant digits, and what follows is what a person can check in the export. */
export function formatFigure(value: Value, { digits = 3, decimals, signed }: FigureFormat = {}) {
  if (!isFigure(value)) return MISSING;
  if (value === 0) return decimals ? (0).toFixed(decimals) : "0";
  if (decimals === undefined && Math.abs(value) < 1e-6) return formatScientific(value, digits);
  const text =
    decimals === undefined
      ? value.toLocaleString("en-US", {
          minimumSignificantDigits: digits,
          maximumSignificantDigits: digits,
        })
      : value.toLocaleString("en-US", {
          minimumFractionDigits: decimals,
          maximumFractionDigits: decimals,
        });
  const isZero = !/[1-9]/.test(text);
  return isZero ? text.replace("-", "") : withSigns(text, value > 0, signed);
}

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

function formatScientific(value: number, digits: number) {
  const [mantissa, exponent] = value.toExponential(digits - 1).split("e");
  const power = [...String(Math.abs(Number(exponent)))].map((d) => superscripts[Number(d)]);
  const sign = Number(exponent) < 0 ? "⁻" : "";
  return `${withSigns(mantissa, value > 0)}${NO_BREAK_SPACE}×${NO_BREAK_SPACE}10${sign}${power.join("")}`;
}

/** The value as it is stored, for a title on hover: up to 12 significant digits. */
export function formatFull(value: Value) {
  if (!isFigure(value)) return MISSING;
  return withSigns(value.toLocaleString("en-US", { maximumSignificantDigits: 12 }), value > 0);
}

/** A fraction as a percentage: `0.58` is "58 %", `0.004` is "<1 %". */
export function formatPercent(fraction: Value, { decimals = 0, signed }: FigureFormat = {}) {
  if (!isFigure(fraction)) return MISSING;
  const percent = fraction * 100;
  const least = 10 ** -decimals;
  if (!signed && percent > 0 && percent < least / 2) return `<${least}${NO_BREAK_SPACE}%`;
  return `${formatFigure(percent, { decimals, signed })}${NO_BREAK_SPACE}%`;
}

/** Parts of a formatted figure for alignment on the point: "45.2" is "45" and ".2". */
export function splitFigure(text: string): { integer: string; fraction: string } {
  const point = text.indexOf(".");
  if (point < 0 || text.includes("×")) return { integer: text, fraction: "" };
  return { integer: text.slice(0, point), fraction: text.slice(point) };
}

/** How many decimals the widest figure of a column shows: the box every fraction of it gets. */
export function fractionDigits(values: readonly Value[], format?: FigureFormat) {
  const lengths = values.map((value) => splitFigure(formatFigure(value, format)).fraction.length);
  return Math.max(0, ...lengths.map((length) => length - 1));
}

/** "day" 2 Nov 2026; "long" 2 November 2026; "month" Nov 2026; "time" 2 Nov 2026, 16:20; "clock" 16:20:05. */
const dateFormats = {
  day: "d LLL yyyy",
  long: "d LLLL yyyy",
  month: "LLL yyyy",
  time: "d LLL yyyy, HH:mm",
  clock: "HH:mm:ss",
} as const;

/** A date of business (no zone) or an instant (ISO, shown in `zone`). Missing or malformed: en dash. */
export function formatDate(
  value: string | Date | null | undefined,
  style: keyof typeof dateFormats = "day",
  zone = "utc",
) {
  if (!value) return MISSING;
  const date =
    value instanceof Date
      ? DateTime.fromJSDate(value, { zone })
      : DateTime.fromISO(value, { zone });
  return date.isValid ? date.setLocale("en-GB").toFormat(dateFormats[style]) : MISSING;
}

/** "Net thickness" -> "net thickness": a name in the middle of a sentence. */
export const lowerFirst = (text: string) => text.charAt(0).toLowerCase() + text.slice(1);
