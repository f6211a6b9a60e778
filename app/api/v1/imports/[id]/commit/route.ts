import { withRoute } from "@/app/_server/with-route";
import { commitImport, type ImportFile } from "@/services/imports/imports";
import { idParams } from "../../../common-schema";
import { presentImportFile } from "../../presenter";
import { commitBody } from "../../schema";

/** Take the rows into the book; their runs follow in the worker. Repeated, it answers with what was done. */
export const POST = withRoute({
  may: "import.create",
  params: idParams,
  body: commitBody,
  status: 202,
  handler: ({ actor, params, body }) => commitImport(actor, params.id, body.rows),
  present: (file: ImportFile, actor) => presentImportFile(file, actor),
});
