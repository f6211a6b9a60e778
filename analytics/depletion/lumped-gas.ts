/** Produced gases with heptanes plus as one, so that sheets of any detail can be balanced against each other. */
import { lightComponents, type ReportedStream } from "../composition/composition-schema";
import type { HeptanesPlus, Stream } from "../composition/stream";

/** The components of a balance, in the order of every array of mole fractions here: light ones, then heptanes plus. */
export const balanceComponents = [...lightComponents, "C7+"] as const;
export type BalanceComponent = (typeof balanceComponents)[number];
export const HEPTANES_PLUS = balanceComponents.length - 1;

export interface LumpedGas {
  /** as it was before heptanes plus became one */
  readonly stream: Stream;
  /** in the order of `balanceComponents`; adds up to 1 */
  readonly moleFractions: Float64Array;
  /** lb/lbmol, in the same order; 0 where the component is absent */
  readonly molecularWeights: Float64Array;
  readonly heptanesPlus: HeptanesPlus | null;
}

/** Sums the heavy fractions of a stream into heptanes plus. */
export function lumpStream(stream: Stream): LumpedGas {
  const moleFractions = new Float64Array(balanceComponents.length);
  const molecularWeights = new Float64Array(balanceComponents.length);
  for (const component of stream.components) {
    const index =
      component.light === null ? HEPTANES_PLUS : lightComponents.indexOf(component.light);
    moleFractions[index] += component.moleFraction;
    if (component.light !== null) molecularWeights[index] = component.molecularWeight;
  }
  molecularWeights[HEPTANES_PLUS] = stream.heptanesPlus?.molecularWeight ?? 0;
  return { stream, moleFractions, molecularWeights, heptanesPlus: stream.heptanesPlus };
}

/** Sum of a stream as it was reported, mole per cent. */
export function reportedTotalMolePercent(reported: ReportedStream): number {
  const light = Object.values(reported.light).reduce((sum, value) => sum + value, 0);
  return light + reportedHeptanesPlusMolePercent(reported);
}

/** Heptanes and heavier of a stream as it was reported, mole per cent. */
export function reportedHeptanesPlusMolePercent(reported: ReportedStream): number {
  const numbered = reported.carbonNumbers.reduce((sum, { molePercent }) => sum + molePercent, 0);
  return numbered + (reported.plus?.molePercent ?? 0);
}
