import pg from "pg";

/**
 * Remembers in the database itself whether the demo's load began and whether it ended, so that a
 * load which was cut short is neither taken for a whole demo nor for somebody's own data.
 */

export type DemoState = "empty" | "cut-short" | "loaded" | "own-data";

/** What a database holds, as far as the demo is concerned. */
export async function demoState(databaseUrl: string): Promise<DemoState> {
  return query(databaseUrl, async (client) => {
    const { rows } = await client.query<{ finished: boolean }>(
      "select finished_at is not null as finished from demo_loads order by started_at desc limit 1",
    );
    if (rows.length > 0) return rows[0].finished ? "loaded" : "cut-short";
    const people = await client.query("select 1 from users limit 1");
    return people.rows.length === 0 ? "empty" : "own-data";
  });
}

export async function markDemoStarted(databaseUrl: string): Promise<void> {
  await query(databaseUrl, (client) =>
    client.query("insert into demo_loads (started_at) values (now())"),
  );
}

export async function markDemoFinished(databaseUrl: string): Promise<void> {
  await query(databaseUrl, (client) => client.query("update demo_loads set finished_at = now()"));
}

/**
 * Empty the database down to the last table. Called only when what it holds is the beginning of a
 * demo's load that was cut short, before anybody could sign in.
 */
export async function emptyDatabase(databaseUrl: string): Promise<void> {
  await query(databaseUrl, (client) =>
    client.query(
      "drop schema if exists pgboss cascade; drop schema public cascade; create schema public",
    ),
  );
}

async function query<Result>(
  databaseUrl: string,
  work: (client: pg.Client) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query(
      "create table if not exists demo_loads (started_at timestamptz primary key, finished_at timestamptz)",
    );
    return await work(client);
  } finally {
    await client.end();
  }
}
