/**
 * `npm start`: everything between a clean clone and a product that answers, in one command.
 * `npm run dev` (--dev) does the same with hot reload. Ctrl-C stops what it started.
 */
import "./lib/node-version.mjs";
import process from "node:process";
import { build, buildWorkers, isBuilt } from "./lib/build.mjs";
import { openCluster, rememberDatabaseUrl } from "./lib/cluster.mjs";
import { say, sayFailure, task } from "./lib/console-output.mjs";
import { installDependencies } from "./lib/dependencies.mjs";
import { loadDotenv } from "./lib/dotenv.mjs";
import { Failure } from "./lib/failure.mjs";
import { waitUntilHealthy } from "./lib/health.mjs";
import { checkSettings, migrate, seed, settings, typescript } from "./lib/installation.mjs";
import { keepRunning } from "./lib/keep-running.mjs";
import { withLock } from "./lib/lock.mjs";
import { dataPath } from "./lib/paths.mjs";
import { isPortFree, portTakenFailure } from "./lib/ports.mjs";
import {
  ProcessGroup,
  recordedRun,
  runRecordFile,
  stopLeftBehind,
  stopOnSignal,
} from "./lib/processes.mjs";
import { stopRunning } from "./lib/run.mjs";

const dev = process.argv.includes("--dev");
const command = dev ? "npm run dev" : "npm start";

/** What has to be undone, last first. */
const undo = [];

let stopping = null;

function stopEverything() {
  stopping ??= (async () => {
    stopRunning();
    while (undo.length > 0) await undo.pop()();
  })();
  return stopping;
}

async function main() {
  say(`Dewledger, on Node ${process.versions.node}`);
  loadDotenv();
  const { host, port } = webAddress();
  const workers = workerCount();
  const address = `http://${host === "0.0.0.0" ? "127.0.0.1" : host}:${port}`;

  const hadCluster = await recover();
  if (!(await isPortFree(port, host))) throw portTakenFailure(port, command);
  const group = new ProcessGroup({
    recordFile: runRecordFile(),
    logFolder: dataPath("logs"),
    command,
    address,
  });
  undo.push(
    () => group.forget(),
    () => group.stop(),
  );

  if (!(await installDependencies())) say("Packages are up to date");
  const { env } = await settings({ address });
  const checked = await checkSettings(env);
  const isPrivate = !env.DATABASE_URL;
  if (isPrivate) env.DATABASE_URL = await startCluster(group, hadCluster);
  // The demo's figures are computed on the same threads as everybody's.
  if (dev || !isBuilt()) await buildWorkers();
  await migrate(env);
  const demo = isPrivate || checked.DEWLEDGER_DEMO;
  await task(demo ? "Looking after the demo" : "Looking after reference rows", () =>
    seed(env, { demo }),
  );
  if (!dev && !(await build())) say("The build is up to date");

  // Asked again: a build takes long enough for somebody to take a port that was free before it.
  const { env: own, standIns, mailPage } = await settings({ address });
  const running = { ...own, DATABASE_URL: env.DATABASE_URL };
  await startProcesses(group, { env: running, standIns, host, port, address, workers });
  await greet({ address, mailPage, demo });
}

function webAddress() {
  const port = process.env.PORT || "3000";
  if (!/^\d+$/.test(port) || Number(port) < 1 || Number(port) > 65_535) {
    throw new Failure(
      "PORT must be a whole number from 1 to 65535.",
      `Example: PORT=3000 ${command}`,
    );
  }
  return { host: process.env.HOST || "127.0.0.1", port: Number(port) };
}

function workerCount() {
  const workers = process.env.WORKERS || "1";
  if (!/^[1-9]\d?$/.test(workers)) {
    throw new Failure(
      "WORKERS must be a whole number from 1 to 99.",
      `Example: WORKERS=2 ${command}`,
    );
  }
  return Number(workers);
}

