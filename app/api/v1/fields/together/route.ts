import { withRoute } from "@/app/_server/with-route";
import { totalTogether } from "@/services/portfolio/ranking";
import { togetherQuerySchema } from "../ranking-schema";

/** GET /api/v1/fields/together?ids=…,…: what some fields come to together, trial by trial. */
export const GET = withRoute({
  may: "portfolio.read",
  query: togetherQuerySchema,
  handler: ({ actor, query }) => totalTogether(actor, { basis: query, fieldIds: query.ids }),
});
