import { isBlankWord } from "../numbers.ts";
import type { ColumnType, ColumnValues } from "../table.ts";
import { isPointLeftOut, readAsciiNumber, readAsciiWhole, readPlainNumber } from "./ascii-numbers.ts";
import { applyScale } from "./binary-cells.ts";
import { type ColumnReader, columnName, describeColumn, type RowBlock } from "./columns.ts";
import { badHeader, counted, quoted } from "./errors.ts";
import type { Findings } from "./findings.ts";
import { type AsciiForm, readAsciiForm } from "./form.ts";
import type { Hdu } from "./hdu.ts";
import type { FitsHeader } from "./header.ts";
import { leaveOut } from "./left-out.ts";
import { readScale } from "./scale.ts";
import { readText, readTexts } from "./text-cells.ts";

/** A column of an ASCII table in its place. */
interface Field {
  readonly header: FitsHeader;
  readonly place: number;
  readonly name: string;
  readonly form: AsciiForm;
  readonly offset: number;
  /** TNULL without its blanks. */
  readonly mark: string | null;
  readonly findings: Findings;
}

/** Digits that 32 bits hold for certain. */
const MOST_SHORT_DIGITS = 9;

const fieldAt = ({ header, rowBytes }: Hdu, place: number, findings: Findings): Field => {
  const name = columnName(header, place);
  const text = header.text(`TFORM${place}`);
  const form = readAsciiForm(text ?? "");
  if (!form)
    throw badHeader(`Column ${place} (${name}) has the form ${quoted(text ?? "")}, which cannot be read.`);
  const offset = header.count(`TBCOL${place}`) - 1;
  if (offset < 0 || offset + form.width > rowBytes)
    throw badHeader(
      `Column ${place} (${name}) takes the characters ${counted(offset + 1)} to ${counted(offset + form.width)} of a row, but a row has ${counted(rowBytes)}.`,
    );
  const mark = header.text(`TNULL${place}`);
  return { header, place, name, form, offset, mark, findings };
};

/** Blank fields are zero by the letter of the format; here they are blanks, since a missing number is not zero. */
const noteEmpty = ({ name, findings }: Field, row: number): void =>
  findings.add(
    {
      key: "fits-empty-number",
      level: "note",
      message: "Fields of numbers are empty; they were taken as blank, not as zero.",
      hint: "If they should be zero, write the zeros into the file, and bring it anew.",
    },
    `row ${row}, ${name}`,
  );

const askPoint = ({ name, findings }: Field, row: number, text: string, value: number): void =>
  findings.add(
    {
      key: "fits-left-out-point",
      level: "ask",
      message:
        "Numbers are written without a decimal point; by the rules of the format it was put where the column's form has it.",
      hint: "Compare the examples with what you expect. If they are wrong, write the points into the file.",
    },
    `row ${row}, ${name}: ${text} read as ${value}`,
  );

/** Blank by the file's mark, by a usual word, or by the stars that stand for a number too long for its field. */
const isBlank = (field: Field, text: string, row: number): boolean => {
  if (text === field.mark || /^\*+$/.test(text)) return true;
  if (text === "") noteEmpty(field, row);
  return isBlankWord(text);
};

const refuse = (block: RowBlock, row: number, { name }: Field, text: string): void => {
  if (!block.refused.has(row)) block.refused.set(row, `${name} is ${quoted(text)}, which is not a number.`);
};

const numberIn = (text: string, { code, decimals }: AsciiForm): number =>
  code === "I" ? Number(readAsciiWhole(text) ?? Number.NaN) : readAsciiNumber(text, decimals);

/** A field that is no plain number: blank, refused, or spelled in a rarer way. */
const readRareNumber = (block: RowBlock, row: number, field: Field): number => {
  const text = readText(block, row, field.offset, field.form.width).trim();
  if (text === field.mark) return Number.NaN;
  const value = numberIn(text, field.form);
  if (Number.isNaN(value)) {
    if (!isBlank(field, text, block.firstRow + row)) refuse(block, row, field, text);
  } else if (isPointLeftOut(text, field.form.decimals)) askPoint(field, block.firstRow + row, text, value);
  return value;
};

const readNumbers = (block: RowBlock, field: Field): Float64Array => {
  const { bytes, rows, rowBytes } = block;
  const { code, width, decimals } = field.form;
  const marked = readAsciiNumber(field.mark ?? "", 0);
  const values = new Float64Array(rows);
  for (let row = 0, at = field.offset; row < rows; row++, at += rowBytes) {
    const value = readPlainNumber(bytes, at, at + width, decimals > 0);
    // A mark is met by its number too, however many zeros either has behind its point.
    if (value === marked) values[row] = Number.NaN;
    else if (Number.isNaN(value) || (code === "I" && !Number.isInteger(value)))
      values[row] = readRareNumber(block, row, field);
    else values[row] = value;
  }
  return values;
};

const readWholeTexts = (block: RowBlock, field: Field): string[] => {
  const texts = readTexts(block, field.offset, field.form.width, field.name, field.findings);
  return texts.map((cell, row) => {
    const text = cell.trim();
    if (isBlank(field, text, block.firstRow + row)) return "";
    const value = readAsciiWhole(text);
    if (value === null) refuse(block, row, field, text);
    return value === null ? "" : value.toString();
  });
};

const readWords = (block: RowBlock, field: Field): string[] => {
  const texts = readTexts(block, field.offset, field.form.width, field.name, field.findings);
  return field.mark === null ? texts : texts.map((text) => (text.trim() === field.mark ? "" : text));
};

const readerOf = (field: Field): ColumnReader | null => {
  const { header, place, form, mark, findings } = field;
  const reader = (type: ColumnType, read: (block: RowBlock) => ColumnValues): ColumnReader => ({
    column: describeColumn(header, place, type, mark),
    bytes: form.width,
    read,
  });
  if (form.code === "A") return reader("text", (block) => readWords(block, field));
  const scale = readScale(header, place);
  if (!scale) return leaveOut("scale", header, place, findings);
  const isWhole = form.code === "I" && scale.scale === 1 && scale.zero === 0;
  if (isWhole && form.width > MOST_SHORT_DIGITS)
    return reader("int64", (block) => readWholeTexts(block, field));
  return reader(isWhole ? "int32" : "float64", (block) =>
    applyScale(readNumbers(block, field), scale.scale, scale.zero),
  );
};

/** The columns of an ASCII table. */
export const asciiColumns = (table: Hdu, findings: Findings): ColumnReader[] => {
  const readers: ColumnReader[] = [];
  for (let place = 1; place <= table.header.count("TFIELDS"); place++) {
    const reader = readerOf(fieldAt(table, place, findings));
    if (reader) readers.push(reader);
  }
  return readers;
};
