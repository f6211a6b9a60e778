import type { User } from "@/models/user";
import { presentMoment } from "../common-presenter";
import type { UserView } from "./schema";

export function presentUser(user: User): UserView {
  const { id, email, name, role, active, version } = user;
  return {
    id,
    email,
    name,
    role,
    active,
    lastSignInAt: presentMoment(user.lastSignInAt),
    createdAt: presentMoment(user.createdAt),
    version,
  };
}
