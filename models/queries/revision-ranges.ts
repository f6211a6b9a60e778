import { QueryTypes } from "sequelize";
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import type { Range } from "@/analytics/volumetrics/results-schema";
import { sequelize } from "../sequelize";
import type { EstimateState } from "../vocabulary";

/** A revision that has results, with the ranges that lists and timelines draw. */
export interface RevisionRangeRow {
  estimateId: string;
  reservoirId: string;
  revision: number;
  state: EstimateState;
  note: string;
  creatorName: string;
  deciderName: string | null;
  createdAt: Date;
  submittedAt: Date | null;
  decidedAt: Date | null;
  /** YYYY-MM-DD; null until approved */
  effectiveOn: string | null;
  /** null when recoveries were entered */
  recoveryRoute: RecoveryRoute | null;
  condensateRecoverableStb: Range | null;
  salesGasScf: Range | null;
  wetGasInPlaceScf: Range | null;
}

/** The four figures of one result, without the curves that make a summary heavy. */
const rangeOf = (result: string) => `
  case when e.summary is null then null else jsonb_build_object(
    'p90', e.summary #> '{results,${result},p90}', 'p50', e.summary #> '{results,${result},p50}',
    'p10', e.summary #> '{results,${result},p10}', 'mean', e.summary #> '{results,${result},mean}')
  end as "${result}"`;

/** Revisions of these reservoirs, newest first within each. */
export async function listRevisionRanges(
  reservoirIds: readonly string[],
): Promise<RevisionRangeRow[]> {
  if (reservoirIds.length === 0) return [];
  return sequelize.query<RevisionRangeRow>(
    `select e.id as "estimateId", e.reservoir_id as "reservoirId", e.revision, e.state, e.note,
            creator.name as "creatorName", decider.name as "deciderName",
            e.created_at as "createdAt", e.submitted_at as "submittedAt", e.decided_at as "decidedAt",
            e.effective_on::text as "effectiveOn",
            e.inputs #>> '{recoveryPlan,curve,route}' as "recoveryRoute",
            ${["condensateRecoverableStb", "salesGasScf", "wetGasInPlaceScf"].map(rangeOf).join(",")}
       from estimates e
       join users creator on creator.id = e.created_by
       left join users decider on decider.id = e.decided_by
      where e.reservoir_id in (:reservoirIds)
      order by e.reservoir_id, e.revision desc
      limit 2000`,
    { type: QueryTypes.SELECT, replacements: { reservoirIds: [...reservoirIds] } },
  );
}
