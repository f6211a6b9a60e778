/** Binary interaction parameters of Peng-Robinson that come with a characterisation untuned. */
import type { LightComponent } from "../composition/composition-schema";

/** With nitrogen, by hydrocarbon; C6 stands for everything heavier. */
const NITROGEN: Readonly<Partial<Record<LightComponent, number>>> = {
  C1: 0.025,
  C2: 0.01,
  C3: 0.09,
  iC4: 0.095,
  nC4: 0.095,
  iC5: 0.1,
  nC5: 0.11,
  C6: 0.11,
};
const CARBON_DIOXIDE = 0.105;
const HYDROGEN_SULPHIDE: Readonly<Partial<Record<LightComponent, number>>> = {
  C1: 0.07,
  C2: 0.085,
  C3: 0.08,
  iC4: 0.075,
  nC4: 0.075,
  iC5: 0.07,
  nC5: 0.07,
  C6: 0.055,
};
const HYDROGEN_SULPHIDE_HEAVY = 0.05;
const CARBON_DIOXIDE_HYDROGEN_SULPHIDE = 0.135;
const NITROGEN_HYDROGEN_SULPHIDE = 0.13;

/** A component as the interactions see it: light by name, heavy by its specific gravity. */
export type Interacting =
  | { readonly light: LightComponent; readonly specificGravity: null }
  | { readonly light: null; readonly specificGravity: number };

/**
 * Interaction parameter of two components. Hydrocarbons with each other have none, but methane with heptanes plus:
 *
 *     k(C1, heavy) = 0.14 g - 0.0688
 *
 * Typical published values for Peng-Robinson, from memory: nitrogen with hydrocarbons 0.01 to 0.11, carbon dioxide
 * 0.105, hydrogen sulphide 0.05 to 0.085. The one of methane with the heavy end decides the dew point most, and is the
 * first to be tuned.
 *
 * @param methaneHeavyFactor  multiplies k(C1, heavy)
 * @example binaryInteraction({ light: "C1", specificGravity: null }, { light: null, specificGravity: 0.774 }, 1)
 *   // => 0.03956
 * @see C. H. Whitson, M. R. Brule, Phase Behavior, SPE Monograph 20 (2000), ch. 4
 */
export function binaryInteraction(
  a: Interacting,
  b: Interacting,
  methaneHeavyFactor: number,
): number {
  if (a.light === null && b.light === null) return 0;
  if (a.light === null) return binaryInteraction(b, a, methaneHeavyFactor);
  if (b.light === null) return withHeavy(a.light, b.specificGravity, methaneHeavyFactor);
  if (a.light === b.light) return 0;
  const has = (name: LightComponent) => a.light === name || b.light === name;
  const other = (name: LightComponent) => (a.light === name ? b.light : a.light)!;
  if (has("H2S")) {
    if (has("CO2")) return CARBON_DIOXIDE_HYDROGEN_SULPHIDE;
    if (has("N2")) return NITROGEN_HYDROGEN_SULPHIDE;
    return HYDROGEN_SULPHIDE[other("H2S")] ?? 0;
  }
  if (has("CO2")) return has("N2") ? 0 : CARBON_DIOXIDE;
  if (has("N2")) return NITROGEN[other("N2")] ?? 0;
  return 0;
}

function withHeavy(light: LightComponent, specificGravity: number, methaneHeavyFactor: number) {
  switch (light) {
    case "C1":
      return methaneHeavyFactor * (0.14 * specificGravity - 0.0688);
    case "N2":
      return NITROGEN.C6!;
    case "CO2":
      return CARBON_DIOXIDE;
    case "H2S":
      return HYDROGEN_SULPHIDE_HEAVY;
    default:
      return 0;
  }
}
