import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { equationOfStateRequestSchema } from "../fluid-schema";

/**
 * POST /api/v1/calculations/equation-of-state: phase envelope, dew points, separators and simulated depletion of a fluid
 * by the Peng-Robinson equation of state. With all adjustments at 1 it is untuned, and the answer says so. Runs on the
 * thread pool.
 *
 * @example request
 * { "sheet": { ... }, "temperatureDegF": 255, "measuredDewPointPsia": 5215,
 *   "stages": [{ "pressurePsia": 614.7, "temperatureDegF": 85 }, { "pressurePsia": 14.7, "temperatureDegF": 60 }],
 *   "characterisation": { "split": { "kind": "gamma", "fractions": 3 }, "criticals": "keslerLee",
 *     "adjustments": { "heavyCriticalTemperatureFactor": 1, ... } } }
 * @example answer (in part)
 * { "isTuned": false, "saturation": { "upperPsia": 5200.6, "kind": "dewPoint", "mismatchPsia": -14.4 } }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: equationOfStateRequestSchema,
  handler: ({ body, request }) =>
    calculateOnFluid("equationOfState", body, { signal: request.signal }),
});
