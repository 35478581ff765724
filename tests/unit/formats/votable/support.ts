import { AppError } from "#server/errors.ts";
import type { RefusedRow, RowBatch, TableFinding, TableHeader } from "#server/formats/table.ts";
import { openVotable } from "#server/formats/votable/read-votable.ts";

export type Cell = number | string;

export interface WholeTable {
  header: TableHeader;
  rows: Cell[][];
  refused: RefusedRow[];
  findings: readonly TableFinding[];
}

/** Bytes in pieces of those sizes, over and over. */
export async function* inPieces(bytes: Uint8Array, sizes: readonly number[]): AsyncGenerator<Uint8Array> {
  let at = 0;
  for (let i = 0; at < bytes.length; i++) {
    const size = Math.max(1, sizes[i % sizes.length] ?? bytes.length);
    yield bytes.subarray(at, at + size);
    at += size;
  }
}

const rowsOf = (batch: RowBatch): Cell[][] =>
  Array.from({ length: batch.rows }, (_, row) => batch.columns.map((column) => column[row] ?? "missing"));

/** Everything that a reader gives of a document. */
export const readWhole = async (
  document: string | Uint8Array,
  sizes: readonly number[] = [1 << 20],
): Promise<WholeTable> => {
  const bytes = typeof document === "string" ? Buffer.from(document) : document;
  const reader = await openVotable(inPieces(bytes, sizes));
  const rows: Cell[][] = [];
  const refused: RefusedRow[] = [];
  for await (const batch of reader.batches) {
    for (const column of batch.columns)
      if (column.length !== batch.rows) throw new Error(`a column of ${column.length} in ${batch.rows} rows`);
    rows.push(...rowsOf(batch));
    refused.push(...batch.refused);
  }
  return { header: reader.header, rows, refused, findings: reader.findings() };
};

/** The refusal that a document meets with. */
export const refusalOf = async (document: string | Uint8Array): Promise<AppError> => {
  try {
    await readWhole(document);
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("The document was read.");
};

const HEAD = `<?xml version="1.0" encoding="UTF-8"?>
<VOTABLE version="1.4" xmlns="http://www.ivoa.net/xml/VOTable/v1.3">`;

/** A document of one table around its fields and its data. */
export const votable = (fields: string, data: string, attributes = ""): string =>
  `${HEAD}<RESOURCE type="results"><TABLE${attributes}>${fields}<DATA>${data}</DATA></TABLE></RESOURCE></VOTABLE>\n`;

/** One field with those cells. */
export const oneColumn = (field: string, cells: readonly string[]): string =>
  votable(field, `<TABLEDATA>${cells.map((cell) => `<TR><TD>${cell}</TD></TR>`).join("\n")}</TABLEDATA>`);

export const stream = (form: "BINARY" | "BINARY2", bytes: Uint8Array): string =>
  `<${form}><STREAM encoding="base64">${Buffer.from(bytes).toString("base64")}</STREAM></${form}>`;

/** Bytes spelled as hexadecimal digits with blanks between. */
export const hex = (text: string): Buffer => Buffer.from(text.replace(/\s/g, ""), "hex");

/** A small generator of even chance from a seed (mulberry32), the same on every machine. */
export const chance = (seed: number): (() => number) => {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
};
