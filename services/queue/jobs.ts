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
  /**
   * One lane of a run: takes items one after the other until none is left to take. At most one job a lane waits; what a
   * lane that died leaves behind is found again by its leases, so nothing is gained by trying the job itself again.
   */
  "work-on-run": {
    payload: z.object({ runId: z.uuid(), lane: z.number().int().min(1) }),
    options: { policy: "short", retryLimit: 0, expireInSeconds: 4 * 3600 },
  },
} as const;

export type JobName = keyof typeof jobs;

export type JobPayload<Name extends JobName> = z.output<(typeof jobs)[Name]["payload"]>;

export type JobHandlers = {
  [Name in JobName]: (payload: JobPayload<Name>, job: { id: string }) => Promise<void>;
};

export const jobNames = Object.keys(jobs) as JobName[];
