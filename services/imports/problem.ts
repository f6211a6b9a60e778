import { z } from "zod";

/** Something wrong, or worth a look, in one cell, one row or the whole file. */
export const problemSchema = z.object({
  /** line of the file on which the row begins, counted from 1; `null` for the file as a whole */
  line: z.number().int().nullable(),
  column: z.string().nullable(),
  /** what stood in the cell, as typed */
  value: z.string().nullable(),
  /** why, and what to do, in words */
  reason: z.string(),
});

export type Problem = z.infer<typeof problemSchema>;

const LONGEST_ECHO = 80;

/** What stood in a cell, cut to what a person needs to find it. */
export function echo(value: string): string {
  return value.length > LONGEST_ECHO ? `${value.slice(0, LONGEST_ECHO)}…` : value;
}

/** Problems that are kept and shown; more of them say nothing new, and would only fill the store. */
export const MOST_PROBLEMS = 100;

/** The first problems of a list, and how many more there are. */
export function firstProblems(problems: readonly Problem[]): Problem[] {
  const more = problems.length - MOST_PROBLEMS;
  if (more <= 0) return [...problems];
  const rest = { line: null, column: null, value: null, reason: `And ${more} more.` };
  return [...problems.slice(0, MOST_PROBLEMS), rest];
}
