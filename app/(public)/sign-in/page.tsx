import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { safePath } from "@/app/_client/address";
import { currentActor } from "@/app/_server/session";
import { demoPassword, demoPeople } from "@/seeders/demo/people";
import { holdsDemo } from "@/services/demo";
import { getSettings } from "@/services/settings";
import { needsSetup } from "@/services/users";
import { PublicPage } from "../_components/public-page";
import { SignInForm } from "./_components/sign-in-form";

export const metadata: Metadata = { title: "Sign in" };

interface SignInPageProps {
  searchParams: Promise<{ callbackUrl?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  if (await needsSetup()) redirect("/setup");
  const { callbackUrl } = await searchParams;
  const next = safePath(Array.isArray(callbackUrl) ? callbackUrl[0] : callbackUrl);
  if (await currentActor()) redirect(next);

  const { organisationName } = await getSettings();
  const demo = (await holdsDemo()) ? { people: demoPeople, password: demoPassword } : null;
  return (
    <PublicPage title="One book for what is in the ground, and what reaches the tank.">
      <SignInForm next={next} demo={demo} />
      <p className="text-ink-soft">
        Accounts of {organisationName} are made by an administrator. Ask one if you need an account
        or a new password.
      </p>
    </PublicPage>
  );
}
