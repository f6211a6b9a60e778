import pg from "pg";
import { testEnvironment } from "./environment";

/**
 * Ask the product's database directly, for what the API does not show.
 *
 * @returns the rows
 */
export async function queryRows<Row extends pg.QueryResultRow>(
  sql: string,
  values: unknown[] = [],
): Promise<Row[]> {
  const client = new pg.Client({ connectionString: testEnvironment.databaseUrl });
  await client.connect();
  try {
    return (await client.query<Row>(sql, values)).rows;
  } finally {
    await client.end();
  }
}

/**
 * A transaction that stays open until told to commit, for what two people do at once.
 *
 * @param sql  its first statement
 * @returns    a function for further statements, and one that commits
 */
export async function openTransaction(
  sql: string,
): Promise<
  [query: (sql: string, values?: unknown[]) => Promise<void>, commit: () => Promise<void>]
> {
  const client = new pg.Client({ connectionString: testEnvironment.databaseUrl });
  await client.connect();
  await client.query("begin");
  await client.query(sql);
  return [
    async (statement, values = []) => {
      await client.query(statement, values);
    },
    async () => {
      await client.query("commit");
      await client.end();
    },
  ];
}
