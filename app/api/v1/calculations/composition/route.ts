import { withRoute } from "@/app/_server/with-route";
import { calculateComposition } from "@/services/calculations-of-fluids";
import { compositionRequestSchema } from "../fluid-schema";

/**
 * POST /api/v1/calculations/composition: a laboratory's composition normalised, with gravity, type of fluid, z and dew
 * point by correlation. Separator streams are recombined at their measured ratio.
 *
 * @example request
 * { "sheet": { "kind": "wellstream", "stream": { "light": { "CO2": 1.9, "N2": 0.6, "C1": 74.2, ... },
 *     "plus": { "carbonNumber": 7, "molePercent": 6.3, "molecularWeight": 158, "specificGravity": 0.792 } } },
 *   "reservoir": { "pressurePsia": 5800, "temperatureDegF": 255 } }
 * @example answer (in part)
 * { "gravity": 1.047379, "fluidType": { "type": "condensate" }, "dewPointEstimates": [{ "dewPointPsia": 5248.4 }, ... ] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: compositionRequestSchema,
  handler: async ({ body }) => calculateComposition(body),
});
