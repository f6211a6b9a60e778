import { withRoute } from "@/app/_server/with-route";
import { submitEstimate } from "@/services/estimate-review";
import { idParams } from "../../../common-schema";
import { presentEstimate } from "../../presenter";
import { submitEstimateSchema } from "../../schema";

/** Hand it to the reviewers. */
export const POST = withRoute({
  may: "estimate.submit",
  params: idParams,
  body: submitEstimateSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    submitEstimate(actor, params.id, body, expectedVersion),
  present: presentEstimate,
});
