import { DomainError } from "../errors";

/** From the leanest to the richest. */
export const fluidTypes = [
  "dry-gas",
  "wet-gas",
  "lean-condensate",
  "condensate",
  "rich-condensate",
  "near-critical",
  "volatile-oil",
] as const;
export type FluidType = (typeof fluidTypes)[number];

/** Words for screens, in the order of `fluidTypes`. */
export const fluidTypeLabels: Record<FluidType, string> = {
  "dry-gas": "Dry gas",
  "wet-gas": "Wet gas",
  "lean-condensate": "Lean gas condensate",
  condensate: "Gas condensate",
  "rich-condensate": "Rich gas condensate",
  "near-critical": "Near-critical gas condensate",
  "volatile-oil": "Volatile oil",
};

const MCCAIN_1990 = "W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5";
const MCCAIN_1994 = "W. D. McCain, J. Pet. Technol. 46 (Sept. 1994) 746-750";
const COMMON_PRACTICE = "common practice, no source";

interface Limit {
  readonly type: FluidType;
  /** in words, after the figure */
  readonly rule: string;
  readonly source: string;
}

/** By scf/STB of all surface gas, from the most. The last one has no lower limit. */
const BY_GAS_OIL_RATIO: readonly (Limit & { readonly above: number })[] = [
  {
    type: "dry-gas",
    above: 100_000,
    rule: "above 100,000 scf/STB is a dry gas",
    source: MCCAIN_1994,
  },
  {
    type: "wet-gas",
    above: 50_000,
    rule: "50,000 to 100,000 scf/STB is a wet gas",
    source: MCCAIN_1990,
  },
  {
    type: "lean-condensate",
    above: 20_000,
    rule: "20,000 to 50,000 scf/STB (20 to 50 STB/MMscf) is a lean gas condensate",
    source: COMMON_PRACTICE,
  },
  {
    type: "condensate",
    above: 1e6 / 150,
    rule: "6,667 to 20,000 scf/STB (50 to 150 STB/MMscf) is a gas condensate",
    source: COMMON_PRACTICE,
  },
  {
    type: "rich-condensate",
    above: 5_000,
    rule: "5,000 to 6,667 scf/STB (above 150 STB/MMscf) is a rich gas condensate",
    source: COMMON_PRACTICE,
  },
  {
    type: "near-critical",
    above: 3_300,
    rule: "3,300 to 5,000 scf/STB is a gas condensate near its critical point",
    source: COMMON_PRACTICE,
  },
  {
    type: "volatile-oil",
    above: 0,
    rule: "below 3,300 scf/STB is a volatile oil",
    source: MCCAIN_1990,
  },
];

/** By mole per cent of heptanes plus, from the least. */
const BY_HEPTANES_PLUS: readonly (Limit & { readonly below: number })[] = [
  { type: "dry-gas", below: 0.7, rule: "below 0.7 % is a dry gas", source: MCCAIN_1994 },
  { type: "wet-gas", below: 4, rule: "0.7 to 4 % is a wet gas", source: MCCAIN_1990 },
  {
    type: "condensate",
    below: 12.5,
    rule: "4 to 12.5 % is a gas condensate",
    source: MCCAIN_1990,
  },
  {
    type: "volatile-oil",
    below: Infinity,
    rule: "from 12.5 % it is a volatile oil",
    source: MCCAIN_1990,
  },
];

function limitOfGasOilRatio(surfaceGasOilRatioScfPerStb: number) {
  if (!(surfaceGasOilRatioScfPerStb > 0)) {
    throw new DomainError(
      `A gas-oil ratio is above zero, not ${surfaceGasOilRatioScfPerStb} scf/STB`,
      { input: "surfaceGasOilRatioScfPerStb", value: surfaceGasOilRatioScfPerStb },
    );
  }
  // 3,300 itself is still a condensate
  return BY_GAS_OIL_RATIO.find(({ type, above }) =>
    type === "near-critical"
      ? surfaceGasOilRatioScfPerStb >= above
      : surfaceGasOilRatioScfPerStb > above,
  )!;
}

/**
 * Type of a reservoir fluid from its initial producing gas-oil ratio, scf/STB of all surface gas:
 *
 * - above 100,000: dry gas; McCain 1994
 * - above 50,000: wet gas (no liquid forms in the reservoir); McCain 1990
 * - 3,300 to 50,000: retrograde gas condensate; McCain 1990. Within it, lean from 20,000 (below 50 STB/MMscf), rich
 *   below 6,667 (above 150 STB/MMscf), near-critical below 5,000: common practice, no source
 * - below 3,300: volatile oil; McCain 1990
 *
 * A rule of thumb: only a laboratory study says what a fluid is.
 *
 * @throws {DomainError} when the ratio is not positive (infinity is a gas without liquid)
 * @example fluidTypeFromGasOilRatio(12450) // => "condensate"
 * @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5; J. Pet. Technol. 46 (Sept. 1994) 746
 */