/**
 * Refuse to run twice from one folder, and clear up after a run that was killed.
 *
 * @returns {Promise<boolean>} whether the killed run had started the cluster, which is then ours
 */
async function recover() {
  const { state, record } = recordedRun();
  if (state === "running") {
    throw new Failure(
      `Dewledger already runs from this folder, at ${record.address} (${record.command}, process ${record.supervisor.pid}).`,
      "Use that one, or stop it first with Ctrl-C in its terminal.",
    );
  }
  if (state === "none") return false;
  const stopped = await stopLeftBehind(record);
  if (stopped.length > 0) {
    say(`The last run was killed; stopped what it left behind: ${stopped.join(", ")}`);
  }
  return record.ownsCluster;
}

async function startCluster(group, hadCluster) {
  return withLock(dataPath("cluster.lock"), "The database", async () => {
    // Recorded first: if we are killed while it starts, the next run still knows it is ours.
    const cluster = await openCluster({ onStart: () => group.ownCluster() });
    if (cluster.startedNow || hadCluster) {
      group.ownCluster();
      // After the processes have stopped, before the record is forgotten.
      undo.splice(1, 0, cluster.stop);
    }
    rememberDatabaseUrl(cluster.url);
    say(
      `PostgreSQL ${cluster.version} ${cluster.startedNow ? "started" : "runs"} on 127.0.0.1:${cluster.port}` +
        (cluster.createdNow ? `, its data in ${cluster.home}` : ""),
    );
    return cluster.url;
  });
}

async function startProcesses(group, { env, standIns, host, port, address, workers }) {
  const production = { ...env, NODE_ENV: "production" };
  const onUnexpectedEnd = (name) => {
    fail(
      new Failure(`The ${name} process ended unexpectedly.`, `Its log is .data/logs/${name}.log.`),
    );
  };
  const program = (name) =>
    dev ? typescript(`scripts/${name}.ts`) : ["--enable-source-maps", `dist/${name}.mjs`];

  if (standIns.length > 0) {
    const args = [...program("local-services"), ...standIns];
    await group.start("local-services", args, { env: production, onUnexpectedEnd }).ready;
    say("Local stand-ins for mail and storage started");
  }
  const worker = dev
    ? ["--watch", "--watch-preserve-output", ...program("worker")]
    : program("worker");
  const working = Array.from({ length: workers }, (_, index) => {
    const name = index === 0 ? "worker" : `worker-${index + 1}`;
    return keepRunning(group, name, worker, { env: production, onNeverReady: onUnexpectedEnd })
      .ready;
  });
  const web = group.start(
    "web",
    ["node_modules/next/dist/bin/next", dev ? "dev" : "start", "-H", host, "-p", String(port)],
    { env: dev ? { ...env, NODE_ENV: "development" } : production, show: dev, onUnexpectedEnd },
  );
  await Promise.all([
    ...(dev ? [] : working),
    waitUntilHealthy(
      address,
      web.ready.then(() => new Promise(() => undefined)),
    ),
  ]);
}

async function greet({ address, mailPage, demo }) {
  say();
  say(`Dewledger answers at  ${address}`);
  if (mailPage !== null) say(`Local mail            ${mailPage}`);
  if (demo) {
    const { tsImport } = await import("tsx/esm/api");
    const { demoPeople, demoPassword } = await tsImport(
      "../seeders/demo/people.ts",
      import.meta.url,
    );
    say();
    say(`Demo accounts, all with the password ${demoPassword}`);
    for (const { name, email, role } of demoPeople) {
      say(`  ${email.padEnd(38)} ${role.padEnd(14)} ${name}`);
    }
  }
  say();
  say("Ctrl-C stops it.");
}

/** Say what went wrong, stop what was started, and end; what fails because we stop is no news. */
async function fail(error) {
  if (stopping !== null) return;
  sayFailure(error);
  await stopEverything();
  process.exit(1);
}

stopOnSignal(stopEverything);
main().catch(fail);
