import { withRoute } from "@/app/_server/with-route";
import { listRunItems } from "@/services/runs/runs";
import { presentPage } from "../../../common-presenter";
import { idParams } from "../../../common-schema";
import { presentRunItem } from "../../presenter";
import { runItemsQuery } from "../../schema";

/** The estimates of a run and what came of each. */
export const GET = withRoute({
  may: "run.read",
  params: idParams,
  query: runItemsQuery,
  handler: ({ actor, params, query: { state, movedBeyond, ...page } }) =>
    listRunItems(actor, params.id, { state, movedBeyond }, page),
  present: presentPage(presentRunItem),
});
