import { LIMITS } from "#shared/limits.ts";
import { unprocessable } from "../../errors.ts";
import { type DecimalMark, decimalMarkOf } from "../dialect.ts";
import { findNames, type NamesFound } from "../text/names.ts";
import { isNoRow, isRule, type Preamble, readPreamble } from "../text/preamble.ts";
import { Cutter, type Field } from "./cutter.ts";
import { fieldsBetweenGutters, fieldsOfRule, joinUnnamed } from "./gutters.ts";
import { tokensOf } from "./tokens.ts";

/** How the lines of a table in columns of blanks are laid out, as its beginning shows. */
export interface Layout {
  /** By what the columns are told apart. */
  readonly kind: "blanks" | "fixed columns" | "ruled columns";
  readonly preamble: Preamble;
  /** Null where values stand between blanks wherever they are. */
  readonly cutter: Cutter | null;
  readonly found: NamesFound;
  readonly decimalMark: DecimalMark;
  /** No sampled row lacks the last value. */
  readonly isLastFilled: boolean;
}

type Rows = readonly (readonly string[])[];

/** Lines that are looked at: enough to find the gaps between columns, few enough to answer at once. */
const SAMPLE_LINES = 2000;

/** Share of lines that agree on the number of values between blanks. */
const AGREEING = 0.9;

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eEdD][+-]?\d+)?$/;
const hasNumber = (line: string): boolean => tokensOf(line).some((token) => NUMBER.test(token));

interface Reading {
  readonly kind: Layout["kind"];
  readonly cutter: Cutter | null;
  readonly rows: Rows;
}

/** Values between blanks, where nearly all lines have as many. */
const betweenBlanks = (lines: readonly string[], least: number): Reading | null => {
  const rows = lines.map(tokensOf);
  const width = rows[0]?.length ?? 0;
  const agreeing = rows.filter((cells) => cells.length === width).length;
  return width >= 2 && agreeing >= rows.length * least ? { kind: "blanks", cutter: null, rows } : null;
};

const cutAll = (lines: readonly string[], fields: readonly Field[]): Rows | null => {
  const cutter = new Cutter(fields);
  const rows = lines.map((line) => cutter.cut(line));
  return rows.every((cells) => typeof cells !== "number") ? rows : null;
};

/** Share of a column's cells that may look like several values. */
const MOST_SEVERAL = 0.3;
/** Hours, minutes and seconds are three numbers; a cell of more is several values. */
const MOST_NUMBERS = 3;

const isSeveral = (cell: string): boolean =>
  / {2,}/.test(cell) || cell.split(" ").filter((word) => NUMBER.test(word)).length > MOST_NUMBERS;

const areSeveral = (rows: Rows, at: number): boolean => {
  const cells = rows.map((row) => row[at] ?? "").filter((cell) => cell !== "");
  return cells.filter(isSeveral).length > cells.length * MOST_SEVERAL;
};

/** Whether the last column holds more than single words. */
const hasWords = (rows: Rows): boolean => rows.slice(1).some((cells) => /\s/.test(cells.at(-1) ?? ""));

const reading = (kind: Layout["kind"], rows: Rows | null, fields: readonly Field[]): Reading | null =>
  rows && fields.length >= 2 && !fields.some((_, at) => areSeveral(rows, at))
    ? { kind, rows, cutter: new Cutter(fields, hasWords(rows)) }
    : null;

/** Columns that the names stand above. */
const underNames = (lines: readonly string[]): Reading | null => {
  const [names = "", ...body] = lines;
  const fields = fieldsBetweenGutters(lines);
  const isHeaded = !hasNumber(names) && body.some(hasNumber);
  const own = isHeaded ? joinUnnamed(fields, names) : fields;
  if (!own || own.some(({ from, to }) => / {2,}\S/.test(names.slice(from, to).trim()))) return null;
  return reading("fixed columns", cutAll(lines, own), own);
};

