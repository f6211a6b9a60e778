import { sequelize } from "@/models/sequelize";

/**
 * Whether this process can do its work, which is to say whether the database answers.
 *
 * @throws when it does not
 */
export async function checkHealth(): Promise<{ status: "ok" }> {
  await sequelize.query("select 1");
  return { status: "ok" };
}
