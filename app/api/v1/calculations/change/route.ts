import { withRoute } from "@/app/_server/with-route";
import { calculateChange } from "@/services/sensitivity";
import { changeRequestSchema } from "./schema";

/**
 * POST /api/v1/calculations/change: how much each difference between two estimates explains of the move of a percentile,
 * averaged over the orders of making the changes. Where both estimates have more trials than can be made for every order,
 * effects and their two ends are of `trials` trials, and `own` has the ends on all of them. Runs on the thread pool.
 *
 * @example request
 * { "from": { "inputs": { ... }, "seed": 1, "trials": 10000, "sampling": "latinHypercube" },
 *   "to": { "inputs": { ... }, "seed": 1, "trials": 10000, "sampling": "latinHypercube" },
 *   "result": "condensateRecoverableStb", "percentile": "p50" }
 * @example answer (in part)
 * { "from": 5.1e6, "to": 6.4e6, "own": { "from": 5.1e6, "to": 6.4e6 }, "trials": 10000, "orders": "all",
 *   "changes": [{ "change": { "kind": "input", "input": "areaAcres" }, "effect": 1.2e6, "standardError": null }] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: changeRequestSchema,
  handler: ({ body, request }) => calculateChange(body, { signal: request.signal }),
});
