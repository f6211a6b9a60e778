import { withRoute } from "@/app/_server/with-route";
import { getReservoirPage } from "@/services/field-files";
import { presentReservoirPage } from "../../../file-presenter";
import { reservoirPageParams } from "../../../file-schema";

/** The reservoir with its estimates, samples and revisions, by the words of its address. */
export const GET = withRoute({
  may: "reservoir.read",
  params: reservoirPageParams,
  handler: ({ actor, params }) => getReservoirPage(actor, params.id, params.reservoir),
  present: presentReservoirPage,
});
