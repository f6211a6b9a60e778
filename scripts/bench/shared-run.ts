import { createHash } from "node:crypto";
import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import process from "node:process";
import { setTimeout as sleep } from "node:timers/promises";
import pg from "pg";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { sequelize } from "@/models/sequelize";
import { closeQueue } from "@/services/queue/queue";
import { createRun } from "@/services/runs/create-run";
import { getRun } from "@/services/runs/runs";
import { encodeVectors } from "@/services/trial-vectors";
import { makeRunBook, type RunBook } from "./run-book";
import { startWorker } from "./worker-process";

export interface SharedRunOptions {
  reservoirs: number;
  trials: number;
  /** leases of the killed worker end at once instead of after their time, for who cannot wait */
  hurry: boolean;
  /** restarts the server under the run, after the kill */
  restartDatabase?: () => Promise<void>;
}

export interface SharedRun {
  counts: Awaited<ReturnType<typeof getRun>>["tally"]["counts"];
  state: string;
  /** of each worker by name: items that ended under it */
  itemsOf: Record<string, number>;
  killed: string;
  /** items that were done when the worker was killed */
  doneAtKill: number;
  /** items that were begun more than once because of the kill */
  begunAgain: number;
  /** drafts by how often trials were stored for them: `{ 1: all }` when every one was stored once */
  storedTimes: Record<number, number>;
  /** audit events of results, by draft, the same way */
  auditedTimes: Record<number, number>;
  /** drafts whose stored trials are, byte for byte, those of one process without a queue */
  sameBytes: number;
  impossible: { state: string; reason: string | null; stored: number };
  /** whether the worker that was not killed lived through it all */
  survived: boolean;
  seconds: number;
  logFile: string;
}

/** What the product's processes ask for that a run does not use. */
const unusedSettings = {
  NEXTAUTH_URL: "http://127.0.0.1:9",
  NEXTAUTH_SECRET: "a secret that nothing in this run is sealed with",
  SMTP_URL: "smtp://127.0.0.1:9",
  S3_ENDPOINT: "http://127.0.0.1:9",
  S3_ACCESS_KEY_ID: "unused",
  S3_SECRET_ACCESS_KEY: "unused",
};

/**
 * Two worker processes share a recalculation of a book of drafts while one of them is killed without warning, and what
 * is in the database afterwards is counted and compared with a simulation in this process.
 *
 * @param databaseUrl  an empty database, used up by this; also taken as this process's own
 */
export async function shareRun(databaseUrl: string, options: SharedRunOptions): Promise<SharedRun> {
  const env = { ...process.env, ...unusedSettings, DATABASE_URL: databaseUrl, LOG_LEVEL: "info" };
  Object.assign(process.env, unusedSettings, { DATABASE_URL: databaseUrl });
  await migrate(env);
  const book = await withClient(databaseUrl, (client) => makeRunBook(client, options));
  const logFile = path.join(mkdtempSync(path.join(tmpdir(), "dewledger-run-")), "workers.log");
  const [first, second] = await Promise.all([startWorker(env, logFile), startWorker(env, logFile)]);
  try {
    const began = performance.now();
    const runId = await createRun(book.engineer, { kind: "recalculation", scope: "open" });
    const doneAtKill = await untilShared(databaseUrl, runId, Math.ceil(options.reservoirs / 4));
    await first.kill();
    if (options.hurry) {
      await withClient(databaseUrl, (client) =>
        client.query(
          "update run_items set leased_until = now() where worker = $1 and state = 'running'",
          [first.name],
        ),
      );
    }
    await options.restartDatabase?.();
    await untilFinished(book, runId);
    const seconds = (performance.now() - began) / 1000;
    const survived = !second.hasEnded();
    const found = await withClient(databaseUrl, (client) => examine(client, runId, book, options));
    const { run, tally } = await getRun(book.engineer, runId);
    return {
      ...found,
      counts: tally.counts,
      state: run.state,
      killed: first.name,
      doneAtKill,
      survived,
      seconds,
      logFile,
    };
  } finally {
    await Promise.all([first.kill(), second.stop()]);
    await closeQueue();
    await sequelize.close();
  }
}

