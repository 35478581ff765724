import { openFits } from "#server/formats/fits/open-fits.ts";
import type { TableFinding, TableReader } from "#server/formats/table.ts";

/** A small writer of FITS files, bytes and headers as the caller says, right or wrong. */

const BLOCK = 2880;

export type HeaderValue = string | number | bigint | boolean;

/** A value as a header writes it; a text that begins with a quote is taken as it is. */
const spelled = (value: HeaderValue): string => {
  if (typeof value === "boolean") return (value ? "T" : "F").padStart(20);
  if (typeof value !== "string") return String(value).padStart(20);
  return value.startsWith("'") ? value : `'${value.replaceAll("'", "''").padEnd(8)}'`;
};

export const card = (keyword: string, value: HeaderValue, comment = ""): string => {
  const text = `${keyword.padEnd(8)}= ${spelled(value)}`;
  return (comment ? `${text} / ${comment}` : text).padEnd(80).slice(0, 80);
};

export const padded = (bytes: Buffer, filler = 0): Buffer =>
  Buffer.concat([bytes, Buffer.alloc((BLOCK - (bytes.length % BLOCK)) % BLOCK, filler)]);

export const header = (cards: readonly string[], end = "END"): Buffer =>
  padded(Buffer.from([...cards, end].map((record) => record.padEnd(80)).join(""), "latin1"), 32);

/** The header of a file that begins with no data. */
export const primary = (cards: readonly string[] = []): Buffer =>
  header([card("SIMPLE", true), card("BITPIX", 8), card("NAXIS", 0), card("EXTEND", true), ...cards]);

export interface WrittenColumn {
  name?: string;
  form: string;
  /** Further keywords without the column's number, e.g. TNULL. */
  keywords?: Record<string, HeaderValue>;
}

export interface WrittenTable {
  columns: readonly WrittenColumn[];
  /** Each the bytes of a row. */
  rows: readonly Buffer[];
  kind?: "BINTABLE" | "TABLE";
  cards?: readonly string[];
  heap?: Buffer;
  /** Instead of what the rows and columns say. */
  counts?: Partial<
    Record<"BITPIX" | "NAXIS" | "NAXIS1" | "NAXIS2" | "PCOUNT" | "GCOUNT" | "TFIELDS", HeaderValue>
  >;
}

const columnCards = ({ name, form, keywords = {} }: WrittenColumn, place: number): string[] => [
  ...(name === undefined ? [] : [card(`TTYPE${place}`, name)]),
  card(`TFORM${place}`, form),
  ...Object.entries(keywords).map(([keyword, value]) => card(`${keyword}${place}`, value)),
];

/** A table with its header, filled to whole blocks. */
export const extension = (table: WrittenTable): Buffer => {
  const { columns, rows, kind = "BINTABLE", cards = [], heap = Buffer.alloc(0) } = table;
  const counts = {
    BITPIX: 8,
    NAXIS: 2,
    NAXIS1: rows[0]?.length ?? 0,
    NAXIS2: rows.length,
    PCOUNT: heap.length,
    GCOUNT: 1,
    TFIELDS: columns.length,
    ...table.counts,
  };
  return Buffer.concat([
    header([
      card("XTENSION", kind),
      ...Object.entries(counts).map(([keyword, value]) => card(keyword, value)),
      ...columns.flatMap((column, index) => columnCards(column, index + 1)),
      ...cards,
    ]),
    padded(Buffer.concat([...rows, heap]), kind === "TABLE" ? 32 : 0),
  ]);
};

export const image = (bytes: number): Buffer =>
  Buffer.concat([
    header([
      card("XTENSION", "IMAGE"),
      card("BITPIX", 8),
      card("NAXIS", 1),
      card("NAXIS1", bytes),
      card("PCOUNT", 0),
      card("GCOUNT", 1),
    ]),
    padded(Buffer.alloc(bytes, 255)),
  ]);

export const fitsFile = (...tables: readonly WrittenTable[]): Buffer =>
  Buffer.concat([primary(), ...tables.map(extension)]);

/** A file of one binary table from columns of cells, each the bytes that it takes in its row. */
export const binaryFile = (
  columns: readonly (WrittenColumn & { cells: readonly Buffer[] })[],
  more: Partial<WrittenTable> = {},
): Buffer => {
  const count = columns[0]?.cells.length ?? 0;
  const rows = Array.from({ length: count }, (_, row) =>
    Buffer.concat(columns.map((column) => column.cells[row] ?? Buffer.alloc(0))),
  );
  return fitsFile({ columns, rows, ...more });
};

/** A file of one ASCII table; rows are written as they are. */
export const asciiFile = (
  columns: readonly (WrittenColumn & { from: number })[],
  rows: readonly string[],
  more: Partial<WrittenTable> = {},
): Buffer =>
  fitsFile({
    kind: "TABLE",
    columns: columns.map(({ from, ...column }) => ({
      ...column,
      keywords: { TBCOL: from, ...column.keywords },
    })),
    rows: rows.map((row) => Buffer.from(row, "latin1")),
    ...more,
  });

/** Bytes as a file stream brings them. */
export async function* pieces(bytes: Uint8Array, size = 65_536): AsyncGenerator<Uint8Array> {
  for (let from = 0; from < bytes.length; from += size) yield bytes.subarray(from, from + size);
}

type Cell = number | string;

export interface ReadTable {
  reader: TableReader;
  names: string[];
  types: string[];
  /** By column. */
  cells: Cell[][];
  rows: number;
  refused: { row: number; text: string; why: string }[];
  findings: readonly TableFinding[];
}

/** Reads a file to its end. */
export const readFits = async (bytes: Uint8Array, size?: number): Promise<ReadTable> => {
  const reader = await openFits(pieces(bytes, size));
  const cells: Cell[][] = reader.header.columns.map(() => []);
  const refused: ReadTable["refused"] = [];
  let rows = 0;
  for await (const batch of reader.batches) {
    rows += batch.rows;
    for (const [index, values] of batch.columns.entries())
      for (const value of values) cells[index]?.push(value);
    refused.push(...batch.refused.map(({ row, text, why }) => ({ row, text, why })));
  }
  return {
    reader,
    names: reader.header.columns.map((column) => column.name),
    types: reader.header.columns.map((column) => column.type),
    cells,
    rows,
    refused,
    findings: reader.findings(),
  };
};

export const keysOf = (findings: readonly TableFinding[]): string[] => findings.map((finding) => finding.key);

const written = (size: number, write: (bytes: Buffer) => void): Buffer => {
  const bytes = Buffer.alloc(size);
  write(bytes);
  return bytes;
};

/** Cells of a binary table. */
export const bytesOf = {
  uint8: (value: number) => written(1, (bytes) => bytes.writeUInt8(value)),
  int16: (value: number) => written(2, (bytes) => bytes.writeInt16BE(value)),
  int32: (value: number) => written(4, (bytes) => bytes.writeInt32BE(value)),
  int64: (value: bigint) => written(8, (bytes) => bytes.writeBigInt64BE(value)),
  float32: (value: number) => written(4, (bytes) => bytes.writeFloatBE(value)),
  float64: (value: number) => written(8, (bytes) => bytes.writeDoubleBE(value)),
  text: (value: string, width: number, filler = 0) =>
    written(width, (bytes) => {
      bytes.fill(filler);
      bytes.write(value, "utf8");
    }),
  hex: (value: string) => Buffer.from(value, "hex"),
};
