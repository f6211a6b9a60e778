import type { Letter } from "./letter";

interface EstimateReference {
  reservoirName: string;
  fieldName: string;
  revision: number;
  url: string;
}

const named = ({ reservoirName, fieldName, revision }: EstimateReference) =>
  `revision ${revision} of ${reservoirName} (${fieldName})`;

/** To the reviewers: an estimate waits for them. */
export function estimateSubmittedLetter(
  reviewerName: string,
  engineerName: string,
  estimate: EstimateReference,
): Letter {
  return {
    subject: `For review: ${estimate.reservoirName}, revision ${estimate.revision}`,
    greeting: reviewerName,
    paragraphs: [
      `${engineerName} has submitted ${named(estimate)} for review.`,
      "It is counted in approved totals only after you or another reviewer approve it.",
    ],
    action: { label: "Review the estimate", url: estimate.url },
  };
}

/** To the engineer: the reviewer has decided. */
export function estimateDecidedLetter(
  engineerName: string,
  reviewerName: string,
  decision: "approved" | "returned",
  note: string,
  estimate: EstimateReference,
): Letter {
  return {
    subject: `${decision === "approved" ? "Approved" : "Returned"}: ${estimate.reservoirName}, revision ${estimate.revision}`,
    greeting: engineerName,
    paragraphs: [
      `${reviewerName} has ${decision} ${named(estimate)}.`,
      ...(note.trim() === "" ? [] : [`Their note: ${note.trim()}`]),
    ],
    action: { label: "Open the estimate", url: estimate.url },
  };
}
