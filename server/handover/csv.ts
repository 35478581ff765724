import { plainNumber } from "#shared/format/numbers.ts";

/** Signs that a spreadsheet takes for the start of a formula. */
const FORMULA_START = /^[=+\-@\t\r]/;
/** Numbers and sexagesimal positions may begin with a sign and stay as they are. */
const IS_NUMERIC = /^[+-]?\d[\d\s:.]*(?:[eE][+-]?\d+)?$/;

/** A text that a spreadsheet will not run; numbers, negative ones too, are left alone. */
export const inertText = (text: string): string =>
  FORMULA_START.test(text) && !IS_NUMERIC.test(text) ? `'${text}` : text;

const quoteIfNeeded = (text: string): string =>
  /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;

/** One cell by RFC 4180; a blank is empty. */
export const csvCell = (value: string | number | null): string => {
  if (value === null) return "";
  return typeof value === "number" ? plainNumber(value) : quoteIfNeeded(inertText(value));
};

export const csvLine = (values: readonly (string | number | null)[]): string =>
  `${values.map(csvCell).join(",")}\r\n`;
