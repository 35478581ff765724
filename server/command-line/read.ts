import { once } from "node:events";
import { basename } from "node:path";
import type { Writable } from "node:stream";
import { AppError } from "../errors.ts";
import { openTable, type RecognisedTable } from "../formats/open-table.ts";
import { bytesOf } from "./open-table.ts";
import { oneOf, oneOperand, readOptions } from "./options.ts";
import { readPlanFile } from "./plan-file.ts";
import { ReadCounts, readReport } from "./read-report.ts";
import { rowLines, rowsHeader } from "./read-rows.ts";
import { type Surroundings, write } from "./surroundings.ts";
import { asks, usage } from "./trouble.ts";
import { beginFile } from "./unfinished-file.ts";

export const READ_HELP = `Says what the readers make of a file, without taking its columns for anything yet.

  shortlight read FILE [--companion README] [--table NAME] [--plan PLAN.json] [--rows] [--format json|ecsv]

  FILE         a table: text between commas, semicolons, tabs, bars or blanks, text in columns, text with a byte-by-byte
               description, ECSV, VOTable or FITS; each also packed with gzip. What it is is told by its content.
  --companion  the byte-by-byte description of FILE, where it is a file of its own
  --table      which table FILE is, where several are described and none has its name
  --plan       a plan as for "derive"; its delimiter, decimalMark and encoding are taken
  --rows       the values as ECSV instead of the report
  --format     json (the report; the default) or ecsv (the same as --rows)

The report is JSON: what the file was taken for, its encoding, its columns with type, unit, UCD, description, null mark
and frame, the rows that it declares and the rows that were read, how many rows were refused with the first of them,
and what was found. Rows are written once all of them have been read, so that a file that ends in the middle leaves
nothing behind.
`;

const OPTIONS = {
  companion: { type: "string" },
  table: { type: "string" },
  plan: { type: "string" },
  rows: { type: "boolean", default: false },
  format: { type: "string" },
} as const;

/** Which of several tables a file is, the person must say. */
const asQuestion = (error: unknown): unknown =>
  error instanceof AppError && error.code === "which-table"
    ? asks(error.code, error.message, { hint: "Say which of them the file is with --table.", cause: error })
    : error;

interface Named {
  readonly file: string;
  readonly companion: string | undefined;
  readonly table: string | undefined;
  readonly plan: string | undefined;
}

const openNamed = async (
  folder: string,
  { file, companion, table, plan }: Named,
): Promise<RecognisedTable> => {
  const { delimiter, decimalMark, encoding } = await readPlanFile(folder, plan);
  const beside = companion === undefined ? undefined : await bytesOf(folder, companion);
  const choice = { name: basename(file), table, companion: beside, delimiter, decimalMark, encoding };
  return openTable(await bytesOf(folder, file), choice).catch((error: unknown) => {
    throw asQuestion(error);
  });
};

const send = async (to: Writable, text: string): Promise<void> => {
  if (!to.write(text)) await once(to, "drain");
};

const writeRows = async (table: RecognisedTable, counts: ReadCounts, at: Surroundings): Promise<void> => {
  const draft = await beginFile(at.folder, undefined, at.out);
  try {
    for await (const batch of table.reader.batches) {
      counts.add(batch);
      await send(draft.rows, rowLines(batch));
    }
    await draft.finish(rowsHeader(table.reader.header));
  } finally {
    await draft.discard();
  }
};

/** What a person should know who sees the rows alone. */
const summary = (table: RecognisedTable, counts: ReadCounts): string => {
  const refused = counts.refused.map(
    ({ row, line, why }) => `  ${line === null ? `row ${row}` : `line ${line}`}: ${why}\n`,
  );
  const found = table.reader.findings().map(({ level, message }) => `  ${level}: ${message}\n`);
  return `${counts.rows} rows read, ${counts.refusedRows} refused; taken for ${table.takenFor}.\n${refused.join("")}${found.join("")}`;
};

export const read = async (args: readonly string[], at: Surroundings): Promise<void> => {
  const { values, positionals } = readOptions(args, OPTIONS, "read");
  const file = oneOperand(positionals, "The file to read", "read");
  const format = oneOf(values.format ?? (values.rows ? "ecsv" : "json"), ["json", "ecsv"], "format");
  if (values.rows && format === "json")
    throw usage("--rows writes ECSV, and --format json asks for the report.", "Leave one of them out.");
  const { companion, table, plan } = values;
  const opened = await openNamed(at.folder, { file, companion, table, plan });
  const counts = new ReadCounts();
  if (format === "ecsv") {
    await writeRows(opened, counts, at);
    return write(at.err, summary(opened, counts));
  }
  for await (const batch of opened.reader.batches) counts.add(batch);
  await write(at.out, `${JSON.stringify(readReport(file, opened, counts), null, 2)}\n`);
};
