import { withRoute } from "@/app/_server/with-route";
import { calculateDistribution } from "@/services/calculations";
import { distributionRequestSchema } from "./schema";

/**
 * POST /api/v1/calculations/distribution: percentiles, moments and a drawable density. P90 is the low case.
 *
 * @example request
 * { "distribution": { "kind": "lognormalP90P10", "p90": 50, "p10": 500 }, "points": 80 }
 * @example answer (in part)
 * { "range": { "p90": 50, "p50": 158.113883, "p10": 500, "mean": 236.710864 }, "standardDeviation": 263.726214 }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: distributionRequestSchema,
  handler: async ({ body }) => calculateDistribution(body),
});