export function fluidTypeFromGasOilRatio(surfaceGasOilRatioScfPerStb: number): FluidType {
  return limitOfGasOilRatio(surfaceGasOilRatioScfPerStb).type;
}

export interface FluidEvidence {
  /** of the wellstream; null when no composition is known */
  readonly heptanesPlusMoleFraction: number | null;
  /** of all surface gas; null when no separator test is known, infinite for a gas without liquid */
  readonly surfaceGasOilRatioScfPerStb: number | null;
}

export interface FluidClass {
  readonly type: FluidType;
  readonly label: string;
  /** the rule that decided, in words with the figure */
  readonly rule: string;
  readonly source: string;
}

const RETROGRADE = 2;

/** Dry gases, wet gases, retrograde gases of any richness, oils. */
function family(type: FluidType): number {
  if (type === "dry-gas") return 0;
  if (type === "wet-gas") return 1;
  return type === "volatile-oil" ? RETROGRADE + 1 : RETROGRADE;
}

/**
 * Type of a reservoir fluid from heptanes plus, from the gas-oil ratio, or from both. Heptanes plus: below 0.7 mol % dry
 * gas (McCain 1994), to 4 % wet gas, to 12.5 % gas condensate, above a volatile oil (McCain 1990). Where both are known,
 * the gas-oil ratio says how rich a condensate is, and where they disagree the richer type counts: taking a condensate
 * for a wet gas loses more than the other way round.
 *
 * Limits from memory. A rule of thumb: only a laboratory study says what a fluid is.
 *
 * @throws {DomainError} when neither is known or one is impossible
 * @example classifyFluid({ heptanesPlusMoleFraction: 0.0659, surfaceGasOilRatioScfPerStb: null }).type
 *   // => "condensate"
 * @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5; J. Pet. Technol. 46 (Sept. 1994) 746
 */
export function classifyFluid(evidence: FluidEvidence): FluidClass {
  const byHeavy = classByHeptanesPlus(evidence.heptanesPlusMoleFraction);
  const byRatio = classByGasOilRatio(evidence.surfaceGasOilRatioScfPerStb);
  if (!byHeavy || !byRatio) {
    const only = byHeavy ?? byRatio;
    if (!only) {
      throw new DomainError("A fluid's type needs its heptanes plus or its gas-oil ratio", {
        input: "heptanesPlusMoleFraction",
      });
    }
    return only;
  }
  const [heavy, ratio] = [family(byHeavy.type), family(byRatio.type)];
  if (heavy === ratio) return byRatio;
  const [counts, other] = heavy > ratio ? [byHeavy, byRatio] : [byRatio, byHeavy];
  const type = heavy === RETROGRADE && ratio < RETROGRADE ? "lean-condensate" : counts.type;
  return {
    type,
    label: fluidTypeLabels[type],
    rule: `${counts.rule}. The other figure says ${fluidTypeLabels[other.type].toLowerCase()} (${other.rule}); the richer counts`,
    source: counts.source,
  };
}

function classByHeptanesPlus(moleFraction: number | null): FluidClass | null {
  if (moleFraction === null) return null;
  if (!(moleFraction >= 0 && moleFraction <= 1)) {
    throw new DomainError(`A mole fraction lies between 0 and 1, not ${moleFraction}`, {
      input: "heptanesPlusMoleFraction",
      value: moleFraction,
    });
  }
  const percent = 100 * moleFraction;
  const { type, rule, source } = BY_HEPTANES_PLUS.find(({ below }) => percent < below)!;
  return {
    type,
    label: fluidTypeLabels[type],
    rule: `${Number(percent.toPrecision(3))} mol % heptanes plus: ${rule}`,
    source,
  };
}

function classByGasOilRatio(ratio: number | null): FluidClass | null {
  if (ratio === null) return null;
  const { type, rule, source } = limitOfGasOilRatio(ratio);
  const figure =
    ratio === Infinity
      ? "no liquid at the surface"
      : `${Number(ratio.toPrecision(4)).toLocaleString("en-GB")} scf/STB`;
  return { type, label: fluidTypeLabels[type], rule: `${figure}: ${rule}`, source };
}
