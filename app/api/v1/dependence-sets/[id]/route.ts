import { withRoute } from "@/app/_server/with-route";
import {
  getDependenceSet,
  removeDependenceSet,
  updateDependenceSet,
} from "@/services/dependence-sets";
import { idParams } from "../../common-schema";
import { presentDependenceSet } from "../presenter";
import { dependenceSetPatchSchema } from "../schema";

export const GET = withRoute({
  may: "dependenceSet.read",
  params: idParams,
  handler: ({ actor, params }) => getDependenceSet(actor, params.id),
  present: presentDependenceSet,
});

/** Change a set; `isDefault: true` makes totals stand on it unless a page says otherwise. */
export const PATCH = withRoute({
  may: "dependenceSet.update",
  params: idParams,
  body: dependenceSetPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateDependenceSet(actor, params.id, body, expectedVersion),
  present: presentDependenceSet,
});

/** Delete a set that is not the default. */
export const DELETE = withRoute({
  may: "dependenceSet.update",
  params: idParams,
  versioned: true,
  handler: ({ actor, params, expectedVersion }) =>
    removeDependenceSet(actor, params.id, expectedVersion),
});
