import { stream, votable } from "./support.ts";

/** Tables written in each form of a VOTable, by code that has nothing in common with the reader. */

export const DATATYPES = [
  "boolean",
  "unsignedByte",
  "short",
  "int",
  "long",
  "float",
  "double",
  "char",
  "unicodeChar",
] as const;
export type Datatype = (typeof DATATYPES)[number];

/** null is a blank; 64-bit integers and booleans are texts, as the reader gives them. */
export type Value = number | string | null;

export interface WrittenTable {
  datatypes: readonly Datatype[];
  rows: readonly (readonly Value[])[];
}

const isText = (datatype: Datatype): boolean => datatype === "char" || datatype === "unicodeChar";

/** How the binary form without masks spells a blank: the declared mark where the datatype has no other way. */
const MARKS: Partial<Record<Datatype, string>> = {
  unsignedByte: "255",
  short: "-32768",
  int: "-2147483648",
  long: "-9223372036854775808",
};

const fieldsOf = (datatypes: readonly Datatype[]): string =>
  datatypes
    .map((datatype, index) => {
      const size = isText(datatype) ? ' arraysize="*"' : "";
      const mark = MARKS[datatype];
      const values = mark === undefined ? "" : `<VALUES null="${mark}"/>`;
      return `<FIELD name="c${index}" datatype="${datatype}"${size}>${values}</FIELD>`;
    })
    .join("");

const escaped = (text: string): string =>
  text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;").replaceAll("\r", "&#13;");

const cell = (value: Value): string => (value === null ? "<TD/>" : `<TD>${escaped(String(value))}</TD>`);

export const asTabledata = ({ datatypes, rows }: WrittenTable): string =>
  votable(
    fieldsOf(datatypes),
    `<TABLEDATA>${rows.map((row) => `<TR>${row.map(cell).join("")}</TR>`).join("\n")}</TABLEDATA>`,
  );

const bytesOf: Record<Datatype, (value: Value) => Buffer> = {
  boolean: (value) => Buffer.from(value === null ? "?" : value === "true" ? "T" : "F"),
  unsignedByte: (value) => Buffer.from([Number(value ?? MARKS.unsignedByte)]),
  short: (value) => {
    const bytes = Buffer.alloc(2);
    bytes.writeInt16BE(Number(value ?? MARKS.short));
    return bytes;
  },
  int: (value) => {
    const bytes = Buffer.alloc(4);
    bytes.writeInt32BE(Number(value ?? MARKS.int));
    return bytes;
  },
  long: (value) => {
    const bytes = Buffer.alloc(8);
    bytes.writeBigInt64BE(BigInt(value ?? MARKS.long ?? 0));
    return bytes;
  },
  float: (value) => {
    const bytes = Buffer.alloc(4);
    bytes.writeFloatBE(Number(value ?? Number.NaN));
    return bytes;
  },
  double: (value) => {
    const bytes = Buffer.alloc(8);
    bytes.writeDoubleBE(Number(value ?? Number.NaN));
    return bytes;
  },
  char: (value) => counted(Buffer.from(String(value ?? "")), 1),
  unicodeChar: (value) => counted(Buffer.from(String(value ?? ""), "utf16le").swap16(), 2),
};

const counted = (bytes: Buffer, width: number): Buffer => {
  const count = Buffer.alloc(4);
  count.writeInt32BE(bytes.length / width);
  return Buffer.concat([count, bytes]);
};

const rowBytes = (datatypes: readonly Datatype[], row: readonly Value[]): Buffer[] =>
  datatypes.map((datatype, index) => bytesOf[datatype](row[index] ?? null));

const mask = (row: readonly Value[]): Buffer => {
  const bytes = Buffer.alloc(Math.ceil(row.length / 8));
  for (const [index, value] of row.entries())
    if (value === null) bytes[index >> 3] = (bytes[index >> 3] ?? 0) | (0x80 >> (index & 7));
  return bytes;
};

export const asBinary = ({ datatypes, rows }: WrittenTable): string =>
  votable(
    fieldsOf(datatypes),
    stream("BINARY", Buffer.concat(rows.flatMap((row) => rowBytes(datatypes, row)))),
  );

export const asBinary2 = ({ datatypes, rows }: WrittenTable): string =>
  votable(
    fieldsOf(datatypes),
    stream("BINARY2", Buffer.concat(rows.flatMap((row) => [mask(row), ...rowBytes(datatypes, row)]))),
  );

/** The cells as the reader should give them. */
export const expectedRows = ({ datatypes, rows }: WrittenTable): (number | string)[][] =>
  rows.map((row) =>
    datatypes.map((datatype, index) => {
      const isTextColumn = isText(datatype) || datatype === "boolean" || datatype === "long";
      return row[index] ?? (isTextColumn ? "" : Number.NaN);
    }),
  );
