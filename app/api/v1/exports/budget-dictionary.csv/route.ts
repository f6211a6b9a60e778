import { withRoute } from "@/app/_server/with-route";
import { exportBudgetDictionary } from "@/services/exports/budget";

/** GET /api/v1/exports/budget-dictionary.csv: name, unit and meaning of every column of the budget file. */
export const GET = withRoute({
  may: "export.create",
  handler: async ({ actor }) => exportBudgetDictionary(actor),
});
