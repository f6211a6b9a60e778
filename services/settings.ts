import type { Settings } from "@/models/settings";
import { findSettings } from "@/models/queries/settings";
import { changesBetween, recordAudit } from "./audit";
import { NotFoundError } from "./errors";
import { authorise, type Actor } from "./policy";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

/** The choices that hold for the whole book. Needs nobody: the sign-in page shows the organisation's name. */
export async function getSettings(): Promise<Settings> {
  const settings = await findSettings();
  if (!settings) throw new NotFoundError("settings row");
  return settings;
}

/** Rename the organisation. The standard conditions are not editable: every stored volume is stated at them. */
export async function updateSettings(
  actor: Actor,
  patch: { organisationName?: string },
  expectedVersion: number,
): Promise<Settings> {
  authorise(actor, "settings.update");
  return inTransaction(async (transaction) => {
    const settings = await findSettings({ transaction, lock: true });
    if (!settings) throw new NotFoundError("settings row");
    assertVersion(settings, expectedVersion);
    const changes = changesBetween({ organisationName: settings.organisationName }, patch);
    settings.set(changes.after);
    await saveVersioned(settings, transaction);
    await recordAudit(
      { actor, action: "settings.updated", entity: "settings", entityId: "1", ...changes },
      transaction,
    );
    return settings;
  });
}
