import { withRoute } from "@/app/_server/with-route";
import { createFluidSample } from "@/services/fluid-samples";
import { presentFluidSample } from "./presenter";
import { newFluidSampleSchema } from "./schema";

export const POST = withRoute({
  may: "fluidSample.create",
  body: newFluidSampleSchema,
  status: 201,
  handler: ({ actor, body }) => createFluidSample(actor, body),
  present: presentFluidSample,
});
