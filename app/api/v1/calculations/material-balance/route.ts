import { withRoute } from "@/app/_server/with-route";
import { calculateMaterialBalance } from "@/services/calculations-of-fluids";
import { materialBalanceRequestSchema } from "../material-balance-schema";

/**
 * POST /api/v1/calculations/material-balance: gas and condensate in place from reservoir pressures and production, by the
 * straight line of p/z with the two-phase z below the dew point.
 *
 * @example request
 * { "records": [{ "pressurePsia": 5200, "surfaceGasScf": 0, "condensateStb": 0 },
 *     { "pressurePsia": 4500, "surfaceGasScf": 8.1e9, "condensateStb": 610000 }, ... ],
 *   "separatorTest": { ... }, "temperatureDegF": 255, "curve": { ... }, "depthFt": 12000 }
 * @example answer (in part)
 * { "wellstreamInPlaceScf": 9.4e10, "condensateInPlaceStb": 9.5e6, "line": { "rSquared": 0.9994, ... },
 *   "withGasZ": { "bias": -0.061, ... } }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: materialBalanceRequestSchema,
  handler: async ({ body }) => calculateMaterialBalance(body),
});
