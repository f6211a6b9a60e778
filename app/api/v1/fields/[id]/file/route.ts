import { withRoute } from "@/app/_server/with-route";
import { basisSchema } from "@/components/basis/basis";
import { getFieldFile } from "@/services/field-files";
import { presentFieldFile } from "../../file-presenter";
import { fieldFileParams } from "../../file-schema";

/** The field, its reservoirs with every revision, and what it comes to on the basis; by id or the word of its address. */
export const GET = withRoute({
  may: "field.read",
  params: fieldFileParams,
  query: basisSchema,
  handler: ({ actor, params, query }) => getFieldFile(actor, params.id, query),
  present: presentFieldFile,
});
