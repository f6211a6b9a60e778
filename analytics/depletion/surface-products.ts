/** What the streams of a depletion bring to the tank and the gas line. */
import type { SeparatorStage } from "../composition/composition-schema";
import type { Stream } from "../composition/stream";
import { characterise } from "../equation-of-state/characterise";
import type { Characterisation } from "../equation-of-state/characterisation-schema";
import { Flasher } from "../equation-of-state/flash";
import type { Mixture } from "../equation-of-state/mixture";
import { separate } from "../equation-of-state/separator-train";
import { CANONICAL_CONSTANTS } from "../units/standard-conditions";

/** Of 1 MMscf of a stream. */
export interface SurfaceProducts {
  readonly condensateStb: number;
  /** Mscf of each stage, the stock tank last */
  readonly stageGasMscf: readonly number[];
  readonly surfaceGasMscf: number;
}

/** The separators; a function where they change with the reservoir's pressure, always as many. */
export type Separators =
  | readonly SeparatorStage[]
  | ((reservoirPressurePsia: number) => readonly SeparatorStage[]);

/** A stream of the depletion, with what was removed of it per mole of the fluid at the dew point. */
export interface ProducedStream<Gas> {
  readonly pressurePsia: number;
  readonly stepMoles: number;
  readonly gas: Gas;
}

/** Surface products at one pressure; volumes per MMscf of wellstream at the dew point. */
export interface SurfaceRow {
  readonly pressurePsia: number;
  /** produced so far */
  readonly condensateStb: number;
  readonly surfaceGasMscf: number;
  readonly stageGasMscf: readonly number[];
  /** of 1 MMscf of the gas that is being produced */
  readonly produced: SurfaceProducts;
  /** STB per MMscf of its surface gas */
  readonly producingYieldStbPerMmscf: number;
}

/** A separator that the reservoir no longer reaches is run at this share of its pressure. Common practice, no source. */
export const LOWERED_SHARE = 0.5;

/**
 * Stages as a reservoir at this pressure feeds them: a separator at or above the reservoir's pressure is lowered to half
 * of it, and stages after it are no higher than that. The stock tank stays.
 */
export function stagesAtPressure(
  stages: readonly SeparatorStage[],
  reservoirPressurePsia: number,
): SeparatorStage[] {
  let ceiling = Infinity;
  return stages.map((stage, index) => {
    if (index === stages.length - 1) return stage;
    const isReached = stage.pressurePsia < reservoirPressurePsia;
    const own = isReached ? stage.pressurePsia : LOWERED_SHARE * reservoirPressurePsia;
    ceiling = Math.min(own, ceiling);
    return { ...stage, pressurePsia: ceiling };
  });
}

const atPressure = (separators: Separators, reservoirPressurePsia: number) =>
  typeof separators === "function"
    ? separators(reservoirPressurePsia)
    : stagesAtPressure(separators, reservoirPressurePsia);

/** Flashes of one mixture: 1 MMscf of a composition through the stages. */
export function mixtureSeparator(
  mixture: Mixture,
): (moleFractions: Float64Array, stages: readonly SeparatorStage[]) => SurfaceProducts {
  const flasher = new Flasher(mixture);
  const poundMoles = 1e6 / CANONICAL_CONSTANTS.molarVolumeScfPerLbmol;
  return (moleFractions, stages) => {
    const separation = separate(flasher, moleFractions, stages);
    return {
      condensateStb: (separation.condensate?.barrels ?? 0) * poundMoles,
      stageGasMscf: separation.stages.map(({ gasMoles }) => 1000 * gasMoles),
      surfaceGasMscf: 1000 * separation.gasMoles,
    };
  };
}

/** Flashes of laboratory streams, each with the heavy fractions that its own heptanes plus makes. */
export function streamSeparator(
  characterisation: Characterisation,
): (stream: Stream, stages: readonly SeparatorStage[]) => SurfaceProducts {
  return (stream, stages) => {
    const { mixture, moleFractions } = characterise(stream, characterisation);
    return mixtureSeparator(mixture)(moleFractions, stages);
  };
}

/**
 * Adds up what each produced stream brings, and sets it beside the fluid at the dew point. With dn_k removed in step k
 * per mole at the dew point and q(y) the products of 1 MMscf of a stream:
 *
 *     Q_k = sum_j dn_j q(y_j)     per MMscf of wellstream at the dew point
 *
 * @param separators    stages that the reservoir no longer reaches are lowered; a function says otherwise
 * @param separateOne   products of 1 MMscf of a gas
 * @returns             a row for each stream, and the dew-point fluid's own products
 * @throws {DomainError | ConvergenceError} what the flashes throw
 * @see M. B. Standing, Volumetric and Phase Behavior of Oil Field Hydrocarbon Systems, SPE (1977), on surface recovery
 *   from depletion studies; C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610-620
 */
export function surfaceProducts<Gas>(
  dewPoint: { readonly pressurePsia: number; readonly gas: Gas },
  streams: readonly ProducedStream<Gas>[],
  separators: Separators,
  separateOne: (gas: Gas, stages: readonly SeparatorStage[]) => SurfaceProducts,
): { readonly initial: SurfaceProducts; readonly rows: SurfaceRow[] } {
  const initialStages = atPressure(separators, dewPoint.pressurePsia);
  const initial = separateOne(dewPoint.gas, initialStages);
  let condensateStb = 0;
  let surfaceGasMscf = 0;
  const stageGasMscf = initialStages.map(() => 0);
  const rows = streams.map(({ pressurePsia, stepMoles, gas }): SurfaceRow => {
    const produced = separateOne(gas, atPressure(separators, pressurePsia));
    condensateStb += stepMoles * produced.condensateStb;
    surfaceGasMscf += stepMoles * produced.surfaceGasMscf;
    produced.stageGasMscf.forEach((mscf, index) => {
      stageGasMscf[index] += stepMoles * mscf;
    });
    return {
      pressurePsia,
      condensateStb,
      surfaceGasMscf,
      stageGasMscf: [...stageGasMscf],
      produced,
      producingYieldStbPerMmscf: yieldOf(produced),
    };
  });
  return { initial, rows };
}

/** STB per MMscf of surface gas; 0 for a stream without liquid. */
export function yieldOf({ condensateStb, surfaceGasMscf }: SurfaceProducts): number {
  return condensateStb === 0 ? 0 : condensateStb / (surfaceGasMscf / 1000);
}
