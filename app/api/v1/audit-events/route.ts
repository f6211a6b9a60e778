import { withRoute } from "@/app/_server/with-route";
import { listAuditEvents } from "@/services/audit";
import { presentPage } from "../common-presenter";
import { presentAuditEvent } from "./presenter";
import { auditQuery, toAuditFilter } from "./schema";

/** The audit trail, newest first. */
export const GET = withRoute({
  may: "audit.read",
  query: auditQuery,
  handler: ({ actor, query: { limit, offset, ...filter } }) =>
    listAuditEvents(actor, toAuditFilter(filter), { limit, offset }),
  present: presentPage(presentAuditEvent),
});
