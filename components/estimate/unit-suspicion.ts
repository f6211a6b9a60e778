import { toCanonical } from "@/analytics/units/conversions";
import type { DriverName } from "@/analytics/volumetrics/results-schema";

/** A unit that people type by habit where another is asked for. */
interface OtherUnit {
  /** as in "is 31 in metres?" */
  words: string;
  symbol: string;
  toCanonical: (value: number) => number;
}

const perCent: OtherUnit[] = [{ words: "per cent", symbol: "%", toCanonical: (v) => v / 100 }];
const pressures: OtherUnit[] = [
  { words: "bar", symbol: "bar", toCanonical: (v) => toCanonical(v, "pressure", "bar") },
  { words: "megapascals", symbol: "MPa", toCanonical: (v) => toCanonical(v, "pressure", "MPa") },
];

const otherUnits: Partial<Record<DriverName, OtherUnit[]>> = {
  areaAcres: [
    {
      words: "square kilometres",
      symbol: "km²",
      toCanonical: (v) => toCanonical(v, "area", "km2"),
    },
    { words: "hectares", symbol: "ha", toCanonical: (v) => toCanonical(v, "area", "ha") },
  ],
  netThicknessFt: [
    { words: "metres", symbol: "m", toCanonical: (v) => toCanonical(v, "length", "m") },
  ],
  porosity: perCent,
  waterSaturation: perCent,
  pressurePsia: pressures,
  temperatureDegF: [
    {
      words: "degrees Celsius",
      symbol: "°C",
      toCanonical: (v) => toCanonical(v, "temperature", "degC"),
    },
  ],
  gasRecovery: perCent,
  condensateRecovery: perCent,
  salesGasFraction: perCent,
  abandonmentPressurePsia: pressures,
  condensateCurveFactor: perCent,
  sweepEfficiency: perCent,
  displacementEfficiency: perCent,
};

export interface TypedValue {
  /** key of the parameter */
  key: string;
  /** in the input's own unit, as read from the field */
  value: number;
}

export interface UnitSuspicion {
  /** parameters that look as if they were in the other unit */
  keys: string[];
  typed: number[];
  words: string;
  symbol: string;
  converted: Record<string, number>;
  /** high over low as typed; `null` when all figures are under suspicion together */
  ratio: number | null;
}

/** What is usual for an input: its values, and how many times its low the high may be. */
export interface Usual {
  low: number;
  high: number;
  ratioHigh: number | null;
}

const tidy = (value: number) => Number(value.toPrecision(3));

/**
 * Finds figures of one input that were probably typed in another unit: as they stand the range is unusual (a figure
 * outside the usual values, or high and low too far apart), and with some of them converted nothing is unusual and the
 * order holds. The fewest figures that explain it win. `null` when nothing is unusual, or no conversion explains it.
 *
 * @param values  low to high, as typed
 */
export function suspectUnit(
  name: DriverName,
  values: readonly TypedValue[],
  usual: Usual,
): UnitSuspicion | null {
  const units = otherUnits[name];
  if (!units || values.length === 0) return null;
  const figures = values.map((typed) => typed.value);
  if (figures.some((value) => !(value > 0)) || looksUsual(figures, usual)) return null;

  const subsets = subsetsBySize(values.length);
  for (const subset of subsets) {
    for (const unit of units) {
      const changed = figures.map((value, index) =>
        subset.includes(index) ? tidy(unit.toCanonical(value)) : value,
      );
      if (!looksUsual(changed, usual)) continue;
      return {
        keys: subset.map((index) => values[index].key),
        typed: subset.map((index) => figures[index]),
        words: unit.words,
        symbol: unit.symbol,
        converted: Object.fromEntries(subset.map((index) => [values[index].key, changed[index]])),
        ratio:
          subset.length === values.length
            ? null
            : figures[figures.length - 1] / Math.min(...figures),
      };
    }
  }
  return null;
}

function looksUsual(figures: readonly number[], usual: Usual): boolean {
  const ordered = figures.every((value, index) => index === 0 || value >= figures[index - 1]);
  const within = figures.every((value) => value >= usual.low && value <= usual.high);
  const ratio = figures[figures.length - 1] / figures[0];
  return ordered && within && (usual.ratioHigh === null || ratio <= usual.ratioHigh);
}

function subsetsBySize(count: number): number[][] {
  const all: number[][] = [];
  for (let mask = 1; mask < 2 ** count; mask += 1) {
    all.push(
      Array.from({ length: count }, (_, index) => index).filter((index) => mask & (1 << index)),
    );
  }
  return all.sort((a, b) => a.length - b.length);
}
