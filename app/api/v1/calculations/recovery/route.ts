import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { recoveryRequestSchema } from "../recovery-schema";

/**
 * POST /api/v1/calculations/recovery: what depletion, compression and cycling bring to the tank, with ranges, on the same
 * trials. Nothing is stored. Runs on the thread pool.
 *
 * @example request
 * { "inputs": { ... }, "plans": [{ "concept": "depletion", "curve": { ... }, "abandonmentPressurePsia": { ... }, ... }],
 *   "seed": 1, "trials": 4000 }
 * @example answer (in part)
 * { "concepts": [{ "concept": "depletion", "condensateRecovery": { "p90": 0.31, ... },
 *     "shares": { "toTank": 0.36, "leftInRock": 0.56, "leftInGas": 0.08 } }] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: recoveryRequestSchema,
  handler: ({ body, request }) => calculateOnFluid("recovery", body, { signal: request.signal }),
});
