import { withRoute } from "@/app/_server/with-route";
import { createFirstAdministrator, needsSetup } from "@/services/users";
import { setupRequestSchema } from "./schema";

/** Does this installation still need its first administrator? */
export const GET = withRoute({
  may: "public",
  handler: async () => ({ needsSetup: await needsSetup() }),
});

/** Become the first administrator; refused as soon as anybody exists. */
export const POST = withRoute({
  may: "public",
  body: setupRequestSchema,
  status: 201,
  handler: async ({ body }) => {
    await createFirstAdministrator(body);
    return { needsSetup: false };
  },
});
