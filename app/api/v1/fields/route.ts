import { withRoute } from "@/app/_server/with-route";
import { createField } from "@/services/fields";
import { presentField } from "./presenter";
import { newFieldSchema } from "./schema";

export const POST = withRoute({
  may: "field.create",
  body: newFieldSchema,
  status: 201,
  handler: ({ actor, body }) => createField(actor, body),
  present: presentField,
});
