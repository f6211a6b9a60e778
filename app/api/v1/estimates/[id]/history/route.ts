import { withRoute } from "@/app/_server/with-route";
import type { AuditEvent } from "@/models/audit-event";
import { listHistory } from "@/services/audit";
import { presentAuditEvent } from "../../../audit-events/presenter";
import { idParams } from "../../../common-schema";

/** What happened to this estimate, newest first. */
export const GET = withRoute({
  may: "estimate.read",
  params: idParams,
  handler: ({ params }) => listHistory("estimate", params.id),
  present: (events: AuditEvent[]) => ({ items: events.map(presentAuditEvent) }),
});
