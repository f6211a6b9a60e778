import pg from "pg";

/**
 * Remembers in the database itself whether the demo's load began and whether it ended, so that a
 * load which was cut short is neither taken for a whole demo nor for somebody's own data.
 */

/** Any number that no other program takes an advisory lock on. */
const LOCK = 7_281_906_552;

export type DemoState = "empty" | "cut-short" | "loaded" | "own-data";

export interface DemoLoad {
  /** What the database holds, as far as the demo is concerned. */
  state: () => Promise<DemoState>;
  markStarted: () => Promise<void>;
  markFinished: () => Promise<void>;
}

/**
 * Look after the demo of one database, one program at a time: a load that goes on after the command
 * which began it was killed is waited for, not taken for one that was cut short.
 */
export async function withDemoLoad<Result>(
  databaseUrl: string,
  work: (load: DemoLoad) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({
    connectionString: databaseUrl,
    application_name: "dewledger-demo",
  });
  await client.connect();
  try {
    await client.query("select pg_advisory_lock($1)", [LOCK]);
    return await work({
      state: () => stateOf(client),
      markStarted: async () => {
        await ensureTable(client);
        await client.query("insert into demo_loads (started_at) values (now())");
      },
      markFinished: async () => {
        await client.query("update demo_loads set finished_at = now()");
      },
    });
  } finally {
    await client.end();
  }
}

async function stateOf(client: pg.Client): Promise<DemoState> {
  await ensureTable(client);
  const { rows } = await client.query<{ finished: boolean }>(
    "select finished_at is not null as finished from demo_loads order by started_at desc limit 1",
  );
  if (rows.length > 0) return rows[0].finished ? "loaded" : "cut-short";
  const people = await client.query("select 1 from users limit 1");
  return people.rows.length === 0 ? "empty" : "own-data";
}

async function ensureTable(client: pg.Client): Promise<void> {
  await client.query(
    "create table if not exists demo_loads (started_at timestamptz primary key, finished_at timestamptz)",
  );
}

/**
 * Empty the database down to the last table. For a database of tests, and for one that holds the
 * beginning of a demo's load which was cut short before anybody could sign in.
 */
export async function emptyDatabase(databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query(
      "drop schema if exists pgboss cascade; drop schema public cascade; create schema public",
    );
  } finally {
    await client.end();
  }
}
