import "server-only";
import { ENGINE_VERSION } from "@/analytics/volumetrics/simulate";
import { requireActor } from "@/app/_server/session";
import type { BasisChoices } from "@/components/layout/basis-strip";
import type { NavItem, Person } from "@/components/layout/top-bar";
import { listDependenceSets } from "@/services/dependence-sets";
import { can, type Actor } from "@/services/policy";
import { listPriceDecks } from "@/services/price-decks";

/** Everybody who is signed in, as the top bar and the sections need them. */
export interface Workspace {
  person: Person;
  nav: NavItem[];
  /** what made the numbers, for the footer */
  engineVersion: string;
}

/** For the layout of signed-in pages. Visitors are sent to sign in. */
export async function loadWorkspace(): Promise<Workspace> {
  const actor = await requireActor();
  return { person: personOf(actor), nav: sectionsOf(actor), engineVersion: ENGINE_VERSION };
}

/**
 * Published price decks, latest first, and dependence sets, the book's own first, for the basis strip. They come with
 * the page: a layout that asked for them in the browser could have them before the page beneath it is hydrated.
 */
export async function loadBasisChoices(): Promise<BasisChoices> {
  const actor = await requireActor();
  const [decks, sets] = await Promise.all([
    listPriceDecks(actor, { state: "published" }, { limit: 50, offset: 0 }),
    listDependenceSets(actor),
  ]);
  return {
    decks: decks.items.map(({ id, name, versionNumber, asOfOn }) => ({
      id,
      name: `${name} v${versionNumber}`,
      asOf: asOfOn,
    })),
    dependenceSets: sets.map(({ id, name, isDefault }) => ({ id, name, isDefault })),
    mayEditSets: can(actor, "dependenceSet.update"),
  };
}

function personOf({ name, role }: Actor): Person {
  const words = name.split(/\s+/).filter(Boolean);
  const initials = [words[0], words.length > 1 ? words.at(-1) : undefined];
  return {
    name,
    role: role.charAt(0).toUpperCase() + role.slice(1),
    initials: initials.map((word) => word?.charAt(0).toUpperCase() ?? "").join(""),
  };
}

function sectionsOf(actor: Actor): NavItem[] {
  return [
    { href: "/portfolio", label: "Portfolio" },
    { href: "/fields", label: "Fields" },
    { href: "/prices", label: "Prices" },
    { href: "/review", label: "Review" },
    ...(can(actor, "import.read") ? [{ href: "/import", label: "Import" }] : []),
    ...(can(actor, "run.create") || can(actor, "run.cancel")
      ? [{ href: "/runs", label: "Runs" }]
      : []),
    ...(can(actor, "user.read") ? [{ href: "/people", label: "People" }] : []),
    ...(can(actor, "audit.read") ? [{ href: "/audit", label: "Audit" }] : []),
  ];
}
