import { LIMITS } from "#shared/limits.ts";
import type { CsvRecord } from "../csv-splitter.ts";
import type { RefusedRow, RowBatch } from "../table.ts";
import { OutsideLines } from "../text/outside-lines.ts";
import { isRule } from "../text/preamble.ts";
import { insideFrame, type Layout } from "./layout.ts";

const isBlank = (cells: readonly string[]): boolean => cells.every((cell) => cell.trim() === "");

/** Sorts the records of a text into rows and refused ones; blank lines, comments and ruled lines are neither. */
export class DelimitedRows {
  /** Rows and refused rows. */
  seen = 0;
  /** All rows have been read. */
  isDone = false;
  /** The last line has no end. */
  endsOpen = false;
  readonly outside: OutsideLines;
  /** Lines of names, units and rules still to come. */
  private left: number;
  /** In the batch that is being made. */
  private blankLines = 0;
  private readonly width: number;

  constructor(private readonly layout: Layout) {
    this.width = layout.found.names.length;
    this.left = layout.found.skip;
    this.outside = new OutsideLines(layout.preamble);
  }

  batch(records: readonly CsvRecord[], bytes: number): RowBatch {
    const columns: string[][] = Array.from({ length: this.width }, () => []);
    const refused: RefusedRow[] = [];
    const kept: CsvRecord[] = [];
    this.blankLines = 0;
    for (const record of records) {
      const cells = this.cellsOf(record);
      if (cells === null) continue;
      this.seen++;
      const why = this.trouble(cells, record.text);
      if (why !== null) {
        refused.push({ row: this.seen, line: this.lineOf(record), text: record.text, why });
        continue;
      }
      kept.push(record);
      for (let i = 0; i < this.width; i++) columns[i]?.push(cells[i] ?? "");
    }
    const lineOf = (row: number): { line: number; text: string } => {
      const record = kept[row];
      return record ? { line: this.lineOf(record), text: record.text } : { line: 0, text: "" };
    };
    return { rows: kept.length, columns, refused, bytes, blankLines: this.blankLines, lineOf };
  }

  /** Whether a last record without an end lacks a part of its row. */
  isCut({ cells, text }: CsvRecord, batch: RowBatch): boolean {
    if (batch.refused.length === 0) return false;
    return this.layout.isFramed ? !isInFrame(text) : cells.length < this.width;
  }

  /** Line of the file on which a record begins. */
  lineOf(record: CsvRecord): number {
    return this.layout.preamble.lines + record.line;
  }

  /** Cells of a row; null where the record is none. */
  private cellsOf({ cells, text }: CsvRecord): readonly string[] | null {
    if (text === "") {
      this.blankLines++;
      return null;
    }
    const isFramed = this.layout.isFramed && isInFrame(text);
    const isWide = !this.layout.isFramed && cells.length === this.width;
    if ((!isWide || this.outside.hasMark) && this.outside.take(text, isWide)) return null;
    if (isBlank(cells)) {
      this.blankLines++;
      return null;
    }
    if (this.seen === 0 && isRule(text)) return null;
    if (this.left > 0) {
      this.left--;
      return null;
    }
    return isFramed ? insideFrame(cells) : cells;
  }

  private trouble(cells: readonly string[], text: string): string | null {
    if (this.layout.isFramed && !isInFrame(text))
      return "This row does not stand between bars as the others do.";
    if (cells.length !== this.width)
      return `This row has ${cells.length} values; the table has ${this.width} columns. Nothing was guessed about where the others belong.`;
    if (text.length <= LIMITS.cellCharacters) return null;
    const longest = cells.reduce((most, cell) => Math.max(most, cell.length), 0);
    if (longest <= LIMITS.cellCharacters) return null;
    return `A value of this row has ${longest.toLocaleString("en")} characters; ${LIMITS.cellCharacters.toLocaleString("en")} are the most that are read.`;
  }
}

const isInFrame = (text: string): boolean => {
  const own = text.trim();
  return own.length > 1 && own.startsWith("|") && own.endsWith("|");
};
