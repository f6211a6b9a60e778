import { z } from "zod";
import { nameSchema } from "../common-schema";

export const settingsPatchSchema = z.object({ organisationName: nameSchema.optional() }).strict();
export type SettingsPatchRequest = z.infer<typeof settingsPatchSchema>;

export const settingsSchema = z.object({
  organisationName: z.string(),
  standardPressurePsia: z.number(),
  standardTemperatureDegF: z.number(),
  version: z.number().int(),
});
export type SettingsView = z.infer<typeof settingsSchema>;
