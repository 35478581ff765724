import type { Connection } from "mysql2";
import type { QueryRunner } from "typeorm";
import type { Deps } from "../deps.ts";
import { STORED_KEYS } from "./index-columns.ts";
import type { ScanKey } from "./key.ts";

/** A star as read: id, designation, source id, release, flag bits, then the numbers in the order of STORED_KEYS. */
export type StarCells = [string, string | null, string | null, string | null, number, ...(number | null)[]];

const IN_EDITION = "programme_id = ? AND from_edition <= ? AND (to_edition IS NULL OR to_edition > ?)";
const editionValues = (key: ScanKey): unknown[] => [key.programmeId, key.edition, key.edition];

export const countStars = async (deps: Deps, key: ScanKey): Promise<number> => {
  const [row] = await deps.db.query<{ n: string }[]>(
    `SELECT COUNT(*) AS n FROM star WHERE ${IN_EDITION}`,
    editionValues(key),
  );
  return Number(row?.n);
};

const READ_AHEAD = 4_096;
/** A file system that is slow for a while must not end the query. */
const PATIENCE_SECONDS = 600;

/** Every star of the edition in the order of its id, streamed on a connection of its own. */
export const readStars = async function* (deps: Deps, key: ScanKey): AsyncGenerator<StarCells> {
  const runner: QueryRunner = deps.db.createQueryRunner();
  const raw: Connection = await runner.connect();
  let isDone = false;
  try {
    await runner.query(`SET SESSION net_write_timeout = ${PATIENCE_SECONDS}`);
    const names = ["designation", "source_id", "release", "flags_bits", ...STORED_KEYS];
    const columns = names.map((name) => `\`${name}\``).join(", ");
    const stream = raw
      .query({
        sql: `SELECT star_id, ${columns} FROM star WHERE ${IN_EDITION} ORDER BY star_id`,
        values: editionValues(key),
        rowsAsArray: true,
      })
      .stream({ highWaterMark: READ_AHEAD });
    for await (const row of stream) yield row as StarCells;
    isDone = true;
  } finally {
    // A stream that is left early would go on sending rows into a connection that others wait for.
    if (!isDone) raw.destroy();
    await runner.release();
  }
};
