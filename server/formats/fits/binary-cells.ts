import type { RowBlock } from "./columns.ts";
import type { Findings } from "./findings.ts";

/** Cells of a binary table to values. All numbers of the format are big-endian. */

export const readFloats32 = (block: RowBlock, offset: number): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) values[row] = view.getFloat32(at);
  return values;
};

export const readFloats64 = (block: RowBlock, offset: number): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) values[row] = view.getFloat64(at);
  return values;
};

/** `blank` is a stored value; a number that the type does not hold marks nothing. */
export const readUint8s = (block: RowBlock, offset: number, blank: number): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const stored = view.getUint8(at);
    values[row] = stored === blank ? Number.NaN : stored;
  }
  return values;
};

export const readInt16s = (block: RowBlock, offset: number, blank: number): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const stored = view.getInt16(at);
    values[row] = stored === blank ? Number.NaN : stored;
  }
  return values;
};

export const readInt32s = (block: RowBlock, offset: number, blank: number): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const stored = view.getInt32(at);
    values[row] = stored === blank ? Number.NaN : stored;
  }
  return values;
};

/** Whole numbers of 64 bits as texts with all their digits, `zero` added to what is stored. */
export const readInt64Texts = (
  block: RowBlock,
  offset: number,
  blank: bigint | null,
  zero: bigint,
): string[] => {
  const { view, rows, rowBytes } = block;
  const values = new Array<string>(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const stored = view.getBigInt64(at);
    if (stored === blank) values[row] = "";
    else values[row] = (zero === 0n ? stored : stored + zero).toString();
  }
  return values;
};

/** Whole numbers of 64 bits that a scale turns into measured ones; beyond 2⁵³ they are rounded. */
export const readInt64Numbers = (block: RowBlock, offset: number, blank: bigint | null): Float64Array => {
  const { view, rows, rowBytes } = block;
  const values = new Float64Array(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const stored = view.getBigInt64(at);
    values[row] = stored === blank ? Number.NaN : Number(stored);
  }
  return values;
};

const TRUE = 0x54;
const FALSE = 0x46;

export const readLogicals = (block: RowBlock, offset: number, name: string, findings: Findings): string[] => {
  const { view, rows, rowBytes } = block;
  const values = new Array<string>(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    const byte = view.getUint8(at);
    values[row] = byte === TRUE ? "true" : byte === FALSE ? "false" : "";
    if (byte !== TRUE && byte !== FALSE && byte !== 0)
      strangeLogical(byte, block.firstRow + row, name, findings);
  }
  return values;
};

const strangeLogical = (byte: number, row: number, name: string, findings: Findings): void =>
  findings.add(
    {
      key: "fits-strange-logical",
      level: "ask",
      message: "Logical values are neither T nor F nor empty; they were taken as blank.",
      hint: "If they mean something, write the column as numbers or as T and F, and bring the file anew.",
    },
    `row ${row}, ${name}: byte ${byte}`,
  );

/** The bits of one cell: "true" or "false" for a single one, else a text of ones and zeros, the first bit first. */
export const readBits = (block: RowBlock, offset: number, bits: number): string[] => {
  const { view, rows, rowBytes } = block;
  const values = new Array<string>(rows);
  for (let row = 0, at = offset; row < rows; row++, at += rowBytes) {
    if (bits === 1) values[row] = view.getUint8(at) & 0x80 ? "true" : "false";
    else {
      let text = "";
      for (let bit = 0; bit < bits; bit++) text += (view.getUint8(at + (bit >> 3)) >> (7 - (bit & 7))) & 1;
      values[row] = text;
    }
  }
  return values;
};

/** Stored numbers to physical ones, in place: zero + scale × stored. */
export const applyScale = (values: Float64Array, scale: number, zero: number): Float64Array => {
  if (scale === 1 && zero === 0) return values;
  for (let row = 0; row < values.length; row++) values[row] = zero + scale * (values[row] ?? Number.NaN);
  return values;
};
