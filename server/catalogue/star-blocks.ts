import type { DataSource } from "typeorm";

/** Bounds the memory of the worker and the size of one transaction. */
const BLOCK = 5_000;

/** The stars that an extract speaks of, block by block. */
export async function* starsOfExtract(db: DataSource, extractId: string): AsyncGenerator<string[]> {
  for (let after = 0; ; ) {
    const rows = await db.query<{ row: number; id: string }[]>(
      `SELECT \`row_number\` AS row, star_id AS id FROM entry
       WHERE extract_id = ? AND \`row_number\` > ? ORDER BY \`row_number\` LIMIT ${BLOCK}`,
      [extractId, after],
    );
    const last = rows.at(-1);
    if (!last) return;
    yield rows.map((r) => r.id);
    after = last.row;
  }
}

/** Every star of the edition in force, block by block. */
export async function* starsOfEdition(
  db: DataSource,
  programmeId: string,
  edition: number,
): AsyncGenerator<string[]> {
  for (let after = "0"; ; ) {
    const rows = await db.query<{ id: string }[]>(
      `SELECT star_id AS id FROM star WHERE programme_id = ? AND star_id > ? AND from_edition <= ?
         AND (to_edition IS NULL OR to_edition > ?) ORDER BY star_id LIMIT ${BLOCK}`,
      [programmeId, after, edition, edition],
    );
    const last = rows.at(-1);
    if (!last) return;
    yield rows.map((r) => r.id);
    after = last.id;
  }
}
