import { withRoute } from "@/app/_server/with-route";
import { networkAddressOf } from "@/app/_server/network-address";
import { changeOwnPassword } from "@/services/users";
import { passwordChangeSchema } from "../schema";

/** Replace my password; every session of mine ends with it. */
export const POST = withRoute({
  may: "password.change",
  body: passwordChangeSchema,
  handler: ({ actor, body, request }) =>
    changeOwnPassword(actor, body, networkAddressOf(request.headers.get("x-forwarded-for"))),
});
