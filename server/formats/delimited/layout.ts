import { LIMITS } from "#shared/limits.ts";
import { unprocessable } from "../../errors.ts";
import type { DecimalMark, Delimiter } from "../dialect.ts";
import { findNames, type NamesFound } from "../text/names.ts";
import { isNoRow, type Preamble, readPreamble } from "../text/preamble.ts";
import { chooseDialect } from "./choose-dialect.ts";

/** How the lines of a delimited text are laid out, as its beginning shows. */
export interface Layout {
  readonly preamble: Preamble;
  readonly delimiter: Delimiter;
  readonly decimalMark: DecimalMark;
  readonly rival: Delimiter | null;
  /** Every row begins and ends with a bar. */
  readonly isFramed: boolean;
  readonly found: NamesFound;
}

export interface LayoutChoice {
  readonly delimiter?: Delimiter;
  readonly decimalMark?: DecimalMark;
  /** Name of the file, which decides between readings that are equally likely. */
  readonly name?: string;
}

const SAMPLE_CHARACTERS = 64 * 1024;

/** The sample's whole lines; all of it where it has only one. */
const sampleOf = (text: string): string => {
  if (text.length <= SAMPLE_CHARACTERS) return text;
  const end = text.lastIndexOf("\n", SAMPLE_CHARACTERS);
  return end < 0 ? text : text.slice(0, end + 1);
};

const isFramedLine = (line: string): boolean => /^\s*\|.*\|\s*$/.test(line);

/** Whether lines stand between bars. A row that lacks a bar is none, and does not make the others stand without a frame. */
export const areFramed = (lines: readonly string[]): boolean =>
  isFramedLine(lines[0] ?? "") && lines.filter(isFramedLine).length > lines.length / 2;

/** Cells without the two outside a frame; their padding is the frame's too. */
export const insideFrame = (cells: readonly string[]): string[] =>
  cells.slice(1, -1).map((cell) => cell.trim());

const noRows = (): Error =>
  unprocessable(
    "no-table",
    "The file begins with comments and blank lines alone, and no table follows them.",
    {
      hint: "Check that it is the table itself, or take the marks of comments away from its rows.",
    },
  );

const tooWide = (width: number): Error =>
  unprocessable(
    "too-many-columns",
    `The table has ${width.toLocaleString("en")} columns; ${LIMITS.fileColumns.toLocaleString("en")} are the most that are read.`,
    { hint: "Save the columns that you need as a table of their own, and bring that." },
  );

/** Judges the beginning of a text: comments, delimiter, frame, names and units. */
export const judgeLayout = (head: string, choice: LayoutChoice): Layout => {
  const lines = head.split("\n");
  const preamble = readPreamble(lines);
  const sample = sampleOf(lines.slice(preamble.lines).join("\n"));
  if (sample.trim() === "") throw noRows();
  const chosen = chooseDialect(unruled(sample), choice.delimiter, choice.name);
  const isFramed = chosen.delimiter === "|" && areFramed(unruled(sample).trimEnd().split("\n"));
  const cellsOf = (cells: readonly string[]): readonly string[] => (isFramed ? insideFrame(cells) : cells);
  const { delimiter } = chosen;
  const found = findNames({
    comments: preamble.comments,
    rows: chosen.rows.filter((cells) => cells.some((cell) => cell.trim() !== "")).map(cellsOf),
    decimalMark: choice.decimalMark ?? chosen.decimalMark,
    split: (line) => (line.includes(delimiter) ? cellsOf(line.split(delimiter)) : [line]),
  });
  if (found.names.length > LIMITS.fileColumns) throw tooWide(found.names.length);
  return {
    preamble,
    delimiter,
    decimalMark: choice.decimalMark ?? chosen.decimalMark,
    rival: chosen.rival,
    isFramed,
    found,
  };
};

/** Lines drawn around or below the names have no cells. */
const unruled = (sample: string): string =>
  sample
    .split("\n")
    .filter((line) => !isNoRow(line))
    .join("\n");
