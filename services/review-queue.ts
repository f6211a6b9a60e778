import { listReviewQueueRows, type ReviewQueueRow } from "@/models/queries/review-queue";
import { authorise, type Actor } from "./policy";

/** What waits for a decision, and what was sent back, longest-waiting first. */
export async function listReviewQueue(actor: Actor): Promise<ReviewQueueRow[]> {
  authorise(actor, "estimate.read");
  return listReviewQueueRows();
}
