import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { isSameFluid } from "@/components/estimate/differences";

/** The sample that an estimate's sheet was taken from. */
export interface EstimateSample<Sample> {
  readonly sample: Sample;
  /** the sample was changed since: the estimate keeps the copy it was made with */
  readonly isNewer: boolean;
}

/**
 * Finds the sample behind the sheet in an estimate: the one that the estimate names, for as long as nobody has put
 * another sheet into the fields; otherwise one with the same figures.
 *
 * @param stored  the revision as the server has it; `null` for one that was not saved yet
 * @param fluid   the sheet in the fields
 */
export function sampleOfEstimate<Sample extends { id: string; separatorTest: SeparatorTest }>(
  samples: readonly Sample[],
  stored: { fluidSampleId: string | null; inputs: { fluid: SeparatorTest } } | null,
  fluid: SeparatorTest | null,
): EstimateSample<Sample> | null {
  if (fluid === null) return null;
  const named =
    stored && isSameFluid(stored.inputs.fluid, fluid)
      ? samples.find(({ id }) => id === stored.fluidSampleId)
      : undefined;
  const sample = named ?? samples.find(({ separatorTest }) => isSameFluid(separatorTest, fluid));
  return sample ? { sample, isNewer: !isSameFluid(sample.separatorTest, fluid) } : null;
}
