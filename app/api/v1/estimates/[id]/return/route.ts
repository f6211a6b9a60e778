import { withRoute } from "@/app/_server/with-route";
import { returnEstimate } from "@/services/estimate-review";
import { idParams } from "../../../common-schema";
import { presentEstimate } from "../../presenter";
import { returnEstimateSchema } from "../../schema";

/** Send it back to its author with a note. */
export const POST = withRoute({
  may: "estimate.return",
  params: idParams,
  body: returnEstimateSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    returnEstimate(actor, params.id, body, expectedVersion),
  present: presentEstimate,
});
