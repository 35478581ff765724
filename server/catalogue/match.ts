import type { JobRun } from "../jobs/job-run.ts";
import { normalisedSql } from "./designation.ts";

/** Rows that one statement changes: small enough for a cluster to certify. */
const RANGE = 20_000;

const LOW_DIGITS = 15;
const LOW_SIZE = 10 ** LOW_DIGITS;

/**
 * Star ids need no sequence: the entry that founds a star gives it its number, which is that of its extract times 2³² plus
 * that of its row. The digits are added up in two parts, as whole numbers of 64 bits would be slow for every row of a file.
 */
export class FoundedIds {
  private readonly high: number;
  private readonly low: number;

  constructor(extractId: string) {
    const base = BigInt(extractId) << 32n;
    this.high = Number(base / BigInt(LOW_SIZE));
    this.low = Number(base % BigInt(LOW_SIZE));
  }

  of(row: number): string {
    const sum = this.low + row;
    const isOver = sum >= LOW_SIZE;
    const high = isOver ? this.high + 1 : this.high;
    const low = String(isOver ? sum - LOW_SIZE : sum);
    return high === 0 ? low : `${high}${low.padStart(LOW_DIGITS, "0")}`;
  }
}

const OTHERS = `JOIN extract x ON x.extract_id = o.extract_id AND x.state = 'committed'`;

const BY_IDENTIFIER = `
  UPDATE entry e
  JOIN (
    SELECT n.\`row_number\` AS row_no, MIN(o.star_id) AS star_id
    FROM entry n
    JOIN entry o ON o.programme_id = n.programme_id AND o.source_id = n.source_id
      AND BINARY o.source_id = BINARY n.source_id AND COALESCE(o.\`release\`, '') = COALESCE(n.\`release\`, '')
    ${OTHERS}
    WHERE n.extract_id = ? AND n.\`row_number\` > ? AND n.\`row_number\` <= ? AND n.source_id IS NOT NULL
      AND o.extract_id <> n.extract_id
    GROUP BY n.\`row_number\`
  ) found ON found.row_no = e.\`row_number\`
  SET e.star_id = found.star_id WHERE e.extract_id = ?`;

const BY_DESIGNATION = `
  UPDATE entry e JOIN name_key k ON k.name = ${normalisedSql("e.designation")}
  SET e.star_id = k.star_id
  WHERE e.extract_id = ? AND e.\`row_number\` > ? AND e.\`row_number\` <= ?
    AND e.source_id IS NULL AND e.designation IS NOT NULL`;

/** Names of the stars there are, in one spelling; for one connection, and gone with it. */
const NAME_KEYS = [
  "DROP TEMPORARY TABLE IF EXISTS name_key",
  `CREATE TEMPORARY TABLE name_key (name varchar(120) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin PRIMARY KEY,
     star_id bigint unsigned NOT NULL) ENGINE=InnoDB`,
];

const FILL_NAME_KEYS = `
  INSERT INTO name_key
  SELECT ${normalisedSql("o.designation")} AS name, MIN(o.star_id) FROM entry o ${OTHERS}
  WHERE o.programme_id = ? AND o.designation IS NOT NULL GROUP BY name`;

/** Two rows of one extract are never taken for one star: the later ones found their own, as `FoundedIds` says. */
const PART_TWINS = `
  UPDATE entry e
  JOIN (SELECT star_id, MIN(\`row_number\`) AS first FROM entry
        WHERE extract_id = ? GROUP BY star_id HAVING COUNT(*) > 1) twin
    ON twin.star_id = e.star_id AND twin.first <> e.\`row_number\`
  SET e.star_id = (e.extract_id << 32) + e.\`row_number\` WHERE e.extract_id = ?`;

/**
 * Finds the entries of an extract, each of which has founded a star of its own so far, that speak of a star there is:
 * the one with the same identifier in the same release; for entries without an identifier the one of the same name.
 * Only committed extracts are matched against.
 */
export const matchEntries = async (run: JobRun, extractId: string): Promise<void> => {
  const { programmeId } = run.job;
  const runner = run.deps.db.createQueryRunner();
  const overRanges = async (sql: string, last: number, more: unknown[], step: number): Promise<void> => {
    for (let from = 0; from < last; from += RANGE) {
      await runner.query(sql, [extractId, from, from + RANGE, ...more]);
      await run.progress((step * last + Math.min(from + RANGE, last)) / 2, last, "Matching", "rows");
    }
  };
  try {
    await run.progress(0, null, "Matching", "rows");
    const [others]: { n: string }[] = await runner.query(
      "SELECT COUNT(*) AS n FROM extract WHERE programme_id = ? AND state = 'committed'",
      [programmeId],
    );
    if (Number(others?.n) === 0) return;
    const [row]: { last: number | null; unnamed: string }[] = await runner.query(
      "SELECT MAX(`row_number`) AS last, COUNT(IF(source_id IS NULL, 1, NULL)) AS unnamed FROM entry WHERE extract_id = ?",
      [extractId],
    );
    const last = row?.last ?? 0;
    await overRanges(BY_IDENTIFIER, last, [extractId], 0);
    if (Number(row?.unnamed) > 0) {
      for (const sql of NAME_KEYS) await runner.query(sql);
      await runner.query(FILL_NAME_KEYS, [programmeId]);
      await overRanges(BY_DESIGNATION, last, [], 1);
    }
    await runner.query(PART_TWINS, [extractId, extractId]);
  } finally {
    if (!runner.isReleased) {
      await runner.query("DROP TEMPORARY TABLE IF EXISTS name_key").catch(() => undefined);
      await runner.release();
    }
  }
};
