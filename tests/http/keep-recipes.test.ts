import { expect, test } from "vitest";
import { KeepRecipes1796121800000 } from "#migrations/1796121800000-keep-recipes.ts";
import { MIGRATIONS } from "#migrations/index.ts";
import { contentHash } from "#server/recipes/content-hash.ts";
import { recipeSettings } from "#shared/api/recipes.ts";
import { testDataSource } from "#tests/support/database.ts";

const NOW = new Date("2031-03-04T09:15:00Z");
const HASH = "0".repeat(64);

/** A programme as it was kept before, with an edition by each recipe, a list, and a recompute that waits. */
const FORMER: readonly (readonly [string, readonly unknown[]])[] = [
  [
    "INSERT INTO programme (programme_id, name, recipe, edition, created_at, version) VALUES (7, 'Suns', 'practice', 2, ?, 1)",
    [NOW],
  ],
  [
    `INSERT INTO catalogue_edition (programme_id, \`number\`, reason, recipe, stars, fingerprint, made_at)
     VALUES (7, 1, 'extract 1', 'default', 3, ?, ?), (7, 2, 'recipe practice', 'practice', 3, ?, ?)`,
    [HASH, NOW, HASH, NOW],
  ],
  [
    `INSERT INTO target_list (programme_id, name, state, catalogue_edition, view_params, recipe, fingerprint, made_by, made_at, version)
     VALUES (7, 'First', 'draft', 1, '', 'default', ?, 1, ?, 1)`,
    [HASH, NOW],
  ],
  [
    `INSERT INTO job (programme_id, kind, state, payload, run_at, created_at, changed_at)
     VALUES (7, 'recompute', 'queued', '{"recipe":"default"}', ?, ?, ?)`,
    [NOW, NOW, NOW],
  ],
];

test("programmes of before get their recipes, and everything names the version that it was made with", async () => {
  const db = await testDataSource();
  const later = MIGRATIONS.slice(MIGRATIONS.indexOf(KeepRecipes1796121800000));
  for (const _ of later) await db.undoLastMigration();
  for (const [sql, values] of FORMER) await db.query(sql, [...values]);
  await db.runMigrations();

  const recipes = await db.query("SELECT * FROM recipe WHERE programme_id = 7 ORDER BY name");
  expect(recipes).toMatchObject([
    { name: "Default", number: 1, saved_by: "0" },
    { name: "Practice", number: 1, saved_by: "0" },
  ]);
  for (const { recipe_id, recipe_version_id, settings, content_hash } of recipes) {
    expect(recipe_id).toBe(recipe_version_id);
    const content = typeof settings === "string" ? JSON.parse(settings) : settings;
    expect(recipeSettings.parse(content)).toEqual(content);
    expect(content_hash).toBe(contentHash(content));
  }

  const [byDefault, byPractice] = recipes.map((row: { recipe_version_id: string }) => row.recipe_version_id);
  const versions = async (table: string, order: string): Promise<string[]> =>
    (
      await db.query(`SELECT recipe_version_id AS id FROM ${table} WHERE programme_id = 7 ORDER BY ${order}`)
    ).map((row: { id: string }) => row.id);
  expect(await versions("programme", "1")).toEqual([byPractice]);
  expect(await versions("catalogue_edition", "`number`")).toEqual([byDefault, byPractice]);
  expect(await versions("target_list", "1")).toEqual([byDefault]);
  const [job] = await db.query("SELECT JSON_VALUE(payload, '$.recipeVersionId') AS id FROM job");
  expect(job.id).toBe(byDefault);
});
