import { withRoute } from "@/app/_server/with-route";
import { updateUser } from "@/services/users";
import { idParams } from "../../common-schema";
import { presentUser } from "../presenter";
import { userPatchSchema } from "../schema";

export const PATCH = withRoute({
  may: "user.update",
  params: idParams,
  body: userPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updateUser(actor, params.id, body, expectedVersion),
  present: presentUser,
});
