/**
 * Fill the database.
 *
 *     tsx scripts/seed.ts          rows that the product needs (safe to repeat)
 *     tsx scripts/seed.ts --demo   the same, and the demo scenario when the database is empty
 */
import fs from "node:fs";
import path from "node:path";
import process from "node:process";
import { pathToFileURL } from "node:url";
import { say, sayFailure, seconds } from "./lib/console-output.mjs";
import { type DemoLoad, emptyDatabase, withDemoLoad } from "./lib/demo-load";
import { loadSettings } from "./lib/dotenv.mjs";
import { Failure } from "./lib/failure.mjs";
import { withMigrations } from "./lib/migrations";
import { root } from "./lib/paths.mjs";

async function main(args: string[]): Promise<void> {
  loadSettings();
  const url = process.env.DATABASE_URL;
  if (!url) throw new Failure("DATABASE_URL is not set.", "See .env.example.");
  await withDemoLoad(url, async (load) => {
    const state = args.includes("--demo") ? await load.state() : "own-data";
    if (state === "cut-short") {
      say("The last load of the demo was cut short; starting it afresh");
      await emptyDatabase(url);
      await withMigrations(url, (migrations) => migrations.up());
    }
    const seeders = referenceSeeders();
    if (state === "empty" || state === "cut-short") seeders.push(() => loadDemo(load));
    // The second start of an installation ends here, without loading the product's code.
    if (seeders.length === 0) return;
    try {
      for (const seed of seeders) await seed();
    } finally {
      await disconnect();
    }
  });
}

/** Every seeders/…-reference-….ts, in the order of its name. */
function referenceSeeders(): (() => Promise<void>)[] {
  const folder = path.join(root, "seeders");
  const files = fs.readdirSync(folder).filter((file) => /-reference-.+\.ts$/.test(file));
  return files.sort().map((file) => async () => {
    const seeder = (await import(pathToFileURL(path.join(folder, file)).href)) as {
      seed: () => Promise<void>;
    };
    await seeder.seed();
  });
}

async function loadDemo(load: DemoLoad): Promise<void> {
  const { seedDemo } = await import("../seeders/demo");
  const started = Date.now();
  await load.markStarted();
  await seedDemo();
  await load.markFinished();
  say(`Demo loaded in ${seconds(Date.now() - started)}`);
}

/** Close what the seeders have opened; an open connection would keep this program alive. */
async function disconnect(): Promise<void> {
  const { closeQueue } = await import("../services/queue/queue");
  const { sequelize } = await import("../models/sequelize");
  await closeQueue();
  await sequelize.close();
}

try {
  await main(process.argv.slice(2));
} catch (error) {
  sayFailure(error);
  process.exitCode = 1;
}
