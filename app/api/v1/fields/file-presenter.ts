import type { RevisionRangeRow } from "@/models/queries/revision-ranges";
import type { FieldFile } from "@/services/field-files";
import type { Actor } from "@/services/policy";
import type { ReservoirFile } from "@/services/reservoirs";
import { presentMoment } from "../common-presenter";
import { presentReservoirFile } from "../reservoirs/presenter";
import type { FieldFileView, ReservoirPageView, RevisionRangeView } from "./file-schema";
import { presentField } from "./presenter";

function presentRevisionRange(row: RevisionRangeRow): RevisionRangeView {
  return {
    estimateId: row.estimateId,
    revision: row.revision,
    state: row.state,
    note: row.note,
    creator: row.creatorName,
    decider: row.deciderName,
    createdAt: presentMoment(row.createdAt),
    submittedAt: presentMoment(row.submittedAt),
    decidedAt: presentMoment(row.decidedAt),
    effectiveOn: row.effectiveOn,
    recoveryRoute: row.recoveryRoute,
    condensateRecoverableStb: row.condensateRecoverableStb,
    salesGasScf: row.salesGasScf,
    wetGasInPlaceScf: row.wetGasInPlaceScf,
  };
}

export function presentFieldFile({ field, reservoirs, ...figures }: FieldFile): FieldFileView {
  return {
    ...figures,
    field: presentField(field),
    reservoirs: reservoirs.map(({ reservoir, revisions }) => ({
      id: reservoir.id,
      slug: reservoir.slug,
      name: reservoir.name,
      depthFt: reservoir.depthFt,
      revisions: revisions.map(presentRevisionRange),
    })),
  };
}

export function presentReservoirPage(
  { file, revisions }: { file: ReservoirFile; revisions: RevisionRangeRow[] },
  actor: Actor,
): ReservoirPageView {
  return {
    ...presentReservoirFile(file, actor),
    revisions: revisions.map(presentRevisionRange),
  };
}
