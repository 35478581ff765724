import type { MigrationInterface, QueryRunner } from "typeorm";

const GIVEN = ["ebv", "ebv_err", "distance_given", "distance_given_err"];

const add = (names: readonly string[], type: string): string =>
  names.map((name) => `ADD COLUMN IF NOT EXISTS ${name} ${type}`).join(", ");
const drop = (names: readonly string[]): string =>
  names.map((name) => `DROP COLUMN IF EXISTS ${name}`).join(", ");

/**
 * Colour excess and distance as extracts give them, which relation gave a star its distance, and the error by which the
 * smallest planet scales.
 */
export class TakeInDustAndDistance1796121900000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE entry ${add(GIVEN, "double NULL")}`);
    await queryRunner.query(
      `ALTER TABLE star ${add([...GIVEN, "reach_err"], "double NULL")},
         ADD COLUMN IF NOT EXISTS distance_method tinyint unsigned NOT NULL DEFAULT '0'`,
    );
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE entry ${drop(GIVEN)}`);
    await queryRunner.query(`ALTER TABLE star ${drop([...GIVEN, "reach_err", "distance_method"])}`);
  }
}
