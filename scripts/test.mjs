/**
 * `npm test`: every check there is, ending with one line, `N passed, N failed`.
 *
 *     npm test                                   formatting, lint, types, build, all tests
 *     npm test -- --project unit                 one project of tests
 *     npm test -- tests/api/fields.test.ts       one file; starts only what it needs
 *     npm test -- --dev tests/e2e/x.test.ts      against the sources with hot reload, no build
 *
 * Other arguments go to vitest. DATABASE_URL_TEST replaces the private database of the tests.
 * TEST_BASE_URL, TEST_DATABASE_URL and TEST_MAIL_URL together point the tests at a product that
 * already runs.
 */
import "./lib/node-version.mjs";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import process from "node:process";
import { Checks } from "./lib/checks.mjs";
import { findChromium } from "./lib/chromium.mjs";
import { say } from "./lib/console-output.mjs";
import { installDependencies } from "./lib/dependencies.mjs";
import { failureFromOutput } from "./lib/failure.mjs";
import { readJsonIfAny, root } from "./lib/paths.mjs";
import { stopOnSignal } from "./lib/processes.mjs";
import { run, stopRunning } from "./lib/run.mjs";
import { needsBrowser, needsProduct, selectsByName, UNIT_PROJECTS } from "./lib/test-needs.mjs";
import { prepareProduct, startTestProduct } from "./lib/test-product.mjs";

const dev = process.argv.includes("--dev");
const wanted = process.argv.slice(2).filter((argument) => argument !== "--dev");
const checks = new Checks();
const undo = [];
let stopping = null;

function stopEverything() {
  stopping ??= (async () => {
    stopRunning();
    while (undo.length > 0) await undo.pop()();
  })();
  return stopping;
}

/** A program that passes when it ends with code 0. */
async function program(name, args, note) {
  const { code, output } = await run(process.execPath, args, { cwd: root, onLine: note });
  if (code !== 0) throw failureFromOutput(name, output);
}

async function checkSources() {
  const next = "node_modules/next/dist/bin/next";
  const prettier = ["node_modules/prettier/bin/prettier.cjs", "--check", "."];
  const eslint = ["node_modules/eslint/bin/eslint.js", "--max-warnings", "0", "."];
  await checks.check("Formatting", () => program("Formatting", prettier));
  await checks.check("Lint", () => program("Lint", eslint));
  await checks.check("Types", async () => {
    await program("Route types", [next, "typegen"]);
    await program("Types", ["node_modules/typescript/bin/tsc", "--noEmit"]);
  });
}

async function vitest(name, args, env) {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-summary-"));
  const summaryFile = path.join(folder, "summary.json");
  const started = Date.now();
  const { code } = await run(process.execPath, ["node_modules/vitest/vitest.mjs", "run", ...args], {
    cwd: root,
    env: { ...env, TEST_SUMMARY_FILE: summaryFile },
    inherit: true,
  });
  const summary = readJsonIfAny(summaryFile);
  // Tests that a name pattern left out were not asked for.
  if (summary !== null && selectsByName(args)) summary.skipped = 0;
  checks.addTests(name, code, summary, Date.now() - started);
  fs.rmSync(folder, { recursive: true, force: true });
}

/** The product and the browser for the tests that need them; null when they could not be had. */
async function environment(args) {
  let env = process.env;
  const isGiven = Boolean(process.env.TEST_BASE_URL);
  if (needsProduct(args) && !isGiven) {
    const built = await checks.check("Build", () => prepareProduct({ dev }));
    if (!built) return null;
    const started = await checks.check("The product starts on a database of its own", async () => {
      env = await startTestProduct({ dev, undo: (work) => undo.push(work) });
    });
    if (!started) return null;
  }
  if (!needsBrowser(args)) return env;
  let chromium = null;
  await checks.check("The browser", async () => {
    chromium = await findChromium();
  });
  return chromium === null ? null : { ...env, TEST_CHROMIUM: chromium };
}

async function everything() {
  await checkSources();
  const unit = UNIT_PROJECTS.flatMap((project) => ["--project", project]);
  await vitest("Unit tests", unit, process.env);
  const env = await environment([]);
  if (env === null) {
    say("API and browser tests could not run.");
    return;
  }
  await vitest("API tests", ["--project", "api"], env);
  await vitest("Browser tests", ["--project", "e2e"], env);
}

async function some(args) {
  const env = await environment(args);
  if (env !== null) await vitest("Tests", args, env);
}

stopOnSignal(stopEverything);
await checks.check("Packages", () => installDependencies());
if (checks.failed === 0) await (wanted.length === 0 ? everything() : some(wanted));
if (stopping === null) {
  await stopEverything();
  process.stdout.write(`\n${checks.closingLine()}\n`);
  process.exit(checks.failed === 0 ? 0 : 1);
}
