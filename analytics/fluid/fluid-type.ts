import { DomainError } from "../errors";

export const fluidTypes = [
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
  "wet-gas": "Wet gas",
  "lean-condensate": "Lean gas condensate",
  condensate: "Gas condensate",
  "rich-condensate": "Rich gas condensate",
  "near-critical": "Near-critical gas condensate",
  "volatile-oil": "Volatile oil",
};

/**
 * Type of a reservoir fluid from its initial producing gas-oil ratio, scf/STB of all surface gas:
 *
 * - above 50,000: wet gas (no liquid forms in the reservoir); McCain 1990
 * - 3,300 to 50,000: retrograde gas condensate; McCain 1990. Within it, lean from 20,000 (below 50 STB/MMscf), rich
 *   below 6,667 (above 150 STB/MMscf), near-critical below 5,000: common practice, no source
 * - below 3,300: volatile oil; McCain 1990
 *
 * A rule of thumb: only a laboratory study says what a fluid is.
 *
 * @throws {DomainError} when the ratio is not positive (infinity is dry gas, and counts as wet gas)
 * @example fluidTypeFromGasOilRatio(12450) // => "condensate"
 * @see W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5
 */
export function fluidTypeFromGasOilRatio(surfaceGasOilRatioScfPerStb: number): FluidType {
  if (!(surfaceGasOilRatioScfPerStb > 0)) {
    throw new DomainError(
      `A gas-oil ratio is above zero, not ${surfaceGasOilRatioScfPerStb} scf/STB`,
      { input: "surfaceGasOilRatioScfPerStb", value: surfaceGasOilRatioScfPerStb },
    );
  }
  if (surfaceGasOilRatioScfPerStb > 50000) return "wet-gas";
  if (surfaceGasOilRatioScfPerStb > 20000) return "lean-condensate";
  if (surfaceGasOilRatioScfPerStb > 1e6 / 150) return "condensate";
  if (surfaceGasOilRatioScfPerStb > 5000) return "rich-condensate";
  if (surfaceGasOilRatioScfPerStb >= 3300) return "near-critical";
  return "volatile-oil";
}
