import fs from "node:fs";
import path from "node:path";
import { task } from "./console-output.mjs";
import { contentHash } from "./content-hash.mjs";
import { requireSpace } from "./disk-space.mjs";
import { Failure, failureFromOutput } from "./failure.mjs";
import { withLock } from "./lock.mjs";
import { dataPath, readTextIfAny, root, writeFileAtomically } from "./paths.mjs";
import { recordedRun } from "./processes.mjs";
import { run } from "./run.mjs";

/** Everything the build reads. A new top-level folder of the product belongs here. */
const SOURCES = [
  ...["analytics", "app", "components", "fonts", "models", "public", "services"],
  ...["proxy.ts", "instrumentation.ts", "next.config.mjs", "package-lock.json", "package.json"],
  ...["postcss.config.mjs", "tailwind.config.ts", "tsconfig.json"],
  ...["build-programs.mjs", "build-workers.mjs", "local-services.ts", "worker.ts"].map(
    (file) => `scripts/${file}`,
  ),
];

const STAMP = path.join(root, ".next", "dewledger-build");
const PROGRAMS = ["dist/worker.mjs", "dist/local-services.mjs"];

function sourcesHash() {
  return contentHash(root, SOURCES, [process.versions.modules]);
}

/** Whether the last complete build was made from the sources as they are now. */
export function isBuilt() {
  return (
    readTextIfAny(STAMP) === sourcesHash() &&
    PROGRAMS.every((program) => fs.existsSync(path.join(root, program)))
  );
}

/**
 * Build the product when its sources changed. The stamp is removed first and written last, so a
 * build that was interrupted is never taken for a whole one.
 *
 * @returns {Promise<boolean>} whether anything was built
 */
export async function build() {
  return withLock(dataPath("build.lock"), "The build", async () => {
    if (isBuilt()) return false;
    refuseUnderRunningProduct();
    const hash = sourcesHash();
    await requireSpace(root, 800, "the build");
    fs.rmSync(STAMP, { force: true });
    await buildWorkers();
    await task("Building the product (about a minute)", async (note) => {
      await step("Building", ["node_modules/next/dist/bin/next", "build"], note);
    });
    writeFileAtomically(STAMP, hash, 0o644);
    return true;
  });
}

/** A product that runs from the old build would find its files exchanged. */
function refuseUnderRunningProduct() {
  const { state, record } = recordedRun();
  const isOther = state === "running" && record.supervisor.pid !== process.pid;
  if (!isOther || record.command !== "npm start") return;
  throw new Failure(
    `The sources have changed, and ${record.address} still runs from the last build.`,
    "Stop it with Ctrl-C in its terminal, then run the same command again.",
  );
}

/** Bundle the programs that run beside Next: the calculation threads, the worker, the stand-ins. */
export async function buildWorkers() {
  await step("Bundling the workers", ["scripts/build-workers.mjs"]);
  await step("Bundling the worker process", ["scripts/build-programs.mjs"]);
}

async function step(what, args, onLine) {
  const env = { ...process.env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1", CI: "true" };
  const { code, output } = await run(process.execPath, args, { cwd: root, env, onLine });
  if (code !== 0) throw failureFromOutput(what, output);
}
