import { withRoute } from "@/app/_server/with-route";
import { revokeApiToken } from "@/services/api-tokens";
import { idParams } from "../../common-schema";
import { presentApiToken } from "../presenter";

/** Revoke a token of mine. */
export const DELETE = withRoute({
  may: "apiToken.manage",
  params: idParams,
  handler: ({ actor, params }) => revokeApiToken(actor, params.id),
  present: presentApiToken,
});
