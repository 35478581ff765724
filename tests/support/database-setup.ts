import type { TestProject } from "vitest/node";
import { startThrowawayDatabase } from "#scripts/lib/throwaway-database.ts";

declare module "vitest" {
  interface ProvidedContext {
    /** Address of the MariaDB for tests, with `{database}` where the name goes. */
    databaseUrl: string;
  }
}

interface Shared {
  url: Promise<string>;
  users: number;
  stop?: () => Promise<void>;
}

/** Each project loads this file anew; the process is what they have in common. */
const KEY = Symbol.for("shortlight.test-database");
const place = globalThis as unknown as Record<symbol, Shared | undefined>;

/** `npm test` brings one; a single test run by hand starts its own. */
const begin = (): Shared => {
  const given = process.env.SHORTLIGHT_TEST_DATABASE_URL;
  if (given) return { url: Promise.resolve(given), users: 0 };
  const shared: Shared = { url: Promise.resolve(""), users: 0 };
  shared.url = startThrowawayDatabase().then((database) => {
    shared.stop = database.stop;
    return database.url("{database}");
  });
  return shared;
};

export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  place[KEY] ??= begin();
  const shared = place[KEY];
  shared.users++;
  project.provide("databaseUrl", await shared.url);
  return async () => {
    if (--shared.users > 0) return;
    place[KEY] = undefined;
    await shared.stop?.();
  };
}
