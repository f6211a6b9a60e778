import { withRoute } from "@/app/_server/with-route";
import { createImport, listImports, type ImportFile } from "@/services/imports/imports";
import { presentPage } from "../common-presenter";
import { pageQuery } from "../common-schema";
import { presentImport, presentImportFile } from "./presenter";
import { readUpload } from "./upload";

/** Imports, newest first. */
export const GET = withRoute({
  may: "import.read",
  query: pageQuery,
  handler: ({ actor, query }) => listImports(actor, query),
  present: presentPage(presentImport),
});

/**
 * Check a CSV of reservoirs, sent as the part `file` of a form; nothing in the book changes yet. An idempotency key is
 * refused because it would not cover the file; sending a file twice makes a second preview and nothing else.
 */
export const POST = withRoute({
  may: "import.create",
  status: 201,
  answersOnce: true,
  handler: async ({ actor, request }) => createImport(actor, await readUpload(request)),
  present: (file: ImportFile, actor) => presentImportFile(file, actor),
});
