import type { RecognisedTable } from "../formats/open-table.ts";
import type { RefusedRow, RowBatch, TableColumn, TableFinding, TableHeader } from "../formats/table.ts";

const REFUSALS_KEPT = 10;
const LONGEST_TEXT = 500;

/** What a reader makes of a file, as the command prints it. */
export interface ReadReport {
  readonly file: string;
  readonly takenFor: string;
  readonly format: TableHeader["format"];
  readonly variant: string;
  readonly encoding: string | null;
  readonly isPacked: boolean;
  readonly decimalMark: "." | ",";
  readonly meta: TableHeader["meta"];
  readonly columns: readonly TableColumn[];
  readonly declaredRows: number | null;
  readonly rows: number;
  readonly refusedRows: number;
  /** The first of the refused rows. */
  readonly refused: readonly RefusedRow[];
  readonly findings: readonly TableFinding[];
}

/** Counts what goes by. */
export class ReadCounts {
  rows = 0;
  refusedRows = 0;
  readonly refused: RefusedRow[] = [];

  add(batch: RowBatch): void {
    this.rows += batch.rows;
    this.refusedRows += batch.refused.length;
    for (const row of batch.refused.slice(0, REFUSALS_KEPT - this.refused.length))
      this.refused.push({ ...row, text: row.text.slice(0, LONGEST_TEXT) });
  }
}

export const readReport = (
  file: string,
  { reader, takenFor, isPacked, decimalMark }: RecognisedTable,
  counts: ReadCounts,
): ReadReport => {
  const { format, variant, encoding, meta, columns, declaredRows } = reader.header;
  return {
    file,
    takenFor,
    format,
    variant,
    encoding,
    isPacked,
    decimalMark,
    meta,
    columns,
    declaredRows,
    rows: counts.rows,
    refusedRows: counts.refusedRows,
    refused: counts.refused,
    findings: reader.findings(),
  };
};
