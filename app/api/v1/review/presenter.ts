import { scaleRange } from "@/analytics/portfolio/ranking";
import { reportingUnits } from "@/analytics/units/reporting-units";
import type { ReviewQueueRow } from "@/models/queries/review-queue";
import { can, type Actor } from "@/services/policy";
import { presentMoment } from "../common-presenter";
import type { ReviewItemView, ReviewQuery, ReviewView } from "./schema";

/** Rows as the database has them (gross, STB) -> figures on the basis. */
export function presentReview(
  rows: ReviewQueueRow[],
  basis: ReviewQuery,
  actor: Actor,
): ReviewView {
  const { unit, factor } = reportingUnits(basis.units, basis.base).condensate;
  return { unit, items: rows.map((row) => presentItem(row, factor * shareOf(row, basis), actor)) };
}

/** Reviewed is the estimate itself, so the field's chance of commerciality stays out of it. */
const shareOf = (row: ReviewQueueRow, { interest }: ReviewQuery) =>
  interest === "net" ? row.netRevenueInterest : 1;

function presentItem(row: ReviewQueueRow, factor: number, actor: Actor): ReviewItemView {
  return {
    id: row.id,
    revision: row.revision,
    state: row.state,
    reservoir: { slug: row.reservoirSlug, name: row.reservoirName },
    field: { slug: row.fieldSlug, name: row.fieldName },
    basin: row.basinName,
    note: row.note,
    submitter: { id: row.submittedBy, name: row.submitterName },
    submittedAt: presentMoment(row.submittedAt),
    decider: row.deciderName,
    decidedAt: presentMoment(row.decidedAt),
    decisionNote: row.decisionNote,
    condensate: scaleRange(row.condensateRecoverableStb, factor),
    approved:
      row.approvedRevision === null || row.approvedCondensateRecoverableStb === null
        ? null
        : {
            revision: row.approvedRevision,
            condensate: scaleRange(row.approvedCondensateRecoverableStb, factor),
          },
    warnings: row.warnings,
    recoveryRoute: row.recoveryRoute,
    canDecide: row.state === "submitted" && can(actor, "estimate.approve", row),
  };
}
