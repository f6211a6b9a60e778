import { withRoute } from "@/app/_server/with-route";
import { createDraft } from "@/services/estimates";
import { idParams } from "../../../common-schema";
import { presentEstimate } from "../../../estimates/presenter";
import { newEstimateSchema } from "../../../estimates/schema";

/** Begin the next revision: from the inputs given, or as a copy of the approved one. */
export const POST = withRoute({
  may: "estimate.create",
  params: idParams,
  body: newEstimateSchema,
  status: 201,
  handler: ({ actor, params, body }) => createDraft(actor, params.id, body),
  present: presentEstimate,
});
