import { withRoute } from "@/app/_server/with-route";
import { calculateSensitivity } from "@/services/sensitivity";
import { sensitivityRequestSchema } from "./schema";

/**
 * POST /api/v1/calculations/sensitivity: what drives one result of an estimate, without keeping it. The trials are made
 * anew from inputs, seed, method and number, so a revision's own give that revision's trials. `parts` names what is wanted,
 * all of it unless said. Runs on the thread pool.
 *
 * @example request
 * { "inputs": { ... }, "seed": 1, "trials": 10000, "result": "condensateRecoverableStb",
 *   "chosen": { "from": 0.9, "to": 1 } }
 * @example answer (in part)
 * { "rankRegression": { "rSquared": 0.95, "coefficients": [{ "input": "areaAcres", "coefficient": 0.73 }] },
 *   "varianceShares": { "factors": [{ "inputs": ["areaAcres"], "first": { "value": 0.56, "standardError": 0.01 } }] },
 *   "knowing": [{ "input": "areaAcres", "varianceRemoved": 0.54, "remainingWidth": 0.68 }] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: sensitivityRequestSchema,
  handler: ({ body, request }) => calculateSensitivity(body, { signal: request.signal }),
});
