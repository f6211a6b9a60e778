import { withRoute } from "@/app/_server/with-route";
import { getRun } from "@/services/runs/runs";
import { idParams } from "../../common-schema";
import { presentRun } from "../presenter";

/** One run: how far it is, who works on it and how long it may take. */
export const GET = withRoute({
  may: "run.read",
  params: idParams,
  handler: ({ actor, params }) => getRun(actor, params.id),
  present: presentRun,
});
