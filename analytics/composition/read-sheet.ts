/** From a laboratory's composition sheet to one stream whose mole fractions add up to one. */
import { DomainError } from "../errors";
import { CUBIC_FEET_PER_BARREL } from "../units/conversions";
import {
  AIR_MOLECULAR_WEIGHT,
  baseAtPressure,
  standardConstants,
} from "../units/standard-conditions";
import type { Warning } from "../warnings";
import { checkPlausibility, checkSeparatorRatio, type StreamRole } from "./check-sheet";
import { carbonNumberProperties, fractionName, lightConstants } from "./components";
import { lightComponents, type CompositionSheet, type ReportedStream } from "./composition-schema";
import { heavyComponents, lumpFractions } from "./heptanes-plus";
import type { Stream, StreamComponent } from "./stream";

/** Sums of mole per cent that a sheet may have; outside, something is missing or counted twice. */
const POSSIBLE_TOTAL = [95, 105] as const;
/** Sums that rounding explains. */
const USUAL_TOTAL = [99, 101] as const;

export interface Normalised {
  readonly stream: StreamRole;
  readonly reportedTotalMolePercent: number;
  /** every reported figure was multiplied by this; 1 when nothing was done */
  readonly factor: number;
}

export interface StreamReading {
  readonly stream: Stream;
  /** mole per cent of each of the stream's components as the sheet gave it */
  readonly reportedMolePercent: readonly number[];
  readonly normalised: Normalised;
  readonly warnings: Warning[];
}

export interface CompositionReading {
  readonly stream: Stream;
  /** one for a wellstream, gas and liquid for separator streams */
  readonly normalised: readonly Normalised[];
  /** as reported, component by component of the stream; null where two streams were recombined */
  readonly reportedMolePercent: readonly number[] | null;
  readonly warnings: Warning[];
}

/**
 * One reported stream as mole fractions. The figures are multiplied by 100 over their sum; the sum and the factor are
 * returned, so that a screen can show what was done. Fractions of an extended analysis get the generalised properties
 * of their carbon number; the plus fraction has its own. Components with nothing in them are left out.
 *
 * Order does not matter: the stream comes in the order of a sheet whatever order its parts were typed in.
 *
 * @param reported  mole per cent
 * @param role      decides what is plausible: a separator liquid may hold 80 % heptanes plus, a wellstream may not
 * @param path      prefix of the `input` of errors and warnings
 * @throws {DomainError} when a figure is negative, the sum lies outside 95 to 105 %, carbon numbers have a gap, the
 *   plus fraction has no molecular weight or specific gravity, or a property is impossible
 * @example readStream({ light: { C1: 90, C2: 9 }, carbonNumbers: [], plus: null }).normalised.factor // => 1.010101
 */
export function readStream(
  reported: ReportedStream,
  role: StreamRole = "wellstream",
  path = "stream",
): StreamReading {
  const rows = reportedRows(reported, path);
  const total = rows.reduce((sum, { molePercent }) => sum + molePercent, 0);
  if (!(total >= POSSIBLE_TOTAL[0] && total <= POSSIBLE_TOTAL[1])) {
    throw new DomainError(
      `The ${role} adds up to ${percent(total)}; a sheet adds up to 100 %, and outside 95 to 105 % something is missing ` +
        "or counted twice",
      { input: path, value: total },
    );
  }
  const factor = Math.abs(total - 100) < 1e-9 ? 1 : 100 / total;
  const stream = assemble(
    rows.map(({ component, molePercent }) => ({ ...component, moleFraction: molePercent / total })),
  );
  const warnings = checkPlausibility(stream, role, {
    light: `${path}.light`,
    plus: `${path}.plus`,
  });
  if (total < USUAL_TOTAL[0] || total > USUAL_TOTAL[1]) {
    warnings.unshift({
      code: "sum_not_100",
      severity: "warning",
      input: path,
      message:
        `The ${role} adds up to ${percent(total)} as reported. Every figure was multiplied by ` +
        `${factor.toFixed(4)}; look for a missing component or a typing error.`,
    });
  }
  return {
    stream,
    reportedMolePercent: rows.map(({ molePercent }) => molePercent),
    normalised: { stream: role, reportedTotalMolePercent: total, factor },
    warnings,
  };
}

