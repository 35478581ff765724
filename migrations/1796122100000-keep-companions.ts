import type { MigrationInterface, QueryRunner } from "typeorm";

/** The file that describes the table of an extract, beside it. */
export class KeepCompanions1796122100000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query("ALTER TABLE extract ADD COLUMN IF NOT EXISTS companion json NULL");
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query("ALTER TABLE extract DROP COLUMN IF EXISTS companion");
  }
}
