import { withRoute } from "@/app/_server/with-route";
import { getFluidSample, updateFluidSample } from "@/services/fluid-samples";
import { idParams } from "../../common-schema";
import { presentFluidSample } from "../presenter";
import { fluidSamplePatchSchema } from "../schema";

export const GET = withRoute({
  may: "fluidSample.read",
  params: idParams,
  handler: ({ actor, params }) => getFluidSample(actor, params.id),
  present: presentFluidSample,
});

export const PATCH = withRoute({
  may: "fluidSample.update",
  params: idParams,
  body: fluidSamplePatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateFluidSample(actor, params.id, body, expectedVersion),
  present: presentFluidSample,
});
