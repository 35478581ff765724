import type { DataSource } from "typeorm";

/** Brings the schema up to date; answers the names of the migrations that ran. */
export const runMigrations = async (dataSource: DataSource): Promise<string[]> => {
  const ran = await dataSource.runMigrations();
  return ran.map((migration) => migration.name);
};
