import { withRoute } from "@/app/_server/with-route";
import { getFieldFile } from "@/services/field-files";
import { presentFieldFile } from "../../file-presenter";
import { fieldFileParams } from "../../file-schema";

/** The field with its reservoirs and every revision of each; by id or by the word of its address. */
export const GET = withRoute({
  may: "field.read",
  params: fieldFileParams,
  handler: ({ actor, params }) => getFieldFile(actor, params.id),
  present: presentFieldFile,
});
