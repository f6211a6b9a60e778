import { withRoute } from "@/app/_server/with-route";
import type { ApiToken } from "@/models/api-token";
import { createApiToken, listApiTokens } from "@/services/api-tokens";
import { presentApiToken } from "./presenter";
import { newApiTokenSchema, type NewApiTokenView } from "./schema";

export const GET = withRoute({
  may: "apiToken.manage",
  handler: ({ actor }) => listApiTokens(actor),
  present: (tokens: ApiToken[]) => ({ items: tokens.map(presentApiToken) }),
});

/** Make a token that acts as its owner; the answer shows the secret this once. */
export const POST = withRoute({
  may: "apiToken.manage",
  body: newApiTokenSchema,
  status: 201,
  answersOnce: true,
  handler: ({ actor, body }) => createApiToken(actor, body),
  present: ({ row, token }: { row: ApiToken; token: string }): NewApiTokenView => ({
    ...presentApiToken(row),
    token,
  }),
});
