import { withRoute } from "@/app/_server/with-route";
import { updateBasin } from "@/services/basins";
import { idParams } from "../../common-schema";
import { presentBasin } from "../presenter";
import { basinPatchSchema } from "../schema";

export const PATCH = withRoute({
  may: "basin.update",
  params: idParams,
  body: basinPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateBasin(actor, params.id, body, expectedVersion),
  present: presentBasin,
});
