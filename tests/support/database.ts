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
