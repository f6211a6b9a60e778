/**
 * The process that does queued work. Start as many as the work needs, on as many machines; each takes one job of a kind
 * at a time, and as many lanes of runs as keep its threads busy. SIGTERM gives items of runs back at once and lets
 * other work in hand finish.
 */
import { availableParallelism } from "node:os";
import process from "node:process";
import { sequelize } from "../models/sequelize";
import { closePool } from "../services/compute/pool";
import { isDatabaseAway } from "../services/database-errors";
import { env } from "../services/env";
import { log } from "../services/log";
import { handlersOf } from "../services/queue/handlers";
import { workOn } from "../services/queue/queue";
import { RunWorker } from "../services/runs/run-worker";

env();
// The queue does not wait for its own notes of jobs that ended. A database that is away is no reason to end with it.
process.on("unhandledRejection", (error) => {
  if (isDatabaseAway(error)) {
    log.warn({ err: error }, "the database is away");
    return;
  }
  log.fatal({ err: error }, "worker fails");
  process.exit(1);
});

const runs = new RunWorker();
// One lane more than there are calculation threads, which have work then while one lane stores its result.
const lanes = Math.max(2, availableParallelism());
// Each looks for a letter once a second; a day's decisions should not wait for one another.
const letters = 4;
const work = await workOn(handlersOf(runs), { "work-on-run": lanes, "send-mail": letters });
runs.start();
log.info({ worker: runs.name, lanes }, "worker ready");
// Tells the program that started this one, if it listens, that it is ready and what it is called.
process.send?.(runs.name);

let stopping = false;
// "disconnect": the program that started this one is gone, killed perhaps.
for (const event of ["SIGTERM", "SIGINT", "disconnect"] as const) {
  process.on(event, () => {
    if (stopping) return;
    stopping = true;
    log.info({ event }, "worker stops");
    runs
      .stop()
      .then(() => work.stop())
      .then(() => closePool())
      .then(() => sequelize.close())
      .then(
        () => process.exit(0),
        (error: unknown) => {
          log.error({ err: error }, "worker did not stop cleanly");
          process.exit(1);
        },
      );
  });
}
