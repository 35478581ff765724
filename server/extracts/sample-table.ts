import { AppError } from "../errors.ts";
import type { CsvRecord } from "../formats/csv-splitter.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { ColumnValues, RowBatch, TableFinding } from "../formats/table.ts";
import { type Sample, sampleOf } from "./sample.ts";

/** Rows that are looked at: enough to judge by, few enough to answer at once. */
const MOST_ROWS = 2_000;

/** A value as text; numbers in the shortest form that reads back to the same bits. */
export const cellText = (values: ColumnValues | undefined, row: number): string => {
  const value = values?.[row];
  if (typeof value === "string") return value;
  return value === undefined || Number.isNaN(value) ? "" : String(value);
};

const recordOf = ({ columns, lineOf }: RowBatch, row: number, number: number): CsvRecord => {
  const cells = columns.map((values) => cellText(values, row));
  const { line, text } = lineOf?.(row) ?? { line: number, text: cells.join("\t") };
  return { cells, line, text };
};

/** Keeps every row at first, then every second, fourth …, so that what is kept covers all that was shown. */
export class SpreadRows {
  readonly rows: CsvRecord[] = [];
  private step = 1;
  private seen = 0;

  constructor(private readonly most: number) {}

  show(batch: RowBatch): void {
    for (let row = 0; row < batch.rows; row++) {
      if (this.seen++ % this.step !== 0) continue;
      this.rows.push(recordOf(batch, row, this.seen));
      if (this.rows.length < this.most) continue;
      this.step *= 2;
      this.rows.splice(0, this.most, ...this.rows.filter((_, i) => i % 2 === 0));
    }
  }
}

/** A file that its reader refuses, as something that was found. */
export const refusal = (error: AppError): TableFinding => ({
  key: error.code,
  level: "stop",
  message: error.message,
  hint: error.hint ?? "Get the file again, and bring it as a new extract.",
  count: 1,
  examples: [],
});

const encodingOf = (name: string | null): Sample["encoding"] =>
  name === "utf-16le" || name === "utf-16be" || name === "latin1" ? name : "utf-8";

const DELIMITERS: Readonly<Record<string, Sample["delimiter"]>> = {
  commas: ",",
  semicolons: ";",
  tabs: "\t",
  bars: "|",
  "framed by bars": "|",
};

/**
 * Rows of a table that its reader opened, with what the reader found.
 *
 * @param isWhole reads to the end and looks at rows of all parts; else at those of the beginning
 */
export const sampleTable = async (
  { reader, decimalMark }: RecognisedTable,
  isWhole: boolean,
): Promise<Sample> => {
  const { header } = reader;
  const spread = new SpreadRows(isWhole ? MOST_ROWS : Number.POSITIVE_INFINITY);
  const uneven: CsvRecord[] = [];
  const found: TableFinding[] = [];
  try {
    for await (const batch of reader.batches) {
      spread.show(batch);
      for (const { line, text } of batch.refused)
        if (uneven.length < MOST_ROWS) uneven.push({ cells: [], line: line ?? 0, text });
      if (!isWhole && spread.rows.length >= MOST_ROWS) break;
    }
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    found.push(refusal(error));
  }
  const { format, variant, declaredRows, meta } = header;
  return sampleOf(header.columns, spread.rows, {
    format,
    variant,
    declaredRows,
    meta,
    encoding: encodingOf(header.encoding),
    delimiter: format === "fixed-width" ? " " : (DELIMITERS[variant] ?? ","),
    decimalMark,
    uneven,
    found: [...reader.findings(), ...found],
  });
};
