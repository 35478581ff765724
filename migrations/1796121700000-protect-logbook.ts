import type { MigrationInterface, QueryRunner } from "typeorm";

const FORBIDDEN = ["UPDATE", "DELETE"] as const;

/** With a binary log, or without the TRIGGER right, the server may refuse; the hash chain tells of changes all the same. */
const NOT_PERMITTED = [
  "ER_BINLOG_CREATE_ROUTINE_NEED_SUPER",
  "ER_TABLEACCESS_DENIED_ERROR",
  "ER_DBACCESS_DENIED_ERROR",
];

const codeOf = (error: unknown): string =>
  String((error as { driverError?: { code?: unknown } }).driverError?.code);

/** Lines of the logbook are never changed or removed. */
export class ProtectLogbook1796121700000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    for (const verb of FORBIDDEN) {
      try {
        await queryRunner.query(`
          CREATE OR REPLACE TRIGGER logbook_line_no_${verb.toLowerCase()} BEFORE ${verb} ON logbook_line
          FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'Lines of the logbook are never changed or removed.'`);
      } catch (error) {
        if (!NOT_PERMITTED.includes(codeOf(error))) throw error;
      }
    }
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    for (const verb of FORBIDDEN)
      await queryRunner.query(`DROP TRIGGER IF EXISTS logbook_line_no_${verb.toLowerCase()}`);
  }
}
