import { Readable } from "node:stream";
import { setTimeout as wait } from "node:timers/promises";
import type { PoolConnection, ResultSetHeader } from "mysql2";
import type { DataSource } from "typeorm";

/**
 * Many rows at once, for the wide tables. `LOAD DATA LOCAL INFILE` fed from memory is nearly twice as quick as
 * batched INSERT; a server that forbids it gets the INSERTs.
 */
export type Value = number | string | null;

const PIECE_BYTES = 64 * 1024;
const INSERT_ROWS = 1_000;
const ATTEMPTS = 4;
const NOT_ALLOWED = new Set([1148, 3948, 4166]);
const TRY_AGAIN = new Set([1205, 1213]);

const SPECIAL = /[\\\t\n\r\0]/;
const escapeText = (text: string): string =>
  SPECIAL.test(text)
    ? text
        .replaceAll("\\", "\\\\")
        .replaceAll("\t", "\\t")
        .replaceAll("\n", "\\n")
        .replaceAll("\r", "\\r")
        .replaceAll("\0", "\\0")
    : text;

/** A value as a cell of the stream; doubles in the shortest form that reads back as the same bits. */
export const encodeValue = (value: Value): string => {
  if (value === null) return "\\N";
  if (typeof value === "string") return escapeText(value);
  return Number.isFinite(value) ? String(value) : "\\N";
};

/** A row as a line of the stream, without the line's end. */
export const encodeRow = (row: readonly Value[]): string => {
  let text = encodeValue(row[0] ?? null);
  for (let i = 1; i < row.length; i++) text += `\t${encodeValue(row[i] ?? null)}`;
  return text;
};

const ESCAPES: Record<string, string> = { t: "\t", n: "\n", r: "\r", "0": "\0" };

/** Back from a line to its values, all as texts: the database makes the same numbers of them. */
const decodeRow = (line: string): (string | null)[] =>
  line
    .split("\t")
    .map((cell) =>
      cell === "\\N"
        ? null
        : cell.replace(/\\(.)/g, (_match, escaped: string) => ESCAPES[escaped] ?? escaped),
    );

function* pieces(lines: readonly string[]): Generator<Buffer> {
  let text = "";
  for (const line of lines) {
    text += `${line}\n`;
    if (text.length < PIECE_BYTES) continue;
    yield Buffer.from(text);
    text = "";
  }
  if (text !== "") yield Buffer.from(text);
}

const list = (columns: readonly string[]): string => columns.map((c) => `\`${c}\``).join(", ");

/** Warnings are what LOCAL makes of errors: a row that was skipped or bent must not pass. */
const load = (
  connection: PoolConnection,
  table: string,
  columns: readonly string[],
  lines: readonly string[],
): Promise<void> =>
  new Promise((resolve, reject) => {
    const sql = `LOAD DATA LOCAL INFILE 'rows' INTO TABLE \`${table}\` CHARACTER SET utf8mb4
      FIELDS TERMINATED BY '\\t' ESCAPED BY '\\\\' LINES TERMINATED BY '\\n' (${list(columns)})`;
    const infileStreamFactory = () => Readable.from(pieces(lines), { objectMode: false });
    connection.query<ResultSetHeader>({ sql, infileStreamFactory }, (error, result) => {
      if (error) return reject(error);
      if (result.affectedRows === lines.length && result.warningStatus === 0) return resolve();
      connection.query("SHOW WARNINGS LIMIT 3", (_error, warnings) =>
        reject(
          new Error(
            `${lines.length} rows were sent to ${table} and ${result.affectedRows} arrived: ${JSON.stringify(warnings)}`,
          ),
        ),
      );
    });
  });

const insert = async (
  db: DataSource,
  table: string,
  columns: readonly string[],
  lines: readonly string[],
): Promise<void> => {
  for (let from = 0; from < lines.length; from += INSERT_ROWS) {
    const values = lines.slice(from, from + INSERT_ROWS).map(decodeRow);
    await db.query(`INSERT INTO \`${table}\` (${list(columns)}) VALUES ?`, [values]);
  }
};

const errnoOf = (error: unknown): number => Number((error as { errno?: unknown }).errno);

/** Writes encoded rows in one statement of its own, or all of them again where the database asks to. */
export const bulkInsertLines = async (
  db: DataSource,
  table: string,
  columns: readonly string[],
  lines: readonly string[],
): Promise<void> => {
  if (lines.length === 0) return;
  const runner = db.createQueryRunner();
  try {
    const connection = (await runner.connect()) as PoolConnection;
    for (let attempt = 1; ; attempt++) {
      try {
        return await load(connection, table, columns, lines);
      } catch (error) {
        if (NOT_ALLOWED.has(errnoOf(error))) break;
        if (!TRY_AGAIN.has(errnoOf(error)) || attempt >= ATTEMPTS) throw error;
        await wait(attempt * 50);
      }
    }
  } finally {
    await runner.release();
  }
  await insert(db, table, columns, lines);
};

/** The same for rows that are values still. */
export const bulkInsert = (
  db: DataSource,
  table: string,
  columns: readonly string[],
  rows: readonly Value[][],
): Promise<void> => bulkInsertLines(db, table, columns, rows.map(encodeRow));
