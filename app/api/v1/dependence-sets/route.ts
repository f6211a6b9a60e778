import { withRoute } from "@/app/_server/with-route";
import type { DependenceSet } from "@/models/dependence-set";
import { createDependenceSet, listDependenceSets } from "@/services/dependence-sets";
import { presentDependenceSet } from "./presenter";
import { newDependenceSetSchema } from "./schema";

export const GET = withRoute({
  may: "dependenceSet.read",
  handler: ({ actor }) => listDependenceSets(actor),
  present: (sets: DependenceSet[]) => ({ items: sets.map(presentDependenceSet) }),
});

export const POST = withRoute({
  may: "dependenceSet.create",
  body: newDependenceSetSchema,
  status: 201,
  handler: ({ actor, body }) => createDependenceSet(actor, body),
  present: presentDependenceSet,
});