/** Columns below as many names that do not stand above them. */
const besidesNames = ([names = "", ...body]: readonly string[]): Reading | null => {
  const fields = fieldsBetweenGutters(body);
  const words = [tokensOf(names), names.trim().split(/ {2,}|\t/)].find(
    (list) => list.length === fields.length,
  );
  const rows = words && body.length > 0 ? cutAll(body, fields) : null;
  return words && rows ? reading("fixed columns", [words, ...rows], fields) : null;
};

const ruled = (lines: readonly string[], rule: string): Reading | null => {
  const fields = fieldsOfRule(rule);
  return reading("ruled columns", cutAll(lines, fields), fields);
};

/** Whether both readings say the same wherever a line has all its values between blanks. */
const isSame = (fixed: Reading, blanks: Reading): boolean =>
  fixed.rows.every((cells, at) => {
    const tokens = blanks.rows[at] ?? [];
    return tokens.length !== fixed.rows[0]?.length || cells.join("\n") === tokens.join("\n");
  });

const choose = (lines: readonly string[], rule: string | undefined): Reading | null => {
  const byRule = rule === undefined ? null : ruled(lines, rule);
  if (byRule) return byRule;
  const blanks = betweenBlanks(lines, 1);
  const fixed = underNames(lines) ?? besidesNames(lines);
  if (blanks)
    return fixed && fixed.rows[0]?.length === blanks.rows[0]?.length && isSame(fixed, blanks)
      ? fixed
      : blanks;
  return fixed ?? betweenBlanks(lines, AGREEING);
};

const unclear = (): Error =>
  unprocessable(
    "columns-not-clear",
    "The columns of this table cannot be told apart: its rows have different numbers of values between blanks, and no places that are blank in all of them fit its names.",
    { hint: "Write the table with commas or tabs between its values, and bring that." },
  );

const tooWide = (width: number): Error =>
  unprocessable(
    "too-many-columns",
    `The table has ${width.toLocaleString("en")} columns; ${LIMITS.fileColumns.toLocaleString("en")} are the most that are read.`,
    { hint: "Save the columns that you need as a table of their own, and bring that." },
  );

const isLastFilled = (rows: Rows): boolean => rows.length > 0 && rows.every((cells) => cells.at(-1) !== "");

/** A line among the first that is ruled for each column. */
const ruleAmong = (lines: readonly string[]): string | undefined =>
  lines.slice(0, 3).find((line) => isRule(line) && /^[-=\s]+$/.test(line) && fieldsOfRule(line).length >= 2);

/**
 * Judges the beginning of a text whose columns stand between blanks. Null where nothing of that kind is seen.
 *
 * @param head whole lines
 */
export const judgeColumns = (head: string): Layout | null => {
  const all = head.split("\n", SAMPLE_LINES);
  const preamble = readPreamble(all);
  const own = all
    .slice(preamble.lines)
    .filter((line) => line.trim() !== "" && (preamble.mark === null || !line.startsWith(preamble.mark)));
  const lines = own.filter((line) => !isNoRow(line));
  const chosen = lines.length === 0 ? null : choose(lines, ruleAmong(own));
  if (!chosen) return null;
  const decimalMark = decimalMarkOf(
    chosen.rows.map((cells) => [...cells]),
    "\t",
  );
  const found = findNames({ comments: preamble.comments, rows: chosen.rows, decimalMark, split: tokensOf });
  if (found.names.length > LIMITS.fileColumns) throw tooWide(found.names.length);
  return {
    kind: chosen.kind,
    preamble,
    cutter: chosen.cutter,
    found,
    decimalMark,
    isLastFilled: isLastFilled(chosen.rows.slice(found.skip, -1)),
  };
};

/** As `judgeColumns`, where a text must be such a table. */
export const needColumns = (head: string): Layout => {
  const layout = judgeColumns(head);
  if (layout) return layout;
  throw unclear();
};
