/** From the moles of a depletion and its surface products to a recovery curve. */
import type { Characterised } from "../equation-of-state/mixture";
import type {
  RecoveryCurve,
  RecoveryPoint,
  RecoveryRoute,
} from "../recovery/recovery-curve-schema";
import type { SimulatedDepletion } from "./simulate-depletion";
import {
  mixtureSeparator,
  surfaceProducts,
  yieldOf,
  type Separators,
  type SurfaceProducts,
  type SurfaceRow,
} from "./surface-products";

/** State of the cell at one pressure, moles per mole at the dew point. */
export interface CellPoint {
  readonly pressurePsia: number;
  readonly producedFraction: number;
  /** left as gas */
  readonly gasMoles: number;
  readonly liquidFraction: number;
  readonly gasZ: number;
  readonly twoPhaseZ: number;
}

/**
 * Recovery against pressure. Of the condensate in place at the dew point, with q STB per MMscf of a stream:
 *
 *     produced = sum dn_j q(y_j) / q(z)          still in the gas = G_k q(y_k) / q(z)
 *
 * and the rest lies as liquid in the rock. Steps in which nothing was removed carry no point.
 *
 * @param cell     rows below the dew point
 * @param surface  products at the same pressures
 */
export function recoveryCurve(
  route: RecoveryRoute,
  dewPoint: {
    readonly pressurePsia: number;
    readonly temperatureDegF: number;
    readonly gasZ: number;
  },
  cell: readonly CellPoint[],
  surface: { readonly initial: SurfaceProducts; readonly rows: readonly SurfaceRow[] },
): RecoveryCurve {
  const { initial, rows } = surface;
  const share = (part: number, whole: number) => (whole > 0 ? part / whole : 0);
  const points: RecoveryPoint[] = [
    {
      pressurePsia: dewPoint.pressurePsia,
      wellstreamProduced: 0,
      gasProduced: 0,
      condensateProduced: 0,
      condensateInGas: 1,
      liquidSaturation: 0,
      gasZ: dewPoint.gasZ,
      twoPhaseZ: dewPoint.gasZ,
      producingYieldStbPerMmscf: yieldOf(initial),
    },
  ];
  cell.forEach((point, index) => {
    if (!(point.producedFraction > points[points.length - 1].wellstreamProduced)) return;
    const { condensateStb, surfaceGasMscf, produced, producingYieldStbPerMmscf } = rows[index];
    points.push({
      pressurePsia: point.pressurePsia,
      wellstreamProduced: point.producedFraction,
      gasProduced: share(surfaceGasMscf, initial.surfaceGasMscf),
      condensateProduced: share(condensateStb, initial.condensateStb),
      condensateInGas: share(point.gasMoles * produced.condensateStb, initial.condensateStb),
      liquidSaturation: point.liquidFraction,
      gasZ: point.gasZ,
      twoPhaseZ: point.twoPhaseZ,
      producingYieldStbPerMmscf,
    });
  });
  return {
    route,
    temperatureDegF: dewPoint.temperatureDegF,
    dewPointPsia: dewPoint.pressurePsia,
    points,
  };
}

/**
 * Recovery curve of a simulated depletion: each stream flashed through the separators as the mixture it is.
 *
 * @param separators  stages that the reservoir no longer reaches are lowered; a function says otherwise
 * @throws {DomainError | ConvergenceError} what the flashes throw
 */
export function recoveryCurveOfSimulation(
  { mixture }: Characterised,
  { temperatureDegF, steps }: SimulatedDepletion,
  separators: Separators,
  route: RecoveryRoute,
): RecoveryCurve {
  const [first, ...below] = steps;
  const surface = surfaceProducts(first, below, separators, mixtureSeparator(mixture));
  return recoveryCurve(
    route,
    { pressurePsia: first.pressurePsia, temperatureDegF, gasZ: first.gasZ },
    below,
    surface,
  );
}
