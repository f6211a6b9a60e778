import { deliver } from "../mail/transport";
import type { RunWorker } from "../runs/run-worker";
import type { JobHandlers } from "./jobs";

/** What the worker does with each kind of job. A handler that throws is tried again later. */
export function handlersOf(runs: RunWorker): JobHandlers {
  return {
    "send-mail": deliver,
    "work-on-run": (lane) => runs.work(lane),
  };
}
