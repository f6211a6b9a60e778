"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import type { ReactNode } from "react";
import { useBasis } from "@/components/basis/use-basis";
import { Menu, type MenuGroup } from "@/components/ui/choice";
import { ThemeSwitch } from "./theme-switch";
import { Wordmark } from "./wordmark";

export interface Person {
  name: string;
  /** as it is shown: "Planner" */
  role: string;
  initials: string;
}

/** One section. Who sees it is decided where the list is made, from the policy table. */
export interface NavItem {
  href: string;
  label: string;
  /** what waits there */
  count?: number;
}

export interface TopBarProps {
  person: Person;
  nav: readonly NavItem[];
  /** the account menu: profile, sign out */
  account: MenuGroup[];
  /** before the theme switch: a "Go to" button */
  tools?: ReactNode;
}

export function TopBar({ person, nav, account, tools }: TopBarProps) {
  const pathname = usePathname();
  const { withBasis } = useBasis();
  const home = nav[0]?.href ?? "/";

  return (
    <header className="top-bar">
      <Wordmark href={withBasis(home)} />
      <nav aria-label="Sections">
        <ul>
          {nav.map(({ href, label, count }) => (
            <li key={href}>
              <Link
                href={withBasis(href)}
                aria-current={
                  pathname === href || pathname.startsWith(`${href}/`) ? "page" : undefined
                }
              >
                {label}
                {count !== undefined && count > 0 && (
                  <span className="count">
                    {count}
                    <span className="sr-only"> waiting</span>
                  </span>
                )}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      {tools}
      <ThemeSwitch />
      <div className="account-slot flex">
        <Menu
          align="end"
          buttonClassName="account"
          button={
            <>
              <span className="avatar" aria-hidden="true">
                {person.initials}
              </span>
              <span className="account-name">
                {person.name}
                <span className="sr-only">, </span>
                <small>{person.role}</small>
              </span>
            </>
          }
          groups={account}
        />
      </div>
    </header>
  );
}
