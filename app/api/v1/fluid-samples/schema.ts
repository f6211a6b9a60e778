import { z } from "zod";
import { sampleStudySchema } from "@/analytics/fluid/sample-study-schema";
import { separatorTestSchema } from "@/analytics/fluid/separator-test-schema";
import { dateSchema, nameSchema } from "../common-schema";

export const newFluidSampleSchema = z
  .object({
    reservoirId: z.uuid(),
    name: nameSchema,
    sampledOn: dateSchema,
    laboratory: z.string().trim().max(200).optional(),
    separatorTest: separatorTestSchema,
    /** composition, depletion table and equation of state; a sample without them has only its separator test */
    study: sampleStudySchema.optional(),
  })
  .strict();
export type NewFluidSampleRequest = z.infer<typeof newFluidSampleSchema>;

export const fluidSamplePatchSchema = newFluidSampleSchema.omit({ reservoirId: true }).partial();
export type FluidSamplePatchRequest = z.infer<typeof fluidSamplePatchSchema>;

export const fluidSampleSchema = z.object({
  id: z.uuid(),
  reservoirId: z.uuid(),
  name: z.string(),
  sampledOn: dateSchema,
  laboratory: z.string(),
  separatorTest: separatorTestSchema,
  condensateApi: z.number(),
  /** gas of all stages per stock-tank barrel, at 14.696 psia and 60 degF */
  gasOilRatioScfPerStb: z.number(),
  /** per million scf of surface gas */
  condensateYieldStbPerMmscf: z.number(),
  /** of the recombined wellstream, air = 1 */
  wellstreamGravity: z.number(),
  /** mole fraction of the wellstream */
  hydrogenSulphide: z.number(),
  dewPointPsia: z.number().nullable(),
  study: sampleStudySchema,
  version: z.number().int(),
});
export type FluidSampleView = z.infer<typeof fluidSampleSchema>;
