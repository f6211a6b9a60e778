import { withRoute } from "@/app/_server/with-route";
import type { Basin } from "@/models/basin";
import { createBasin, listBasins } from "@/services/basins";
import { presentBasin } from "./presenter";
import { newBasinSchema } from "./schema";

export const GET = withRoute({
  may: "basin.read",
  handler: ({ actor }) => listBasins(actor),
  present: (basins: Basin[]) => ({ items: basins.map(presentBasin) }),
});

export const POST = withRoute({
  may: "basin.create",
  body: newBasinSchema,
  status: 201,
  handler: ({ actor, body }) => createBasin(actor, body),
  present: presentBasin,
});
