import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { tuningRequestSchema } from "../fluid-schema";

/**
 * POST /api/v1/calculations/tuning: adjustments of heptanes plus, and only the declared ones, that bring the equation of
 * state to a laboratory's dew point and depletion. A proposal; nothing is stored. Runs on the thread pool.
 *
 * @example request
 * { "sheet": { ... }, "characterisation": { ... }, "table": { ... },
 *   "tunables": ["heavyCriticalTemperatureFactor", "heavyVolumeShiftFactor"] }
 * @example answer (in part)
 * { "changes": [{ "name": "heavyCriticalTemperatureFactor", "from": 1, "to": 1.021, "atBound": false }, ... ] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: tuningRequestSchema,
  handler: ({ body, request }) => calculateOnFluid("tuning", body, { signal: request.signal }),
});
