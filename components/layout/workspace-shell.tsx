import { Suspense, type ReactNode } from "react";
import type { MenuGroup } from "@/components/ui/choice";
import { BasisStrip, type BasisChoices } from "./basis-strip";
import { Footer } from "./footer";
import { TopBar, type NavItem, type Person } from "./top-bar";

export interface WorkspaceShellProps {
  person: Person;
  nav: readonly NavItem[];
  /** for the basis strip; left out on pages whose figures stand on no basis */
  choices?: BasisChoices;
  account: MenuGroup[];
  tools?: ReactNode;
  /** what made the numbers, for the footer */
  provenance?: ReactNode;
  children: ReactNode;
}

/** Navigation, basis, page, footer: what every signed-in page stands in. */
export function WorkspaceShell({
  person,
  nav,
  choices,
  account,
  tools,
  provenance,
  children,
}: WorkspaceShellProps) {
  return (
    <>
      <a className="skip-link" href="#main">
        Skip to content
      </a>
      {/* Both read the address, which is known only in the browser while a page is prerendered. */}
      <Suspense fallback={<div className="h-[88px]" />}>
        <TopBar person={person} nav={nav} account={account} tools={tools} />
        {choices && <BasisStrip {...choices} />}
      </Suspense>
      {children}
      <Footer provenance={provenance} />
    </>
  );
}
