import { isDeepStrictEqual } from "node:util";
import type { Transaction } from "sequelize";
import {
  createAuditEvent,
  listAuditEventsPage,
  type AuditFilter,
} from "@/models/queries/audit-events";
import type { AuditEvent } from "@/models/audit-event";
import { now } from "./clock";
import { toPage, type Page, type PageRequest } from "./paging";
import { authorise, type Actor } from "./policy";

/** What the audit trail is about. */
export type AuditedEntity =
  | "user"
  | "apiToken"
  | "settings"
  | "basin"
  | "field"
  | "reservoir"
  | "fluidSample"
  | "estimate"
  | "priceDeck"
  | "dependenceSet"
  | "import"
  | "run"
  | "export";

export interface AuditEntry {
  /** who, or null for the product itself */
  actor: Actor | null;
  /** `<entity>.<verb in the past>`, such as `estimate.approved` */
  action: string;
  entity: AuditedEntity;
  entityId: string;
  /** the values that changed, as they were and as they are; null where there was or is nothing */
  before?: object | null;
  after?: object | null;
}

/** Write one event in the transaction of the change it tells of, so that neither exists without the other. */
export async function recordAudit(entry: AuditEntry, transaction: Transaction): Promise<void> {
  await createAuditEvent(
    {
      actorId: entry.actor?.id ?? null,
      action: entry.action,
      entity: entry.entity,
      entityId: entry.entityId,
      before: entry.before ?? null,
      after: entry.after ?? null,
      requestId: entry.actor?.requestId ?? null,
      at: now(),
    },
    { transaction },
  );
}

/**
 * What differs between two versions of a record, on both sides.
 *
 * @param after  the properties that were set; others are not looked at
 */
export function changesBetween<Record extends object>(
  before: Record,
  after: Partial<Record>,
): { before: Partial<Record>; after: Partial<Record> } {
  const changed: { before: Partial<Record>; after: Partial<Record> } = { before: {}, after: {} };
  for (const key of Object.keys(after) as (keyof Record)[]) {
    if (after[key] === undefined) continue;
    if (isDeepStrictEqual(before[key], after[key])) continue;
    changed.before[key] = before[key];
    changed.after[key] = after[key];
  }
  return changed;
}

/** The trail, newest first. */
export async function listAuditEvents(
  actor: Actor,
  filter: AuditFilter,
  page: PageRequest,
): Promise<Page<AuditEvent>> {
  authorise(actor, "audit.read");
  return toPage(await listAuditEventsPage(filter, page), page);
}

/** What happened to one record, newest first; everyone who may see the record may see its history. */
export async function listHistory(
  entity: "field" | "reservoir" | "fluidSample" | "estimate" | "priceDeck",
  entityId: string,
): Promise<AuditEvent[]> {
  return (await listAuditEventsPage({ entity, entityId }, { limit: 200, offset: 0 })).rows;
}
