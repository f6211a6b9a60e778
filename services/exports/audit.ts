import type { AuditEvent } from "@/models/audit-event";
import { walkAuditEvents, type AuditFilter } from "@/models/queries/audit-events";
import { today } from "../clock";
import { authorise, type Actor } from "../policy";
import { csvResponse, type CsvCell } from "./csv";

/** Events read in one statement; some carry a whole set of inputs, so a batch is a few megabytes at most. */
const BATCH = 200;

const names = [
  "event_id",
  "at_utc",
  "person",
  "person_id",
  "action",
  "entity",
  "entity_id",
  "before_json",
  "after_json",
  "request_id",
] as const;

/** The audit trail as a file, newest first, written while it is read: its length costs no memory. */
export async function exportAuditTrail(actor: Actor, filter: AuditFilter): Promise<Response> {
  authorise(actor, "audit.read");

  async function* lines(): AsyncGenerator<CsvCell[]> {
    for await (const event of walkAuditEvents(filter, BATCH)) yield cellsOf(event);
  }

  const file = { names, rows: lines(), byteOrderMark: true };
  return csvResponse(file, `dewledger-audit-${today()}.csv`);
}

function cellsOf(event: AuditEvent): CsvCell[] {
  const json = (value: object | null): CsvCell => value && JSON.stringify(value);
  return [
    event.id,
    event.at.toISOString(),
    event.actor?.name ?? null,
    event.actorId,
    event.action,
    event.entity,
    event.entityId,
    json(event.before),
    json(event.after),
    event.requestId,
  ];
}
