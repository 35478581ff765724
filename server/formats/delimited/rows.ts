import { LIMITS } from "#shared/limits.ts";
import type { CsvRecord } from "../csv-splitter.ts";
import type { RefusedRow, RowBatch } from "../table.ts";
import { declaredIn, isRule, uncommented } from "../text/preamble.ts";
import { insideFrame, type Layout } from "./layout.ts";

const isBlank = (cells: readonly string[]): boolean => cells.every((cell) => cell.trim() === "");

/** As a database's own client counts what it printed. */
const COUNTED = /^\((\d{1,12}) rows?\)$/;

/** Sorts the records of a text into rows and refused ones; blank lines, comments and ruled lines are neither. */
export class DelimitedRows {
  /** Rows and refused rows. */
  seen = 0;
  comments = 0;
  isDone = false;
  endsOpen = false;
  readonly commentExamples: string[] = [];
  declaredRows: number | null;
  private left: number;
  /** In the batch that is being made. */
  private blankLines = 0;
  private readonly width: number;

  constructor(
    private readonly layout: Layout,
    private readonly linesBefore: number,
  ) {
    this.width = layout.found.names.length;
    this.left = layout.found.skip;
    this.declaredRows = layout.preamble.declaredRows;
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
        refused.push({ row: this.seen, line: this.linesBefore + record.line, text: record.text, why });
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

  /** Whether the record would be a row, and has too few values for one. */
  isShort({ cells, text }: CsvRecord): boolean {
    if (this.isOutside(text) || isBlank(cells)) return false;
    if (this.layout.isFramed && !text.trimEnd().endsWith("|")) return true;
    return (this.layout.isFramed ? cells.length - 2 : cells.length) < this.width;
  }

  /** Line of the file of a record. */
  lineOf(record: CsvRecord): number {
    return this.linesBefore + record.line;
  }

  /** Cells of a row; null where the record is none. */
  private cellsOf({ cells, text }: CsvRecord): readonly string[] | null {
    if (cells.length !== this.width || this.layout.preamble.mark !== null) {
      if (this.isOutside(text)) return null;
    }
    if (isBlank(cells)) {
      this.blankLines++;
      return null;
    }
    if (this.left > 0) {
      this.left--;
      return null;
    }
    return this.layout.isFramed && text.trimEnd().endsWith("|") ? insideFrame(cells) : cells;
  }

  /** A comment, a ruled line or a count of the rows. */
  private isOutside(text: string): boolean {
    const { mark } = this.layout.preamble;
    const own = mark !== null && text.startsWith(mark) ? mark : text.startsWith("#") ? "#" : null;
    if (own !== null && (own === mark || text.split(this.layout.delimiter).length !== this.width)) {
      this.noteComment(text, own);
      return true;
    }
    const counted = COUNTED.exec(text.trim());
    if (counted) this.declaredRows ??= Number(counted[1]);
    return counted !== null || isRule(text);
  }

  private noteComment(text: string, mark: string): void {
    this.declaredRows ??= declaredIn(uncommented(text, mark));
    this.comments++;
    if (this.commentExamples.length < 5) this.commentExamples.push(text.slice(0, 80));
  }

  private trouble(cells: readonly string[], text: string): string | null {
    if (cells.length !== this.width)
      return `This row has ${cells.length} values; the table has ${this.width} columns. Nothing was guessed about where the others belong.`;
    if (text.length <= LIMITS.cellCharacters) return null;
    const longest = cells.reduce((most, cell) => Math.max(most, cell.length), 0);
    if (longest <= LIMITS.cellCharacters) return null;
    return `A value of this row has ${longest.toLocaleString("en")} characters; ${LIMITS.cellCharacters.toLocaleString("en")} are the most that are read.`;
  }
}
