/** What a composition sheet can and cannot say: refusals of the impossible and questions about the unusual. */
import { DomainError } from "../errors";
import type { Warning } from "../warnings";
import { carbonNumberProperties, fractionName } from "./components";
import type { CompositionSheet } from "./composition-schema";
import { heavyComponents, type HeavyComponent } from "./heptanes-plus";
import type { Stream } from "./stream";

export type StreamRole = "wellstream" | "gas" | "liquid";

interface Range {
  readonly what: string;
  readonly unit: string;
  readonly usual: readonly [number, number];
  readonly possible: readonly [number, number];
}

/** Usual and possible ranges of gas-condensate analyses: common practice, no source. */
const HEPTANES_PLUS_MOLECULAR_WEIGHT: Range = {
  what: "molecular weight of heptanes plus",
  unit: " lb/lbmol",
  usual: [100, 200],
  possible: [90, 300],
};
const HEPTANES_PLUS_SPECIFIC_GRAVITY: Range = {
  what: "specific gravity of heptanes plus",
  unit: "",
  usual: [0.7, 0.83],
  possible: [0.68, 0.95],
};
const HEPTANES_PLUS_MOLE_PERCENT: Range = {
  what: "heptanes plus of a gas-condensate wellstream",
  unit: " mol %",
  usual: [0, 12.5],
  possible: [0, 20],
};
const NON_HYDROCARBONS: Readonly<Record<string, Range>> = {
  CO2: { what: "carbon dioxide", unit: " mol %", usual: [0, 15], possible: [0, 80] },
  N2: { what: "nitrogen", unit: " mol %", usual: [0, 10], possible: [0, 80] },
  H2S: { what: "hydrogen sulphide", unit: " mol %", usual: [0, 10], possible: [0, 80] },
};
const LIQUID_DENSITY: Range = {
  what: "density of the separator liquid",
  unit: " lb/ft3",
  usual: [33, 53],
  possible: [20, 62.4],
};
const GAS_LIQUID_RATIO: Range = {
  what: "separator gas",
  unit: " scf per separator barrel",
  usual: [2_500, 200_000],
  possible: [200, 10_000_000],
};
/** hexanes without heptanes plus from which something is missing: common practice, no source */
const NOTICEABLE_HEXANES_PERCENT = 0.2;
/** Watson factor of heptanes plus by M and specific gravity; aromatic below, beyond pure paraffins above */
const USUAL_WATSON = [11, 12.9] as const;

function check(range: Range, value: number, input: string, code = "unusual_value"): Warning[] {
  const shown = `${Number(value.toPrecision(4))}${range.unit}`;
  const [lowest, highest] = range.possible;
  if (!(value >= lowest && value <= highest)) {
    throw new DomainError(
      `The ${range.what} cannot be ${shown}: it lies between ${lowest} and ${highest}${range.unit}`,
      { input, value },
    );
  }
  const [low, high] = range.usual;
  if (value >= low && value <= high) return [];
  return [
    {
      code,
      severity: "warning",
      input,
      message: `The ${range.what} is ${shown}; usual values run from ${low} to ${high}${range.unit}.`,
    },
  ];
}

/**
 * Watson characterisation factor of a fraction from its molecular weight and specific gravity.
 *
 *     Kw = 4.5579 M^0.15178 g^-0.84573
 *
 * About 12.5 for paraffins, 11.5 to 12.3 for the heptanes plus of condensates, 10 for aromatics. Riazi and Daubert's
 * boiling point (1980) rearranged by Whitson; from memory.
 *
 * @example watsonFactor(140, 0.774) // => 11.9839
 * @see C. H. Whitson, SPE J. 23 (Aug. 1983) 683-694
 */
export function watsonFactor(molecularWeight: number, specificGravity: number): number {
  return 4.5579 * molecularWeight ** 0.15178 * specificGravity ** -0.84573;
}

/** Where the figures of a stream stand on the sheet. */
export interface SheetPaths {
  readonly light: string;
  readonly plus: string;
}

/**
 * Refuses what no stream has and warns of what few have.
 *
 * @throws {DomainError} when a property of the heavy end is impossible, non-hydrocarbons reach 80 %, or a wellstream
 *   holds more than 20 % heptanes plus, which makes it an oil
 */
export function checkPlausibility(
  stream: Stream,
  role: StreamRole,
  { light: lightPath, plus: plusPath }: SheetPaths,
): Warning[] {
  const warnings: Warning[] = [];
  let nonHydrocarbons = 0;
  for (const { name, moleFraction } of stream.components) {
    const range = NON_HYDROCARBONS[name];
    if (!range) continue;
    nonHydrocarbons += moleFraction;
    warnings.push(...check(range, 100 * moleFraction, `${lightPath}.${name}`));
    if (name === "H2S" && role === "wellstream") {
      warnings.push(hydrogenSulphideCaution(moleFraction, `${lightPath}.H2S`));
    }
  }
  if (!(nonHydrocarbons < 0.8)) {
    throw new DomainError(
      `Nitrogen, carbon dioxide and hydrogen sulphide add up to ${(100 * nonHydrocarbons).toFixed(1)} %; from 80 % ` +
        "this is not a hydrocarbon stream",
      { input: lightPath, value: nonHydrocarbons },
    );
  }
  if (!stream.heptanesPlus) {
    return role === "wellstream"
      ? [...warnings, ...missingHeptanesPlus(stream, plusPath)]
      : warnings;
  }
  warnings.push(...checkPlusEnd(heavyComponents(stream.components), plusPath));
  const { molecularWeight, specificGravity, moleFraction } = stream.heptanesPlus;
  warnings.push(
    ...check(HEPTANES_PLUS_MOLECULAR_WEIGHT, molecularWeight, `${plusPath}.molecularWeight`),
    ...check(HEPTANES_PLUS_SPECIFIC_GRAVITY, specificGravity, `${plusPath}.specificGravity`),
  );
  if (role === "wellstream") {
    assertNoOil(100 * moleFraction, `${plusPath}.molePercent`);
    warnings.push(
      ...check(
        HEPTANES_PLUS_MOLE_PERCENT,
        100 * moleFraction,
        `${plusPath}.molePercent`,
        "probably_oil",
      ),
    );
  }
  const watson = watsonFactor(molecularWeight, specificGravity);
  if (watson < USUAL_WATSON[0] || watson > USUAL_WATSON[1]) {
    warnings.push({
      code: "unusual_heptanes_plus",
      severity: "warning",
      input: `${plusPath}.specificGravity`,
      message:
        `A molecular weight of ${Number(molecularWeight.toPrecision(4))} with a specific gravity of ` +
        `${specificGravity.toFixed(3)} gives a Watson factor of ${watson.toFixed(1)}; petroleum fractions have ` +
        `${USUAL_WATSON[0]} to ${USUAL_WATSON[1]}. One of the two may be mistyped.`,
    });
  }
  return warnings;
}