async function migrate(env: NodeJS.ProcessEnv): Promise<void> {
  const args = ["--conditions=react-server", "--import", "tsx", "scripts/migrate.ts", "up"];
  const program = spawn(process.execPath, args, { env, stdio: ["ignore", "ignore", "inherit"] });
  const [code] = (await once(program, "exit")) as [number | null];
  if (code !== 0) throw new Error(`the migrations ended with ${code}`);
}

async function withClient<Result>(
  url: string,
  work: (client: pg.Client) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Wait until both workers have done something and this many items are done. @returns how many are */
async function untilShared(url: string, runId: string, least: number): Promise<number> {
  return withClient(url, async (client) => {
    const deadline = Date.now() + 300_000;
    while (Date.now() < deadline) {
      const { rows } = await client.query<{ done: number; workers: number }>(
        `select count(*)::integer as done, count(distinct worker)::integer as workers
          from run_items where run_id = $1 and state = 'done'`,
        [runId],
      );
      const [{ done, workers }] = rows;
      if (workers === 2 && done >= least) return done;
      await sleep(20);
    }
    throw new Error("the two workers did not share the run within five minutes");
  });
}

async function untilFinished({ engineer }: RunBook, runId: string): Promise<void> {
  const deadline = Date.now() + 900_000;
  while (Date.now() < deadline) {
    // The database may be away at this very moment.
    const overview = await getRun(engineer, runId).catch(() => null);
    if (overview?.run.state === "finished") return;
    await sleep(250);
  }
  throw new Error("the run did not finish within fifteen minutes");
}

async function examine(
  client: pg.Client,
  runId: string,
  { drafts, impossible }: RunBook,
  { trials }: SharedRunOptions,
) {
  const times = async (counted: string) => {
    const { rows } = await client.query<{ times: number; drafts: number }>(
      `select times, count(*)::integer as drafts from (
          select (${counted})::integer as times from unnest($1::uuid[]) as draft (id)
        ) as counts group by times`,
      [drafts.map(({ id }) => id)],
    );
    return Object.fromEntries(rows.map((row) => [row.times, row.drafts])) as Record<number, number>;
  };
  const workers = await client.query<{ worker: string; items: number; again: number }>(
    `select worker, count(*)::integer as items,
        (count(*) filter (where attempts > 1))::integer as again
      from run_items where run_id = $1 group by worker`,
    [runId],
  );
  const [refused] = (
    await client.query<{ state: string; reason: string | null; stored: number }>(
      `select state, reason,
          (select count(*)::integer from storings where estimate_id = $2) as stored
        from run_items where run_id = $1 and estimate_id = $2`,
      [runId, impossible.id],
    )
  ).rows;
  return {
    itemsOf: Object.fromEntries(workers.rows.map(({ worker, items }) => [worker, items])),
    begunAgain: workers.rows.reduce((sum, { again }) => sum + again, 0),
    storedTimes: await times("select count(*) from storings where estimate_id = draft.id"),
    auditedTimes: await times(
      `select count(*) from audit_events
        where entity_id = draft.id::text and action = 'estimate.computed'`,
    ),
    sameBytes: await countSameBytes(client, drafts, trials),
    impossible: refused,
  };
}

async function countSameBytes(
  client: pg.Client,
  drafts: RunBook["drafts"],
  trials: number,
): Promise<number> {
  const columns = vectorNames.map((name) => name.replace(/[A-Z]/g, (c) => `_${c.toLowerCase()}`));
  const { rows } = await client.query<{ id: string; digest: string }>(
    `select estimate_id as id, encode(sha256(${columns.join(" || ")}), 'hex') as digest
      from estimate_trials`,
  );
  const stored = new Map(rows.map(({ id, digest }) => [id, digest]));
  return drafts.filter(({ id, inputs, seed }) => {
    const { vectors } = simulate(inputs, { trials, sampling: "latinHypercube", seed });
    const bytes = encodeVectors(vectors);
    const digest = createHash("sha256");
    for (const name of vectorNames) digest.update(bytes[name]);
    return stored.get(id) === digest.digest("hex");
  }).length;
}
