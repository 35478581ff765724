import { readdirSync } from "node:fs";
import { expect, test } from "vitest";
import { MIGRATIONS } from "#migrations/index.ts";
import { ENTITIES } from "#server/database/entities/index.ts";
import { testDataSource } from "#tests/support/database.ts";

test("entities and migrations describe the same schema", async () => {
  const db = await testDataSource();
  const pending = await db.driver.createSchemaBuilder().log();
  expect(pending.upQueries.map((query) => query.query)).toEqual([]);
});

test("migrations run up, down and up again", async () => {
  const db = await testDataSource();
  for (const _ of MIGRATIONS) await db.undoLastMigration();
  expect(await db.query("SHOW TABLES")).toHaveLength(1);
  const ran = await db.runMigrations();
  expect(ran).toHaveLength(MIGRATIONS.length);
});

test("every migration and entity file is in its index", () => {
  const files = (folder: string, ending: string) =>
    readdirSync(folder).filter((file) => file.endsWith(ending));
  expect(MIGRATIONS).toHaveLength(files("migrations", ".ts").length - 1);
  expect(ENTITIES).toHaveLength(files("server/database/entities", ".entity.ts").length);
});
