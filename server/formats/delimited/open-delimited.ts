import { CsvSplitter } from "../csv-splitter.ts";
import type { DecimalMark, Delimiter } from "../dialect.ts";
import { cutOff } from "../read-records.ts";
import type { RowBatch, TableReader } from "../table.ts";
import { checkText } from "../text/check-text.ts";
import { textColumns, textMeta } from "../text/columns.ts";
import type { TextEncoding } from "../text/encoding.ts";
import { textFindings } from "../text/findings.ts";
import { TextSource } from "../text/text-source.ts";
import { judgeLayout, type Layout } from "./layout.ts";
import { DelimitedRows } from "./rows.ts";

/** How the text of a file becomes cells and numbers. */
export interface DelimitedDialect {
  readonly encoding: TextEncoding;
  readonly delimiter: Delimiter;
  readonly decimalMark: DecimalMark;
}

/** A table as text. Its columns are texts, to be read as numbers with the decimal mark. */
export interface DelimitedTable extends TableReader {
  readonly dialect: DelimitedDialect;
}

/** What is known of the dialect; the rest is judged by the beginning of the file. */
export type DelimitedChoice = Partial<DelimitedDialect> & {
  /** Name of the file, which decides between readings that are equally likely. */
  readonly name?: string;
};

const VARIANTS: Readonly<Record<Delimiter, string>> = {
  ",": "commas",
  ";": "semicolons",
  "\t": "tabs",
  "|": "bars",
};

async function* batchesOf(source: TextSource, layout: Layout, rows: DelimitedRows): AsyncGenerator<RowBatch> {
  const splitter = new CsvSplitter(layout.delimiter);
  let [skip, bytes] = [layout.preamble.lines, 0];
  for await (const piece of source.pieces()) {
    bytes = piece.bytes;
    let text = piece.text;
    for (; skip > 0 && text !== ""; ) {
      const end = text.indexOf("\n") + 1;
      text = text.slice(end === 0 ? text.length : end);
      if (end > 0) skip--;
    }
    const records = splitter.push(text);
    if (records.length > 0) yield rows.batch(records, bytes);
  }
  const { record, isQuoteOpen } = splitter.end();
  if (record) {
    const batch = rows.batch([record], bytes);
    if (isQuoteOpen || rows.isCut(record, batch))
      throw cutOff(rows.lineOf(record), record.cells.length, layout.found.names.length);
    rows.endsOpen = batch.rows + batch.refused.length > 0;
    yield batch;
  }
  rows.isDone = true;
}

/**
 * Opens a table as text: values between commas, semicolons, tabs or bars, framed by bars or not, under a line of names.
 * Comments may stand before the names, and units and a ruled line below them.
 */
export const openDelimited = async (
  bytes: AsyncIterable<Uint8Array>,
  { name, ...choice }: DelimitedChoice = {},
): Promise<DelimitedTable> => {
  const source = await TextSource.open(bytes, choice.encoding);
  checkText(source);
  const layout = judgeLayout(source.headText(), { ...choice, name });
  const { columns, renamed } = textColumns(layout.found, layout.preamble.comments);
  const rows = new DelimitedRows(layout);
  return {
    header: {
      format: "delimited",
      variant: layout.isFramed ? "framed by bars" : VARIANTS[layout.delimiter],
      encoding: source.encoding,
      columns,
      declaredRows: layout.preamble.declaredRows,
      meta: textMeta(layout.preamble),
    },
    dialect: { encoding: source.encoding, delimiter: layout.delimiter, decimalMark: layout.decimalMark },
    batches: batchesOf(source, layout, rows),
    findings: () => textFindings({ source, found: layout.found, renamed, rival: layout.rival, rows }),
  };
};
