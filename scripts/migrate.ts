/**
 * Bring the database to the present layout, or take it back.
 *
 *     tsx scripts/migrate.ts up | down | down --all | status
 */
import process from "node:process";
import { say, sayFailure } from "./lib/console-output.mjs";
import { loadSettings } from "./lib/dotenv.mjs";
import { Failure } from "./lib/failure.mjs";
import { FailedMigration, withMigrations } from "./lib/migrations";

async function main([command = "up", option]: string[]): Promise<void> {
  loadSettings();
  const url = process.env.DATABASE_URL;
  if (!url) throw new Failure("DATABASE_URL is not set.", "See .env.example.");
  await withMigrations(url, async (migrations) => {
    switch (command) {
      case "up": {
        const applied = await migrations.up();
        say(applied.length === 0 ? "Database layout is up to date" : report("applied", applied));
        return;
      }
      case "down": {
        const reverted = await migrations.down(option === "--all" ? "all" : "last");
        say(reverted.length === 0 ? "Nothing to revert" : report("reverted", reverted));
        return;
      }
      case "status": {
        const pending = await migrations.pending();
        say(pending.length === 0 ? "Database layout is up to date" : report("pending", pending));
        return;
      }
      default:
        throw new Failure(`Unknown command "${command}".`, "Use up, down, down --all or status.");
    }
  });
}

function report(what: string, names: string[]): string {
  return `Migrations ${what}: ${names.length} (${names.at(0)}${names.length > 1 ? ` … ${names.at(-1)}` : ""})`;
}

function explain(error: unknown): unknown {
  if (error instanceof FailedMigration) {
    return new Failure(
      `Migration ${error.migration} could not be ${error.direction === "up" ? "applied" : "reverted"}: ${error.message}`,
      "It was rolled back whole; those before it are kept, and nothing was lost. Correct the\n" +
        "migration or the data it names, then run the same command again.",
    );
  }
  if (error instanceof Error && "code" in error) {
    const { code } = error;
    if (code === "ECONNREFUSED" || code === "ENOTFOUND" || code === "28P01" || code === "3D000") {
      return new Failure(
        `The database of DATABASE_URL does not answer: ${error.message}`,
        "Check the address, the user and the password. Nothing was changed.",
      );
    }
  }
  return error;
}

try {
  await main(process.argv.slice(2));
} catch (error) {
  sayFailure(explain(error));
  process.exitCode = 1;
}
