/**
 * Two worker processes share the re-run of a whole portfolio while one of them is killed.
 *
 *     npm run bench:workers
 *     npm run bench:workers -- --reservoirs=120 --trials=4000 --restart-database
 *
 * Runs on a PostgreSQL cluster of its own, which is thrown away afterwards. `--restart-database` restarts that server
 * under the run as well. Ends with code 1 when anything was stored twice, not at all, or with other bytes than one
 * process gives.
 */
import process from "node:process";
import { parseArgs } from "node:util";
import { openCluster, removeCluster } from "../lib/cluster.mjs";
import { shareRun } from "./shared-run";

const { values } = parseArgs({
  options: {
    reservoirs: { type: "string", default: "500" },
    trials: { type: "string", default: "10000" },
    "restart-database": { type: "boolean", default: false },
  },
});
const reservoirs = Number(values.reservoirs);
const trials = Number(values.trials);
const print = (line: string) => process.stdout.write(`${line}\n`);

const name = `dewledger-workers-${process.pid}`;
let cluster = await openCluster({ name });
let isWhole = false;
try {
  const restartDatabase = async () => {
    await cluster.stop();
    cluster = await openCluster({ name });
  };
  const run = await shareRun(cluster.url, {
    reservoirs,
    trials,
    hurry: false,
    ...(values["restart-database"] && { restartDatabase }),
  });
  print(`${reservoirs} drafts of ${trials} trials and an impossible one, two worker processes`);
  print(`killed ${run.killed} when ${run.doneAtKill} were done; its work in hand was begun again`);
  if (values["restart-database"]) {
    print(`database restarted after that; the other worker ${run.survived ? "lived on" : "ended"}`);
  }
  print(`finished in ${run.seconds.toFixed(1)} s: ${JSON.stringify(run.counts)}`);
  print(
    `items ended by each worker: ${JSON.stringify(run.itemsOf)}; begun again: ${run.begunAgain}`,
  );
  print(`drafts by times stored: ${JSON.stringify(run.storedTimes)}`);
  print(`drafts by audit events of results: ${JSON.stringify(run.auditedTimes)}`);
  print(`the same bytes as one process: ${run.sameBytes} of ${reservoirs}`);
  print(`the impossible one: ${run.impossible.state}, ${run.impossible.reason}`);
  isWhole =
    run.state === "finished" &&
    run.storedTimes[1] === reservoirs &&
    run.auditedTimes[1] === reservoirs &&
    run.sameBytes === reservoirs &&
    run.survived;
  print(isWhole ? "every one exactly once" : `NOT WHOLE; see ${run.logFile}`);
} finally {
  await cluster.stop();
  await removeCluster(cluster);
}
process.exitCode = isWhole ? 0 : 1;
