import { unprocessable } from "../../errors.ts";
import { uniqueNames } from "../delimited/unique-names.ts";
import type { OpenTable, RowBatch, TableColumn, TableHeader } from "../table.ts";
import { asciiColumns } from "./ascii-table.ts";
import { binaryColumns } from "./binary-table.ts";
import { ByteSource } from "./byte-source.ts";
import type { ColumnReader } from "./columns.ts";
import { counted, quoted, tooLarge } from "./errors.ts";
import { Findings } from "./findings.ts";
import type { Hdu } from "./hdu.ts";
import { readMeta } from "./meta.ts";
import { readRows } from "./rows.ts";
import { withSerializedWords } from "./serialized-columns.ts";
import { beginSum, findTable, type Opened, surveyRest } from "./survey.ts";

/** The standard's own bound, since keywords have eight characters. */
const MOST_COLUMNS = 999;
/** A row is held whole. */
const MOST_ROW_BYTES = 4 * 2 ** 20;

const checkSize = (table: Hdu): void => {
  const columns = table.header.count("TFIELDS");
  if (columns > MOST_COLUMNS)
    throw tooLarge(
      `The table ${quoted(table.name)} has ${counted(columns)} columns; FITS allows ${MOST_COLUMNS}.`,
    );
  if (table.rowBytes > MOST_ROW_BYTES)
    throw tooLarge(
      `A row of the table ${quoted(table.name)} has ${counted(table.rowBytes)} bytes; ${counted(MOST_ROW_BYTES)} are the most that are read.`,
    );
};

const readersOf = (table: Hdu, findings: Findings): ColumnReader[] => {
  checkSize(table);
  const readers =
    table.kind === "ASCII table" ? asciiColumns(table, findings) : binaryColumns(table, findings);
  // Columns of an ASCII table may lie over each other, and so be larger together than the row.
  const bytes = readers.reduce((sum, reader) => sum + reader.bytes, 0);
  if (bytes > MOST_ROW_BYTES)
    throw tooLarge(
      `The columns of the table ${quoted(table.name)} have ${counted(bytes)} bytes in each row; ${counted(MOST_ROW_BYTES)} are the most that are read.`,
    );
  // A row without bytes has no end, however many of them a header promises.
  if (readers.length > 0 && table.rowBytes > 0) return readers;
  const [example] = findings.list().filter((finding) => finding.key.startsWith("fits-left-out"));
  throw unprocessable(
    "fits-no-columns",
    `The table ${quoted(table.name)} has no column that can be read.${example ? ` ${example.message}` : ""}`,
    { hint: example?.hint ?? "Get the file again, or bring another table." },
  );
};

const noteUnreadable = ({ file, table }: Opened, findings: Findings): void => {
  for (const record of [file, table.header].flatMap((header) => header.unreadable))
    findings.add(
      {
        key: "fits-unreadable-records",
        level: "note",
        message:
          "Records of the headers are neither a keyword with a value nor a comment; they were passed over.",
        hint: "Look whether the names and units of the columns are complete.",
      },
      record.trim().slice(0, 80),
    );
};

const noteRenamed = (name: string, findings: Findings): void =>
  findings.add(
    {
      key: "headers-renamed",
      level: "note",
      message: "Columns share a name or have none, and are told apart by a number.",
      hint: "Nothing needs to be done; the original keeps its names.",
    },
    name,
  );

/** The columns as a person sees them: each with a name of its own, and with all words that the file has for it. */
const presentColumns = (
  { table }: Opened,
  readers: readonly ColumnReader[],
  findings: Findings,
): TableColumn[] => {
  const columns = withSerializedWords(
    readers.map((reader) => reader.column),
    table.header.comments,
  );
  const { header: names, renamed } = uniqueNames(columns.map((column) => column.name));
  for (let place = 1; place <= table.header.count("TFIELDS"); place++)
    if (table.header.text(`TTYPE${place}`) === null) noteRenamed(`column ${place}`, findings);
  for (const { to } of renamed) noteRenamed(to, findings);
  return columns.map((column, index) => ({ ...column, name: names[index] ?? column.name }));
};

async function* batchesOf(
  source: ByteSource,
  opened: Opened,
  readers: readonly ColumnReader[],
  findings: Findings,
): AsyncGenerator<RowBatch> {
  try {
    beginSum(source, opened);
    yield* readRows(source, opened.table, readers);
    if (opened.table.rows > 0) await surveyRest(source, opened, findings);
  } finally {
    await source.close();
  }
}

const open = async (source: ByteSource) => {
  const findings = new Findings();
  const opened = await findTable(source, findings);
  const { file, table } = opened;
  const readers = readersOf(table, findings);
  noteUnreadable(opened, findings);
  const header: TableHeader = {
    format: "fits",
    variant: table.kind,
    encoding: null,
    columns: presentColumns(opened, readers, findings),
    declaredRows: table.rows,
    meta: readMeta([table.header, file], findings),
  };
  return { header, batches: batchesOf(source, opened, readers, findings), findings: () => findings.list() };
};

/**
 * Opens the first table with rows of a FITS file: a binary table or an ASCII table (Definition of the FITS, version 4.0,
 * sections 7.2 and 7.3). Holds one batch of rows at a time.
 */
export const openFits: OpenTable = async (source) => {
  const bytes = new ByteSource(source);
  try {
    return await open(bytes);
  } catch (error) {
    await bytes.close();
    throw error;
  }
};
