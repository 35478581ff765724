import { unprocessable } from "../errors.ts";
import { areFramed } from "./delimited/layout.ts";
import { isDescriptionHead } from "./described/description.ts";
import { partingsOf } from "./dialect.ts";
import { isEcsv } from "./ecsv/header-lines.ts";
import { isBarred } from "./fixed-width/bar-header.ts";
import { judgeColumns } from "./fixed-width/layout.ts";
import type { TableFormat } from "./table.ts";
import { judgeEncoding } from "./text/encoding.ts";
import { isNoRow, readPreamble } from "./text/preamble.ts";

/** Bytes that a file is recognised by. */
export const RECOGNISED_BYTES = 256 * 1024;

const XML_BYTES = 8 * 1024;
const SAMPLE_CHARACTERS = 64 * 1024;

interface Stranger {
  /** As Latin-1, at the beginning or at another place. */
  readonly mark: string;
  readonly at?: number;
  readonly what: string;
  readonly hint: string;
}

const EXPORT = "Export the table as CSV or ECSV, and bring that.";
const UNPACK = "Unpack it, and bring the table itself, or pack that with gzip.";

const STRANGERS: readonly Stranger[] = [
  {
    mark: "PK\u0003\u0004",
    what: "a zip archive or a spreadsheet",
    hint: `${UNPACK} Of a spreadsheet, save the sheet as CSV.`,
  },
  { mark: "PK\u0005\u0006", what: "an empty zip archive", hint: UNPACK },
  { mark: "\u00d0\u00cf\u0011\u00e0", what: "a spreadsheet or document of an old kind", hint: EXPORT },
  { mark: "%PDF", what: "a PDF document", hint: EXPORT },
  { mark: "{\\rtf", what: "a text document", hint: EXPORT },
  { mark: "%!PS", what: "a PostScript document", hint: EXPORT },
  { mark: "\u0089PNG", what: "a picture", hint: "Bring the table that it shows." },
  { mark: "\u00ff\u00d8\u00ff", what: "a picture", hint: "Bring the table that it shows." },
  { mark: "GIF8", what: "a picture", hint: "Bring the table that it shows." },
  { mark: "BZh", what: "a bzip2 archive", hint: UNPACK },
  { mark: "\u00fd7zXZ", what: "an xz archive", hint: UNPACK },
  { mark: "7z\u00bc\u00af", what: "a 7z archive", hint: UNPACK },
  { mark: "(\u00b5/\u00fd", what: "a Zstandard archive", hint: UNPACK },
  { mark: "\u001f\u009d", what: "an archive of compress", hint: UNPACK },
  { mark: "ustar", at: 257, what: "a tar archive", hint: UNPACK },
  { mark: "\u0089HDF", what: "an HDF5 file", hint: EXPORT },
  { mark: "PAR1", what: "a Parquet file", hint: EXPORT },
  { mark: "SQLite format 3", what: "a database", hint: EXPORT },
  { mark: "DUCK", at: 8, what: "a database", hint: EXPORT },
];

const refuse = (what: string, hint: string): Error =>
  unprocessable("not-a-table", `This is ${what}, not a table.`, { hint });

const refuseStrangers = (head: Uint8Array): void => {
  const start = Buffer.from(head.subarray(0, 512)).toString("latin1");
  const found = STRANGERS.find(({ mark, at = 0 }) => start.startsWith(mark, at));
  if (found) throw refuse(found.what, found.hint);
};

const PAGE =
  "Look at it in a browser: it may be an error or a sign-in page of the service that was saved instead. Bring the table.";

/** The kind of a text in markup; null where it is none. */
const markupFormat = (text: string): TableFormat | null => {
  const start = text.slice(0, XML_BYTES).trimStart();
  if (!start.startsWith("<")) return null;
  if (/<(?:[A-Za-z_][\w.-]*:)?VOTABLE\b/i.test(start)) return "votable";
  if (/<!doctype html|<html|<head|<body/i.test(start)) throw refuse("a web page", PAGE);
  if (/^<\?xml/i.test(start)) return "votable";
  // A comparison such as `<5` may begin the first cell of a table.
  if (/^<[A-Za-z!/]/.test(start)) throw refuse("a text in markup", EXPORT);
  return null;
};

const refuseJson = (text: string): void => {
  const start = text.slice(0, SAMPLE_CHARACTERS).trimStart();
  if (/^\{\s*"|^\[\s*[[{"]/.test(start) && !/^\[[^\]\n]*\][,;\t]/.test(start))
    throw refuse("a text of JSON", "Write its table as CSV or ECSV, and bring that.");
};

/** Share of the lines that a delimiter must explain before it counts as one. */
const EXPLAINED = 0.7;

/** Whether commas, semicolons, tabs or bars part the lines into as many values as the first has. */
const isDelimited = (text: string): boolean => {
  const lines = text.split("\n");
  const { lines: before } = readPreamble(lines);
  const sample = lines
    .slice(before)
    .filter((line) => !isNoRow(line))
    .join("\n")
    .slice(0, SAMPLE_CHARACTERS);
  return (
    areFramed(sample.trimEnd().split("\n")) ||
    partingsOf(sample).some(({ rows, score }) => {
      const width = rows[0]?.length ?? 0;
      const isLone = rows.filter((cells) => cells.join("").trim() !== "").length === 1;
      return width >= 2 && (isLone || score >= EXPLAINED * (1000 + width));
    })
  );
};

const textFormat = (text: string): TableFormat => {
  if (text.split("\n").some((line) => isDescriptionHead(line.slice(0, 200)))) return "described";
  if (isBarred(text)) return "fixed-width";
  if (isDelimited(text)) return "delimited";
  return judgeColumns(text) ? "fixed-width" : "delimited";
};

/**
 * What a file is, by its content alone.
 *
 * @param head its first bytes, RECOGNISED_BYTES of them where it has as many
 * @throws AppError in words for what is no table: archives, documents, pages, pictures
 */
export const recognise = (head: Uint8Array): TableFormat => {
  refuseStrangers(head);
  const start = Buffer.from(head.subarray(0, 80)).toString("latin1");
  if (/^SIMPLE {2}=/.test(start)) return "fits";
  if (isEcsv(head)) return "ecsv";
  const { encoding } = judgeEncoding(head);
  const text = new TextDecoder(encoding === "latin1" ? "windows-1252" : encoding)
    .decode(head, { stream: true })
    .replace(/\r\n?/g, "\n");
  const markup = markupFormat(text);
  if (markup) return markup;
  refuseJson(text);
  const isWhole = head.length < RECOGNISED_BYTES;
  return textFormat(isWhole ? text : text.slice(0, text.lastIndexOf("\n") + 1));
};
