import fs from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import pg from "pg";
import { type QueryInterface, Sequelize } from "sequelize";
import { Umzug } from "umzug";
import { root } from "./paths.mjs";

/** Any number that no other program takes an advisory lock on. */
const LOCK = 7_281_906_551;

interface Migration {
  up: (context: { context: QueryInterface }) => Promise<void>;
  down: (context: { context: QueryInterface }) => Promise<void>;
}

/** A migration that failed: it was rolled back, and those before it are kept. */
export class FailedMigration extends Error {
  constructor(
    readonly migration: string,
    readonly direction: "up" | "down",
    override readonly cause: unknown,
  ) {
    super(cause instanceof Error ? cause.message : String(cause));
    this.name = "FailedMigration";
  }
}

export interface MigrationRun {
  /** Apply what has not been applied; the names of what was. */
  up: () => Promise<string[]>;
  /** Revert the last one, or all; the names of what was. */
  down: (which: "last" | "all") => Promise<string[]>;
  /** Names not applied yet. */
  pending: () => Promise<string[]>;
}

/**
 * Run `work` with the migrations of one database, while holding a lock in that database so that two
 * programs that start together do not migrate it at once.
 *
 * Each migration and the line that records it are one transaction. Migrations know nothing of it:
 * they get a connection pool of exactly one connection, on which the transaction was begun.
 *
 * @throws {FailedMigration}
 */
export async function withMigrations<Result>(
  databaseUrl: string,
  work: (migrations: MigrationRun) => Promise<Result>,
): Promise<Result> {
  const guard = new pg.Client({
    connectionString: databaseUrl,
    application_name: "dewledger-lock",
  });
  await guard.connect();
  const sequelize = new Sequelize(databaseUrl, {
    dialect: "postgres",
    dialectModule: pg,
    logging: false,
    pool: { max: 1, min: 1, idle: 3_600_000, acquire: 60_000 },
  });
  try {
    await guard.query("select pg_advisory_lock($1)", [LOCK]);
    await sequelize.query(
      "create table if not exists schema_migrations (name text primary key, applied_at timestamptz not null default now())",
    );
    return await work(migrationRun(sequelize));
  } finally {
    await sequelize.close();
    await guard.end();
  }
}

function migrationRun(sequelize: Sequelize): MigrationRun {
  const inTransaction = async (
    name: string,
    direction: "up" | "down",
    record: string,
  ): Promise<void> => {
    await sequelize.query("begin");
    try {
      const migration = await load(name);
      await migration[direction]({ context: sequelize.getQueryInterface() });
      await sequelize.query(record, { bind: [name] });
      await sequelize.query("commit");
    } catch (error) {
      await sequelize.query("rollback");
      throw new FailedMigration(name, direction, error);
    }
  };
  const umzug = new Umzug({
    migrations: migrationNames().map((name) => ({
      name,
      up: () => inTransaction(name, "up", "insert into schema_migrations (name) values ($1)"),
      down: () => inTransaction(name, "down", "delete from schema_migrations where name = $1"),
    })),
    storage: {
      // Recorded inside each migration's own transaction.
      logMigration: async () => undefined,
      unlogMigration: async () => undefined,
      executed: async () => {
        const [rows] = await sequelize.query("select name from schema_migrations order by name");
        return (rows as { name: string }[]).map(({ name }) => name);
      },
    },
    logger: undefined,
  });
  const names = (list: readonly { name: string }[]) => list.map(({ name }) => name);
  return {
    up: () => own(async () => names(await umzug.up())),
    down: (which) => own(async () => names(await umzug.down(which === "all" ? { to: 0 } : {}))),
    pending: async () => names(await umzug.pending()),
  };
}

/** Umzug wraps what a migration throws; the reader wants ours. */
async function own<Result>(work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof Error && error.cause instanceof FailedMigration) throw error.cause;
    throw error;
  }
}

function migrationNames(): string[] {
  return fs
    .readdirSync(path.join(root, "migrations"))
    .filter((file) => /^\d{14}-.+\.ts$/.test(file))
    .map((file) => file.replace(/\.ts$/, ""))
    .sort();
}

async function load(name: string): Promise<Migration> {
  const file = pathToFileURL(path.join(root, "migrations", `${name}.ts`)).href;
  return (await import(file)) as Migration;
}
