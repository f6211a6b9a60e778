import { toRankingRequest } from "@/app/api/v1/fields/ranking-request";
import { rankingExportQuerySchema } from "@/app/api/v1/fields/ranking-schema";
import { withRoute } from "@/app/_server/with-route";
import { exportRanking } from "@/services/exports/ranking";

/** GET /api/v1/exports/ranking.csv: the ranking exactly as the same address shows it. */
export const GET = withRoute({
  may: "export.create",
  query: rankingExportQuerySchema,
  handler: ({ actor, query }) =>
    exportRanking(actor, { ...toRankingRequest(query), columns: query.columns }),
});
