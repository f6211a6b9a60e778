import type { EstimateState } from "@/models/vocabulary";
import { ConflictError } from "./errors";
import { can, type Actor, type EstimateAuthors } from "./policy";

/**
 * The life of an estimate: draft -> submitted -> approved -> superseded, or submitted -> returned -> submitted again.
 * What may be done in which state; who may do it is the policy's business.
 */
const statesFor = {
  "estimate.update": ["draft", "returned"],
  "estimate.run": ["draft", "returned"],
  "estimate.submit": ["draft", "returned"],
  "estimate.discard": ["draft"],
  "estimate.approve": ["submitted"],
  "estimate.return": ["submitted"],
} as const satisfies Record<string, readonly EstimateState[]>;

export type EstimateAction = keyof typeof statesFor;

const verbs: Record<EstimateAction, string> = {
  "estimate.update": "changed",
  "estimate.run": "run",
  "estimate.submit": "submitted",
  "estimate.discard": "discarded",
  "estimate.approve": "approved",
  "estimate.return": "returned",
};

function isPossible(action: EstimateAction, state: EstimateState): boolean {
  const states: readonly EstimateState[] = statesFor[action];
  return states.includes(state);
}

/** @throws {ConflictError} when an estimate in this state cannot be treated so */
export function assertPossible(action: EstimateAction, estimate: { state: EstimateState }): void {
  if (isPossible(action, estimate.state)) return;
  throw new ConflictError(
    `This estimate is ${estimate.state} and cannot be ${verbs[action]}.`,
    "wrong_state",
  );
}

export type EstimateAbilities = Record<
  "update" | "run" | "submit" | "discard" | "approve" | "return",
  boolean
>;

/** What this person can do with this estimate as it stands: state, role and authorship together. */
export function estimateAbilities(
  actor: Actor,
  estimate: EstimateAuthors & { state: EstimateState },
): EstimateAbilities {
  const able = (action: EstimateAction) =>
    isPossible(action, estimate.state) && can(actor, action, estimate);
  return {
    update: able("estimate.update"),
    run: able("estimate.run"),
    submit: able("estimate.submit"),
    discard: able("estimate.discard"),
    approve: able("estimate.approve"),
    return: able("estimate.return"),
  };
}
