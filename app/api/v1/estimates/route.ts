import { withRoute } from "@/app/_server/with-route";
import type { Estimate } from "@/models/estimate";
import { listEstimates } from "@/services/estimates";
import type { Page } from "@/services/paging";
import type { Actor } from "@/services/policy";
import { presentPage } from "../common-presenter";
import { presentEstimateListItem } from "./presenter";
import { estimatesQuery } from "./schema";

/** Estimates of all reservoirs, longest-waiting first: `?state=submitted` is the reviewers' queue. */
export const GET = withRoute({
  may: "estimate.read",
  query: estimatesQuery,
  handler: ({ actor, query: { state, reservoirId, ...page } }) =>
    listEstimates(actor, { state, reservoirId }, page),
  present: (page: Page<Estimate>, actor: Actor) =>
    presentPage((row: Estimate) => presentEstimateListItem(row, actor))(page),
});
