import { DateTime } from "luxon";
import { countWord } from "@/app/_client/words";
import type { ReviewItemView } from "@/app/api/v1/review/schema";

/** "today", "yesterday", "6 days": how long something has waited, in calendar days of UTC. */
export function ageWords(since: string, now: Date): string {
  const days = daysBetween(since, now);
  if (days < 1) return "today";
  return days === 1 ? "1 day" : `${days} days`;
}

function daysBetween(since: string, now: Date): number {
  const from = DateTime.fromISO(since, { zone: "utc" }).startOf("day");
  const to = DateTime.fromJSDate(now, { zone: "utc" }).startOf("day");
  return Math.max(0, Math.round(to.diff(from, "days").days));
}

/** The finding over the inbox. */
export function inboxTitle(waiting: readonly ReviewItemView[], now: Date): string {
  if (waiting.length === 0) return "No estimate waits for review";
  const many = waiting.length === 1 ? "estimate waits" : "estimates wait";
  const oldest = waiting.map(({ submittedAt }) => submittedAt).sort()[0];
  const days = daysBetween(oldest, now);
  const age =
    days < 1
      ? waiting.length === 1
        ? "since today"
        : "all since today"
      : `${waiting.length === 1 ? "" : "the oldest "}for ${ageWords(oldest, now)}`;
  return `${countWord(waiting.length)} ${many} for review, ${age}`;
}

/** Change of the mean against the approved revision, as a fraction; null without one. */
export function meanChange({ condensate, approved }: ReviewItemView): number | null {
  if (!approved || approved.condensate.mean === 0) return null;
  return condensate.mean / approved.condensate.mean - 1;
}
