import { z } from "zod";
import { momentSchema, pageOf, pageQuery, personSchema } from "../common-schema";

export const auditQuery = pageQuery.extend({
  entity: z.string().max(50).optional(),
  entityId: z.string().max(100).optional(),
  actorId: z.uuid().optional(),
  from: z.iso.datetime({ offset: true }).optional(),
  to: z.iso.datetime({ offset: true }).optional(),
});

export const auditEventSchema = z.object({
  id: z.string(),
  /** null for what the product did by itself */
  actor: personSchema.nullable(),
  action: z.string(),
  entity: z.string(),
  entityId: z.string(),
  before: z.record(z.string(), z.unknown()).nullable(),
  after: z.record(z.string(), z.unknown()).nullable(),
  requestId: z.string().nullable(),
  at: momentSchema,
});
export type AuditEventView = z.infer<typeof auditEventSchema>;

export const auditPageSchema = pageOf(auditEventSchema);
