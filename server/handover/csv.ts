import { stringify } from "csv-stringify/sync";
import { plainNumber } from "#shared/format/numbers.ts";
import type { FileColumn } from "./list-columns.ts";

/** Signs that a spreadsheet takes for the start of a formula. */
const FORMULA_START = /^[=+\-@\t\r]/;
/** Numbers and sexagesimal positions may begin with a sign and stay as they are. */
const IS_NUMERIC = /^[+-]?\.?\d[\d :.dhms]*(?:[eE][+-]?\d+)?$/;

/** An identifier may begin with a sign: without operators and brackets it runs nothing. */
const IS_PLAIN_IDENTIFIER = /^[+-][\w .:-]*$/;

/** A text that a spreadsheet will not run; numbers, negative ones too, are left alone. */
const inertText = (text: string, isIdentifier: boolean): string => {
  if (!FORMULA_START.test(text) || IS_NUMERIC.test(text)) return text;
  return isIdentifier && IS_PLAIN_IDENTIFIER.test(text) ? text : `'${text}`;
};

type Cell = string | number | null;

/**
 * One line by RFC 4180; a blank is empty. A line break of any kind puts its cell in quotes.
 *
 * @param columns of those values; none for a line of names
 */
export const csvLine = (
  values: readonly Cell[],
  columns: readonly Pick<FileColumn, "isIdentifier">[] = [],
): string =>
  stringify(
    [
      values.map((value, i) =>
        typeof value === "string" ? inertText(value, columns[i]?.isIdentifier === true) : value,
      ),
    ],
    { record_delimiter: "windows", quoted_match: /[\r\n]/, cast: { number: plainNumber } },
  );
