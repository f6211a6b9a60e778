import { z } from "zod";
import { changeExplanationSchema } from "@/analytics/sensitivity/sensitivity-schema";
import { producingConcepts } from "@/analytics/recovery/recovery-plan-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { quantitySummarySchema, vectorNames } from "@/analytics/volumetrics/results-schema";

/**
 * One side of a comparison: a revision, a revision as another concept would produce it, or a field as it stands on the
 * basis.
 */
export const comparisonSideSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("estimate"), estimateId: z.uuid() }).strict(),
  z
    .object({
      kind: z.literal("concept"),
      estimateId: z.uuid(),
      concept: z.enum(producingConcepts),
    })
    .strict(),
  z.object({ kind: z.literal("field"), fieldId: z.uuid() }).strict(),
]);
export type ComparisonSide = z.infer<typeof comparisonSideSchema>;

/** POST /api/v1/comparisons: two sides beside each other. Volumes in scf and STB, gross and unrisked. */
export const comparisonRequestSchema = z
  .object({
    left: comparisonSideSchema,
    right: comparisonSideSchema,
    /** whose P50 the differences of inputs explain */
    result: z.enum(vectorNames).default("condensateRecoverableStb"),
  })
  .strict();
export type ComparisonRequest = z.infer<typeof comparisonRequestSchema>;

const quantity = quantitySummarySchema.omit({ histogram: true });

const sideSchema = z.object({
  /** "Larkhaven, Main sand, r3" */
  label: z.string(),
  /** what it stands on: state and date, concept, number of reservoirs */
  detail: z.string(),
  /** address of the page it is from */
  href: z.string(),
  trials: z.number().int(),
  quantities: z.record(z.enum(vectorNames), quantity),
  /** null for a field */
  inputs: estimateInputsSchema.nullable(),
});

export const comparisonSchema = z.object({
  left: sideSchema,
  right: sideSchema,
  /** of the P50 from left to right; null with the reason when a side is a field of several reservoirs */
  explanation: changeExplanationSchema.nullable(),
  whyNotExplained: z.string().nullable(),
});
export type Comparison = z.infer<typeof comparisonSchema>;
