import type { z } from "zod";
import type { Basis } from "@/components/basis/basis";
import type { RankingRequest } from "@/services/portfolio/ranking";
import type { rankingFilterSchema, rankingOrderSchema } from "./ranking-schema";

type RankingQuery = Basis &
  z.output<typeof rankingFilterSchema> &
  z.output<typeof rankingOrderSchema>;

/** The words of the address -> what the service is asked. */
export function toRankingRequest(query: RankingQuery): RankingRequest {
  return {
    basis: query,
    filter: {
      search: query.search,
      basins: query.basin,
      classes: query.class,
      states: query.state,
      engineers: query.engineer,
      yieldFromStbPerMmscf: query.yieldFrom ?? null,
      yieldToStbPerMmscf: query.yieldTo ?? null,
    },
    sort: query.sort,
    direction: query.direction,
  };
}
