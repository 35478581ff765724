import { createConnection } from "mysql2/promise";
import type { DataSource } from "typeorm";
import { afterAll, inject } from "vitest";
import { createDataSource } from "#server/database/data-source.ts";
import { runMigrations } from "#server/database/migrate.ts";

/** Each vitest worker has a database of its own. */
const NAME = `test_${process.env.VITEST_POOL_ID ?? "1"}`;
const LOCK_SECONDS = 60;

const urlOf = (database: string): string => inject("databaseUrl").replace("{database}", database);

export const testDatabaseUrl = (): string => urlOf(NAME);

let opening: Promise<DataSource> | undefined;

/**
 * This worker's database, migrated, and empty when the file that runs now first asks for it. Closed after the file.
 * Tests of one file share what they write; `emptyDatabase` clears it in between where that matters.
 */
export const testDataSource = (): Promise<DataSource> => {
  opening ??= open();
  return opening;
};

afterAll(async () => {
  const db = await opening?.catch(() => undefined);
  if (db?.isInitialized) await db.destroy();
  await releaseLock?.();
});

let releaseLock: (() => Promise<void>) | undefined;

const open = async (): Promise<DataSource> => {
  await makeAndLock();
  const db = await createDataSource(testDatabaseUrl()).initialize();
  await runMigrations(db);
  await emptyDatabase(db);
  return db;
};

/** Two test files on one database would read each other's rows: whoever comes second waits, then fails loudly. */
const makeAndLock = async (): Promise<void> => {
  const connection = await createConnection({ uri: urlOf("mysql").replace(/^mariadb:/, "mysql:") });
  releaseLock = () => connection.end();
  await connection.query(
    `CREATE DATABASE IF NOT EXISTS ${NAME} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`,
  );
  const [rows] = await connection.query(`SELECT GET_LOCK('${NAME}', ${LOCK_SECONDS}) AS held`);
  const [row] = rows as { held: number }[];
  if (Number(row?.held) !== 1) throw new Error(`Another test file is using the database ${NAME}.`);
};

/** Empties every table that has rows; the schema and the list of migrations stay. */
export const emptyDatabase = async (db: DataSource): Promise<void> => {
  const tables: { name: string }[] = await db.query(
    "SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE() AND table_name <> ?",
    [db.options.migrationsTableName ?? "migrations"],
  );
  if (tables.length === 0) return;
  const probes = tables.map(
    ({ name }) => `SELECT '${name}' AS name WHERE EXISTS (SELECT 1 FROM \`${name}\`)`,
  );
  const filled: { name: string }[] = await db.query(probes.join(" UNION ALL "));
  const runner = db.createQueryRunner();
  try {
    await runner.query("SET FOREIGN_KEY_CHECKS = 0");
    for (const { name } of filled) await runner.query(`TRUNCATE TABLE \`${name}\``);
    await runner.query("SET FOREIGN_KEY_CHECKS = 1");
  } finally {
    await runner.release();
  }
};
