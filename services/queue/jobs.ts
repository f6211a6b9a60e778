import { z } from "zod";
import { mailMessage } from "../mail/message";

/**
 * The kinds of work that run outside a request. Each has a name, the shape of its payload and how
 * often it is tried again; its handler stands in handlers.ts. Payloads are small and plain: ids
 * rather than rows, since the row may have changed by the time the job runs.
 */
export const jobs = {
  /** Hand one message to the mail relay. A relay may be away for hours, so it is tried for a day. */
  "send-mail": {
    payload: mailMessage,
    options: { retryLimit: 12, retryDelay: 15, retryBackoff: true, expireInSeconds: 120 },
  },
  /** Run the estimates that an import made. What was run stays run, so a retry goes on where it stopped. */
  "run-estimates": {
    payload: z.object({ importId: z.uuid() }),
    options: { retryLimit: 5, retryDelay: 5, retryBackoff: true, expireInSeconds: 3600 },
  },
} as const;

export type JobName = keyof typeof jobs;

export type JobPayload<Name extends JobName> = z.output<(typeof jobs)[Name]["payload"]>;

export type JobHandlers = {
  [Name in JobName]: (payload: JobPayload<Name>, job: { id: string }) => Promise<void>;
};

export const jobNames = Object.keys(jobs) as JobName[];
