import type { MigrationInterface, QueryRunner } from "typeorm";

export class CountAttempts1796121600000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      CREATE TABLE IF NOT EXISTS attempt_count (
        key_hash char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
        hits int unsigned NOT NULL,
        resets_at datetime(6) NOT NULL,
        INDEX attempt_count_resets (resets_at),
        PRIMARY KEY (key_hash)
      ) ENGINE=InnoDB DEFAULT CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query("DROP TABLE IF EXISTS attempt_count");
  }
}
