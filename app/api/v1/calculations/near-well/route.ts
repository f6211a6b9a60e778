import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { nearWellRequestSchema } from "../recovery-schema";

/**
 * POST /api/v1/calculations/near-well: what share of its rate a well keeps beside the liquid that collects around it, by
 * two-phase pseudopressure. Runs on the thread pool.
 *
 * @example request
 * { "sheet": { ... }, "characterisation": { ... }, "temperatureDegF": 220,
 *   "reservoirPressurePsia": 4200, "flowingPressurePsia": 2000,
 *   "relativePermeability": { "gasExponent": 2.5, "condensateExponent": 3,
 *     "criticalCondensateSaturation": 0.15, "residualGasSaturation": 0.2 } }
 * @example answer (in part)
 * { "productivityRatio": 0.258, "points": [{ "pressurePsia": 2000, "liquidSaturation": 0.382, ... }, ... ] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: nearWellRequestSchema,
  handler: ({ body, request }) => calculateOnFluid("nearWell", body, { signal: request.signal }),
});
