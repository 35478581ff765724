import { Readable } from "node:stream";
import { AppError } from "../../errors.ts";
import type { CsvRecord } from "../csv-splitter.ts";
import { type DecimalMark, type Delimiter, detectDialect } from "../dialect.ts";
import { detectEncoding, type Encoding, notATable, textDecoder } from "../encoding.ts";
import { type Batch, readRecords } from "../read-records.ts";
import type { RefusedRow, RowBatch, TableColumn, TableFinding, TableReader } from "../table.ts";
import { peek } from "./peek.ts";
import { uniqueNames } from "./unique-names.ts";

/** How the text of a file becomes cells and numbers. */
export interface DelimitedDialect {
  readonly encoding: Encoding;
  readonly delimiter: Delimiter;
  readonly decimalMark: DecimalMark;
}

/** A table as text. Its columns are texts, to be read as numbers with the decimal mark. */
export interface DelimitedTable extends TableReader {
  readonly dialect: DelimitedDialect;
}

/** Bytes by which the encoding and the dialect are judged. */
const HEAD_BYTES = 128 * 1024;
const DIALECT_CHARACTERS = 64 * 1024;

const VARIANTS: Readonly<Record<Delimiter, string>> = {
  ",": "commas",
  ";": "semicolons",
  "\t": "tabs",
  "|": "bars",
};

const stop = (code: string, message: string, hint: string): AppError =>
  new AppError(422, code, message, { hint });

const emptyFile = (): AppError =>
  stop("empty-file", "The file is empty, so it has no line of names.", "Get the file again.");

/** The dialect by the choice given or, for what it leaves open, by what the bytes say. */
const dialectOf = (
  head: Uint8Array,
  choice: Partial<DelimitedDialect>,
): DelimitedDialect & { isGuess: boolean } => {
  const found = detectEncoding(head);
  const instead = notATable(head, found.encoding);
  if (instead !== null)
    throw stop(
      "not-a-table",
      `This is ${instead}, not a table as text.`,
      "Export the table as CSV or ECSV and read that.",
    );
  if (found.isUnreadable)
    throw stop(
      "unread-encoding",
      "The file is text in big-endian UTF-16, which is not read here.",
      "Save it as UTF-8.",
    );
  const encoding = choice.encoding ?? found.encoding;
  const text = textDecoder(encoding).decode(head, { stream: true });
  const isWhole = head.length < HEAD_BYTES;
  const lines = isWhole ? text : text.slice(0, text.lastIndexOf("\n") + 1);
  const detected = detectDialect(lines.slice(0, DIALECT_CHARACTERS));
  return {
    encoding,
    delimiter: choice.delimiter ?? detected.delimiter,
    decimalMark: choice.decimalMark ?? detected.decimalMark,
    isGuess: choice.encoding === undefined && found.isGuess,
  };
};

const textColumn = (name: string): TableColumn => ({
  name,
  type: "text",
  unit: "",
  ucd: "",
  description: "",
  nullMark: null,
  frame: null,
});

const isBlank = (record: CsvRecord): boolean => record.cells.every((cell) => cell.trim() === "");

/** Sorts the records of a file into rows and refused ones; blank lines are neither. */
class Rows {
  private row = 0;

  constructor(private readonly width: number) {}

  batch({ records, bytes }: Batch): RowBatch {
    const columns: string[][] = Array.from({ length: this.width }, () => []);
    const refused: RefusedRow[] = [];
    let rows = 0;
    for (const record of records) {
      if (isBlank(record)) continue;
      this.row++;
      if (record.cells.length !== this.width) {
        refused.push(this.uneven(record));
        continue;
      }
      rows++;
      for (let i = 0; i < this.width; i++) columns[i]?.push(record.cells[i] ?? "");
    }
    return { rows, columns, refused, bytes };
  }

  private uneven({ cells, line, text }: CsvRecord): RefusedRow {
    const has = `This row has ${cells.length} values; the first line has ${this.width}.`;
    return {
      row: this.row,
      line,
      text,
      why: `${has} Nothing was guessed about where the others belong.`,
    };
  }
}

const findingsOf = (
  renamed: readonly { from: string; to: string }[],
  isGuess: boolean,
): readonly TableFinding[] => [
  ...(renamed.length === 0
    ? []
    : [
        {
          key: "headers-renamed",
          level: "note" as const,
          message: `${renamed.length} columns share a name or have none, and are told apart by a number.`,
          hint: "Nothing needs to be done; the original keeps its names.",
          count: renamed.length,
          examples: renamed.slice(0, 5).map(({ to }) => to),
        },
      ]),
  ...(isGuess
    ? [
        {
          key: "encoding-guessed",
          level: "note" as const,
          message: "Some bytes are not UTF-8, so the text is read as Latin-1 (Windows-1252).",
          hint: "Look at names with accents; choose another encoding if they are wrong.",
          count: 1,
          examples: [],
        },
      ]
    : []),
];

/**
 * Opens a table as text: values between commas, semicolons, tabs or bars, with a line of names first.
 *
 * @param choice what is known of the dialect; the rest is judged by the beginning of the file
 */
export const openDelimited = async (
  source: AsyncIterable<Uint8Array>,
  choice: Partial<DelimitedDialect> = {},
): Promise<DelimitedTable> => {
  const { head, whole } = await peek(source, HEAD_BYTES);
  if (head.length === 0) throw emptyFile();
  const { isGuess, ...dialect } = dialectOf(head, choice);
  const records = readRecords(Readable.from(whole), dialect);
  const first = await records.next();
  const names = first.done ? undefined : first.value.records[0];
  if (first.done || !names || isBlank(names)) throw emptyFile();
  const { header, renamed } = uniqueNames(names.cells);
  const rows = new Rows(header.length);
  const opened = first.value;

  async function* batches(): AsyncGenerator<RowBatch> {
    try {
      yield rows.batch({ records: opened.records.slice(1), bytes: opened.bytes });
      for await (const batch of records) yield rows.batch(batch);
    } finally {
      await records.return(undefined);
    }
  }

  return {
    header: {
      format: "delimited",
      variant: VARIANTS[dialect.delimiter],
      encoding: dialect.encoding,
      columns: header.map(textColumn),
      declaredRows: null,
      meta: { title: null, description: null, sources: [], frame: null },
    },
    dialect,
    batches: batches(),
    findings: () => findingsOf(renamed, isGuess),
  };
};
