import type { HeptanesPlus, StreamComponent } from "./stream";

/** What a lump needs of its members. */
interface Lumpable {
  readonly moleFraction: number;
  readonly molecularWeight: number;
  readonly specificGravity: number;
}

/**
 * Several heavy fractions as one: moles add, the molecular weight is the mole average, and the specific gravity the
 * volume average (volumes of ideal liquids at 60 degF add), so that mass and liquid volume stay what they were.
 *
 *     M = sum z M / sum z        g = sum z M / sum (z M / g)
 *
 * @returns  null when there is nothing to lump
 * @example lumpFractions([{ moleFraction: 0.5, molecularWeight: 100, specificGravity: 0.7 },
 *   { moleFraction: 0.5, molecularWeight: 200, specificGravity: 0.8 }])
 *   // => { moleFraction: 1, molecularWeight: 150, specificGravity: 0.763636 }
 */
export function lumpFractions(fractions: readonly Lumpable[]): HeptanesPlus | null {
  let moles = 0;
  let mass = 0;
  let volume = 0;
  for (const { moleFraction, molecularWeight, specificGravity } of fractions) {
    moles += moleFraction;
    mass += moleFraction * molecularWeight;
    volume += (moleFraction * molecularWeight) / specificGravity;
  }
  if (moles === 0) return null;
  return { moleFraction: moles, molecularWeight: mass / moles, specificGravity: mass / volume };
}

/** A heavy fraction of a stream, whose specific gravity is known by construction. */
export type HeavyComponent = StreamComponent & { readonly specificGravity: number };

/** The fractions of a stream from C7 up. */
export function heavyComponents(components: readonly StreamComponent[]): HeavyComponent[] {
  return components.filter(
    (component): component is HeavyComponent => component.specificGravity !== null,
  );
}
