import { withRoute } from "@/app/_server/with-route";
import { basisSchema } from "@/components/basis/basis";
import { getStatement } from "@/services/portfolio/statement";

/** GET /api/v1/portfolio: the statement of the whole book on a basis. */
export const GET = withRoute({
  may: "portfolio.read",
  query: basisSchema,
  handler: ({ actor, query }) => getStatement(actor, query),
});
