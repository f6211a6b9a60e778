import { withRoute } from "@/app/_server/with-route";
import { runEstimate } from "@/services/estimate-runs";
import { idParams } from "../../../common-schema";
import { presentEstimate } from "../../presenter";

/** Simulate it as it stands and keep every trial. */
export const POST = withRoute({
  may: "estimate.run",
  params: idParams,
  versioned: true,
  handler: ({ actor, params, expectedVersion }) => runEstimate(actor, params.id, expectedVersion),
  present: presentEstimate,
});
