import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { depletionRequestSchema } from "../fluid-schema";

/**
 * POST /api/v1/calculations/depletion: a laboratory's constant-volume depletion checked against itself, with surface
 * products, Hoffmann plot and recovery curve. Runs on the thread pool.
 *
 * @example request
 * { "sheet": { ... }, "table": { "temperatureDegF": 255, "dewPointPsia": 5215, "rows": [ ... ] },
 *   "stages": [{ "pressurePsia": 614.7, "temperatureDegF": 85 }, { "pressurePsia": 14.7, "temperatureDegF": 60 }],
 *   "characterisation": { "split": { "kind": "gamma", "fractions": 3 }, "criticals": "keslerLee", "adjustments": { ... } } }
 * @example answer (in part)
 * { "findings": [{ "code": "component_balance", "severity": "passed", ... }], "curve": { "route": "laboratory", ... } }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: depletionRequestSchema,
  handler: ({ body, request }) => calculateOnFluid("depletion", body, { signal: request.signal }),
});
