import { withRoute } from "@/app/_server/with-route";
import { calculateInPlace } from "@/services/calculations";
import { inPlaceRequestSchema } from "../schema";

/**
 * POST /api/v1/calculations/in-place: wet gas, dry gas and condensate in place with single values.
 *
 * @example request
 * { "areaAcres": 2500, "netThicknessFt": 80, "porosity": 0.15, "waterSaturation": 0.25,
 *   "pressurePsia": 6500, "temperatureDegF": 260, "zFactor": 1.12, "separatorTest": { ... } }
 * @example answer (in part, with the separator test of /wellstream)
 * { "wetGasInPlaceScf": 279486500000, "dryGasInPlaceScf": 262101900000, "condensateInPlaceStb": 21052360 }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: inPlaceRequestSchema,
  handler: async ({ body }) => calculateInPlace(body),
});
