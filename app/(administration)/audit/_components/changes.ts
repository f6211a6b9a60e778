import type { AuditEventView } from "@/app/api/v1/audit-events/schema";
import { MISSING } from "@/components/ui/format";

/** One value that an event set, as people read it. */
export interface Change {
  name: string;
  /** `undefined` when the event says nothing of it */
  before: string | undefined;
  after: string | undefined;
}

const LONGEST = 160;

/** What an event changed, value by value; nested values by their path, long lists by their length. */
export function changesOf({ before, after }: AuditEventView): Change[] {
  const was = flatten(before);
  const is = flatten(after);
  return [...new Set([...was.keys(), ...is.keys()])]
    .filter((name) => JSON.stringify(was.get(name)) !== JSON.stringify(is.get(name)))
    .sort((a, b) => weightOf(a) - weightOf(b))
    .map((name) => {
      const [old, next] = [was.get(name), is.get(name)].map(wordsOf);
      // Two long lists of one length read alike, and differ.
      const differs = old !== undefined && old === next ? `${next}, changed` : next;
      return { name: pathWords(name), before: old, after: differs };
    });
}

/** What tells most stands first, then whole values before parts of values. */
const telling = ["name", "state", "role", "active", "note"];

function weightOf(path: string): number {
  const place = telling.indexOf(path);
  return place < 0 ? telling.length + path.split(".").length : place;
}

const wordsOf = (value: unknown) => (value === undefined ? undefined : valueWords(value));

function flatten(record: Record<string, unknown> | null): Map<string, unknown> {
  const values = new Map<string, unknown>();
  const walk = (value: unknown, path: string, depth: number) => {
    if (typeof value === "object" && value !== null && !Array.isArray(value) && depth < 4) {
      for (const [key, part] of Object.entries(value)) {
        walk(part, path === "" ? key : `${path}.${key}`, depth + 1);
      }
    } else if (path !== "") values.set(path, value);
  };
  walk(record, "", 0);
  return values;
}

function valueWords(value: unknown): string {
  if (value === null || value === undefined || value === "") return MISSING;
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "number") return String(value).replace("-", "\u2212");
  const text = typeof value === "string" ? value : JSON.stringify(value);
  if (text.length <= LONGEST) return text;
  return Array.isArray(value) ? `${value.length} entries` : `${text.slice(0, LONGEST)}…`;
}

/** "inputs.uncertain.netThicknessFt" -> "inputs, uncertain, net thickness ft" */
const pathWords = (path: string) => path.split(".").map(camelWords).join(", ");

const camelWords = (text: string) =>
  text
    .replace(/_/g, " ")
    .replace(
      /([a-z0-9])([A-Z])/g,
      (_, end: string, start: string) => `${end} ${start.toLowerCase()}`,
    );

/** "estimate.approved" -> "Estimate approved"; "user.signedOutEverywhere" -> "User signed out everywhere" */
export function actionWords(action: string): string {
  const words = action.split(".").map(camelWords).join(" ").toLowerCase();
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** "priceDeck" -> "Price deck" */
export const entityWords = (entity: string) => actionWords(entity);
