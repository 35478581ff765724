import { createHash } from "node:crypto";
import type { MigrationInterface, QueryRunner } from "typeorm";

/** The settings as they were when recipes came to be kept. Keys stand in order at every depth, as the hash wants them. */
const DEFAULT_SETTINGS = {
  assumed: { feh: 0, fehError: 0.2, logg: 4.5, loggError: 0.3 },
  astrometricQuality: { byRelease: [], limit: 1.4 },
  coolColours: ["bp-rp", "v-j"],
  distance: {
    fractionLimit: 0.1,
    order: ["given-distance", "inversion"],
    priorLengthPc: 1350,
    zeroPointMas: 0,
  },
  duration: "averaged",
  eccentricity: { prior: "circular" },
  extinction: { rule: "off" },
  habitableZone: { inner: "runaway-greenhouse", outer: "maximum-greenhouse" },
  luminosity: ["correction-ks", "correction-g", "radius-and-temperature"],
  mass: ["abs-ks", "spectrum"],
  radius: ["abs-ks", "light-and-temperature"],
  ranges: { brightestAbsKs: 4.6, coolestSunlikeK: 4000, faintestAbsKs: 9.8, hottestCoolDwarfK: 4200 },
  statistic: "campaign",
  sunlikeColours: ["bp-rp", "g-ks", "g-j"],
  teff: ["given", "sunlike-colour", "cool-colour"],
  usesFeh: true,
};

const PRACTICE_SETTINGS = {
  ...DEFAULT_SETTINGS,
  distance: { ...DEFAULT_SETTINGS.distance, order: ["inversion"] },
  duration: "central",
  luminosity: ["radius-and-temperature"],
  mass: ["abs-ks"],
  radius: ["abs-ks"],
  teff: ["given"],
  usesFeh: false,
};

const RECIPES = [
  {
    key: "default",
    name: "Default",
    note: "Published relations in their order of trust, inside their published ranges.",
    settings: JSON.stringify(DEFAULT_SETTINGS),
  },
  {
    key: "practice",
    name: "Practice",
    note: "One relation for each quantity and central transits, as the practice stars are worked out by hand.",
    settings: JSON.stringify(PRACTICE_SETTINGS),
  },
] as const;

/** Tables that name the recipe of what they hold; a programme is made before its recipes are. */
const NAMING = [
  { table: "programme", kept: " DEFAULT 0" },
  { table: "catalogue_edition", kept: "" },
  { table: "target_list", kept: "" },
] as const;

const giveRecipes = async (runner: QueryRunner): Promise<void> => {
  for (const { name, note, settings } of RECIPES)
    await runner.query(
      `INSERT INTO recipe (programme_id, \`number\`, name, note, settings, content_hash, saved_by, saved_at)
       SELECT p.programme_id, 1, ?, ?, ?, ?, 0, p.created_at FROM programme p
       WHERE NOT EXISTS (SELECT 1 FROM recipe r WHERE r.programme_id = p.programme_id AND r.name = ?)`,
      [name, note, settings, createHash("sha256").update(settings).digest("hex"), name],
    );
  await runner.query("UPDATE recipe SET recipe_id = recipe_version_id WHERE recipe_id IS NULL");
};

const nameVersion = async (runner: QueryRunner, table: string, kept: string): Promise<void> => {
  await runner.query(
    `ALTER TABLE \`${table}\` ADD COLUMN IF NOT EXISTS recipe_version_id bigint unsigned NOT NULL DEFAULT 0`,
  );
  if (await runner.hasColumn(table, "recipe")) {
    for (const { key, name } of RECIPES)
      await runner.query(
        `UPDATE \`${table}\` t JOIN recipe r ON r.programme_id = t.programme_id AND r.name = ? AND r.\`number\` = 1
         SET t.recipe_version_id = r.recipe_version_id WHERE t.recipe = ?`,
        [name, key],
      );
    await runner.query(`ALTER TABLE \`${table}\` DROP COLUMN recipe`);
  }
  await runner.query(`ALTER TABLE \`${table}\` MODIFY recipe_version_id bigint unsigned NOT NULL${kept}`);
};

/** A recompute that waits goes on by the version that it was asked for by its key. */
const nameVersionInJobs = async (runner: QueryRunner): Promise<void> => {
  for (const { key, name } of RECIPES)
    await runner.query(
      `UPDATE job j JOIN recipe r ON r.programme_id = j.programme_id AND r.name = ? AND r.\`number\` = 1
       SET j.payload = JSON_OBJECT('recipeVersionId', CAST(r.recipe_version_id AS CHAR))
       WHERE j.kind = 'recompute' AND JSON_VALUE(j.payload, '$.recipe') = ?`,
      [name, key],
    );
};

/**
 * Recipes become rows that people save in versions. Each step on its own and only if missing, as MariaDB commits at every
 * definition.
 */
export class KeepRecipes1796121800000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE IF NOT EXISTS recipe (
        recipe_version_id bigint unsigned NOT NULL AUTO_INCREMENT,
        recipe_id bigint unsigned NULL,
        programme_id bigint unsigned NOT NULL,
        \`number\` int unsigned NOT NULL,
        name varchar(120) NOT NULL,
        note varchar(2000) NOT NULL DEFAULT '',
        settings json NOT NULL,
        content_hash char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
        saved_by bigint unsigned NOT NULL,
        saved_at datetime(6) NOT NULL,
        INDEX recipe_programme (programme_id),
        UNIQUE INDEX recipe_version (recipe_id, \`number\`),
        PRIMARY KEY (recipe_version_id)
      ) ENGINE=InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
    await giveRecipes(runner);
    for (const { table, kept } of NAMING) await nameVersion(runner, table, kept);
    await nameVersionInJobs(runner);
  }

  /** What was derived by any recipe but the practice one counts as derived by the default. */
  async down(runner: QueryRunner): Promise<void> {
    for (const { table } of NAMING) {
      await runner.query(
        `ALTER TABLE \`${table}\` ADD COLUMN IF NOT EXISTS recipe varchar(20) NOT NULL DEFAULT 'default'`,
      );
      if (await runner.hasColumn(table, "recipe_version_id")) {
        await runner.query(
          `UPDATE \`${table}\` t JOIN recipe r ON r.recipe_version_id = t.recipe_version_id
           SET t.recipe = 'practice' WHERE r.name = 'Practice'`,
        );
        await runner.query(`ALTER TABLE \`${table}\` DROP COLUMN recipe_version_id`);
      }
      if (table !== "programme")
        await runner.query(`ALTER TABLE \`${table}\` MODIFY recipe varchar(20) NOT NULL`);
    }
    await runner.query("DROP TABLE IF EXISTS recipe");
  }
}
