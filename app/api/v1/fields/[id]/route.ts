import { withRoute } from "@/app/_server/with-route";
import { getField, updateField } from "@/services/fields";
import { idParams } from "../../common-schema";
import { presentField } from "../presenter";
import { fieldPatchSchema } from "../schema";

export const GET = withRoute({
  may: "field.read",
  params: idParams,
  handler: ({ actor, params }) => getField(actor, params.id),
  present: presentField,
});

export const PATCH = withRoute({
  may: "field.update",
  params: idParams,
  body: fieldPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateField(actor, params.id, body, expectedVersion),
  present: presentField,
});
