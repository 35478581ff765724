import { type Sample, sampleOf } from "../extracts/sample.ts";
import { SpreadRows } from "../extracts/sample-table.ts";
import type { RecognisedTable } from "../formats/open-table.ts";
import type { TableFinding, TableHeader } from "../formats/table.ts";

/** What a first reading of the whole file shows: its header, and rows spread over all of it. */
export interface Glance {
  readonly header: TableHeader;
  readonly sample: Sample;
  /** What the reader found. */
  readonly findings: readonly TableFinding[];
}

const MOST_ROWS = 4096;

/**
 * Reads the table to its end and keeps some of it. A file that breaks in the middle is found out here, before anything
 * is written, and units are judged by rows of all its parts.
 */
export const glanceAt = async ({
  reader,
  decimalMark,
}: Pick<RecognisedTable, "reader" | "decimalMark">): Promise<Glance> => {
  const spread = new SpreadRows(MOST_ROWS);
  for await (const batch of reader.batches) spread.show(batch);
  const { header } = reader;
  return {
    header,
    findings: reader.findings(),
    sample: sampleOf(header.columns, spread.rows, { decimalMark }),
  };
};
