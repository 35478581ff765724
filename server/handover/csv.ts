import { stringify } from "csv-stringify/sync";
import { plainNumber } from "#shared/format/numbers.ts";

/** Signs that a spreadsheet takes for the start of a formula. */
const FORMULA_START = /^[=+\-@\t\r]/;
/** Numbers and sexagesimal positions may begin with a sign and stay as they are. */
const IS_NUMERIC = /^[+-]?\d[\d\s:.]*(?:[eE][+-]?\d+)?$/;

/** A text that a spreadsheet will not run; numbers, negative ones too, are left alone. */
const inertText = (text: string): string =>
  FORMULA_START.test(text) && !IS_NUMERIC.test(text) ? `'${text}` : text;

/** One line by RFC 4180; a blank is empty. */
export const csvLine = (values: readonly (string | number | null)[]): string =>
  stringify([values.map((value) => (typeof value === "string" ? inertText(value) : value))], {
    record_delimiter: "windows",
    cast: { number: plainNumber },
  });
