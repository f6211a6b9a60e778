import { withRoute } from "@/app/_server/with-route";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { labSheetRequestSchema } from "../fluid-schema";

/**
 * POST /api/v1/calculations/lab-sheet: a laboratory's CSV, or cells pasted from a spreadsheet, read into a composition, a
 * depletion table and separators. What could not be read is listed cell by cell; nothing is stored. The layout is that of
 * /api/v1/calculations/lab-sheet-template.csv. Runs on the thread pool.
 *
 * @example request
 * { "text": "composition\ncomponent,mol %\nC1,90\nC2,10\n" }
 * @example answer (in part)
 * { "composition": { "kind": "wellstream", "stream": { "light": { "C1": 90, "C2": 10 }, ... } }, "problems": [] }
 */
export const POST = withRoute({
  may: "calculation.run",
  body: labSheetRequestSchema,
  handler: ({ body, request }) => calculateOnFluid("labSheet", body, { signal: request.signal }),
});
