import type { DataSource } from "typeorm";
import type { Config } from "#server/config.ts";
import { demoSignIns, needsSeed, seedDemo } from "#server/demo/seed.ts";

export type DemoSignIn = Awaited<ReturnType<typeof demoSignIns>>[number];

/** Seeds the practice programme into an empty database; answers who can sign in. */
export const seedWhenEmpty = async (db: DataSource, config: Config): Promise<DemoSignIn[]> => {
  if (await needsSeed(db)) {
    process.stderr.write("Filling the empty database with the practice programme ...\n");
    await seedDemo(db, config);
  }
  return demoSignIns(db);
};
