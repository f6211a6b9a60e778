import { withRoute } from "@/app/_server/with-route";
import { cancelRun } from "@/services/runs/runs";
import { idParams } from "../../../common-schema";
import { presentRun } from "../../presenter";

/** Stop a run. What is stored stays; nothing more is. */
export const POST = withRoute({
  may: "run.cancel",
  params: idParams,
  handler: ({ actor, params }) => cancelRun(actor, params.id),
  present: presentRun,
});
