import { existsSync } from "node:fs";
import { join } from "node:path";
import type { DataSource } from "typeorm";
import type { Settings } from "#server/config.ts";
import { openDatabase } from "./database.ts";
import { DATABASE, startMariaDb } from "./mariadb.ts";
import { livingProcess } from "./processes.ts";
import { Trouble } from "./trouble.ts";

/** The private instance as it is: one that runs goes on running, one that does not is stopped again afterwards. */
const reachPrivate = async (varFolder: string): Promise<{ url: string; stop: () => Promise<void> }> => {
  const folder = join(varFolder, "mariadb");
  if (!existsSync(join(folder, "data")))
    throw new Trouble("There is no database yet: run `npm start` once, or set DATABASE_URL.");
  const isRunning = livingProcess(join(folder, "mariadb.pid"), `--datadir=${join(folder, "data")} `) !== null;
  const server = await startMariaDb({ folder });
  return { url: server.url(DATABASE), stop: isRunning ? async () => undefined : server.stop };
};

/** Does some work on the installation's database, wherever that is. */
export const withInstallationDatabase = async <T>(
  settings: Settings,
  work: (db: DataSource) => Promise<T>,
): Promise<T> => {
  const reached =
    settings.databaseUrl === null
      ? await reachPrivate(settings.folders.var)
      : { url: settings.databaseUrl, stop: async () => undefined };
  try {
    const db = await openDatabase(reached.url);
    try {
      return await work(db);
    } finally {
      await db.destroy();
    }
  } finally {
    await reached.stop();
  }
};
