import type { Page } from "@/services/paging";
import type { Person } from "./common-schema";

/** Present every row of a page. */
export function presentPage<Row, Item>(
  present: (row: Row) => Item,
): (page: Page<Row>) => Page<Item> {
  return (page) => ({ ...page, items: page.items.map((row) => present(row)) });
}

/** A person as others may see them. */
export function presentPerson(user: { id: string; name: string }): Person;
export function presentPerson(user: { id: string; name: string } | null | undefined): Person | null;
export function presentPerson(user: { id: string; name: string } | null | undefined) {
  return user ? { id: user.id, name: user.name } : null;
}

/** A moment as ISO 8601 in UTC. */
export function presentMoment(moment: Date): string;
export function presentMoment(moment: Date | null): string | null;
export function presentMoment(moment: Date | null) {
  return moment?.toISOString() ?? null;
}
