import { withRoute } from "@/app/_server/with-route";
import { getReservoirFile, updateReservoir } from "@/services/reservoirs";
import { idParams } from "../../common-schema";
import { presentReservoir, presentReservoirFile } from "../presenter";
import { reservoirPatchSchema } from "../schema";

/** The reservoir with its field, approved and open estimates, revisions and fluid samples. */
export const GET = withRoute({
  may: "reservoir.read",
  params: idParams,
  handler: ({ actor, params }) => getReservoirFile(actor, params.id),
  present: presentReservoirFile,
});

export const PATCH = withRoute({
  may: "reservoir.update",
  params: idParams,
  body: reservoirPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateReservoir(actor, params.id, body, expectedVersion),
  present: presentReservoir,
});
