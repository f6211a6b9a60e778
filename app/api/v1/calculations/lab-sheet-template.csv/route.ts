import { withRoute } from "@/app/_server/with-route";
import { LAB_SHEET_TEMPLATE_NAME, labSheetTemplate } from "@/services/lab-sheets/template";

/** GET /api/v1/calculations/lab-sheet-template.csv: the sheet that POST /api/v1/calculations/lab-sheet reads, to fill in. */
export const GET = withRoute({
  may: "calculation.run",
  handler: async () =>
    new Response(labSheetTemplate(), {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": `attachment; filename="${LAB_SHEET_TEMPLATE_NAME}"`,
        "cache-control": "no-store",
      },
    }),
});
