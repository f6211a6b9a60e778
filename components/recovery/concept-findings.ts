/** What setting ways of producing side by side shows, in a sentence with the figure in it. */
import type { ConceptResult } from "@/analytics/recovery/compare-concepts";
import { shortConcepts } from "@/components/estimate/plan-words";
import { formatFigure, formatPercent } from "@/components/ui/format";

/** What the calculation answers about one way of producing. */
export type ConceptView = ConceptResult;

/** A gain below this share of depletion's own is of the size of the assumptions' rounding. */
const LEAST_GAIN = 0.01;

/**
 * Which concept brings most to the tank and how much more than depletion, by the means over the trials, whose
 * differences are exact.
 *
 * @param factor  from STB to `unit`
 */
export function conceptFinding(
  concepts: readonly ConceptView[],
  factor: number,
  unit: string,
): string {
  const depletion = concepts.find(({ concept }) => concept === "depletion");
  const others = concepts.filter(({ concept }) => concept !== "depletion");
  const meanOf = ({ condensateRecoverableStb }: ConceptView) => condensateRecoverableStb.mean;
  if (!depletion || others.length === 0) {
    const only = concepts[0];
    if (!only) return "Where the liquid goes";
    return `${shortConcepts[only.concept]} leaves ${formatPercent(only.shares.leftInRock)} of the condensate in the rock`;
  }
  const best = others.reduce((most, one) => (meanOf(one) > meanOf(most) ? one : most));
  const gain = meanOf(best) - meanOf(depletion);
  if (gain > LEAST_GAIN * meanOf(depletion)) {
    return `${shortConcepts[best.concept]} brings ${formatFigure(gain * factor)} ${unit} more to the tank than depletion`;
  }
  return gain < -LEAST_GAIN * meanOf(depletion)
    ? `Depletion brings the most to the tank: ${formatFigure(meanOf(depletion) * factor)} ${unit}`
    : `No concept brings more to the tank than depletion's ${formatFigure(meanOf(depletion) * factor)} ${unit}`;
}

/** What cycling costs in gas: "Cycling injects 210 Bscf, of which 12 are bought". */
export function gasBalanceFinding(
  { injectedScf, makeUpScf }: NonNullable<ConceptView["gasBalance"]>,
  factor: number,
  unit: string,
): string {
  const injected = `Cycling injects ${formatFigure(injectedScf * factor)} ${unit}`;
  return makeUpScf > 0.005 * injectedScf
    ? `${injected}; ${formatFigure(makeUpScf * factor)} of it has to be bought`
    : `${injected}, all of it its own`;
}
