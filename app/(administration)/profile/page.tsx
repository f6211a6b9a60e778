import type { Metadata } from "next";
import { requireActor } from "@/app/_server/session";
import { LinkButton } from "@/components/ui/button";
import { Columns, Page, PageHead, Section, Stack } from "@/components/ui/section";
import { PasswordForm } from "./_components/password-form";
import { SignOutEverywhere } from "./_components/sign-out-everywhere";
import { ThemeChoice } from "./_components/theme-choice";

export const metadata: Metadata = { title: "Profile" };

export default async function ProfilePage() {
  const { name, email, role } = await requireActor("session.read");
  return (
    <Page>
      <PageHead
        title={name}
        meta={
          <>
            <span>{role.charAt(0).toUpperCase() + role.slice(1)}</span>
            <span>{email}</span>
            <span>An administrator changes name and role</span>
          </>
        }
      />
      <Columns kind="equal">
        <Stack>
          <Section
            title="Password"
            note="Changing it signs you out on every other device and revokes your API tokens."
          >
            <PasswordForm email={email} />
          </Section>
          <Section
            title="Sessions"
            note="A session ends by itself after twelve hours. End all of them if a device is lost."
          >
            <SignOutEverywhere />
          </Section>
        </Stack>
        <Stack>
          <Section title="Light or dark" note="Kept on this device.">
            <ThemeChoice />
          </Section>
          <Section
            title="Programs"
            note="A program with a token does what you may do, under your name. It stops with your account."
          >
            <LinkButton href="/api-guide">Tokens, and how to use the API</LinkButton>
          </Section>
        </Stack>
      </Columns>
    </Page>
  );
}
