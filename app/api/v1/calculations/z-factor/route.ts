import { withRoute } from "@/app/_server/with-route";
import { calculateZFactor } from "@/services/calculations";
import { zFactorRequestSchema } from "../schema";

/**
 * POST /api/v1/calculations/z-factor: deviation factor and volume factor of a gas of known gravity, by the
 * pseudocriticals of Sutton (2007) and the z of Dranchuk and Abou-Kassem (1975).
 *
 * @example request
 * { "gasGravity": 0.914, "pressurePsia": 6500, "temperatureDegF": 260, "carbonDioxide": 0.02 }
 * @example answer (in part)
 * { "reducedPressure": 9.93, "reducedTemperature": 1.64, "zFactor": 1.13, "warnings": [] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: zFactorRequestSchema,
  handler: async ({ body }) => calculateZFactor(body),
});
