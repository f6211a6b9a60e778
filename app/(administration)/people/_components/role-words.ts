import type { UserView } from "@/app/api/v1/users/schema";
import type { Option } from "@/components/ui/choice";

export type Role = UserView["role"];

const does: Record<Role, string> = {
  engineer: "enters reservoirs and fluids, runs and submits estimates",
  reviewer: "approves estimates or returns them",
  planner: "ranks fields, sets interests and price decks, exports budgets",
  executive: "reads everything, changes nothing",
  administrator: "adds people, sets roles, reads the audit trail",
};

export const roleName = (role: Role) => role.charAt(0).toUpperCase() + role.slice(1);

/** Every role with what it is for. */
export const roleOptions: Option<Role>[] = (Object.keys(does) as Role[]).map((value) => ({
  value,
  label: roleName(value),
  note: does[value],
}));
