import type { MigrationInterface, QueryRunner } from "typeorm";

/** What the columns of a committed extract hold. */
export class KeepColumnHealth1796122200000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query("ALTER TABLE extract ADD COLUMN IF NOT EXISTS health json NULL");
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query("ALTER TABLE extract DROP COLUMN IF EXISTS health");
  }
}
