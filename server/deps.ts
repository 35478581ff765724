import type { DataSource } from "typeorm";
import type { Config } from "./config.ts";
import type { Log } from "./log.ts";
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
