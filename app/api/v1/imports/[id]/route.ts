import { withRoute } from "@/app/_server/with-route";
import { getImport } from "@/services/imports/imports";
import { idParams } from "../../common-schema";
import { presentImportFile } from "../presenter";
import { importQuery } from "../schema";

/** One import: what its rows would do, or did, a page of them, and how far the runs are. */
export const GET = withRoute({
  may: "import.read",
  params: idParams,
  query: importQuery,
  handler: async ({ actor, params, query }) =>
    presentImportFile(await getImport(actor, params.id), actor, query),
});
