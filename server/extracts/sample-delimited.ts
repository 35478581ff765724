import type { ReadingPlan } from "#shared/api/extracts.ts";
import { type CsvRecord, CsvSplitter } from "../formats/csv-splitter.ts";
import { uniqueNames } from "../formats/delimited/unique-names.ts";
import { detectDialect } from "../formats/dialect.ts";
import { detectEncoding, type Encoding, notATable, textDecoder } from "../formats/encoding.ts";
import type { FileStorage } from "../storage/storage.ts";
import type { DialectChoice } from "./open-extract.ts";
import { namedColumn, type Sample, sampleOf } from "./sample.ts";

/** Bytes looked at: the beginning, some pieces spread over the rest, and the end. */
const HEAD = 128 * 1024;
const LONGEST_HEAD = 1024 * 1024;
const PIECE = 24 * 1024;
const PIECES = 6;
const TAIL = 48 * 1024;
/** Rows of the beginning that are looked at: enough to judge by, few enough to answer at once. */
const HEAD_ROWS = 800;

const VARIANTS: Readonly<Record<ReadingPlan["delimiter"], string>> = {
  ",": "commas",
  ";": "semicolons",
  "\t": "tabs",
  "|": "bars",
  " ": "blanks",
};

const readRange = async (files: FileStorage, key: string, start: number, end: number): Promise<Buffer> => {
  const pieces: Buffer[] = [];
  for await (const piece of await files.read(key, { start, end })) pieces.push(piece as Buffer);
  return Buffer.concat(pieces);
};

const readHead = async (files: FileStorage, key: string, bytes: number): Promise<Buffer> => {
  const head = await readRange(files, key, 0, Math.min(bytes, HEAD) - 1);
  if (head.includes(10) || bytes <= HEAD) return head;
  return readRange(files, key, 0, Math.min(bytes, LONGEST_HEAD) - 1);
};

const isBlankRecord = (r: CsvRecord): boolean => r.cells.every((cell) => cell.trim() === "");

/** Whole lines from the middle of the file; their line numbers are not known. */
const middleRows = (text: string, delimiter: string): CsvRecord[] => {
  const from = text.indexOf("\n") + 1;
  const end = text.lastIndexOf("\n") + 1;
  if (from === 0 || end <= from) return [];
  return new CsvSplitter(delimiter).push(text.slice(from, end)).map((r) => ({ ...r, line: 0 }));
};

const spread = (from: number, to: number): { start: number; end: number }[] => {
  if (to - from < PIECES * PIECE) return [];
  const step = Math.floor((to - from) / PIECES / 2) * 2;
  return Array.from({ length: PIECES }, (_, i) => ({
    start: from + i * step,
    end: from + i * step + PIECE - 1,
  }));
};

const empty = (encoding: Encoding, more: Partial<Sample>): Sample => sampleOf([], [], { encoding, ...more });

/** Looks into a table as text without reading all of it, by the choice given or by what the bytes say. */
export const sampleDelimited = async (
  files: FileStorage,
  key: string,
  bytes: number,
  choice: DialectChoice = {},
): Promise<Sample> => {
  if (bytes === 0) return empty("utf-8", { isEmpty: true });
  const head = await readHead(files, key, bytes);
  const found = detectEncoding(head);
  const encoding = choice.encoding ?? found.encoding;
  const instead = notATable(head, found.encoding);
  if (instead !== null || found.isUnreadable)
    return empty(encoding, { instead, isBigEndian: found.isUnreadable });

  const isWhole = head.length >= bytes;
  const headText = textDecoder(encoding).decode(head);
  if (headText.trim() === "") return empty(encoding, { isEmpty: true });
  const wholeLines = isWhole ? headText : headText.slice(0, headText.lastIndexOf("\n") + 1);
  const detected = detectDialect(wholeLines.slice(0, 64 * 1024));
  const { delimiter = detected.delimiter, decimalMark = detected.decimalMark } = choice;
  const splitter = new CsvSplitter(delimiter);
  const records = splitter.push(wholeLines);
  const last = isWhole ? splitter.end() : { record: null, isQuoteOpen: false };
  const [first, ...body] = records.length > 0 ? records : last.record ? [last.record] : [];
  const { header, renamed } = uniqueNames(first?.cells ?? []);

  body.splice(HEAD_ROWS);
  let cutLine: CsvRecord | null = null;
  if (last.record && records.length > 0) {
    if (last.isQuoteOpen || last.record.cells.length < header.length) cutLine = last.record;
    else body.push(last.record);
  }
  if (!isWhole) {
    const decode = (piece: Buffer): string => textDecoder(encoding).decode(piece);
    for (const { start, end } of spread(HEAD, bytes - TAIL))
      body.push(
        ...middleRows(decode(await readRange(files, key, start, end)), delimiter).filter(
          (r) => r.cells.length === header.length,
        ),
      );
    const tailStart = Math.floor(Math.max(head.length, bytes - TAIL) / 2) * 2;
    if (tailStart < bytes) {
      const tail = decode(await readRange(files, key, tailStart, bytes - 1));
      const lastText = tail.slice(tail.lastIndexOf("\n") + 1);
      const cells = new CsvSplitter(delimiter).push(`${lastText}\n`)[0]?.cells ?? [];
      if (tail.includes("\n") && lastText.trim() !== "" && cells.length < header.length)
        cutLine = { cells, line: 0, text: lastText };
    }
  }
  const isEven = (r: CsvRecord): boolean => r.cells.length === header.length;
  const filled = body.filter((r) => !isBlankRecord(r));
  return sampleOf(header.map(namedColumn), filled.filter(isEven), {
    variant: VARIANTS[delimiter],
    encoding,
    isEncodingGuessed: found.isGuess,
    delimiter,
    decimalMark,
    renamed,
    uneven: filled.filter((r) => !isEven(r)),
    cutLine,
  });
};
