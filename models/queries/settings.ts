import type { Transaction } from "sequelize";
import { Settings } from "../associations";

/** The one row, or null in a database that was never migrated to have it. */
export async function findSettings(
  options: { transaction?: Transaction; lock?: boolean } = {},
): Promise<Settings | null> {
  return Settings.findByPk(1, options);
}