/**
 * A whole composition sheet. Separator streams are recombined at their measured ratio, per barrel of separator liquid:
 *
 *     moles of gas = R / Vm(base)        moles of liquid = 5.6146 rho / M_liquid
 *
 * with R in scf per separator barrel, Vm the molar volume at the sheet's own base and rho the liquid's density, lb/ft3,
 * at separator conditions. A plus fraction of one stream that the other reports number by number joins the carbon
 * number of the nearest molecular weight, moles and mass unchanged, with a warning.
 *
 * @throws {DomainError} as `readStream`, or when the ratio or the density is impossible; `input` is a path in the sheet
 * @example readComposition({ kind: "wellstream", stream: { light: { C1: 95, C2: 5 }, carbonNumbers: [], plus: null } })
 *   .stream.gravity // => 0.578077
 * @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 7
 */
export function readComposition(sheet: CompositionSheet): CompositionReading {
  if (sheet.kind === "wellstream") {
    const { stream, normalised, reportedMolePercent, warnings } = readStream(sheet.stream);
    return { stream, normalised: [normalised], reportedMolePercent, warnings };
  }
  const gas = readStream(sheet.gas, "gas", "gas");
  const liquid = readStream(sheet.liquid, "liquid", "liquid");
  const warnings = [...gas.warnings, ...liquid.warnings, ...checkSeparatorRatio(sheet)];
  const { molarVolumeScfPerLbmol } = standardConstants(baseAtPressure(sheet.basePressurePsia));
  const gasMoles = sheet.gasLiquidRatioScfPerSeparatorBarrel / molarVolumeScfPerLbmol;
  const liquidMoles =
    (CUBIC_FEET_PER_BARREL * sheet.liquidDensityLbPerCubicFoot) / liquid.stream.molecularWeight;
  const vapour = gasMoles / (gasMoles + liquidMoles);
  const parts = [
    ...scaled(alignPlus(gas.stream, liquid.stream, "gas", warnings), vapour),
    ...scaled(alignPlus(liquid.stream, gas.stream, "liquid", warnings), 1 - vapour),
  ];
  const stream = assemble(mergeByName(parts));
  warnings.push(
    ...checkPlausibility(stream, "wellstream", { light: "gas.light", plus: "liquid.plus" }),
  );
  return {
    stream,
    normalised: [gas.normalised, liquid.normalised],
    reportedMolePercent: null,
    warnings,
  };
}

interface Row {
  readonly component: Omit<StreamComponent, "moleFraction">;
  readonly molePercent: number;
}

function reportedRows(reported: ReportedStream, path: string): Row[] {
  const rows: Row[] = [];
  const add = (component: Row["component"], molePercent: number, input: string) => {
    if (!(molePercent >= 0 && molePercent <= 100)) {
      throw new DomainError(`${component.name} lies between 0 and 100 mol %, not ${molePercent}`, {
        input,
        value: molePercent,
      });
    }
    if (molePercent > 0) rows.push({ component, molePercent });
  };
  for (const name of lightComponents) {
    const { molecularWeight } = lightConstants[name];
    add(
      { name, light: name, carbonNumber: null, molecularWeight, specificGravity: null },
      reported.light[name] ?? 0,
      `${path}.light.${name}`,
    );
  }
  const numbers = assertNoGap(reported, path);
  numbers.forEach(({ carbonNumber, molePercent, index }) => {
    const { molecularWeight, specificGravity } = carbonNumberProperties(carbonNumber);
    const name = fractionName(carbonNumber);
    add(
      { name, light: null, carbonNumber, molecularWeight, specificGravity },
      molePercent,
      `${path}.carbonNumbers.${index}.molePercent`,
    );
  });
  const { plus } = reported;
  if (plus) {
    for (const key of ["molecularWeight", "specificGravity"] as const) {
      if (!(plus[key] > 0 && plus[key] < Infinity)) {
        throw new DomainError(
          `${fractionName(plus.carbonNumber, true)} needs its ${key === "molecularWeight" ? "molecular weight" : "specific gravity"}: ` +
            "without it neither gravity nor yield follows from the sheet",
          { input: `${path}.plus.${key}`, value: plus[key] },
        );
      }
    }
    const { carbonNumber, molecularWeight, specificGravity } = plus;
    add(
      {
        name: fractionName(carbonNumber, true),
        light: null,
        carbonNumber,
        molecularWeight,
        specificGravity,
      },
      plus.molePercent,
      `${path}.plus.molePercent`,
    );
  }
  return rows;
}

