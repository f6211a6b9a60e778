import { withRoute } from "@/app/_server/with-route";
import { retryRun } from "@/services/runs/runs";
import { idParams } from "../../../common-schema";
import { presentRun } from "../../presenter";

/** Compute after all what failed or was passed over; what is done stays done. */
export const POST = withRoute({
  may: "run.create",
  params: idParams,
  status: 202,
  handler: ({ actor, params }) => retryRun(actor, params.id),
  present: presentRun,
});
