import { withRoute } from "@/app/_server/with-route";
import { discardDraft, getEstimate, updateDraft } from "@/services/estimates";
import { idParams } from "../../common-schema";
import { presentEstimate } from "../presenter";
import { estimatePatchSchema } from "../schema";

export const GET = withRoute({
  may: "estimate.read",
  params: idParams,
  handler: ({ actor, params }) => getEstimate(actor, params.id),
  present: presentEstimate,
});

/** Change a draft or a returned estimate; new inputs, seed or trials take its results away. */
export const PATCH = withRoute({
  may: "estimate.update",
  params: idParams,
  body: estimatePatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateDraft(actor, params.id, body, expectedVersion),
  present: presentEstimate,
});

/** Discard a draft that was never submitted. */
export const DELETE = withRoute({
  may: "estimate.discard",
  params: idParams,
  versioned: true,
  handler: ({ actor, params, expectedVersion }) => discardDraft(actor, params.id, expectedVersion),
});