/** The carbon numbers in order, after a look for gaps, doubles and a plus fraction that does not follow on. */
function assertNoGap({ carbonNumbers, plus }: ReportedStream, path: string) {
  const numbers = carbonNumbers
    .map((row, index) => ({ ...row, index }))
    .sort((a, b) => a.carbonNumber - b.carbonNumber);
  let next = 7;
  for (const { carbonNumber, index } of numbers) {
    if (carbonNumber !== next) {
      throw new DomainError(
        carbonNumber < next
          ? `C${carbonNumber} stands on the sheet twice`
          : `C${next} is missing: carbon numbers run without a gap from C7 (enter 0 where there is none)`,
        { input: `${path}.carbonNumbers.${index}.carbonNumber`, value: carbonNumber },
      );
    }
    next += 1;
  }
  if (plus && plus.carbonNumber !== next) {
    throw new DomainError(
      numbers.length === 0
        ? `C7 to C${plus.carbonNumber - 1} are missing before C${plus.carbonNumber}+`
        : `After C${next - 1} comes C${next}+, not C${plus.carbonNumber}+`,
      { input: `${path}.plus.carbonNumber`, value: plus.carbonNumber },
    );
  }
  return numbers;
}

function assemble(components: readonly StreamComponent[]): Stream {
  const molecularWeight = components.reduce(
    (sum, component) => sum + component.moleFraction * component.molecularWeight,
    0,
  );
  return {
    components,
    heptanesPlus: lumpFractions(heavyComponents(components)),
    molecularWeight,
    gravity: molecularWeight / AIR_MOLECULAR_WEIGHT,
  };
}

const scaled = (components: readonly StreamComponent[], by: number) =>
  components.map((component) => ({ ...component, moleFraction: component.moleFraction * by }));

/** Lets a plus fraction join the single carbon number of the other stream that is nearest to it by weight. */
function alignPlus(
  stream: Stream,
  other: Stream,
  role: StreamRole,
  warnings: Warning[],
): StreamComponent[] {
  const isPlus = ({ name }: StreamComponent) => name.endsWith("+");
  return stream.components.map((component) => {
    const from = component.carbonNumber;
    const finer = other.components.filter(
      ({ carbonNumber }) => carbonNumber !== null && from !== null && carbonNumber >= from,
    );
    if (!isPlus(component) || finer.length === 0 || (finer.length === 1 && isPlus(finer[0]))) {
      return component;
    }
    const nearest = finer.reduce((best, candidate) =>
      distance(candidate, component) < distance(best, component) ? candidate : best,
    );
    warnings.push({
      code: "plus_fraction_joined",
      severity: "warning",
      input: `${role}.plus`,
      message:
        `${component.name} of the ${role} is reported whole, while the other stream goes on to ` +
        `${finer[finer.length - 1].name}. It counts as ${nearest.name}, the fraction nearest to it by molecular weight.`,
    });
    return { ...component, name: nearest.name, carbonNumber: nearest.carbonNumber };
  });
}

const distance = (a: StreamComponent, b: StreamComponent) =>
  Math.abs(Math.log(a.molecularWeight / b.molecularWeight));

function mergeByName(parts: readonly StreamComponent[]): StreamComponent[] {
  const byName = new Map<string, StreamComponent[]>();
  for (const part of parts) byName.set(part.name, [...(byName.get(part.name) ?? []), part]);
  const merged = [...byName.values()].map(([first, ...rest]): StreamComponent => {
    const lump = lumpFractions(heavyComponents([first, ...rest]));
    if (lump) return { ...first, ...lump };
    return rest.reduce<StreamComponent>(
      (sum, { moleFraction }) => ({ ...sum, moleFraction: sum.moleFraction + moleFraction }),
      first,
    );
  });
  const rank = ({ light, carbonNumber, name }: StreamComponent) =>
    light ? lightComponents.indexOf(light) : 100 + 2 * carbonNumber! + (name.endsWith("+") ? 1 : 0);
  return merged.sort((a, b) => rank(a) - rank(b));
}

const percent = (value: number) => `${Number(value.toPrecision(5))} %`;
