/**
 * Create and start this clone's private database, print its URL and leave it running.
 *
 *     node scripts/dev-database.mjs            the database "dewledger"
 *     node scripts/dev-database.mjs scratch    another database of the same cluster
 *     node scripts/dev-database.mjs --stop     stop the cluster
 *
 * The URL is the only line on standard output, for `DATABASE_URL=$(node scripts/dev-database.mjs)`.
 */
import path from "node:path";
import process from "node:process";
import { clusterHome, openCluster, rememberDatabaseUrl, stopCluster } from "./lib/cluster.mjs";
import { sayFailure } from "./lib/console-output.mjs";
import { withLock } from "./lib/lock.mjs";
import { dataPath } from "./lib/paths.mjs";
import { findPostgres } from "./lib/postgres-binaries.mjs";

const [argument] = process.argv.slice(2);

try {
  await withLock(dataPath("cluster.lock"), "The database", async () => {
    if (argument === "--stop") {
      const { folder } = await findPostgres();
      await stopCluster({ data: path.join(clusterHome("dewledger"), "data"), folder });
      return;
    }
    const cluster = await openCluster({ database: argument ?? "dewledger" });
    if (argument === undefined) rememberDatabaseUrl(cluster.url);
    process.stdout.write(`${cluster.url}\n`);
  });
} catch (error) {
  sayFailure(error);
  process.exitCode = 1;
}
