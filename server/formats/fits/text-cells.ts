import { isUtf8 } from "node:buffer";
import type { RowBlock } from "./columns.ts";
import type { Findings } from "./findings.ts";

const BLANK = 32;
const LATIN = new TextDecoder("windows-1252");

/** Texts end at their first NUL; blanks behind them say nothing. */
const endOfText = (bytes: Uint8Array, from: number, width: number): number => {
  let end = from;
  const limit = from + width;
  while (end < limit && bytes[end] !== 0) end++;
  while (end > from && bytes[end - 1] === BLANK) end--;
  return end;
};

/** The text of a single cell, each byte a letter. */
export const readText = (
  { bytes, rowBytes }: RowBlock,
  row: number,
  offset: number,
  width: number,
): string => {
  const from = row * rowBytes + offset;
  return bytes.toString("latin1", from, endOfText(bytes, from, width));
};

/** Copies a column's cells one behind the other, and says whether all of them are ASCII. */
const gather = (block: RowBlock, offset: number, width: number, cells: Uint8Array): boolean => {
  const { bytes, rows, rowBytes } = block;
  let bits = 0;
  let to = 0;
  for (let row = 0; row < rows; row++) {
    const from = row * rowBytes + offset;
    for (let at = from; at < from + width; at++) {
      const byte = bytes[at] ?? 0;
      bits |= byte;
      cells[to++] = byte;
    }
  }
  return bits < 128;
};

/**
 * Texts of a column of cells of fixed width. Letters beyond ASCII, which the format does not allow, are read as UTF-8
 * where the cell's bytes are that, else one by one as Latin letters; either is a finding.
 */
export const readTexts = (
  block: RowBlock,
  offset: number,
  width: number,
  name: string,
  findings: Findings,
): string[] => {
  const cells = Buffer.allocUnsafe(block.rows * width);
  const isAscii = gather(block, offset, width, cells);
  // One text for the whole column, and cells cut from it, is several times quicker than a text for each cell.
  const text = isAscii ? cells.toString("latin1") : "";
  const values = new Array<string>(block.rows);
  for (let row = 0; row < block.rows; row++) {
    const from = row * width;
    const end = endOfText(cells, from, width);
    values[row] = isAscii
      ? text.slice(from, end)
      : foreignText(cells.subarray(from, end), block.firstRow + row, name, findings);
  }
  return values;
};

const foreignText = (cell: Buffer, row: number, name: string, findings: Findings): string => {
  if (!cell.some((byte) => byte > 127)) return cell.toString("latin1");
  const isUnicode = isUtf8(cell);
  const text = isUnicode ? cell.toString("utf8") : LATIN.decode(cell);
  findings.add(
    {
      key: isUnicode ? "fits-utf8" : "fits-latin",
      level: isUnicode ? "note" : "ask",
      message: isUnicode
        ? "Texts hold letters beyond ASCII, which FITS does not allow; they were read as UTF-8."
        : "Texts hold bytes that are neither ASCII nor UTF-8; they were read as Latin letters (Windows-1252).",
      hint: "Look at the examples, and correct the texts in the file where they are wrong.",
    },
    `row ${row}, ${name}: ${text.slice(0, 60)}`,
  );
  return text;
};
