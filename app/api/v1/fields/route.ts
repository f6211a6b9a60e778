import { withRoute } from "@/app/_server/with-route";
import { createField } from "@/services/fields";
import { listRanking } from "@/services/portfolio/ranking";
import { presentField } from "./presenter";
import { rankingQuerySchema } from "./ranking-schema";
import { toRankingRequest } from "./ranking-request";
import { newFieldSchema } from "./schema";

/**
 * GET /api/v1/fields: the fields with their ranges, ranked on a basis. Filter, order, page and basis are in the query;
 * what is left out is the approved default. Totals are of every field that matches, added up trial by trial.
 *
 * @example /api/v1/fields?basin=saltmarrow,corrith&class=contingent&sort=spread&limit=50
 */
export const GET = withRoute({
  may: "portfolio.read",
  query: rankingQuerySchema,
  handler: ({ actor, query }) =>
    listRanking(actor, { ...toRankingRequest(query), limit: query.limit, offset: query.offset }),
});

export const POST = withRoute({
  may: "field.create",
  body: newFieldSchema,
  status: 201,
  handler: ({ actor, body }) => createField(actor, body),
  present: presentField,
});
