import type { Sample } from "../extracts/sample.ts";
import type { CsvRecord } from "../formats/csv-splitter.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { ColumnValues, TableFinding, TableHeader } from "../formats/table.ts";

/** What a first reading of the whole file shows: its header, and rows spread over all of it. */
export interface Glance {
  readonly header: TableHeader;
  readonly sample: Sample;
  /** What the reader found. */
  readonly findings: readonly TableFinding[];
}

const MOST_ROWS = 4096;

/** A value as text; numbers in the shortest form that reads back to the same bits. */
export const cellText = (values: ColumnValues | undefined, row: number): string => {
  const value = values?.[row];
  if (typeof value === "string") return value;
  return value === undefined || Number.isNaN(value) ? "" : String(value);
};

/** Keeps every row at first, then every second, fourth …, so that what is kept covers all that was shown. */
class Spread {
  readonly rows: CsvRecord[] = [];
  private step = 1;
  private seen = 0;

  show(row: () => CsvRecord): void {
    if (this.seen++ % this.step !== 0) return;
    this.rows.push(row());
    if (this.rows.length < MOST_ROWS) return;
    this.step *= 2;
    this.rows.splice(0, MOST_ROWS, ...this.rows.filter((_, i) => i % 2 === 0));
  }
}

/**
 * Reads the table to its end and keeps some of it. A file that breaks in the middle is found out here, before anything
 * is written, and units are judged by rows of all its parts.
 */
export const glanceAt = async ({
  reader,
  decimalMark,
}: Pick<RecognisedTable, "reader" | "decimalMark">): Promise<Glance> => {
  const spread = new Spread();
  for await (const { rows, columns } of reader.batches)
    for (let row = 0; row < rows; row++)
      spread.show(() => ({ cells: columns.map((values) => cellText(values, row)), line: 0, text: "" }));
  const { header } = reader;
  return {
    header,
    findings: reader.findings(),
    sample: {
      encoding: "utf-8",
      isEncodingGuessed: false,
      delimiter: ",",
      decimalMark,
      header: header.columns.map((c) => c.name),
      renamed: [],
      rows: spread.rows,
      uneven: [],
      instead: null,
      isBigEndian: false,
      isEmpty: false,
      cutLine: null,
    },
  };
};
