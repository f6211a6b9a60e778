import { withRoute } from "@/app/_server/with-route";
import { listReviewQueue } from "@/services/review-queue";
import { presentReview } from "./presenter";
import { reviewQuery } from "./schema";

/** What waits for a reviewer, and what was sent back, each beside the approved revision it would replace. */
export const GET = withRoute({
  may: "estimate.read",
  query: reviewQuery,
  handler: async ({ actor, query }) => presentReview(await listReviewQueue(actor), query, actor),
});
