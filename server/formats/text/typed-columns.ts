import { numberCell, textCell } from "../ecsv/cells.ts";
import { isBlankWord, parseNumber } from "../numbers.ts";
import type { ColumnType, ColumnValues } from "../table.ts";

const MINUSES = /[\u2212\u2013\u2014]/g;
const SHOWN_CHARACTERS = 40;

/** A column of a text that declares types. */
export interface TypedColumn {
  readonly name: string;
  readonly type: ColumnType;
  /** Texts that stand for no value; of a column of numbers also other spellings of the same number. */
  readonly nullMarks: readonly string[];
}

type Cell = (text: string) => number | string | null;

const isNumber = (type: ColumnType): boolean => type !== "text" && numberCell(type) !== undefined;

/** Reads a text that is no blank; null where it is none of the type. */
const readerOf = (type: ColumnType): Cell => {
  if (type === "text") return (text) => text;
  if (type === "float64" || type === "float32") {
    const words = numberCell(type);
    return (text) => {
      const value = parseNumber(text, ".");
      if (!Number.isNaN(value)) return type === "float32" ? Math.fround(value) : value;
      return words?.(text) ?? null;
    };
  }
  const read: Cell = numberCell(type) ?? textCell(type === "boolean" ? "bool" : type);
  return (text) => read(text.replace(MINUSES, "-"));
};

const marksOf = ({
  type,
  nullMarks,
}: TypedColumn): ((text: string, value: number | string | null) => boolean) => {
  const texts = new Set(nullMarks);
  const numbers = new Set(
    nullMarks.map((mark) => parseNumber(mark, ".")).filter((mark) => !Number.isNaN(mark)),
  );
  if (!isNumber(type)) return (text) => texts.has(text);
  return (text, value) => texts.has(text) || (typeof value === "number" && numbers.has(value));
};

/** Gathers the cells of rows as values of their columns' types. */
export class TypedColumns {
  /** Blanks in columns of numbers by words that no column declares, with a few of them. */
  undeclaredBlanks = 0;
  readonly undeclaredExamples = new Set<string>();
  private readonly read: readonly Cell[];
  private readonly isMark: readonly ((text: string, value: number | string | null) => boolean)[];
  private readonly values: (number | string)[][];
  private readonly row: (number | string)[] = [];

  constructor(private readonly columns: readonly TypedColumn[]) {
    this.read = columns.map(({ type }) => readerOf(type));
    this.isMark = columns.map(marksOf);
    this.values = columns.map(() => []);
  }

  /** Adds one row to every column, or to none; why it was refused. */
  take(texts: readonly string[]): string | null {
    for (let at = 0; at < this.columns.length; at++) {
      const text = texts[at] ?? "";
      const value = this.valueOf(at, text);
      if (value === null) return this.wrong(at, text);
      this.row[at] = value;
    }
    for (let at = 0; at < this.columns.length; at++) this.values[at]?.push(this.row[at] ?? "");
    return null;
  }

  /** What has gathered, handed over. */
  empty(): ColumnValues[] {
    return this.columns.map(({ type }, at) => {
      const values = this.values[at] ?? [];
      this.values[at] = [];
      return isNumber(type) ? Float64Array.from(values, Number) : values.map(String);
    });
  }

  private valueOf(at: number, text: string): number | string | null {
    const type = this.columns[at]?.type ?? "text";
    const blank = isNumber(type) ? Number.NaN : "";
    if (text === "") return blank;
    const value = this.read[at]?.(text) ?? null;
    if (this.isMark[at]?.(text, value)) return blank;
    if (value !== null || type === "text" || !isBlankWord(text)) return value;
    this.undeclaredBlanks++;
    if (this.undeclaredExamples.size < 5) this.undeclaredExamples.add(`${this.columns[at]?.name}: ${text}`);
    return blank;
  }

  private wrong(at: number, text: string): string {
    const { name, type } = this.columns[at] ?? { name: "", type: "text" };
    return `“${text.slice(0, SHOWN_CHARACTERS)}” in ${name} is no value of the type ${type}.`;
  }
}
