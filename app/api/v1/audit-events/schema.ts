import { z } from "zod";
import { momentSchema, pageOf, pageQuery, personSchema } from "../common-schema";

export const auditFilterQuery = z.object({
  entity: z.string().max(50).optional(),
  entityId: z.string().max(100).optional(),
  actorId: z.uuid().optional(),
  /** at or after this moment */
  from: z.iso.datetime({ offset: true }).optional(),
  /** before this moment */
  to: z.iso.datetime({ offset: true }).optional(),
});
export type AuditFilterQuery = z.infer<typeof auditFilterQuery>;

export const auditQuery = pageQuery.extend(auditFilterQuery.shape);

/** A filter as an address has it -> as the trail takes it. */
export function toAuditFilter({ from, to, entity, entityId, actorId }: AuditFilterQuery) {
  const moment = (text: string | undefined) => (text ? new Date(text) : undefined);
  return { entity, entityId, actorId, from: moment(from), to: moment(to) };
}

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
