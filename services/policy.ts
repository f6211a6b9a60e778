import { roles, type Role } from "@/models/vocabulary";
import { ForbiddenError } from "./errors";

export { roles, type Role };

/** Who is asking, as the database has them at this moment. */
export interface Actor {
  id: string;
  name: string;
  email: string;
  role: Role;
  /** ties audit events and log lines to one request */
  requestId?: string;
}

const everyone: readonly Role[] = roles;

/** The one table: which roles may do what. Rules about a particular record stand beside it, below. */
export const policy = {
  "session.read": everyone,
  "portfolio.read": everyone,
  "basin.read": everyone,
  "field.read": everyone,
  "reservoir.read": everyone,
  "fluidSample.read": everyone,
  "estimate.read": everyone,
  "priceDeck.read": everyone,
  "settings.read": everyone,
  "dependenceSet.read": everyone,
  "run.read": everyone,
  "people.read": everyone,
  "calculation.run": everyone,
  "apiToken.manage": everyone,
  /** one's own */
  "password.change": everyone,

  /** an administrator opens an empty book with its first basin and field; what is in them is for others to say */
  "basin.create": ["engineer", "planner", "administrator"],
  "basin.update": ["planner"],
  "field.create": ["engineer", "planner", "administrator"],
  "field.update": ["engineer", "planner"],
  /** working and net revenue interest, chance of commerciality: what turns volumes into the company's money */
  "field.updateCommercial": ["planner"],
  "reservoir.create": ["engineer"],
  "reservoir.update": ["engineer"],
  "fluidSample.create": ["engineer"],
  "fluidSample.update": ["engineer"],

  "estimate.create": ["engineer"],
  "estimate.update": ["engineer"],
  "estimate.run": ["engineer"],
  "estimate.submit": ["engineer"],
  "estimate.discard": ["engineer"],
  "estimate.approve": ["reviewer"],
  "estimate.return": ["reviewer"],

  /** heavy work in the background; whoever began a run can stop it, and an administrator any */
  "run.create": ["engineer", "planner"],
  "run.cancel": ["engineer", "planner", "administrator"],

  "dependenceSet.create": ["planner"],
  "dependenceSet.update": ["planner"],

  "import.read": ["engineer", "reviewer", "planner"],
  "import.create": ["engineer"],
  "export.create": ["engineer", "reviewer", "planner", "executive"],

  "priceDeck.create": ["planner"],
  "priceDeck.update": ["planner"],
  "priceDeck.publish": ["planner"],

  "user.read": ["administrator"],
  "user.create": ["administrator"],
  "user.update": ["administrator"],
  "settings.update": ["administrator"],
  "audit.read": ["administrator"],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof policy;

/** What the record rules look at; a model row and a presented row both have it. */
export interface EstimateAuthors {
  createdBy: string;
  submittedBy: string | null;
}

/** Rules that depend on the record. Each returns the reason for refusing, or null. */
const recordRules: Partial<
  Record<Action, (actor: Actor, record: EstimateAuthors) => string | null>
> = {
  "estimate.approve": refuseOwnWork,
  "estimate.return": refuseOwnWork,
};

function refuseOwnWork(actor: Actor, estimate: EstimateAuthors): string | null {
  return estimate.createdBy === actor.id || estimate.submittedBy === actor.id
    ? "Nobody decides on their own estimate. Another reviewer has to."
    : null;
}

/**
 * May this person do this, to this record when there is one?
 *
 * @param record  needed for decisions on estimates; without it only the role is looked at
 */
export function can(actor: Actor, action: Action, record?: EstimateAuthors): boolean {
  return refusal(actor, action, record) === null;
}

/** Why this person may not, in words for the screen, or null when they may. */
export function refusal(actor: Actor, action: Action, record?: EstimateAuthors): string | null {
  const allowed: readonly Role[] = policy[action];
  if (!allowed.includes(actor.role)) {
    return `Your role (${actor.role}) does not include this. It takes: ${allowed.join(" or ")}.`;
  }
  return (record && recordRules[action]?.(actor, record)) ?? null;
}

/** @throws {ForbiddenError} when `can` says no */
export function authorise(actor: Actor, action: Action, record?: EstimateAuthors): void {
  const reason = refusal(actor, action, record);
  if (reason !== null) throw new ForbiddenError(reason);
}

/** Every action this person's role allows, for a page to know which buttons to draw. Hiding is courtesy, not security. */
export function allowedActions(actor: Actor): Action[] {
  return (Object.keys(policy) as Action[]).filter((action) => can(actor, action));
}
