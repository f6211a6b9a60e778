import { withRoute } from "@/app/_server/with-route";
import { calculateWellstream } from "@/services/calculations";
import { wellstreamRequestSchema } from "../schema";

/**
 * POST /api/v1/calculations/wellstream: recombine a separator test into the wellstream.
 *
 * @example request
 * { "separatorTest": { "basePressurePsia": 14.696,
 *     "primarySeparator": { "pressurePsia": 514.7, "temperatureDegF": 80, "gasOilRatioScfPerStb": 12000, "gasGravity": 0.68 },
 *     "secondSeparator": null, "stockTankGas": { "gasOilRatioScfPerStb": 450, "gasGravity": 1.15 },
 *     "condensateApi": 56, "condensateMolecularWeight": null,
 *     "nitrogen": 0, "carbonDioxide": 0, "hydrogenSulphide": 0, "dewPointPsia": null },
 *   "reservoir": { "pressurePsia": 6500, "temperatureDegF": 260 } }
 * @example answer (in part)
 * { "wellstreamGravity": 0.914422, "wellstreamScfPerStb": 13275.78, "dryGasFraction": 0.937798,
 *   "condensateYieldStbPerMmscf": 80.32, "fluidType": "condensate" }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: wellstreamRequestSchema,
  handler: async ({ body }) => calculateWellstream(body),
});
