import { withRoute } from "@/app/_server/with-route";
import { basisSchema } from "@/components/basis/basis";
import { compare } from "@/services/comparisons";
import { comparisonRequestSchema } from "./schema";

/**
 * POST /api/v1/comparisons: two revisions, ways of producing or fields beside each other, and how much each difference of
 * inputs explains of the move of one P50. The basis in the address says which revisions and which dependence set stand
 * for a field; volumes are gross and unrisked whatever it says. Runs on the thread pool; nothing is kept.
 *
 * @example request
 * { "left": { "kind": "estimate", "estimateId": "..." },
 *   "right": { "kind": "concept", "estimateId": "...", "concept": "cycling" }, "result": "condensateRecoverableStb" }
 * @example answer (in part)
 * { "left": { "label": "Larkhaven, Main sand, r3", "quantities": { "condensateRecoverableStb": { "p50": 5.1e6 } } },
 *   "explanation": { "from": 5.1e6, "to": 7.9e6,
 *     "changes": [{ "change": { "kind": "recoveryPlan" }, "effect": 2.8e6, "standardError": null }] } }
 */
export const POST = withRoute({
  may: "estimate.read",
  query: basisSchema,
  body: comparisonRequestSchema,
  handler: ({ actor, query, body, request }) =>
    compare(actor, body, query, { signal: request.signal }),
});
