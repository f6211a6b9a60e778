import PgBoss from "pg-boss";
import type { Transaction } from "sequelize";
import { sequelize } from "@/models/sequelize";
import { env } from "../env";
import { log } from "../log";
import { type JobHandlers, type JobName, type JobPayload, jobNames, jobs } from "./jobs";

/**
 * The work queue, kept in the same PostgreSQL as the data so that a job can be written in the
 * transaction that needs it: either both happen or neither.
 */

const held = globalThis as typeof globalThis & { dewledgerQueue?: Promise<PgBoss> };

/** The queue of this process, connected on first use; one instance survives hot reload. */
function queue(): Promise<PgBoss> {
  held.dewledgerQueue ??= connect({ supervise: false }).catch((error: unknown) => {
    // The next call tries again; a database that is away must not disable the queue for ever.
    held.dewledgerQueue = undefined;
    throw error;
  });
  return held.dewledgerQueue;
}

async function connect({ supervise }: { supervise: boolean }): Promise<PgBoss> {
  const boss = new PgBoss({
    connectionString: env().DATABASE_URL,
    application_name: "dewledger-queue",
    max: 4,
    supervise,
    schedule: supervise,
  });
  boss.on("error", (error) => log.error({ err: error }, "queue"));
  await boss.start();
  for (const name of jobNames) await boss.createQueue(name, { name, ...jobs[name].options });
  return boss;
}

export interface EnqueueOptions {
  /** Write the job in this transaction, so that it exists only if the change does. */
  transaction?: Transaction;
  /** Not before this many seconds from now. */
  delaySeconds?: number;
}

/**
 * Ask for a piece of work.
 *
 * @returns the job's id
 * @throws {z.ZodError} when the payload does not have the job's shape
 */
export async function enqueue<Name extends JobName>(
  name: Name,
  payload: JobPayload<Name>,
  { transaction, delaySeconds }: EnqueueOptions = {},
): Promise<string> {
  const data = jobs[name].payload.parse(payload);
  const boss = await queue();
  const id = await boss.send(name, data, {
    ...(delaySeconds === undefined ? {} : { startAfter: delaySeconds }),
    ...(transaction === undefined ? {} : { db: within(transaction) }),
  });
  // pg-boss answers null for a job that a throttle dropped, and ours have none.
  if (id === null) throw new Error(`The queue did not take the job ${name}`);
  return id;
}

/**
 * Ask for a piece of work of which one may wait at a time: under a key that waits already, nothing is asked for. The
 * job's queue has the policy `short`.
 */
export async function enqueueUnlessWaiting<Name extends JobName>(
  name: Name,
  payload: JobPayload<Name>,
  key: string,
  { transaction, priority = 0 }: { transaction?: Transaction; priority?: number } = {},
): Promise<void> {
  const data = jobs[name].payload.parse(payload);
  const boss = await queue();
  await boss.send(name, data, {
    singletonKey: key,
    priority,
    ...(transaction === undefined ? {} : { db: within(transaction) }),
  });
}

/** Lets the queue write through a transaction of ours. */
function within(transaction: Transaction): PgBoss.Db {
  return {
    executeSql: async (text, values) => {
      // Sequelize takes `undefined` for a forgotten value; the driver, and pg-boss, take it for null.
      const bind: unknown[] = values.map((value: unknown) => value ?? null);
      const [rows] = await sequelize.query(text, { bind, transaction });
      return { rows };
    },
  };
}

/**
 * Run jobs in this process until `stop` is called. `stop` lets the work in hand finish for at most
 * `patienceSeconds`; what is not finished then goes back to the queue.
 *
 * @param atOnce  how many jobs of a kind this process does at the same time; one unless said otherwise
 */
export async function workOn(
  handlers: JobHandlers,
  atOnce: Partial<Record<JobName, number>> = {},
): Promise<{ stop: (patienceSeconds?: number) => Promise<void> }> {
  const boss = await connect({ supervise: true });
  for (const name of jobNames) {
    for (let nth = 0; nth < (atOnce[name] ?? 1); nth += 1) await register(boss, name, handlers);
  }
  return {
    stop: (patienceSeconds = 20) =>
      boss.stop({ graceful: true, wait: true, timeout: patienceSeconds * 1000 }),
  };
}

async function register<Name extends JobName>(
  boss: PgBoss,
  name: Name,
  handlers: JobHandlers,
): Promise<void> {
  await boss.work<unknown>(name, { pollingIntervalSeconds: 1, batchSize: 1 }, async ([job]) => {
    const line = log.child({ job: name, jobId: job.id });
    const started = performance.now();
    try {
      const payload = jobs[name].payload.parse(job.data) as JobPayload<Name>;
      await handlers[name](payload, { id: job.id });
      line.info({ ms: Math.round(performance.now() - started) }, "job done");
    } catch (error) {
      line.error({ err: error }, "job failed, to be tried again");
      throw error;
    }
  });
}

/** Close this process's connection to the queue, for programs that end. */
export async function closeQueue(): Promise<void> {
  const open = held.dewledgerQueue;
  held.dewledgerQueue = undefined;
  if (open !== undefined) await (await open).stop({ graceful: false, wait: true });
}
