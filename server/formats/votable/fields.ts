import type { ColumnType, PositionFrame, TableColumn } from "../table.ts";
import { short } from "./faults.ts";

interface Datatype {
  /** Bits of one item in the binary forms. */
  readonly bits: number;
  /** Type of a column of single values; null where a cell is no single value. */
  readonly type: ColumnType | null;
  /** Least and greatest value of the small integers. */
  readonly range?: readonly [number, number];
}

/** VOTable 1.5 (IVOA REC 2025-01-16), section 2.1 "Primitives". A single bit is a yes or no. */
const DATATYPES: Readonly<Record<string, Datatype>> = {
  boolean: { bits: 8, type: "boolean" },
  bit: { bits: 1, type: "boolean" },
  unsignedByte: { bits: 8, type: "uint8", range: [0, 255] },
  short: { bits: 16, type: "int16", range: [-32_768, 32_767] },
  int: { bits: 32, type: "int32", range: [-2_147_483_648, 2_147_483_647] },
  long: { bits: 64, type: "int64" },
  char: { bits: 8, type: "text" },
  unicodeChar: { bits: 16, type: "text" },
  float: { bits: 32, type: "float32" },
  double: { bits: 64, type: "float64" },
  floatComplex: { bits: 64, type: null },
  doubleComplex: { bits: 128, type: null },
};

interface ArraySize {
  /** Items in a cell; where their number varies, the items in one step of it. */
  readonly items: number;
  readonly varies: boolean;
  readonly dimensions: number;
}

/** A FIELD as the document spells it. */
export interface FieldWords {
  readonly name: string;
  readonly datatype: string;
  readonly arraysize: string;
  readonly unit: string;
  readonly ucd: string;
  readonly description: string;
  readonly nullMark: string | null;
  readonly frame: PositionFrame | null;
}

export interface Field extends FieldWords {
  /** Type of its column; null for cells of several values, which no column holds. */
  readonly type: ColumnType | null;
  readonly range: readonly [number, number] | null;
  /** Bits of an item in the binary forms, and the size of a cell; null where the document does not make them clear. */
  readonly layout: { readonly bits: number; readonly size: ArraySize } | null;
}

/** "", "5", "5*", "*", "3x4", "3x*"; null for anything else. */
const parseArraySize = (text: string): ArraySize | null => {
  const plain = text.trim();
  if (plain === "") return { items: 1, varies: false, dimensions: 0 };
  if (!/^(?:\d+x)*(?:\d+\*?|\*)$/.test(plain)) return null;
  const parts = plain.split("x");
  const varies = plain.endsWith("*");
  const fixed = varies ? parts.slice(0, -1) : parts;
  return { items: fixed.reduce((product, n) => product * Number(n), 1), varies, dimensions: parts.length };
};

const columnType = (datatype: Datatype, size: ArraySize): ColumnType | null => {
  if (datatype.type === "text") return size.dimensions <= 1 ? "text" : null;
  return !size.varies && size.items === 1 ? datatype.type : null;
};

/** What a FIELD means. One of an unknown datatype is text where its cells are text. */
export const fieldOf = (words: FieldWords): Field => {
  const datatype = Object.hasOwn(DATATYPES, words.datatype) ? DATATYPES[words.datatype] : undefined;
  const size = parseArraySize(words.arraysize);
  if (!datatype) return { ...words, type: "text", range: null, layout: null };
  return {
    ...words,
    type: size ? columnType(datatype, size) : "text",
    range: datatype.range ?? null,
    layout: size && { bits: datatype.bits, size },
  };
};

/** How a message names a field: its name, else its place from 1. */
export const nameOf = (field: Field, index: number): string =>
  field.name === "" ? `column ${index + 1}` : short(field.name);

/** The columns of a table, without the fields whose cells hold several values. */
export const columnsOf = (fields: readonly Field[]): TableColumn[] =>
  fields.flatMap(({ type, name, unit, ucd, description, nullMark, frame }) =>
    type === null ? [] : [{ name, type, unit, ucd, description, nullMark, frame }],
  );

/** Place of each field's column; −1 for those without one. */
export const slotsOf = (fields: readonly Field[]): Int32Array => {
  let next = 0;
  return Int32Array.from(fields, (field) => (field.type === null ? -1 : next++));
};
