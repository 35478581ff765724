import type { DataSource } from "typeorm";

const BATCH = 20_000;

interface Affected {
  affectedRows: number;
}

const deleteAll = async (db: DataSource, table: string, extractId: string): Promise<void> => {
  for (;;) {
    const { affectedRows } = await db.query<Affected>(
      `DELETE FROM \`${table}\` WHERE extract_id = ? LIMIT ${BATCH}`,
      [extractId],
    );
    if (affectedRows < BATCH) return;
  }
};

/** Removes what an import that was not committed left of its rows. */
export const removeEntries = async (db: DataSource, extractId: string): Promise<void> => {
  await deleteAll(db, "entry", extractId);
  await deleteAll(db, "refused_row", extractId);
};

/** Removes star rows of editions that never came into force, and opens again what they were to replace. */
export const removeInvisibleStars = async (
  db: DataSource,
  programmeId: string,
  edition: number,
): Promise<void> => {
  for (let last = "0"; ; ) {
    const rows = await db.query<{ id: string }[]>(
      `SELECT star_id AS id FROM star WHERE programme_id = ? AND star_id > ? AND from_edition > ?
       ORDER BY star_id LIMIT ${BATCH}`,
      [programmeId, last, edition],
    );
    const end = rows.at(-1)?.id;
    if (end === undefined) break;
    await db.query(
      "DELETE FROM star WHERE programme_id = ? AND star_id > ? AND star_id <= ? AND from_edition > ?",
      [programmeId, last, end, edition],
    );
    last = end;
  }
  for (;;) {
    const { affectedRows } = await db.query<Affected>(
      `UPDATE star SET to_edition = NULL WHERE programme_id = ? AND to_edition > ? LIMIT ${BATCH}`,
      [programmeId, edition],
    );
    if (affectedRows < BATCH) return;
  }
};
