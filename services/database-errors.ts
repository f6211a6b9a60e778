import { BaseError, ConnectionError } from "sequelize";

/**
 * SQLSTATE classes of a server that goes away or comes up (PostgreSQL, appendix A): 08 connection exceptions, 57P01 to
 * 57P05 shutdown and start.
 */
const away = /^(08|57P0)/;

/** What the driver and the operating system say, without a code or with one of their own, when a connection breaks. */
const broken = /Connection terminated|Client has encountered a connection error|not queryable/;
const socketCodes = ["ECONNREFUSED", "ECONNRESET", "EPIPE", "ETIMEDOUT", "ENOENT", "EHOSTUNREACH"];

/** Whether an error says that the database is away, so that the same thing may go well in a moment. */
export function isDatabaseAway(error: unknown): boolean {
  if (error instanceof ConnectionError) return true;
  const cause = error instanceof BaseError && "original" in error ? error.original : error;
  if (!(cause instanceof Error)) return false;
  const code = "code" in cause ? String(cause.code) : "";
  return away.test(code) || socketCodes.includes(code) || broken.test(cause.message);
}
