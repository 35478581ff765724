import type { ColumnType, ColumnValues, RefusedRow, RowBatch, TableColumn } from "../table.ts";

/** Cells of a batch: some thousands of rows of a usual table, and few rows of one with thousands of columns. */
const MOST_CELLS = 262_144;
const MOST_ROWS = 20_000;
const LEAST_ROWS = 16;
/** Rows that there is room for at first, so that a small table takes little memory. */
const FIRST_ROWS = 256;
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
  /** Rows that there is room for, which grows up to the capacity. */
  private room: number;
  private readonly capacity: number;
  private readonly isText: readonly boolean[];

  constructor(columns: readonly TableColumn[]) {
    const fitting = Math.floor(MOST_CELLS / Math.max(1, columns.length));
    this.capacity = Math.max(LEAST_ROWS, Math.min(MOST_ROWS, fitting));
    this.room = Math.min(this.capacity, FIRST_ROWS);
    this.isText = columns.map((column) => isText(column.type));
    this.numbers = this.isText.map((isTextColumn) => new Float64Array(isTextColumn ? 0 : this.room));
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
    if (this.rows === this.room && this.rows < this.capacity) this.grow();
  }

  refuse(line: number | null, text: string, why: string): void {
    this.refused.push({ row: this.row, line, text: text.slice(0, LONGEST_REFUSED), why });
    this.row++;
  }

  take(bytes: number): RowBatch {
    const columns = this.isText.map(
      (isTextColumn, slot): ColumnValues =>
        isTextColumn ? this.textsOf(slot) : (this.numbers[slot] as Float64Array).slice(0, this.rows),
    );
    const batch = { rows: this.rows, columns, refused: this.refused, bytes };
    this.begin();
    return batch;
  }

  /** Without the cells of a refused row that was the last. */
  private textsOf(slot: number): string[] {
    const texts = this.texts[slot] as string[];
    texts.length = this.rows;
    return texts;
  }

  private begin(): void {
    this.rows = 0;
    this.held = 0;
    this.refused = [];
    this.texts = this.isText.map(() => []);
  }

  private grow(): void {
    this.room = Math.min(this.capacity, 4 * this.room);
    this.numbers = this.numbers.map((used, slot) => {
      if (this.isText[slot]) return used;
      const larger = new Float64Array(this.room);
      larger.set(used);
      return larger;
    });
  }
}
