"use client";

import { signOut } from "next-auth/react";
import { useLayoutEffect, type ReactNode } from "react";
import type { BasisChoices } from "@/components/layout/basis-strip";
import type { NavItem, Person } from "@/components/layout/top-bar";
import { applyTheme, rememberedTheme } from "@/components/layout/theme";
import { WorkspaceShell } from "@/components/layout/workspace-shell";
import { useSessionWatch } from "./use-session-watch";
import { useWaitingCount } from "./use-waiting-count";

export interface WorkspaceFrameProps {
  person: Person;
  nav: readonly NavItem[];
  engineVersion: string;
  /** left out on pages whose figures stand on no basis */
  choices?: BasisChoices;
  children: ReactNode;
}

/** The shell of every signed-in page, with the parts of it that live in the browser. */
export function WorkspaceFrame({
  person,
  nav,
  engineVersion,
  choices,
  children,
}: WorkspaceFrameProps) {
  useSessionWatch();
  // A page that answers 403 is drawn anew in the browser, and with it the document's own attributes.
  useLayoutEffect(() => applyTheme(rememberedTheme()), []);
  const waiting = useWaitingCount();
  return (
    <WorkspaceShell
      person={person}
      nav={nav.map((item) => (item.href === "/review" ? { ...item, count: waiting } : item))}
      choices={choices}
      account={[
        {
          entries: [
            { label: "Profile", href: "/profile" },
            { label: "API and tokens", href: "/api-guide" },
            { label: "Methods and sources", href: "/methods" },
            { label: "Sign out", onSelect: () => void signOut({ callbackUrl: "/sign-in" }) },
          ],
        },
      ]}
      provenance={choices && `Engine ${engineVersion}`}
    >
      {children}
    </WorkspaceShell>
  );
}
