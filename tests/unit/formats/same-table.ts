import type { OpenChoice } from "#server/formats/open-table.ts";
import type { TableFormat } from "#server/formats/table.ts";
import { ecsv } from "./ecsv/support.ts";
import { extension, primary } from "./fits/fits-file.ts";
import { votable } from "./votable/support.ts";

/** One table of an identifier, a name, a position and a brightness, written in every format that is read. */

interface Row {
  readonly id: bigint;
  readonly name: string | null;
  readonly ra: number;
  readonly V: number | null;
}

const ROWS: readonly Row[] = [
  { id: 3141592653589793239n, name: "LH-0031", ra: 217.425, V: 11.5 },
  { id: 3141592653589793240n, name: "Étoile", ra: 0.25, V: null },
  { id: 7n, name: null, ra: 359.5, V: -1.25 },
];

interface SameTable extends Pick<OpenChoice, "decimalMark"> {
  readonly format: TableFormat;
  bytes(): Uint8Array;
}

const lines = (cells: readonly (readonly string[])[], between: string): string =>
  cells.map((row) => `${row.join(between)}\n`).join("");

const TEXTS = [
  ["id", "name", "ra", "V"],
  ...ROWS.map(({ id, name, ra, V }) => [String(id), name ?? "", String(ra), V === null ? "" : String(V)]),
];

const WIDTHS = [19, 7, 7, 5];
const columns = TEXTS.map((row) => row.map((cell, at) => cell.padStart(WIDTHS[at] ?? 0)));

const RULE = "-".repeat(80);
const DESCRIPTION = `Byte-by-byte Description of file: table.dat
${RULE}
   Bytes Format Units Label Explanations
${RULE}
   1- 19 I19    ---   id    Identifier
  21- 27 A7     ---   name  ? Name
  29- 35 F7.3   deg   ra    Right ascension
  37- 41 F5.2   mag   V     ? Brightness
${RULE}
`;

const fitsRow = ({ id, name, ra, V }: Row): Buffer => {
  const row = Buffer.alloc(33, 32);
  row.writeBigInt64BE(id, 0);
  row.write(name ?? "", 8, "utf8");
  row.writeDoubleBE(ra, 17);
  row.writeDoubleBE(V ?? Number.NaN, 25);
  return row;
};

const fits = (): Uint8Array => {
  const forms = [
    ["id", "K"],
    ["name", "9A"],
    ["ra", "D"],
    ["V", "D"],
  ].map(([name, form = ""]) => ({ name, form }));
  return Buffer.concat([primary(), extension({ columns: forms, rows: ROWS.map(fitsRow) })]);
};

const FIELDS = `<FIELD name="id" datatype="long"/><FIELD name="name" datatype="unicodeChar" arraysize="*"/>
<FIELD name="ra" datatype="double"/><FIELD name="V" datatype="double"/>`;

const binary2Row = ({ id, name, ra, V }: Row): Buffer => {
  const text = Buffer.from(name ?? "", "utf16le").swap16();
  const row = Buffer.alloc(1 + 8 + 4 + text.length + 16);
  row[0] = (name === null ? 0x40 : 0) | (V === null ? 0x10 : 0);
  row.writeBigInt64BE(id, 1);
  row.writeInt32BE(text.length / 2, 9);
  text.copy(row, 13);
  row.writeDoubleBE(ra, 13 + text.length);
  row.writeDoubleBE(V ?? 0, 21 + text.length);
  return row;
};

const utf16be = (text: string): Uint8Array => Buffer.from(text, "utf16le").swap16();
const text = (content: string) => (): Uint8Array => Buffer.from(content);

export const FILES: Readonly<Record<string, SameTable>> = {
  "text with commas": { format: "delimited", bytes: text(lines(TEXTS, ",")) },
  "text with CR LF": { format: "delimited", bytes: text(lines(TEXTS, ",").replaceAll("\n", "\r\n")) },
  "text with CR alone": { format: "delimited", bytes: text(lines(TEXTS, ",").replaceAll("\n", "\r")) },
  "text with semicolons and decimal commas": {
    format: "delimited",
    bytes: text(lines(TEXTS, ";").replaceAll(".", ",")),
  },
  "text with tabs": { format: "delimited", bytes: text(lines(TEXTS, "\t")) },
  "text with bars": { format: "delimited", bytes: text(lines(TEXTS, "|")) },
  "text framed by bars": {
    format: "delimited",
    bytes: text(`| ${lines(columns, " | ").trimEnd().replaceAll("\n", " |\n| ")} |\n`),
  },
  "text with a mark": { format: "delimited", bytes: text(`\ufeff${lines(TEXTS, ",")}`) },
  "UTF-16 with a mark": {
    format: "delimited",
    bytes: () => Buffer.from(`\ufeff${lines(TEXTS, ",")}`, "utf16le"),
  },
  "UTF-16 without a mark": { format: "delimited", bytes: () => Buffer.from(lines(TEXTS, ","), "utf16le") },
  "big-endian UTF-16": { format: "delimited", bytes: () => utf16be(`\ufeff${lines(TEXTS, ",")}`) },
  "big-endian UTF-16 without a mark": { format: "delimited", bytes: () => utf16be(lines(TEXTS, ",")) },
  "columns at fixed places": { format: "fixed-width", bytes: text(lines(columns, "  ")) },
  "a description above the rows": {
    format: "described",
    bytes: text(`${DESCRIPTION}${lines(columns.slice(1), " ").replace("217.425", "217.425")}`),
  },
  ECSV: {
    format: "ecsv",
    bytes: text(
      ecsv(
        [
          "{name: id, datatype: int64}",
          "{name: name, datatype: string}",
          "{name: ra, datatype: float64}",
          "{name: V, datatype: float64}",
        ],
        lines(TEXTS, ","),
        ["delimiter: ','"],
      ),
    ),
  },
  "a VOTable of TABLEDATA": {
    format: "votable",
    bytes: text(
      votable(
        FIELDS,
        `<TABLEDATA>${TEXTS.slice(1)
          .map((row) => `<TR>${row.map((cell) => `<TD>${cell}</TD>`).join("")}</TR>`)
          .join("")}</TABLEDATA>`,
      ),
    ),
  },
  "a VOTable of BINARY2": {
    format: "votable",
    bytes: text(
      votable(
        FIELDS,
        `<BINARY2><STREAM encoding="base64">${Buffer.concat(ROWS.map(binary2Row)).toString("base64")}</STREAM></BINARY2>`,
      ),
    ),
  },
  FITS: { format: "fits", bytes: fits },
};
