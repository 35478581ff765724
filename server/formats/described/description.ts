import { readExplanation } from "./explanation.ts";
import { type DescribedField, typeOfFormat } from "./field.ts";
import { fits } from "./line-cells.ts";
import { isNote, type Notes, readNotes } from "./notes.ts";
import { isRuleLine } from "./rule.ts";

/** One table as it is described. */
export interface DescribedTable {
  /** Names of the files of this description, as it spells them. */
  readonly files: readonly string[];
  readonly fields: readonly DescribedField[];
  /** Lines of the description, from 0: its first, and the first after it and its notes. */
  readonly begin: number;
  readonly end: number;
}

const HEAD = /^\s*Byte-(?:by|per)-byte\s+Description\s+of\s+files?\s*(?:\(s\))?\s*:?\s*(.*)$/i;
const COLUMN =
  /^\s*(?:(\d+)\s*-\s*)?(\d+)\s+(\d*[AIFEDGXaifedgx]\d*(?:\.\d+)?)\s+(\S+)\s+(\S+)(?:\s+(\S.*))?$/;
const NO_UNIT = /^-+$/;

/** Lines in which a long list of files may go on. */
const LIST_LINES = 20;

/** Rows by which data without a ruled line before them are told from a note. */
const ROWS_SEEN = 20;

/** Whether a line begins the description of a table. */
export const isDescriptionHead = (line: string): boolean => HEAD.test(line);

interface Raw {
  readonly from: number;
  readonly to: number;
  readonly format: string;
  readonly unit: string;
  readonly label: string;
  /** Where the explanation begins in its line. */
  readonly indent: number;
  words: string;
}

/** A column of the description; null for any other line. A row of data may look like one, but columns come in order. */
const rawColumn = (line: string, last: Raw | undefined): Raw | null => {
  const parts = COLUMN.exec(line);
  if (!parts) return null;
  const [, begin, end = "", format = "", unit = "", label = "", words = ""] = parts;
  const from = Number(begin ?? end) - 1;
  const to = Number(end);
  if (from < (last?.to ?? 0) || to <= from) return null;
  return { from, to, format, unit, label, words, indent: line.length - words.length };
};

const goesOn = (line: string, last: Raw): boolean =>
  line.trim() !== "" && line.length - line.trimStart().length >= last.indent - 8;

/** Columns and their explanations, from the line after the head on, up to a ruled line or to what is none of them. */
const readColumns = (lines: readonly string[], from: number): { raw: Raw[]; end: number } => {
  const raw: Raw[] = [];
  let at = from;
  for (; at < lines.length; at++) {
    const line = lines[at] ?? "";
    const last = raw.at(-1);
    const column = rawColumn(line, last);
    if (column) raw.push(column);
    else if (last && goesOn(line, last)) last.words += ` ${line.trim()}`;
    else if (last && line.trim() !== "") break;
    else if (HEAD.test(line)) break;
  }
  return { raw, end: at };
};

const NOTE_SIGN = /\s*\((G?\d+)\)\s*$/;

const fieldOf = (raw: Raw, notes: Notes): DescribedField => {
  const { from, to, format, unit, label } = raw;
  const { words, ...marks } = readExplanation(raw.words);
  const sign = NOTE_SIGN.exec(words)?.[1] ?? "";
  const note = sign === "" ? undefined : notes.get(sign);
  return {
    label,
    from,
    to,
    format,
    ...typeOfFormat(format),
    unit: NO_UNIT.test(unit) ? "" : unit,
    description: note === undefined ? words : `${words.replace(NOTE_SIGN, "")} (Note ${sign}: ${note})`,
    ...marks,
  };
};

/** Notes that several tables share stand at the end of a description of several files. */
const sharedNotes = (lines: readonly string[]): Notes => {
  const at = lines.findIndex((line) => /^\s*Note\s*\(G\d+\)/i.test(line));
  return at < 0 ? new Map() : readNotes(lines, at, () => false).notes;
};

interface Part {
  readonly files: string;
  readonly next: number;
}

/** The list of files, which may go on in the lines before the heads of the columns. */
const readHead = (lines: readonly string[], at: number): Part => {
  let files = HEAD.exec(lines[at] ?? "")?.[1] ?? "";
  let next = at + 1;
  for (; next < Math.min(lines.length, at + LIST_LINES); next++) {
    const line = lines[next] ?? "";
    if (isRuleLine(line) || /^\s*Bytes\b/i.test(line) || rawColumn(line, undefined)) break;
    files += ` ${line.trim()}`;
  }
  return { files, next };
};

/** Where the rows may begin after the columns, and the notes on the way. */
const passNotes = (
  lines: readonly string[],
  raw: readonly Raw[],
  from: number,
): { notes: Notes; end: number } => {
  let end = from;
  while (isRuleLine(lines[end] ?? "") || (lines[end] ?? "x").trim() === "") end++;
  if (!isNote(lines[end] ?? "")) return { notes: new Map(), end: Math.min(end, lines.length) };
  const fields = raw.map((r) => fieldOf(r, new Map()));
  const isRow = (line: string): boolean => fits(line, fields, "characters") || fits(line, fields, "bytes");
  const areRows = (at: number): boolean =>
    isRow(lines[at] ?? "") &&
    lines.slice(at, at + ROWS_SEEN).every((line) => line.trim() === "" || isRow(line));
  return readNotes(lines, end, areRows);
};

/**
 * Reads every byte-by-byte description among some lines (CDS, Standards for Documentation of Astronomical Catalogues
 * 2.0, 2000, section 3.2).
 */
export const readDescriptions = (lines: readonly string[]): DescribedTable[] => {
  const tables: DescribedTable[] = [];
  const shared = sharedNotes(lines);
  for (let at = 0; at < lines.length; at++) {
    if (!isDescriptionHead(lines[at] ?? "")) continue;
    const { files, next } = readHead(lines, at);
    const { raw, end: below } = readColumns(lines, next);
    const { notes, end } = passNotes(lines, raw, below);
    tables.push({
      files: files.split(/[\s,]+/).filter((name) => name !== ""),
      fields: raw.map((r) => fieldOf(r, new Map([...shared, ...notes]))),
      begin: at,
      end,
    });
    at = Math.max(at, end - 1);
  }
  return tables;
};
