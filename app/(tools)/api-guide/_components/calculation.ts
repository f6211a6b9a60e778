import type { z } from "zod";

/** A stateless calculation as the guide shows it. */
export interface Calculation {
  name: string;
  title: string;
  /** what it is for, in a sentence */
  purpose: string;
  request: z.ZodType;
  response: z.ZodType;
  example: unknown;
}
