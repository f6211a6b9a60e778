import { withRoute } from "@/app/_server/with-route";
import { signOutEverywhere } from "@/services/users";
import { presentSession } from "./presenter";

/** Who am I, and what may I do? */
export const GET = withRoute({
  may: "session.read",
  handler: async ({ actor }) => presentSession(actor),
});

/** End every session of mine, on every device, and revoke my API tokens. */
export const DELETE = withRoute({
  may: "session.read",
  handler: ({ actor }) => signOutEverywhere(actor),
});
