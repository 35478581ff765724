import type { RefusedRow, RowBatch } from "../table.ts";
import { OutsideLines } from "../text/outside-lines.ts";
import { isRule } from "../text/preamble.ts";
import type { LineBatch } from "../text/text-lines.ts";
import type { Layout } from "./layout.ts";
import { tokensOf } from "./tokens.ts";

/** Sorts the lines of a table in columns of blanks into rows and refused ones. */
export class ColumnRows {
  /** Rows and refused rows. */
  seen = 0;
  /** All rows have been read. */
  isDone = false;
  /** The last line has no end. */
  endsOpen = false;
  readonly outside: OutsideLines;
  /** Lines of names and units still to come. */
  private left: number;
  private readonly width: number;

  constructor(private readonly layout: Layout) {
    this.width = layout.found.names.length;
    this.left = layout.found.skip;
    this.outside = new OutsideLines(layout.preamble);
  }

  batch({ lines, first, bytes }: LineBatch): RowBatch {
    const columns: string[][] = Array.from({ length: this.width }, () => []);
    const refused: RefusedRow[] = [];
    let rows = 0;
    for (const [at, line] of lines.entries()) {
      if (first + at <= this.layout.preamble.lines || line.trim() === "") continue;
      const cells = this.cellsOf(line);
      if (cells === null) continue;
      this.seen++;
      if (typeof cells === "string") {
        refused.push({ row: this.seen, line: first + at, text: line, why: cells });
        continue;
      }
      rows++;
      for (let i = 0; i < this.width; i++) columns[i]?.push(cells[i] ?? "");
    }
    return { rows, columns, refused, bytes };
  }

  /** Whether a last line without an end lacks a part of its row. */
  isCut(batch: RowBatch): boolean {
    if (batch.refused.length > 0) return true;
    return batch.rows > 0 && this.layout.isLastFilled && batch.columns.at(-1)?.[0] === "";
  }

  /** Cells of a row; words where they cannot be told apart, null where the line is no row. */
  private cellsOf(line: string): readonly string[] | string | null {
    if ((this.seen === 0 || this.layout.kind === "ruled columns") && isRule(line)) return null;
    const cells = this.cut(line);
    if (this.outside.take(line, typeof cells !== "string")) return null;
    if (this.left === 0) return cells;
    this.left--;
    return null;
  }

  private cut(line: string): readonly string[] | string {
    const { cutter, found } = this.layout;
    const cells = cutter?.cut(line);
    if (Array.isArray(cells)) return cells;
    const tokens = tokensOf(line);
    // A row that drifts out of its columns is still clear where it has a value for each of them.
    if (tokens.length === this.width) return tokens;
    if (cells === this.width - 1) return `Text stands behind the last column, ${found.names[cells]}.`;
    return cells === undefined
      ? `This row has ${tokens.length} values between blanks; the table has ${this.width} columns.`
      : `Text stands in the gap between ${found.names[cells]} and ${found.names[cells + 1]}, which is blank in the rows at the beginning.`;
  }
}
