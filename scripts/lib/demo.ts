import { existsSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import type { DataSource } from "typeorm";
import type { Config } from "#server/config.ts";
import { Person } from "#server/database/entities/person.entity.ts";
import { Programme } from "#server/database/entities/programme.entity.ts";
import { ROOT } from "./root.ts";

export interface DemoSignIn {
  email: string;
  password: string;
  /** Their roles in words, for the terminal. */
  roles: string;
}

/** What `server/demo/seed.ts` has to offer. */
interface DemoModule {
  seedDemo(db: DataSource, config: Config): Promise<void>;
  /** Who of the demo can sign in with the password they were seeded with; none when this is no demo. */
  demoSignIns(db: DataSource): Promise<DemoSignIn[]>;
}

const isEmpty = async (db: DataSource): Promise<boolean> =>
  !(await db.manager.exists(Person)) && !(await db.manager.exists(Programme));

/** Seeds the practice programme into an empty database; answers who can sign in. */
export const seedWhenEmpty = async (db: DataSource, config: Config): Promise<DemoSignIn[]> => {
  const file = join(ROOT, "server/demo/seed.ts");
  if (!existsSync(file)) return [];
  // Loaded late: a second start has no need of the generator and all it brings.
  const demo = (await import(pathToFileURL(file).href)) as DemoModule;
  if (await isEmpty(db)) {
    process.stderr.write("Filling the empty database with the practice programme ...\n");
    await demo.seedDemo(db, config);
  }
  return demo.demoSignIns(db);
};
