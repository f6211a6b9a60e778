import { runImportedEstimates } from "../imports/run-estimates";
import { deliver } from "../mail/transport";
import type { JobHandlers } from "./jobs";

/** What the worker does with each kind of job. A handler that throws is tried again later. */
export const handlers: JobHandlers = {
  "send-mail": deliver,
  "run-estimates": runImportedEstimates,
};
