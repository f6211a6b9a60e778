import { withRoute } from "@/app/_server/with-route";
import { createUser, listUsers } from "@/services/users";
import { presentPage } from "../common-presenter";
import { pageQuery } from "../common-schema";
import { presentUser } from "./presenter";
import { newUserSchema } from "./schema";

export const GET = withRoute({
  may: "user.read",
  query: pageQuery,
  handler: ({ actor, query }) => listUsers(actor, query),
  present: presentPage(presentUser),
});

export const POST = withRoute({
  may: "user.create",
  body: newUserSchema,
  status: 201,
  handler: ({ actor, body }) => createUser(actor, body),
  present: presentUser,
});
