import type { LightComponent } from "./composition-schema";

/** One component or fraction of a stream, after normalising. */
export interface StreamComponent {
  /** a light component, or `C7`, `C8`, … of an extended analysis, or the plus fraction (`C7+`, `C30+`) */
  readonly name: string;
  readonly light: LightComponent | null;
  /** 7 and up for heavy fractions, else null */
  readonly carbonNumber: number | null;
  readonly moleFraction: number;
  /** lb/lbmol */
  readonly molecularWeight: number;
  /** at 60 degF, water = 1; null for light components */
  readonly specificGravity: number | null;
}

/** Heptanes and heavier as one. */
export interface HeptanesPlus {
  readonly moleFraction: number;
  readonly molecularWeight: number;
  readonly specificGravity: number;
}

/** A stream whose mole fractions add up to one. */
export interface Stream {
  readonly components: readonly StreamComponent[];
  readonly heptanesPlus: HeptanesPlus | null;
  readonly molecularWeight: number;
  /** air = 1 */
  readonly gravity: number;
}
