import { z } from "zod";
import { compositionSheetSchema, separatorStagesSchema } from "../composition/composition-schema";
import { depletionTableSchema } from "../depletion/depletion-table-schema";
import { tuningRecordSchema } from "../depletion/tuning-record";
import { characterisationSchema } from "../equation-of-state/characterisation-schema";

/** What a fluid sample keeps besides its separator test: the rest of the laboratory's study, and what was made of it. */
export const sampleStudySchema = z
  .object({
    composition: compositionSheetSchema.nullable(),
    depletion: depletionTableSchema.nullable(),
    /** the separators that produced streams are flashed through, stock tank last */
    stages: separatorStagesSchema.nullable(),
    /** the equation of state's set-up; null while nobody has accepted one */
    characterisation: characterisationSchema.nullable(),
    /** what the accepted adjustments were fitted to and by how much they missed; null for an untuned one */
    tuning: tuningRecordSchema.nullable(),
    /** `computed`: the separator sheet was worked out from the composition, not measured */
    separatorTestOrigin: z.enum(["measured", "computed"]),
  })
  .strict();
export type SampleStudy = z.infer<typeof sampleStudySchema>;

/** A sample of which only the separator test is known. */
export const noStudy: SampleStudy = {
  composition: null,
  depletion: null,
  stages: null,
  characterisation: null,
  tuning: null,
  separatorTestOrigin: "measured",
};
