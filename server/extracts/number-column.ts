import type { ColumnCard, ReadingPlan } from "#shared/api/extracts.ts";
import { quickNumber } from "../formats/quick-number.ts";
import type { ColumnValues } from "../formats/table.ts";
import { conversionOf, decimalMarkOf, isMarkedNumber, markValues, numberReader } from "./cells.ts";

const SHOWN_CHARACTERS = 40;

export const shown = (text: string): string =>
  text.length > SHOWN_CHARACTERS ? `${text.slice(0, SHOWN_CHARACTERS)}…` : text;

/** Without one of these a row stands nowhere, so a text that is no number refuses it. */
const PLACING = new Set(["ra", "dec", "epoch"]);

/** Says why a row of the batch is refused. */
export type Refuse = (row: number, why: string) => void;

/** A used column of numbers: reads the cells of a batch into one array that is used again for the next. */
export class NumberColumn {
  /** In the canonical unit; NaN for a blank. */
  values = new Float64Array(0);
  /** 1 where the text of the cell is the canonical number as it stands. */
  isPlain = new Uint8Array(0);
  private source: ColumnValues = [];
  private readonly factor: number;
  private readonly offset: number;
  private readonly marks: readonly number[];
  private readonly readSlowly: (text: string) => number | null;
  private readonly isIdentity: boolean;
  private readonly decimalMark: "." | ",";
  private readonly isError: boolean;

  constructor(
    readonly card: ColumnCard,
    plan: ReadingPlan,
  ) {
    const { factor, offset } = conversionOf(card, plan);
    this.factor = factor;
    this.offset = offset;
    this.marks = markValues(card, plan);
    this.readSlowly = numberReader(card, plan);
    this.decimalMark = decimalMarkOf(plan);
    // The database reads a point as the decimal mark.
    this.isIdentity = factor === 1 && offset === 0 && this.decimalMark === ".";
    this.isError = card.means.endsWith("_err");
  }

  read(source: ColumnValues, rows: number, refuse: Refuse): void {
    this.source = source;
    if (this.values.length < rows) {
      this.values = new Float64Array(rows);
      this.isPlain = new Uint8Array(rows);
    }
    if (source instanceof Float64Array) this.readNumbers(source, rows, refuse);
    else this.readTexts(source, rows, refuse);
  }

  /** What stands in the file where the value is blank: "" for an empty cell. */
  textAt(row: number): string {
    const value = this.source[row];
    if (typeof value === "string") return value.trim();
    return value === undefined || Number.isNaN(value) ? "" : String(value);
  }

  /** Takes the place of a value by what follows from it and others. */
  set(row: number, value: number): void {
    this.values[row] = value;
    this.isPlain[row] = 0;
  }

  private readNumbers(source: Float64Array, rows: number, refuse: Refuse): void {
    this.isPlain.fill(0, 0, rows);
    for (let row = 0; row < rows; row++) {
      const raw = source[row] ?? Number.NaN;
      if (raw === Number.POSITIVE_INFINITY || raw === Number.NEGATIVE_INFINITY)
        this.keepUnread(row, String(raw), refuse);
      else {
        const isMark = this.marks.length > 0 && this.marks.includes(raw);
        this.keep(row, isMark ? Number.NaN : raw * this.factor + this.offset, refuse);
      }
    }
  }

  private readTexts(source: readonly string[], rows: number, refuse: Refuse): void {
    for (let row = 0; row < rows; row++) {
      const text = source[row] ?? "";
      const quick = quickNumber(text, this.decimalMark);
      if (Number.isFinite(quick)) {
        const isMark = this.marks.length > 0 && this.marks.includes(quick);
        this.isPlain[row] = this.isIdentity ? 1 : 0;
        this.keep(row, isMark ? Number.NaN : quick * this.factor + this.offset, refuse);
        continue;
      }
      this.isPlain[row] = 0;
      const value = text === "" ? Number.NaN : this.readSlowly(text);
      if (value === null) this.keepUnread(row, text.trim(), refuse);
      else this.keep(row, value, refuse);
    }
  }

  private keep(row: number, value: number, refuse: Refuse): void {
    if (this.isError && value < 0)
      refuse(row, `The error ${shown(this.textAt(row))} in ${this.card.header} is below zero.`);
    // An error of exactly zero says that none was determined.
    this.values[row] = this.isError && value === 0 ? Number.NaN : value;
  }

  /** A limit or a footnote makes a blank of its cell; any other text refuses the row. */
  private keepUnread(row: number, text: string, refuse: Refuse): void {
    this.values[row] = Number.NaN;
    if (PLACING.has(this.card.means) || !isMarkedNumber(text))
      refuse(row, `“${shown(text)}” in ${this.card.header} is not a number.`);
  }
}
