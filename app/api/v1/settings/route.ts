import { withRoute } from "@/app/_server/with-route";
import { getSettings, updateSettings } from "@/services/settings";
import { presentSettings } from "./presenter";
import { settingsPatchSchema } from "./schema";

export const GET = withRoute({
  may: "settings.read",
  handler: () => getSettings(),
  present: presentSettings,
});

export const PATCH = withRoute({
  may: "settings.update",
  body: settingsPatchSchema,
  versioned: true,
  handler: ({ actor, body, expectedVersion }) => updateSettings(actor, body, expectedVersion),
  present: presentSettings,
});
