import type { Transaction } from "sequelize";
import type { Estimate } from "@/models/estimate";
import { findUser, listActiveUsers } from "@/models/queries/users";
import { isPretending } from "./clock";
import { env } from "./env";
import { sendLetter } from "./mail/send";
import { estimateDecidedLetter, estimateSubmittedLetter } from "./mail/templates/estimate-letters";
import { can, type Actor } from "./policy";

/**
 * @param estimate  with its reservoir and field
 * @param tab  of the reservoir's pages; the first one when not given
 */
function referenceTo(estimate: Estimate, tab = "") {
  const { reservoir, revision } = estimate;
  if (!reservoir?.field) throw new Error("the estimate was loaded without its place");
  const path = `/fields/${reservoir.field.slug}/${reservoir.slug}${tab}`;
  return {
    reservoirName: reservoir.name,
    fieldName: reservoir.field.name,
    revision,
    url: new URL(path, env().NEXTAUTH_URL).href,
  };
}

/** Write to everybody who may decide on it. The letters go out only if the submission is kept. */
export async function tellReviewers(
  actor: Actor,
  estimate: Estimate,
  transaction: Transaction,
): Promise<void> {
  if (isPretending()) return;
  const reviewers = await listActiveUsers("reviewer");
  for (const reviewer of reviewers.filter((person) => can(person, "estimate.approve", estimate))) {
    await sendLetter(
      reviewer.email,
      estimateSubmittedLetter(reviewer.name, actor.name, referenceTo(estimate, "/compare")),
      { transaction },
    );
  }
}

/** Write to who submitted it, and to who began it when that is somebody else. */
export async function tellAuthors(
  actor: Actor,
  estimate: Estimate,
  decision: "approved" | "returned",
  transaction: Transaction,
): Promise<void> {
  if (isPretending()) return;
  for (const id of new Set([estimate.submittedBy, estimate.createdBy])) {
    const author = id === null ? null : await findUser(id, { transaction });
    if (!author?.active) continue;
    await sendLetter(
      author.email,
      estimateDecidedLetter(
        author.name,
        actor.name,
        decision,
        estimate.decisionNote,
        referenceTo(estimate),
      ),
      { transaction },
    );
  }
}
