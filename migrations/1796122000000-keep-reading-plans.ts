import type { MigrationInterface, QueryRunner } from "typeorm";

/** Reading plans get names and versions, so that a second file with the same header asks nothing. */
export class KeepReadingPlans1796122000000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE IF NOT EXISTS reading_plan (
        reading_plan_version_id bigint unsigned NOT NULL AUTO_INCREMENT,
        reading_plan_id bigint unsigned NULL,
        programme_id bigint unsigned NOT NULL,
        \`number\` int unsigned NOT NULL,
        name varchar(120) NOT NULL,
        plan json NOT NULL,
        header_hash char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
        profile json NOT NULL,
        saved_by bigint unsigned NOT NULL,
        saved_at datetime(6) NOT NULL,
        UNIQUE INDEX reading_plan_version (reading_plan_id, \`number\`),
        INDEX reading_plan_header (programme_id, header_hash),
        PRIMARY KEY (reading_plan_version_id)
      ) ENGINE=InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query("DROP TABLE IF EXISTS reading_plan");
  }
}
