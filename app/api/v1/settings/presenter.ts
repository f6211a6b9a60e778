import type { Settings } from "@/models/settings";
import type { SettingsView } from "./schema";

export function presentSettings(settings: Settings): SettingsView {
  const { organisationName, standardPressurePsia, standardTemperatureDegF, version } = settings;
  return { organisationName, standardPressurePsia, standardTemperatureDegF, version };
}
