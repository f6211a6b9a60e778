import { withRoute } from "@/app/_server/with-route";
import { TEMPLATE_FILE_NAME, templateCsv } from "@/services/imports/template";

/** The sheet to fill in. */
export const GET = withRoute({
  may: "import.read",
  handler: async () =>
    new Response(templateCsv(), {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": `attachment; filename="${TEMPLATE_FILE_NAME}"`,
        "cache-control": "no-store",
      },
    }),
});
