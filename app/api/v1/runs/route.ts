import { withRoute } from "@/app/_server/with-route";
import { createRun } from "@/services/runs/create-run";
import { getRun, listRuns } from "@/services/runs/runs";
import { presentPage } from "../common-presenter";
import { presentRun } from "./presenter";
import { newRunSchema, runsQuery } from "./schema";

/** Runs of everybody, newest first. */
export const GET = withRoute({
  may: "run.read",
  query: runsQuery,
  handler: ({ actor, query: { state, ...page } }) => listRuns(actor, { state }, page),
  present: presentPage(presentRun),
});

/** Begin a run; the worker does it. One that would do the same twice at the same time is refused with the other's id. */
export const POST = withRoute({
  may: "run.create",
  body: newRunSchema,
  status: 202,
  handler: async ({ actor, body }) => getRun(actor, await createRun(actor, body)),
  present: presentRun,
});
