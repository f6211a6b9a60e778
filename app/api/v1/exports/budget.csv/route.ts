import { withRoute } from "@/app/_server/with-route";
import { basisSchema } from "@/components/basis/basis";
import { exportBudget } from "@/services/exports/budget";

/** GET /api/v1/exports/budget.csv: the whole book on a basis, in the documented layout for budgeting systems. */
export const GET = withRoute({
  may: "export.create",
  query: basisSchema,
  handler: ({ actor, query }) => exportBudget(actor, query),
});
