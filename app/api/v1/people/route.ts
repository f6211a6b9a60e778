import { withRoute } from "@/app/_server/with-route";
import type { User } from "@/models/user";
import { listPeople } from "@/services/users";
import { peopleQuery, type PeopleView } from "./schema";

/** Active people by name, for choosing one. */
export const GET = withRoute({
  may: "people.read",
  query: peopleQuery,
  handler: ({ actor, query }) => listPeople(actor, query.role),
  present: (users: User[]): PeopleView => ({
    items: users.map(({ id, name, role }) => ({ id, name, role })),
  }),
});
