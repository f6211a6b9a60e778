/** What a gas would give as liquid if a plant took all of it out: gallons per thousand standard cubic feet. */
import type { LightComponent } from "../composition/composition-schema";
import { CANONICAL_CONSTANTS, WATER_POUNDS_PER_BARREL } from "../units/standard-conditions";
import type { GasComponent } from "./heating-value";

/** Ideal gas in a gallon of liquid, scf/gal at 14.696 psia and 60 degF: GPA 2145, from memory. */
const SCF_PER_GALLON: Readonly<Partial<Record<LightComponent, number>>> = {
  C2: 37.488,
  C3: 36.391,
  iC4: 30.637,
  nC4: 31.801,
  iC5: 27.414,
  nC5: 27.658,
  C6: 24.38,
};
const GALLONS_PER_BARREL = 42;

export interface PlantLiquid {
  /** `C7+` takes every heavier fraction together */
  readonly name: string;
  readonly gallonsPerMscf: number;
}

/**
 * Liquid content (GPM) of a gas, component by component: all of it, not what a plant recovers.
 *
 *     GPM_i = 1000 y_i / (scf per gallon)        heavy: 1000 y M / (379.4828 x 8.3372 g)
 *
 * Ethane and heavier; methane and the non-hydrocarbons have none. As ideal gas at 14.696 psia and 60 degF; a heavy
 * fraction's gallon weighs its specific gravity times that of water.
 *
 * @example plantLiquids(components)[0] // => { name: "C2", gallonsPerMscf: 2.6675 } for 10 mol % ethane
 * @see GPA Midstream Standard 2145
 */
export function plantLiquids(components: readonly GasComponent[]): PlantLiquid[] {
  const poundsPerGallon = WATER_POUNDS_PER_BARREL / GALLONS_PER_BARREL;
  const liquids: PlantLiquid[] = [];
  let heavy = 0;
  for (const { light, moleFraction, molecularWeight, specificGravity } of components) {
    if (light) {
      const gas = SCF_PER_GALLON[light];
      if (gas) liquids.push({ name: light, gallonsPerMscf: (1000 * moleFraction) / gas });
    } else if (specificGravity !== null) {
      heavy +=
        (1000 * moleFraction * molecularWeight) /
        (CANONICAL_CONSTANTS.molarVolumeScfPerLbmol * poundsPerGallon * specificGravity);
    }
  }
  return heavy > 0 ? [...liquids, { name: "C7+", gallonsPerMscf: heavy }] : liquids;
}
