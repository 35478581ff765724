import type { DecimalMark } from "../dialect.ts";
import { cutOff } from "../read-records.ts";
import type { RowBatch, TableReader } from "../table.ts";
import { checkText } from "../text/check-text.ts";
import { textColumns, textMeta } from "../text/columns.ts";
import type { TextEncoding } from "../text/encoding.ts";
import { textFindings } from "../text/findings.ts";
import { linesOf } from "../text/text-lines.ts";
import { TextSource } from "../text/text-source.ts";
import { isBarred } from "./bar-header.ts";
import { type Layout, needColumns } from "./layout.ts";
import { openBarred } from "./open-barred.ts";
import { ColumnRows } from "./rows.ts";

/** A table in columns of blanks. Its columns are texts, to be read as numbers with the decimal mark. */
export interface ColumnsTable extends TableReader {
  readonly dialect: { readonly encoding: TextEncoding; readonly decimalMark: DecimalMark };
}

export interface ColumnsChoice {
  readonly encoding?: TextEncoding;
  readonly decimalMark?: DecimalMark;
}

async function* batchesOf(source: TextSource, layout: Layout, rows: ColumnRows): AsyncGenerator<RowBatch> {
  for await (const lines of linesOf(source.pieces())) {
    const batch = rows.batch(lines);
    if (lines.isOpen && rows.isCut(batch)) {
      const filled = batch.columns.filter((values) => values[0] !== undefined && values[0] !== "").length;
      throw cutOff(lines.first, filled, layout.found.names.length);
    }
    rows.endsOpen = lines.isOpen && batch.rows > 0;
    yield batch;
  }
  rows.isDone = true;
}

/**
 * Opens a table in columns of blanks: values between blanks under a line of names, columns at fixed places with blanks
 * between them, columns below a ruled line, or columns below names in bars.
 *
 * Columns at fixed places are told by what is blank in every line of the beginning. No line is cut through a value: one
 * that does not fit is refused as it stands.
 */
export const openColumns = async (
  bytes: AsyncIterable<Uint8Array>,
  choice: ColumnsChoice = {},
): Promise<ColumnsTable> => {
  const source = await TextSource.open(bytes, choice.encoding);
  checkText(source);
  const head = source.headText();
  if (isBarred(head)) return openBarred(source, head);
  const layout = needColumns(head);
  const { columns, renamed } = textColumns(layout.found, layout.preamble.comments);
  const rows = new ColumnRows(layout);
  return {
    header: {
      format: "fixed-width",
      variant: layout.kind,
      encoding: source.encoding,
      columns,
      declaredRows: layout.preamble.declaredRows,
      meta: textMeta(layout.preamble),
    },
    dialect: { encoding: source.encoding, decimalMark: choice.decimalMark ?? layout.decimalMark },
    batches: batchesOf(source, layout, rows),
    findings: () => textFindings({ source, found: layout.found, renamed, rival: null, rows }),
  };
};
