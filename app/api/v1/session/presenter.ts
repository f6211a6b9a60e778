import { allowedActions, type Actor } from "@/services/policy";
import type { SessionView } from "./schema";

export function presentSession(actor: Actor): SessionView {
  const { id, name, email, role } = actor;
  return { id, name, email, role, can: allowedActions(actor) };
}
