import type { DataSource } from "typeorm";
import { createDataSource } from "#server/database/data-source.ts";
import { runMigrations } from "#server/database/migrate.ts";
import { codeOf, Trouble } from "./trouble.ts";

/** SKIP LOCKED, by which workers share the queue, came with this version. */
const LEAST_VERSION = [10, 6] as const;

const placeOf = (url: string): { host: string; database: string; user: string } => {
  const { host, pathname, username } = new URL(url);
  return { host, database: decodeURIComponent(pathname.slice(1)), user: decodeURIComponent(username) };
};

const whyNoConnection = (url: string, error: unknown): string => {
  const { host, database, user } = placeOf(url);
  const code = codeOf(error);
  if (code === "ER_ACCESS_DENIED_ERROR")
    return `The database at ${host} does not let the user ${user} in; check the user and the password in DATABASE_URL.`;
  if (code === "ER_BAD_DB_ERROR")
    return `There is no database ${database} at ${host}; make it with CREATE DATABASE ${database} CHARACTER SET utf8mb4, or name another in DATABASE_URL.`;
  if (code === "ER_DBACCESS_DENIED_ERROR")
    return `The user ${user} may not use the database ${database} at ${host}; grant it all rights on that database.`;
  if (code === "ENOTFOUND" || code === "EAI_AGAIN")
    return `The database host ${host} is not known to this machine; check the name in DATABASE_URL.`;
  if (["ECONNREFUSED", "ETIMEDOUT", "EHOSTUNREACH", "ENETUNREACH", "PROTOCOL_CONNECTION_LOST"].includes(code))
    return `No database answers at ${host} (${code}); start it, or correct DATABASE_URL.`;
  const said = error instanceof Error ? error.message : String(error);
  return `The database at ${host} could not be used: ${said}. Check DATABASE_URL.`;
};

const requireVersion = async (db: DataSource, url: string): Promise<void> => {
  const [row]: { version: string }[] = await db.query("SELECT VERSION() AS version");
  const version = row?.version ?? "";
  const [major = 0, minor = 0] = version.split(".").map((part) => Number.parseInt(part, 10));
  const isNewEnough = major > LEAST_VERSION[0] || (major === LEAST_VERSION[0] && minor >= LEAST_VERSION[1]);
  if (version.includes("MariaDB") && isNewEnough) return;
  throw new Trouble(
    `The database at ${placeOf(url).host} is ${version}; Shortlight needs MariaDB ${LEAST_VERSION.join(".")} or later.`,
  );
};

const migrate = async (db: DataSource, url: string): Promise<void> => {
  try {
    const ran = await runMigrations(db);
    if (ran.length > 0) process.stderr.write(`Brought the database up to date (${ran.length} steps).\n`);
  } catch (error) {
    const { user, database } = placeOf(url);
    if (!/DENIED/.test(codeOf(error))) throw error;
    throw new Trouble(
      `The user ${user} may not change the tables of the database ${database}; grant it all rights on that database.`,
      error,
    );
  }
};

/** Connects, checks what answers, and brings the schema up to date. */
export const openDatabase = async (url: string): Promise<DataSource> => {
  let db: DataSource;
  try {
    db = await createDataSource(url, 4).initialize();
  } catch (error) {
    throw new Trouble(whyNoConnection(url, error), error);
  }
  try {
    await requireVersion(db, url);
    await migrate(db, url);
    return db;
  } catch (error) {
    await db.destroy();
    throw error;
  }
};
