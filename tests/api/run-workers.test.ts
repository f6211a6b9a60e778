import { afterAll, beforeAll, describe, expect, it } from "vitest";
import pg from "pg";
import { shareRun, type SharedRun } from "@/scripts/bench/shared-run";
import { testEnvironment } from "../support/environment";

const reservoirs = 60;
const database = `dewledger_workers_test_${process.pid}`;

async function administer(...statements: string[]): Promise<void> {
  const client = new pg.Client({ connectionString: testEnvironment.databaseUrl });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}

describe("two worker processes that share a run while one is killed", () => {
  let run: SharedRun;

  beforeAll(async () => {
    await administer(
      `drop database if exists ${database} with (force)`,
      `create database ${database}`,
    );
    const url = new URL(testEnvironment.databaseUrl);
    url.pathname = `/${database}`;
    run = await shareRun(url.href, { reservoirs, trials: 2_000, hurry: true });
  });

  afterAll(() => administer(`drop database if exists ${database} with (force)`));

  it("finish it, each with a part in it", () => {
    expect(run.state, run.logFile).toBe("finished");
    expect(run.doneAtKill).toBeLessThan(reservoirs);
    expect(Object.keys(run.itemsOf)).toHaveLength(2);
    expect(run.itemsOf[run.killed]).toBeGreaterThan(0);
  });

  it("store every estimate exactly once", () => {
    expect(run.storedTimes).toEqual({ 1: reservoirs });
    expect(run.auditedTimes).toEqual({ 1: reservoirs });
  });

  it("store the same bytes as one process without a queue", () => {
    expect(run.sameBytes).toBe(reservoirs);
  });

  it("fail an impossible estimate alone, with its reason", () => {
    expect(run.counts).toMatchObject({ done: reservoirs, failed: 1, passedOver: 0 });
    expect(run.impossible).toMatchObject({ state: "failed", stored: 0 });
    expect(run.impossible.reason).toMatch(/pressure/i);
  });
});
