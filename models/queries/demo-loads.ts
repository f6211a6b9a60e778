import { QueryTypes } from "sequelize";
import { sequelize } from "../sequelize";

/** Whether the demo scenario was loaded into this database, whole; the loader keeps its own table of that. */
export async function hasFinishedDemoLoad(): Promise<boolean> {
  const [table] = await sequelize.query<{ exists: boolean }>(
    `select to_regclass('demo_loads') is not null as "exists"`,
    { type: QueryTypes.SELECT },
  );
  if (!table.exists) return false;
  const [load] = await sequelize.query<{ exists: boolean }>(
    `select exists (select 1 from demo_loads where finished_at is not null) as "exists"`,
    { type: QueryTypes.SELECT },
  );
  return load.exists;
}
