import { pino } from "pino";
import { logLevel } from "./env";

/**
 * The process's log: one JSON object a line on standard output. Make a child for one request or
 * job (`log.child({ requestId })`), so that its lines can be found together.
 */
export const log = pino({
  level: logLevel(),
  base: { pid: process.pid },
  timestamp: pino.stdTimeFunctions.isoTime,
  redact: {
    paths: [
      "password",
      "*.password",
      "authorization",
      "*.authorization",
      "cookie",
      "*.cookie",
      "headers.cookie",
      "headers.authorization",
    ],
    censor: "[hidden]",
  },
});
