import { withRoute } from "@/app/_server/with-route";
import { createReservoir } from "@/services/reservoirs";
import { presentReservoir } from "./presenter";
import { newReservoirSchema } from "./schema";

export const POST = withRoute({
  may: "reservoir.create",
  body: newReservoirSchema,
  status: 201,
  handler: ({ actor, body }) => createReservoir(actor, body),
  present: presentReservoir,
});
