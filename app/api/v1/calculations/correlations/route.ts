import { withRoute } from "@/app/_server/with-route";
import { calculateCorrelations } from "@/services/calculations";
import { correlationsRequestSchema } from "./schema";

/**
 * POST /api/v1/calculations/correlations: whether rank correlations between inputs are possible together, and the
 * nearest set that is. Nothing is changed by asking.
 *
 * @example request
 * { "correlations": [
 *   { "a": "areaAcres", "b": "netThicknessFt", "rank": 0.9 },
 *   { "a": "areaAcres", "b": "porosity", "rank": 0.7 },
 *   { "a": "netThicknessFt", "b": "porosity", "rank": -0.9 } ] }
 * @example answer (in part)
 * { "possible": false, "smallestEigenvalue": -0.69151707, "nearest": { "largestChange": 0.368, "added": 0 } }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: correlationsRequestSchema,
  handler: async ({ body }) => calculateCorrelations(body),
});
