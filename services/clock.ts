import { AsyncLocalStorage } from "node:async_hooks";

const pretended = new AsyncLocalStorage<Date>();

/** The time at which the present work is done; everything a service dates, it dates by this. */
export function now(): Date {
  return pretended.getStore() ?? new Date();
}

/** Whether the present work is pretended to be of another time; nobody is written to about such work. */
export function isPretending(): boolean {
  return pretended.getStore() !== undefined;
}

/** The business date of `now()`, in UTC, as `YYYY-MM-DD`. */
export function today(): string {
  return now().toISOString().slice(0, 10);
}

/** Do `work` as if it happened at `date`: how the demo scenario gets a history without a second way of writing one. */
export function atTime<Result>(date: Date, work: () => Promise<Result>): Promise<Result> {
  return pretended.run(date, work);
}
