import { withRoute } from "@/app/_server/with-route";
import { exportAuditTrail } from "@/services/exports/audit";
import { auditFilterQuery, toAuditFilter } from "../../audit-events/schema";

/** GET /api/v1/exports/audit.csv: the audit trail, or the part of it that the same filter shows. */
export const GET = withRoute({
  may: "audit.read",
  query: auditFilterQuery,
  handler: ({ actor, query }) => exportAuditTrail(actor, toAuditFilter(query)),
});
