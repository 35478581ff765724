import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { cpus, tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { createConnection } from "mysql2/promise";
import { ROOT } from "#scripts/lib/root.ts";
import { startThrowawayDatabase, type ThrowawayDatabase } from "#scripts/lib/throwaway-database.ts";
import { loadConfig } from "#server/config.ts";
import { runMigrations } from "#server/database/migrate.ts";
import { closeDeps, createDeps, type Deps } from "#server/deps.ts";
import { createLog } from "#server/log.ts";
import { type Bench, describeMeasurement, ratioOf } from "./harness.ts";
import { type BenchOptions, readOptions } from "./options.ts";

const FOLDER = join(ROOT, "tests/bench");

const allBenches = async (): Promise<Bench[]> => {
  const files = readdirSync(FOLDER).filter((name) => name.endsWith(".bench.ts"));
  const loaded = files.sort().map((name) => import(pathToFileURL(join(FOLDER, name)).href));
  return (await Promise.all(loaded)).map((module) => (module as { default: Bench }).default);
};

const chosen = (benches: Bench[], only: string | undefined): Bench[] => {
  const found = benches.filter((bench) => only === undefined || bench.name === only);
  if (found.length > 0) return found;
  throw new Error(
    `There is no measurement named ${only}; there are ${benches.map((b) => b.name).join(", ")}.`,
  );
};

/** A database of its own for each bench, so that none profits from what another left warm or filled. */
const freshDeps = async (database: ThrowawayDatabase, name: string, folder: string): Promise<Deps> => {
  const schema = `bench_${name.replaceAll("-", "_")}`;
  const connection = await createConnection({ uri: database.url("mysql").replace(/^mariadb:/, "mysql:") });
  await connection.query(`CREATE DATABASE ${schema} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  await connection.end();
  const config = loadConfig({ DATABASE_URL: database.url(schema), SHORTLIGHT_VAR: folder });
  const deps = await createDeps(config, createLog("warn", "bench"));
  await runMigrations(deps.db);
  return deps;
};

const runAll = async (
  benches: Bench[],
  options: BenchOptions,
  database: ThrowawayDatabase,
): Promise<object[]> => {
  const results: object[] = [];
  for (const bench of benches) {
    const folder = mkdtempSync(join(tmpdir(), "shortlight-bench-"));
    const deps = await freshDeps(database, bench.name, folder);
    try {
      const rows = options.rows ?? bench.rows;
      for (const measurement of await bench.run({ rows, deps, folder })) {
        process.stdout.write(`${describeMeasurement(bench.name, measurement)}\n`);
        results.push({ name: bench.name, rows, ...measurement, ratio: ratioOf(measurement) });
      }
    } finally {
      await closeDeps(deps);
      rmSync(folder, { recursive: true, force: true });
    }
  }
  return results;
};

let database: ThrowawayDatabase | undefined;
for (const signal of ["SIGINT", "SIGTERM"] as const)
  process.once(signal, () => {
    void Promise.resolve(database?.stop()).finally(() => process.exit(130));
  });

const run = async (): Promise<void> => {
  const options = readOptions(process.argv.slice(2));
  const benches = chosen(await allBenches(), options.only);
  database = await startThrowawayDatabase();
  const measurements = await runAll(benches, options, database);
  if (options.out === undefined) return;
  const machine = { node: process.version, cores: cpus().length, at: new Date().toISOString() };
  writeFileSync(options.out, `${JSON.stringify({ machine, measurements }, null, 2)}\n`);
};

try {
  await run();
} catch (error) {
  process.exitCode = 1;
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
} finally {
  await database?.stop();
}
