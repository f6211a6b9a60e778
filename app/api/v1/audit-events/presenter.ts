import type { AuditEvent } from "@/models/audit-event";
import { presentMoment, presentPerson } from "../common-presenter";
import type { AuditEventView } from "./schema";

/** @param event  loaded with its actor */
export function presentAuditEvent(event: AuditEvent): AuditEventView {
  return {
    id: event.id,
    actor: presentPerson(event.actor),
    action: event.action,
    entity: event.entity,
    entityId: event.entityId,
    before: event.before && { ...event.before },
    after: event.after && { ...event.after },
    requestId: event.requestId,
    at: presentMoment(event.at),
  };
}
