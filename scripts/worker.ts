/**
 * The process that does queued work. Start as many as the work needs; each takes one job of a kind
 * at a time. SIGTERM lets the work in hand finish.
 */
import process from "node:process";
import { sequelize } from "../models/sequelize";
import { env } from "../services/env";
import { log } from "../services/log";
import { handlers } from "../services/queue/handlers";
import { workOn } from "../services/queue/queue";

env();
const work = await workOn(handlers);
log.info("worker ready");
// Tells the program that started this one, if it listens.
process.send?.("ready");

let stopping = false;
// "disconnect": the program that started this one is gone, killed perhaps.
for (const event of ["SIGTERM", "SIGINT", "disconnect"] as const) {
  process.on(event, () => {
    if (stopping) return;
    stopping = true;
    log.info({ event }, "worker stops");
    work
      .stop()
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
