import { z } from "zod";
import { recoveryRoutes } from "@/analytics/recovery/recovery-curve-schema";
import { rangeSchema } from "@/analytics/volumetrics/results-schema";
import { basisSchema } from "@/components/basis/basis";
import { momentSchema, personSchema } from "../common-schema";

/** The parts of the basis that bear on a volume of condensate. */
export const reviewQuery = basisSchema.pick({ interest: true, units: true, base: true });
export type ReviewQuery = z.infer<typeof reviewQuery>;

const named = z.object({ slug: z.string(), name: z.string() });

export const reviewItemSchema = z.object({
  id: z.uuid(),
  revision: z.number().int(),
  state: z.enum(["submitted", "returned"]),
  reservoir: named,
  field: named,
  basin: z.string(),
  /** why this revision exists */
  note: z.string(),
  submitter: personSchema,
  submittedAt: momentSchema,
  /** of a returned one */
  decider: z.string().nullable(),
  decidedAt: momentSchema.nullable(),
  decisionNote: z.string(),
  /** condensate that reaches the tank, on the basis, unrisked */
  condensate: rangeSchema,
  /** the same of the approved revision that it would replace; null when there is none */
  approved: z.object({ revision: z.number().int(), condensate: rangeSchema }).nullable(),
  /** warnings of the checks on its inputs and results */
  warnings: z.number().int(),
  /** where its recoveries come from; null when they were entered */
  recoveryRoute: z.enum(recoveryRoutes).nullable(),
  /** whether the person asking may approve or return it: reviewers, but not of their own work */
  canDecide: z.boolean(),
});
export type ReviewItemView = z.infer<typeof reviewItemSchema>;

export const reviewSchema = z.object({
  items: z.array(reviewItemSchema),
  /** of condensate */
  unit: z.string(),
});
export type ReviewView = z.infer<typeof reviewSchema>;