/** @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5: an oil from 12.5 mol % */
function assertNoOil(heptanesPlusPercent: number, input: string): void {
  const [, most] = HEPTANES_PLUS_MOLE_PERCENT.possible;
  if (heptanesPlusPercent <= most) return;
  throw new DomainError(
    `With ${Number(heptanesPlusPercent.toPrecision(4))} mol % heptanes plus this is an oil: a gas condensate holds no ` +
      `more than ${HEPTANES_PLUS_MOLE_PERCENT.usual[1]} % (McCain 1990), and above ${most} % nothing is worked out here. Look for a ` +
      "typing error, or whether the stream is the separator's liquid",
    { input, value: heptanesPlusPercent },
  );
}

/** A wellstream does not end at the hexanes: what is heavier was left out, or is hidden in them. */
function missingHeptanesPlus({ components }: Stream, input: string): Warning[] {
  const hexanes = 100 * (components.find(({ name }) => name === "C6")?.moleFraction ?? 0);
  if (!(hexanes > NOTICEABLE_HEXANES_PERCENT)) return [];
  return [
    {
      code: "heptanes_plus_missing",
      severity: "warning",
      input,
      message:
        `The wellstream holds ${Number(hexanes.toPrecision(3))} mol % hexanes and no heptanes plus. If the sheet ends ` +
        "at C6+, dew point and yield will be too low; ask for heptanes plus with its molecular weight and gravity.",
    },
  ];
}

/** A plus fraction beyond C7+ is heavier and denser than the carbon number before it. */
function checkPlusEnd(heavy: readonly HeavyComponent[], path: string): Warning[] {
  const plus = heavy.find(({ name, carbonNumber }) => name.endsWith("+") && carbonNumber! > 7);
  if (!plus) return [];
  const { carbonNumber, molecularWeight, specificGravity } = plus;
  const own = carbonNumberProperties(carbonNumber!);
  const before = carbonNumberProperties(carbonNumber! - 1);
  const name = fractionName(carbonNumber!, true);
  if (!(molecularWeight > before.molecularWeight && molecularWeight <= 1500)) {
    throw new DomainError(
      `${name} cannot have a molecular weight of ${molecularWeight}: C${carbonNumber! - 1} alone has about ` +
        `${before.molecularWeight}, and no condensate's end exceeds 1,500`,
      { input: `${path}.molecularWeight`, value: molecularWeight },
    );
  }
  if (!(specificGravity >= 0.68 && specificGravity <= 1.1)) {
    throw new DomainError(
      `${name} cannot have a specific gravity of ${specificGravity}: it lies between 0.68 and 1.1`,
      { input: `${path}.specificGravity`, value: specificGravity },
    );
  }
  const light = molecularWeight < own.molecularWeight;
  if (!light && specificGravity >= own.specificGravity - 0.03) return [];
  return [
    {
      code: "unusual_value",
      severity: "warning",
      input: `${path}.${light ? "molecularWeight" : "specificGravity"}`,
      message:
        `${name} is reported with a molecular weight of ${molecularWeight} and a specific gravity of ${specificGravity}; ` +
        `C${carbonNumber} alone has about ${own.molecularWeight} and ${own.specificGravity}.`,
    },
  ];
}

function hydrogenSulphideCaution(moleFraction: number, input: string): Warning {
  const ppm = Number((1e6 * moleFraction).toPrecision(3)).toLocaleString("en-GB");
  return {
    code: "sour_gas",
    severity: "caution",
    input,
    message:
      `The wellstream holds ${ppm} ppm of hydrogen sulphide. 100 ppm in air is immediately dangerous to life, and ` +
      "exposure is limited to 10 ppm for ten minutes (NIOSH).",
  };
}

/**
 * The ratio at which separator streams were measured.
 *
 * @throws {DomainError} when the ratio or the liquid's density is impossible
 */
export function checkSeparatorRatio(
  sheet: Extract<CompositionSheet, { kind: "separatorStreams" }>,
): Warning[] {
  return [
    ...check(
      GAS_LIQUID_RATIO,
      sheet.gasLiquidRatioScfPerSeparatorBarrel,
      "gasLiquidRatioScfPerSeparatorBarrel",
    ),
    ...check(LIQUID_DENSITY, sheet.liquidDensityLbPerCubicFoot, "liquidDensityLbPerCubicFoot"),
  ];
}
