import { withRoute } from "@/app/_server/with-route";
import { listAuditEvents } from "@/services/audit";
import { presentPage } from "../common-presenter";
import { presentAuditEvent } from "./presenter";
import { auditQuery } from "./schema";

/** The audit trail, newest first. */
export const GET = withRoute({
  may: "audit.read",
  query: auditQuery,
  handler: ({ actor, query: { limit, offset, from, to, ...filter } }) =>
    listAuditEvents(
      actor,
      { ...filter, from: from ? new Date(from) : undefined, to: to ? new Date(to) : undefined },
      { limit, offset },
    ),
  present: presentPage(presentAuditEvent),
});
