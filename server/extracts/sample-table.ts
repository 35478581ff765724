import { AppError } from "../errors.ts";
import type { CsvRecord } from "../formats/csv-splitter.ts";
import type { ColumnValues, RowBatch, TableFinding, TableReader } from "../formats/table.ts";
import { type Sample, sampleOf } from "./sample.ts";

/** Rows of the beginning that are looked at: enough to judge by, few enough to answer at once. */
const ROWS = 1_000;

/** A value as text; numbers in the shortest form that reads back to the same bits. */
const cellText = (values: ColumnValues | undefined, row: number): string => {
  const value = values?.[row];
  if (typeof value === "string") return value;
  return value === undefined || Number.isNaN(value) ? "" : String(value);
};

const recordsOf = ({ rows, columns }: RowBatch, from: number, most: number): CsvRecord[] =>
  Array.from({ length: Math.min(rows, most) }, (_, row) => {
    const cells = columns.map((values) => cellText(values, row));
    return { cells, line: from + row + 1, text: cells.join("\t") };
  });

/** A file that its reader refuses, as something that was found. */
export const refusal = (error: AppError): TableFinding => ({
  key: error.code,
  level: "stop",
  message: error.message,
  hint: error.hint ?? "Get the file again, and bring it as a new extract.",
  count: 1,
  examples: [],
});

/** The first rows of a table that its format describes, with what its reader found. */
export const sampleTable = async (reader: TableReader): Promise<Sample> => {
  const { header } = reader;
  const rows: CsvRecord[] = [];
  const uneven: CsvRecord[] = [];
  const found: TableFinding[] = [];
  try {
    for await (const batch of reader.batches) {
      rows.push(...recordsOf(batch, rows.length, ROWS - rows.length));
      for (const { line, text } of batch.refused) uneven.push({ cells: [], line: line ?? 0, text });
      if (rows.length >= ROWS) break;
    }
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    found.push(refusal(error));
  }
  const { format, variant, declaredRows, meta } = header;
  return sampleOf(header.columns, rows, {
    format,
    variant,
    declaredRows,
    meta,
    uneven,
    found: [...reader.findings(), ...found],
  });
};
