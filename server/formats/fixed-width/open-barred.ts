import { uniqueNames } from "../delimited/unique-names.ts";
import { cutOff } from "../read-records.ts";
import type { RefusedRow, RowBatch, TableColumn } from "../table.ts";
import { textMeta } from "../text/columns.ts";
import { textFindings } from "../text/findings.ts";
import { OutsideLines } from "../text/outside-lines.ts";
import { readPreamble } from "../text/preamble.ts";
import { type LineBatch, linesOf } from "../text/text-lines.ts";
import type { TextSource } from "../text/text-source.ts";
import { TypedColumns } from "../text/typed-columns.ts";
import { type BarHeader, readBarHeader } from "./bar-header.ts";
import { Cutter } from "./cutter.ts";
import type { ColumnsTable } from "./open-columns.ts";

/** Sorts the lines below names in bars into rows of their types and refused ones. */
class BarredRows {
  seen = 0;
  isDone = false;
  endsOpen = false;
  private readonly cutter: Cutter;

  constructor(
    private readonly header: BarHeader,
    readonly values: TypedColumns,
    readonly outside: OutsideLines,
  ) {
    this.cutter = new Cutter(header.fields);
  }

  batch({ lines, first, bytes }: LineBatch): RowBatch {
    const refused: RefusedRow[] = [];
    let rows = 0;
    for (const [at, line] of lines.entries()) {
      if (first + at <= this.header.lines || line.trim() === "" || this.outside.take(line, true)) continue;
      this.seen++;
      const cells = this.cutter.cut(line);
      const why = typeof cells === "number" ? this.crossed(cells) : this.values.take(cells);
      if (why === null) rows++;
      else refused.push({ row: this.seen, line: first + at, text: line, why });
    }
    return { rows, columns: this.values.empty(), refused, bytes };
  }

  private crossed(gap: number): string {
    const { columns } = this.header;
    return `Text stands below the bar between ${columns[gap]?.name} and ${columns[gap + 1]?.name}.`;
  }
}

async function* batchesOf(source: TextSource, header: BarHeader, rows: BarredRows): AsyncGenerator<RowBatch> {
  for await (const lines of linesOf(source.pieces())) {
    const batch = rows.batch(lines);
    const [line = ""] = lines.lines;
    // The archive writes every line as long as its bars.
    const isShort = line.length <= (header.fields.at(-1)?.from ?? 0);
    if (lines.isOpen && batch.rows + batch.refused.length > 0 && isShort)
      throw cutOff(
        lines.first,
        header.fields.filter(({ from }) => from < line.length).length,
        header.fields.length,
      );
    rows.endsOpen = lines.isOpen && batch.rows > 0;
    yield batch;
  }
  rows.isDone = true;
}

/** Opens a table whose columns stand below names in bars, with their types, units and null marks. */
export const openBarred = (source: TextSource, head: string): ColumnsTable => {
  const header = readBarHeader(head);
  const preamble = readPreamble(head.split("\n"));
  const { header: names, renamed } = uniqueNames(header.columns.map(({ name }) => name));
  const columns = header.columns.map(
    (column, at): TableColumn => ({
      ...column,
      name: names[at] ?? column.name,
      ucd: "",
      description: "",
      frame: null,
    }),
  );
  const typed = columns.map(({ name, type, nullMark }) => ({
    name,
    type,
    nullMarks: nullMark === null ? [] : [nullMark],
  }));
  const rows = new BarredRows(header, new TypedColumns(typed), new OutsideLines(preamble));
  const found = { names, units: null, stand: "line", skip: 0 } as const;
  return {
    header: {
      format: "fixed-width",
      variant: "names in bars",
      encoding: source.encoding,
      columns,
      declaredRows: preamble.declaredRows,
      meta: textMeta(preamble),
    },
    dialect: { encoding: source.encoding, decimalMark: "." },
    batches: batchesOf(source, header, rows),
    findings: () => textFindings({ source, found, renamed: renamed.map(({ to }) => to), rival: null, rows }),
  };
};
