import { DateTime } from "luxon";

/** What the trail is narrowed to, as the page's address has it; days are of UTC. */
export interface AuditFilter {
  entity: string | null;
  entityId: string | null;
  person: string | null;
  /** first day, YYYY-MM-DD */
  from: string | null;
  /** last day, included */
  to: string | null;
  page: number;
}

const isDay = (text: string | null) => text !== null && DateTime.fromISO(text).isValid;

export function readFilter(search: Pick<URLSearchParams, "get">): AuditFilter {
  const day = (name: string) => (isDay(search.get(name)) ? search.get(name) : null);
  const page = Number(search.get("page") ?? 1);
  return {
    entity: search.get("entity"),
    entityId: search.get("record"),
    person: search.get("person"),
    from: day("from"),
    to: day("to"),
    page: Number.isInteger(page) && page > 0 ? page : 1,
  };
}

/** The page's address for a filter. */
export function filterHref({ entity, entityId, person, from, to, page }: AuditFilter): string {
  const search = new URLSearchParams();
  const parts = {
    entity,
    record: entityId,
    person,
    from,
    to,
    page: page > 1 ? String(page) : null,
  };
  for (const [name, value] of Object.entries(parts)) if (value) search.set(name, value);
  const text = search.toString();
  return text === "" ? "/audit" : `/audit?${text}`;
}

/** The same filter as the API takes it: the last day counts whole. */
export function apiFilter({ entity, entityId, person, from, to }: AuditFilter): URLSearchParams {
  const search = new URLSearchParams();
  if (entity) search.set("entity", entity);
  if (entityId) search.set("entityId", entityId);
  if (person) search.set("actorId", person);
  if (from) search.set("from", `${from}T00:00:00Z`);
  if (to) {
    const dayAfter = DateTime.fromISO(to, { zone: "utc" }).plus({ days: 1 }).toISODate();
    if (dayAfter) search.set("to", `${dayAfter}T00:00:00Z`);
  }
  return search;
}
