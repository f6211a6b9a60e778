import { ConnectionRefusedError, DatabaseError } from "sequelize";
import { describe, expect, it, vi } from "vitest";
import { isDatabaseAway } from "@/services/database-errors";
import { patiently } from "@/services/runs/patience";

const coded = (message: string, code?: string) => Object.assign(new Error(message), { code });
const ofDatabase = (error: Error) => new DatabaseError(Object.assign(error, { sql: "" }) as never);

describe("isDatabaseAway(error)", () => {
  // SQLSTATE as in PostgreSQL 15, appendix A.
  it.each([
    ["a refused connection", new ConnectionRefusedError(coded("refused", "ECONNREFUSED"))],
    ["a shutdown by an operator", ofDatabase(coded("terminating", "57P01"))],
    ["a server that starts up", ofDatabase(coded("the database system is starting up", "57P03"))],
    ["a connection failure", ofDatabase(coded("gone", "08006"))],
    [
      "a connection that ended in the middle",
      ofDatabase(coded("Connection terminated unexpectedly")),
    ],
    ["a broken pipe of the driver itself", coded("write EPIPE", "EPIPE")],
  ])("says yes to %s", (_, error) => expect(isDatabaseAway(error)).toBe(true));

  it.each([
    ["a violated constraint", ofDatabase(coded("duplicate key", "23505"))],
    ["a cancelled statement", ofDatabase(coded("canceling statement", "57014"))],
    ["an error of ours", new RangeError("a trial without a value")],
    ["no error at all", "words"],
  ])("says no to %s", (_, error) => expect(isDatabaseAway(error)).toBe(false));
});

describe("patiently(work, signal)", () => {
  const away = () => coded("terminating", "57P01");

  it("does the work again until the database is back", async () => {
    const work = vi.fn().mockRejectedValueOnce(away()).mockResolvedValue("done");
    expect(await patiently(work, new AbortController().signal)).toBe("done");
    expect(work).toHaveBeenCalledTimes(2);
  });

  it("does not repeat what failed for another reason", async () => {
    const work = vi.fn().mockRejectedValue(new RangeError("no"));
    await expect(patiently(work, new AbortController().signal)).rejects.toThrow(RangeError);
    expect(work).toHaveBeenCalledTimes(1);
  });

  it("ends with the signal's reason while it waits", async () => {
    const controller = new AbortController();
    const waiting = patiently(() => Promise.reject(away()), controller.signal);
    setTimeout(() => controller.abort(new Error("the worker stops")), 20);
    await expect(waiting).rejects.toThrow("the worker stops");
  });
});
