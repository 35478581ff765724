import type { ColumnType, ColumnValues, RefusedRow, RowBatch, TableColumn } from "../table.ts";

/** Cells of a batch: some thousands of rows of a usual table, and few rows of one with thousands of columns. */
const MOST_CELLS = 262_144;
const MOST_ROWS = 20_000;
const LEAST_ROWS = 16;
/** Characters and refused rows that a batch may hold before it is given out early. */
const MOST_HELD = 8_000_000;
const MOST_REFUSED = 1_000;
const LONGEST_REFUSED = 2_000;

const isText = (type: ColumnType): boolean =>
  type === "text" || type === "boolean" || type === "int64" || type === "uint64";

/** Columns that fill row by row. A row counts only once it is committed; until then its cells may be written over. */
export class BatchBuilder {
  /** Row of the table being read, from 1, refused rows included. */
  row = 1;
  private rows = 0;
  private held = 0;
  private refused: RefusedRow[] = [];
  private numbers: Float64Array[] = [];
  private texts: string[][] = [];
  private readonly capacity: number;
  private readonly isText: readonly boolean[];
  private readonly noNumbers = new Float64Array(0);

  constructor(columns: readonly TableColumn[]) {
    const fitting = Math.floor(MOST_CELLS / Math.max(1, columns.length));
    this.capacity = Math.max(LEAST_ROWS, Math.min(MOST_ROWS, fitting));
    this.isText = columns.map((column) => isText(column.type));
    this.begin();
  }

  get isFull(): boolean {
    return this.rows >= this.capacity || this.held >= MOST_HELD || this.refused.length >= MOST_REFUSED;
  }

  get isEmpty(): boolean {
    return this.rows === 0 && this.refused.length === 0;
  }

  /** Rows seen so far, refused ones included. */
  get seen(): number {
    return this.row - 1;
  }

  setNumber(slot: number, value: number): void {
    (this.numbers[slot] as Float64Array)[this.rows] = value;
  }

  setText(slot: number, value: string): void {
    (this.texts[slot] as string[])[this.rows] = value;
    this.held += value.length;
  }

  commit(): void {
    this.rows++;
    this.row++;
  }

  refuse(line: number | null, text: string, why: string): void {
    this.refused.push({ row: this.row, line, text: text.slice(0, LONGEST_REFUSED), why });
    this.row++;
  }

  take(bytes: number): RowBatch {
    const columns = this.isText.map(
      (isTextColumn, slot): ColumnValues =>
        isTextColumn
          ? (this.texts[slot] as string[]).slice(0, this.rows)
          : (this.numbers[slot] as Float64Array).slice(0, this.rows),
    );
    const batch = { rows: this.rows, columns, refused: this.refused, bytes };
    this.begin();
    return batch;
  }

  private begin(): void {
    this.rows = 0;
    this.held = 0;
    this.refused = [];
    const used = this.numbers;
    this.numbers = this.isText.map((isTextColumn, slot) =>
      isTextColumn ? this.noNumbers : (used[slot] ?? new Float64Array(this.capacity)),
    );
    this.texts = this.isText.map((isTextColumn) => (isTextColumn ? new Array<string>(this.capacity) : []));
  }
}
