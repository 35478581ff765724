import type { ColumnType } from "../table.ts";

/** A column as a byte-by-byte description has it. */
export interface DescribedField {
  readonly label: string;
  /** Places of its characters, from 0; `to` is the first after it. */
  readonly from: number;
  readonly to: number;
  readonly format: string;
  readonly type: ColumnType;
  /** Digits after the point that the format asks for. */
  readonly decimals: number;
  /** As spelled; empty for the dashes that say "none". */
  readonly unit: string;
  readonly description: string;
  readonly limits: string;
  readonly isNullable: boolean;
  readonly nullMark: string | null;
}

const FORMAT = /^(\d*)([AIFEDGX])(\d*)(?:\.(\d+))?$/i;

/** Digits that an int32 always holds. */
const SHORT_DIGITS = 9;

/** Type of a column by its Fortran format: `A10`, `I4`, `F8.3`, `E12.5`; text for any other. */
export const typeOfFormat = (format: string): { type: ColumnType; decimals: number } => {
  const [, repeat = "", letter = "", width = "", decimals = ""] = FORMAT.exec(format) ?? [];
  // A repeated format is several values in one column.
  if (letter === "" || Number(repeat || 1) > 1) return { type: "text", decimals: 0 };
  if (/i/i.test(letter)) return { type: Number(width || 1) > SHORT_DIGITS ? "int64" : "int32", decimals: 0 };
  return /[fedg]/i.test(letter)
    ? { type: "float64", decimals: Number(decimals || 0) }
    : { type: "text", decimals: 0 };
};
