import { withRoute } from "@/app/_server/with-route";
import { calculateSimulation } from "@/services/calculations";
import { simulationRequestSchema } from "../schema";

/**
 * POST /api/v1/calculations/simulation: results of an estimate's inputs, without keeping them. Runs on the thread
 * pool; the same inputs, trials and seed give the same answer to the last digit.
 *
 * @example request
 * { "inputs": { "schemaVersion": 1, "uncertain": { "areaAcres": { "distribution":
 *     { "kind": "lognormalP90P10", "p90": 1000, "p10": 4000 } }, ... }, "correlations": [], "fluid": { ... },
 *     "depthFt": null }, "trials": 2000, "seed": 1 }
 * @example answer (in part)
 * { "trials": 2000, "results": { "condensateRecoverableStb": { "p90": 2.1e6, "p50": 5.4e6, "p10": 13.2e6 } } }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: simulationRequestSchema,
  handler: ({ body, request }) => calculateSimulation(body, { signal: request.signal }),
});
