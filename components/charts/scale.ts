import { scaleLinear, scaleLog } from "d3-scale";
import { formatFigure } from "@/components/ui/format";

/** A scale shared by a column or a chart. Plain data, so a server page can hand it to the browser. */
export interface Scale {
  kind: "linear" | "log";
  domain: [number, number];
}

export interface ScaleOptions {
  /** `auto` is log where the values span more than a decade and all are above zero */
  kind?: "auto" | "linear" | "log";
  /** share of the width left free at each side (before/after rows use 0.14) */
  pad?: number;
  /** a linear scale starts at zero unless told otherwise */
  fromZero?: boolean;
}

const isNumber = (value: number | null | undefined): value is number =>
  typeof value === "number" && Number.isFinite(value);

/** A scale that holds every value. Without a value: 0 to 1. */
export function scaleFor(
  values: readonly (number | null | undefined)[],
  { kind = "auto", pad = 0.04, fromZero = true }: ScaleOptions = {},
): Scale {
  const known = values.filter(isNumber);
  if (known.length === 0) return { kind: "linear", domain: [0, 1] };
  const low = Math.min(...known);
  const high = Math.max(...known);
  const canBeLog = low > 0;
  const log = canBeLog && (kind === "log" || (kind === "auto" && high / low > 10));

  if (log) {
    const span = Math.log(high / low) || 1;
    const factor = Math.exp((pad * span) / (1 - 2 * pad));
    return { kind: "log", domain: [low / factor, high * factor] };
  }
  const start = fromZero ? Math.min(0, low) : low;
  const end = fromZero ? Math.max(0, high) : high;
  const span = end - start || Math.abs(end) || 1;
  const margin = (pad * span) / (1 - 2 * pad);
  return {
    kind: "linear",
    domain: [
      fromZero && start === 0 ? 0 : start - margin,
      fromZero && end === 0 ? 0 : end + margin,
    ],
  };
}

const d3Scale = ({ kind, domain }: Scale) =>
  (kind === "log" ? scaleLog() : scaleLinear()).domain(domain).range([0, 100]);

/** Position of a value along the scale [%]; outside 0 to 100 when it is off the scale. */
export function positionOn(scale: Scale, value: number): number {
  if (scale.kind === "log" && value <= 0) return Number.NEGATIVE_INFINITY;
  return d3Scale(scale)(value);
}

/** The value at a position [%] of the scale. */
export function valueAt(scale: Scale, position: number): number {
  return d3Scale(scale).invert(position);
}

export interface Tick {
  value: number;
  label: string;
  /** [%] */
  position: number;
}

/** "1,000", "0.05": a tick is a round number, so it is written without trailing zeros. */
const tickLabel = (value: number) =>
  value === 0
    ? "0"
    : Math.abs(value) < 1e-4 || Math.abs(value) >= 1e9
      ? formatFigure(value, { digits: 1 })
      : value.toLocaleString("en-US", { maximumSignificantDigits: 6 }).replace("-", "\u2212");

const leadingDigit = (value: number) => Math.round(value / 10 ** Math.floor(Math.log10(value)));

/** Log ticks at decades; with 3s, or 2s and 5s, between them where decades alone are too few. */
function logTickValues([low, high]: [number, number], count: number): number[] {
  const first = Math.floor(Math.log10(low));
  const last = Math.ceil(Math.log10(high));
  const candidates = Array.from({ length: last - first + 1 }, (_, i) => 10 ** (first + i)).flatMap(
    (decade) => Array.from({ length: 9 }, (_, i) => (i + 1) * decade),
  );
  const within = candidates
    .map((value) => Number(value.toPrecision(6)))
    .filter((value) => value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9));
  const sets = [[1], [1, 3], [1, 2, 5], [1, 2, 3, 4, 5, 6, 7, 8, 9]].map((digits) =>
    within.filter((value) => digits.includes(leadingDigit(value))),
  );
  const dense = sets[0];
  if (dense.length > count) {
    const step = Math.ceil(dense.length / count);
    return dense.filter((_, index) => index % step === 0);
  }
  // The densest set that still fits; two ticks at least, or the reader cannot tell the scale.
  const fitting = sets.filter((set) => set.length <= count && set.length >= 2);
  if (fitting.length > 0) return fitting.at(-1)!;
  return within.length >= 2
    ? within.slice(0, count)
    : scaleLinear([low, high], [0, 100]).ticks(count);
}

/** About `count` round ticks. */
export function ticksOf(scale: Scale, count = 4): Tick[] {
  const values =
    scale.kind === "log" ? logTickValues(scale.domain, count) : d3Scale(scale).ticks(count);
  return values.map((value) => ({
    value,
    label: tickLabel(value),
    position: positionOn(scale, value),
  }));
}

/** Two decimals are a hundredth of a percent: finer than a pixel, and short in the markup. */
export const percent = (position: number) => `${position.toFixed(2)}%`;

/** An svg path through points, both given in percent. */
export const linePath = (points: readonly (readonly [number, number])[]) =>
  points
    .map(([x, y], index) => `${index === 0 ? "M" : "L"}${x.toFixed(2)} ${y.toFixed(2)}`)
    .join("");
