import { randomBytes } from "node:crypto";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import process from "node:process";
import { build, buildWorkers } from "./build.mjs";
import { clusterHome, openCluster, removeCluster, stopCluster } from "./cluster.mjs";
import { say } from "./console-output.mjs";
import { Failure } from "./failure.mjs";
import { waitUntilHealthy } from "./health.mjs";
import { migrate, seed, typescript } from "./installation.mjs";
import { dataPath } from "./paths.mjs";
import { anyFreePort } from "./ports.mjs";
import { findPostgres } from "./postgres-binaries.mjs";
import { ProcessGroup, recordedRun, stopLeftBehind } from "./processes.mjs";

/**
 * The product as the tests meet it: built and started as in production, on free loopback ports, on
 * a database of its own that holds the demo, with stand-ins for mail and storage. All of it is
 * thrown away afterwards; what a killed run left behind is cleared up by the next one.
 */

const clusterName = (pid) => `dewledger-test-${pid}`;

/**
 * Start the product.
 *
 * @param {object} options
 * @param {boolean} options.dev run from the sources with hot reload instead of from a build
 * @param {(undo: () => Promise<void>) => void} options.undo takes what has to be undone, last first
 * @returns {Promise<NodeJS.ProcessEnv>} the environment of the tests
 */
export async function startTestProduct({ dev, undo }) {
  await clearUpKilledRuns();
  const recordFile = path.join(runsFolder(), `${process.pid}.json`);
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-test-"));
  undo(async () => fs.rmSync(folder, { recursive: true, force: true }));

  const [webPort, smtp, mailPage, storage] = [
    await anyFreePort(),
    await anyFreePort(),
    await anyFreePort(),
    await anyFreePort(),
  ];
  const address = `http://127.0.0.1:${webPort}`;
  const logFolder = dataPath("logs", "test");
  const group = new ProcessGroup({ recordFile, logFolder, command: "npm test", address });
  undo(async () => group.forget());
  const databaseUrl = await openDatabase(group, undo);

  const env = {
    ...process.env,
    DATABASE_URL: databaseUrl,
    NEXTAUTH_URL: address,
    NEXTAUTH_SECRET: randomBytes(48).toString("base64url"),
    NEXT_TELEMETRY_DISABLED: "1",
    SMTP_URL: `smtp://127.0.0.1:${smtp}`,
    MAIL_FROM: "Dewledger <dewledger@quillmere.example>",
    S3_ENDPOINT: `http://127.0.0.1:${storage}`,
    S3_REGION: "us-east-1",
    S3_BUCKET: "dewledger",
    S3_ACCESS_KEY_ID: "test",
    S3_SECRET_ACCESS_KEY: "test",
    DEWLEDGER_DEMO: "yes",
    LOG_LEVEL: "info",
  };
  await migrate(env);
  await seed(env, { demo: true });

  const started = { env: { ...env, NODE_ENV: dev ? "development" : "production" } };
  let failure = null;
  const onUnexpectedEnd = (name, { said }) => {
    failure = new Failure(`The ${name} process ended while tests ran.`, "", said);
    process.stderr.write(`${failure.message}\n${said}\n`);
  };
  const run = (name, args) => group.start(name, args, { ...started, onUnexpectedEnd });
  undo(() => group.stop());
  const program = (name) => (dev ? typescript(`scripts/${name}.ts`) : [`dist/${name}.mjs`]);
  const standIns = [
    `--data=${folder}`,
    `--smtp=${smtp}`,
    `--mail-page=${mailPage}`,
    `--storage=${storage}`,
  ];
  await run("local-services", [...program("local-services"), ...standIns]).ready;
  const worker = run("worker", program("worker"));
  const next = ["node_modules/next/dist/bin/next", dev ? "dev" : "start", "-H", "127.0.0.1"];
  const web = run("web", [...next, "-p", String(webPort)]);
  await Promise.all([
    worker.ready,
    waitUntilHealthy(
      address,
      web.ready.then(() => new Promise(() => undefined)),
    ),
  ]);
  say(`The product under test answers at ${address}; its logs are in .data/logs/test`);
  return {
    ...env,
    TEST_BASE_URL: address,
    TEST_DATABASE_URL: databaseUrl,
    TEST_MAIL_URL: `http://127.0.0.1:${mailPage}`,
  };
}

/** What the product is started from. */
export async function prepareProduct({ dev }) {
  if (dev) await buildWorkers();
  else if (!(await build())) say("The build is up to date");
}

async function openDatabase(group, undo) {
  const given = process.env.DATABASE_URL_TEST;
  if (given) {
    await emptyGivenDatabase(given);
    return given;
  }
  const cluster = await openCluster({
    name: clusterName(process.pid),
    durable: false,
    onStart: () => group.ownCluster(),
  });
  undo(async () => {
    await cluster.stop();
    await removeCluster(cluster);
  });
  say(`A PostgreSQL ${cluster.version} of its own runs on 127.0.0.1:${cluster.port}`);
  return cluster.url;
}

/** Everything in it goes, so its name has to say that it is for tests. */
async function emptyGivenDatabase(url) {
  const name = new URL(url).pathname.slice(1);
  if (!/test/i.test(name)) {
    throw new Failure(
      `DATABASE_URL_TEST names the database "${name}". The tests delete everything in it.`,
      'Use a database whose name contains "test", or leave the variable out.',
    );
  }
  const { tsImport } = await import("tsx/esm/api");
  const { emptyDatabase } = await tsImport("./demo-load.ts", import.meta.url);
  await emptyDatabase(url);
}

function runsFolder() {
  const folder = dataPath("test-runs");
  fs.mkdirSync(folder, { recursive: true, mode: 0o700 });
  return folder;
}

async function clearUpKilledRuns() {
  for (const entry of fs.readdirSync(runsFolder())) {
    const file = path.join(runsFolder(), entry);
    const { state, record } = recordedRun(file);
    if (state !== "left-behind") continue;
    if (record.ownsCluster) {
      const home = clusterHome(clusterName(record.supervisor.pid));
      const { folder } = await findPostgres();
      await stopCluster({ data: path.join(home, "data"), folder });
      await removeCluster({ home });
    }
    await stopLeftBehind(record, file);
    say("Cleared up after a test run that was killed");
  }
}
