import { withRoute } from "@/app/_server/with-route";
import { approveEstimate } from "@/services/estimate-review";
import { idParams } from "../../../common-schema";
import { presentEstimate } from "../../presenter";
import { approveEstimateSchema } from "../../schema";

/** Make it the approved estimate; the one before is superseded. */
export const POST = withRoute({
  may: "estimate.approve",
  params: idParams,
  body: approveEstimateSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    approveEstimate(actor, params.id, body, expectedVersion),
  present: presentEstimate,
});
