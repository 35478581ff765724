import { Readable } from "node:stream";
import { setTimeout as wait } from "node:timers/promises";
import type { PoolConnection, ResultSetHeader } from "mysql2";
import type { DataSource } from "typeorm";
import type { LineBuffer } from "./line-buffer.ts";

/**
 * Many rows at once, for the wide tables. `LOAD DATA LOCAL INFILE` fed from memory is nearly twice as quick as
 * batched INSERT; a server that forbids it gets the INSERTs.
 */
export type Value = number | string | null;

const PIECE_BYTES = 64 * 1024;
/** Of bytes that are there already; a packet of the protocol holds up to 16 MiB. */
const SLICE_BYTES = 1024 * 1024;
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
const encodeValue = (value: Value): string => {
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

/** Rows on their way: encoded lines, each without its end, or the bytes of all of them. */
interface Encoded {
  readonly rows: number;
  pieces(): Iterable<Buffer>;
  lines(): readonly string[];
}

function* piecesOf(lines: readonly string[]): Generator<Buffer> {
  let text = "";
  for (const line of lines) {
    text += `${line}\n`;
    if (text.length < PIECE_BYTES) continue;
    yield Buffer.from(text);
    text = "";
  }
  if (text !== "") yield Buffer.from(text);
}

function* slicesOf(bytes: Buffer): Generator<Buffer> {
  for (let at = 0; at < bytes.length; at += SLICE_BYTES) yield bytes.subarray(at, at + SLICE_BYTES);
}

const ofLines = (lines: readonly string[]): Encoded => ({
  rows: lines.length,
  pieces: () => piecesOf(lines),
  lines: () => lines,
});

const ofBuffer = (buffer: LineBuffer): Encoded => ({
  rows: buffer.rows,
  pieces: () => slicesOf(buffer.view()),
  lines: () => buffer.view().toString("utf8").split("\n").slice(0, -1),
});

const list = (columns: readonly string[]): string => columns.map((c) => `\`${c}\``).join(", ");

/** Warnings are what LOCAL makes of errors: a row that was skipped or bent must not pass. */
const load = (
  connection: PoolConnection,
  table: string,
  columns: readonly string[],
  encoded: Encoded,
): Promise<void> =>
  new Promise((resolve, reject) => {
    const sql = `LOAD DATA LOCAL INFILE 'rows' INTO TABLE \`${table}\` CHARACTER SET utf8mb4
      FIELDS TERMINATED BY '\\t' ESCAPED BY '\\\\' LINES TERMINATED BY '\\n' (${list(columns)})`;
    const infileStreamFactory = () => Readable.from(encoded.pieces(), { objectMode: false });
    connection.query<ResultSetHeader>({ sql, infileStreamFactory }, (error, result) => {
      if (error) return reject(error);
      if (result.affectedRows === encoded.rows && result.warningStatus === 0) return resolve();
      connection.query("SHOW WARNINGS LIMIT 3", (_error, warnings) =>
        reject(
          new Error(
            `${encoded.rows} rows were sent to ${table} and ${result.affectedRows} arrived: ${JSON.stringify(warnings)}`,
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
const write = async (
  db: DataSource,
  table: string,
  columns: readonly string[],
  encoded: Encoded,
): Promise<void> => {
  if (encoded.rows === 0) return;
  const runner = db.createQueryRunner();
  try {
    const connection = (await runner.connect()) as PoolConnection;
    for (let attempt = 1; ; attempt++) {
      try {
        return await load(connection, table, columns, encoded);
      } catch (error) {
        if (NOT_ALLOWED.has(errnoOf(error))) break;
        if (!TRY_AGAIN.has(errnoOf(error)) || attempt >= ATTEMPTS) throw error;
        await wait(attempt * 50);
      }
    }
  } finally {
    await runner.release();
  }
  await insert(db, table, columns, encoded.lines());
};

/** Writes rows that are bytes already. The buffer may be filled again once this is done. */
export const bulkInsertBuffer = (
  db: DataSource,
  table: string,
  columns: readonly string[],
  buffer: LineBuffer,
): Promise<void> => write(db, table, columns, ofBuffer(buffer));

/** The same for rows that are values still. */
export const bulkInsert = (
  db: DataSource,
  table: string,
  columns: readonly string[],
  rows: readonly Value[][],
): Promise<void> => write(db, table, columns, ofLines(rows.map(encodeRow)));
