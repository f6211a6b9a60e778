import type { Estimate } from "@/models/estimate";
import { estimateAbilities } from "@/services/estimate-states";
import type { Actor } from "@/services/policy";
import { presentMoment, presentPerson } from "../common-presenter";
import type {
  EstimateBodyView,
  EstimateListItemView,
  EstimateRowView,
  EstimateView,
  PlaceView,
} from "./schema";

/** @param estimate  loaded with its people */
export function presentEstimateRow(estimate: Estimate, actor: Actor): EstimateRowView {
  return {
    id: estimate.id,
    reservoirId: estimate.reservoirId,
    revision: estimate.revision,
    state: estimate.state,
    fluidSampleId: estimate.fluidSampleId,
    seed: estimate.seed,
    trials: estimate.trials,
    sampling: estimate.sampling,
    engineVersion: estimate.engineVersion,
    computedAt: presentMoment(estimate.computedAt),
    note: estimate.note,
    creator: presentPerson(estimate.creator),
    submitter: presentPerson(estimate.submitter),
    submittedAt: presentMoment(estimate.submittedAt),
    decider: presentPerson(estimate.decider),
    decidedAt: presentMoment(estimate.decidedAt),
    decisionNote: estimate.decisionNote,
    effectiveOn: estimate.effectiveOn,
    createdAt: presentMoment(estimate.createdAt),
    updatedAt: presentMoment(estimate.updatedAt),
    version: estimate.version,
    can: estimateAbilities(actor, estimate),
  };
}

/** @param estimate  loaded whole, with its people */
export function presentEstimateBody(estimate: Estimate, actor: Actor): EstimateBodyView {
  const { inputs, summary } = estimate;
  const recoveryRoute = inputs.recoveryPlan?.curve.route ?? null;
  return { ...presentEstimateRow(estimate, actor), recoveryRoute, inputs, summary };
}

/** @param estimate  loaded with its people and place */
export function presentEstimateListItem(estimate: Estimate, actor: Actor): EstimateListItemView {
  return { ...presentEstimateRow(estimate, actor), place: presentPlace(estimate) };
}

/** @param estimate  loaded whole, with its people and place */
export function presentEstimate(estimate: Estimate, actor: Actor): EstimateView {
  return { ...presentEstimateBody(estimate, actor), place: presentPlace(estimate) };
}

function presentPlace({ reservoir }: Estimate): PlaceView {
  const field = reservoir?.field;
  if (!reservoir || !field?.basin) throw new Error("the estimate was loaded without its place");
  const named = ({ id, slug, name }: { id: string; slug: string; name: string }) => ({
    id,
    slug,
    name,
  });
  return { reservoir: named(reservoir), field: named(field), basin: named(field.basin) };
}
