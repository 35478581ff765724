import type { DataSource } from "typeorm";
import type { Config } from "./config.ts";
import { createDataSource } from "./database/data-source.ts";
import type { Log } from "./log.ts";
import { FolderStorage } from "./storage/folder-storage.ts";
import type { FileStorage } from "./storage/storage.ts";

/** What the processes hand to everything they run: no module reaches for a global. */
export interface Deps {
  config: Config;
  log: Log;
  db: DataSource;
  files: FileStorage;
  /** Replaceable so that tests can move time. */
  now: () => Date;
}

/** Connects what the configuration names. The schema is brought up to date elsewhere, before. */
export const createDeps = async (config: Config, log: Log): Promise<Deps> => {
  const db = await createDataSource(config.databaseUrl).initialize();
  return { config, log, db, files: new FolderStorage(config.folders.files), now: () => new Date() };
};

export const closeDeps = async (deps: Deps): Promise<void> => {
  if (deps.db.isInitialized) await deps.db.destroy();
};
