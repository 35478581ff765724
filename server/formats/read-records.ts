import type { Readable } from "node:stream";
import { AppError } from "../errors.ts";
import { type CsvRecord, CsvSplitter } from "./csv-splitter.ts";
import { type Encoding, textDecoder } from "./encoding.ts";

export interface Batch {
  records: CsvRecord[];
  /** Bytes of the file read up to the end of this batch. */
  bytes: number;
}

export interface Dialect {
  encoding: Encoding;
  delimiter: string;
}

/** The file ends before its last line does; nothing after that can be trusted to be whole. */
export const cutOff = (line: number, cells: number, expected: number): AppError =>
  new AppError(
    422,
    "file-cut-off",
    `The file ends in the middle of line ${line.toLocaleString("en")}: ${cells} of ${expected} values, and no end of line. It was probably cut off on its way.`,
    { hint: "Get the file again and bring it as a new extract." },
  );

/** Records of a stream, the header among them, in batches of as many as one piece of the file holds. */
export async function* readRecords(source: Readable, dialect: Dialect): AsyncGenerator<Batch> {
  const decoder = textDecoder(dialect.encoding);
  const splitter = new CsvSplitter(dialect.delimiter);
  let bytes = 0;
  let width = 0;
  for await (const piece of source as AsyncIterable<Buffer>) {
    bytes += piece.length;
    const records = splitter.push(decoder.decode(piece, { stream: true }));
    width ||= records[0]?.cells.length ?? 0;
    if (records.length > 0) yield { records, bytes };
  }
  const last = [...splitter.push(decoder.decode())];
  const { record, isQuoteOpen } = splitter.end();
  if (record) {
    const isShort = width > 0 && record.cells.length < width && record.text.trim() !== "";
    if (isQuoteOpen || isShort) throw cutOff(record.line, record.cells.length, width);
    last.push(record);
  }
  if (last.length > 0) yield { records: last, bytes };
}
