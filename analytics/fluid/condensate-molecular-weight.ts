import { DomainError } from "../errors";
import type { Warning } from "../warnings";

export type MolecularWeightMethod = "cragoe" | "gold-mccain-jennings";

/** Singular points of the two correlations, degrees API. */
const LOWEST_API: Record<MolecularWeightMethod, number> = {
  cragoe: 5.9,
  "gold-mccain-jennings": 8.811,
};

/**
 * Specific gravity of a stock-tank liquid at 60 degF, water = 1: 141.5 / (131.5 + API).
 *
 * @throws {DomainError} when API is not above -131.5
 * @example specificGravityFromApi(56) // => 0.754667
 */
export function specificGravityFromApi(api: number): number {
  if (!(api > -131.5 && api < Infinity)) {
    throw new DomainError(`${api} °API is not the gravity of a liquid`, {
      input: "condensateApi",
      value: api,
    });
  }
  return 141.5 / (131.5 + api);
}

/**
 * Molecular weight of stock-tank condensate from its gravity, lb/lbmol.
 *
 *     Cragoe:                     Mo = 6084 / (API - 5.9)
 *     Gold, McCain and Jennings:  Mo = 5954 / (API - 8.811)
 *
 * Valid for about 40 to 70 API. The two differ by 4 to 7 % between 40 and 55 API, and the vapour equivalent of the
 * condensate by as much: a laboratory value is worth having.
 *
 * @throws {DomainError} when API is not above the singular point of the correlation
 * @example condensateMolecularWeight(50) // => 137.9592
 * @see C. S. Cragoe, US Bureau of Standards Misc. Publ. 97 (1929), constants from memory; D. K. Gold, W. D. McCain,
 *   J. W. Jennings, J. Pet. Technol. 41 (July 1989) 747-752
 */
export function condensateMolecularWeight(
  api: number,
  method: MolecularWeightMethod = "cragoe",
): number {
  const lowest = LOWEST_API[method];
  if (!(api > lowest && api < Infinity)) {
    throw new DomainError(
      `A condensate of ${api} °API has no molecular weight by this correlation; it begins above ${lowest}`,
      { input: "condensateApi", value: api },
    );
  }
  return method === "cragoe" ? 6084 / (api - lowest) : 5954 / (api - lowest);
}

/** Warns where the correlations are stretched: below 35 or above 75 API. */
export function molecularWeightWarnings(api: number): Warning[] {
  if (api >= 35 && api <= 75) return [];
  return [
    {
      code: "molecular_weight_outside_range",
      severity: "warning",
      input: "fluid.condensateMolecularWeight",
      message:
        `The molecular weight is estimated at ${api} °API, outside 35 to 75 where the correlation is used. ` +
        "Enter a laboratory value.",
    },
  ];
}
