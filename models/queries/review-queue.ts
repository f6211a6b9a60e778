import { QueryTypes } from "sequelize";
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import type { Range } from "@/analytics/volumetrics/results-schema";
import { sequelize } from "../sequelize";

/** An estimate that waits for somebody: a reviewer when submitted, its engineer when returned. */
export interface ReviewQueueRow {
  id: string;
  revision: number;
  state: "submitted" | "returned";
  note: string;
  createdBy: string;
  submittedBy: string;
  submitterName: string;
  submittedAt: Date;
  deciderName: string | null;
  decidedAt: Date | null;
  decisionNote: string;
  reservoirName: string;
  reservoirSlug: string;
  fieldName: string;
  fieldSlug: string;
  basinName: string;
  netRevenueInterest: number;
  /** recoverable condensate [STB], gross, unrisked */
  condensateRecoverableStb: Range;
  warnings: number;
  /** null when recoveries were entered */
  recoveryRoute: RecoveryRoute | null;
  /** of the revision that stands now; null for a reservoir without one */
  approvedRevision: number | null;
  approvedCondensateRecoverableStb: Range | null;
}

/** The four figures, without the curves that make a summary heavy. */
const rangeOf = (alias: string) => `
  jsonb_build_object(
    'p90', ${alias}.summary #> '{results,condensateRecoverableStb,p90}',
    'p50', ${alias}.summary #> '{results,condensateRecoverableStb,p50}',
    'p10', ${alias}.summary #> '{results,condensateRecoverableStb,p10}',
    'mean', ${alias}.summary #> '{results,condensateRecoverableStb,mean}')`;

/** Submitted and returned estimates that have results, longest-waiting first, beside what they would replace. */
export async function listReviewQueueRows(): Promise<ReviewQueueRow[]> {
  return sequelize.query<ReviewQueueRow>(
    `select e.id, e.revision, e.state, e.note, e.created_by as "createdBy",
            e.submitted_by as "submittedBy", submitter.name as "submitterName",
            e.submitted_at as "submittedAt", decider.name as "deciderName",
            e.decided_at as "decidedAt", e.decision_note as "decisionNote",
            r.name as "reservoirName", r.slug as "reservoirSlug",
            f.name as "fieldName", f.slug as "fieldSlug", b.name as "basinName",
            f.net_revenue_interest as "netRevenueInterest",
            ${rangeOf("e")} as "condensateRecoverableStb",
            coalesce(jsonb_array_length(e.summary -> 'warnings'), 0) as "warnings",
            e.inputs #>> '{recoveryPlan,curve,route}' as "recoveryRoute",
            approved.revision as "approvedRevision",
            case when approved.id is not null then ${rangeOf("approved")} end
              as "approvedCondensateRecoverableStb"
       from estimates e
       join reservoirs r on r.id = e.reservoir_id
       join fields f on f.id = r.field_id
       join basins b on b.id = f.basin_id
       join users submitter on submitter.id = e.submitted_by
       left join users decider on decider.id = e.decided_by
       left join estimates approved
         on approved.reservoir_id = e.reservoir_id and approved.state = 'approved'
      where e.state in ('submitted', 'returned') and e.summary is not null
      order by coalesce(e.decided_at, e.submitted_at), e.id
      limit 500`,
    { type: QueryTypes.SELECT },
  );
}
