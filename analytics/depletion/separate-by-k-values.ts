/** A stream through the separators by correlation: the fallback where no equation of state is set up. */
import type { SeparatorStage } from "../composition/composition-schema";
import type { Stream } from "../composition/stream";
import { vapourFraction } from "../equation-of-state/rachford-rice";
import { CANONICAL_CONSTANTS, WATER_POUNDS_PER_BARREL } from "../units/standard-conditions";
import { balanceComponents, HEPTANES_PLUS, lumpStream } from "./lumped-gas";
import { standingKValues } from "./standing-k-values";
import type { SurfaceProducts } from "./surface-products";

/**
 * Specific gravity at 60 degF of each component as part of a stabilised liquid, in the order of `balanceComponents`
 * without heptanes plus: GPA 2145, from memory. Those of gases count as apparent values and matter little at the tank.
 */
const LIQUID_SPECIFIC_GRAVITY = [
  0.80144, 0.81802, 0.8094, 0.3, 0.35619, 0.50736, 0.56287, 0.58401, 0.6247, 0.63112, 0.66383,
];

/**
 * Flashes a stream from stage to stage with Standing's K values, heptanes plus as one. The stock-tank liquid is an
 * ideal mixture at 60 degF:
 *
 *     STB = sum n_i M_i / (350.162 sg_i)
 *
 * @param stages  in the direction of flow, the stock tank last
 * @returns       products of 1 MMscf of the stream
 * @throws {DomainError} when a stage's pressure or temperature is impossible
 * @see M. B. Standing, J. Pet. Technol. 31 (September 1979) 1193-1195
 */
export function separateByKValues(
  stream: Stream,
  stages: readonly SeparatorStage[],
): SurfaceProducts {
  const { moleFractions, molecularWeights, heptanesPlus } = lumpStream(stream);
  const count = balanceComponents.length;
  let feed = Float64Array.from(moleFractions);
  let moles = 1e6 / CANONICAL_CONSTANTS.molarVolumeScfPerLbmol;
  const k = new Float64Array(count);
  const stageGasMscf = stages.map(({ pressurePsia, temperatureDegF }) => {
    if (moles === 0) return 0;
    const lnK = standingKValues(pressurePsia, temperatureDegF).map(Math.log);
    const vapour = vapourFraction(feed, lnK, k, NaN);
    const isLiquid = Number.isNaN(vapour) ? !feed.some((z, i) => z > 0 && k[i] > 1) : vapour <= 0;
    if (isLiquid) return 0;
    if (Number.isNaN(vapour) || vapour >= 1) {
      const gas = moles;
      moles = 0;
      return (gas * CANONICAL_CONSTANTS.molarVolumeScfPerLbmol) / 1000;
    }
    const gas = moles * vapour;
    feed = feed.map((z, i) => z / (1 + vapour * (k[i] - 1)));
    moles -= gas;
    return (gas * CANONICAL_CONSTANTS.molarVolumeScfPerLbmol) / 1000;
  });
  const condensateStb = feed.reduce((sum, x, i) => {
    const specificGravity =
      i === HEPTANES_PLUS ? heptanesPlus?.specificGravity : LIQUID_SPECIFIC_GRAVITY[i];
    if (x === 0 || specificGravity === undefined) return sum;
    return sum + (moles * x * molecularWeights[i]) / (WATER_POUNDS_PER_BARREL * specificGravity);
  }, 0);
  return {
    condensateStb,
    stageGasMscf,
    surfaceGasMscf: stageGasMscf.reduce((sum, gas) => sum + gas, 0),
  };
}
