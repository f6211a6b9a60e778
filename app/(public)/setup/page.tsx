import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { currentActor } from "@/app/_server/session";
import { can } from "@/services/policy";
import { getSettings } from "@/services/settings";
import { needsSetup } from "@/services/users";
import { PublicPage } from "../_components/public-page";
import { SetupSteps } from "./_components/setup-steps";

export const metadata: Metadata = { title: "Set up" };

/** Opens a new installation. Once somebody exists, only an administrator who is in the middle of it comes back here. */
export default async function SetupPage() {
  const isNew = await needsSetup();
  const actor = isNew ? null : await currentActor();
  if (!isNew && !(actor && can(actor, "settings.update"))) redirect("/");

  const { organisationName } = await getSettings();
  return (
    <PublicPage title="Open a new book.">
      <SetupSteps
        startAt={isNew ? "administrator" : "organisation"}
        organisation={organisationName}
      />
    </PublicPage>
  );
}
