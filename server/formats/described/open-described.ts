import { unprocessable } from "../../errors.ts";
import { Findings } from "../findings.ts";
import type { RowBatch, TableFinding, TableReader } from "../table.ts";
import { checkText } from "../text/check-text.ts";
import type { TextEncoding } from "../text/encoding.ts";
import { addAgain, addEncoding, addRowCount } from "../text/findings.ts";
import { linesOf } from "../text/text-lines.ts";
import { TextSource } from "../text/text-source.ts";
import { headersRenamed, OPEN_END } from "../text/words.ts";
import { type About, readAbout } from "./about.ts";
import { chooseTable, matchesFile } from "./choose-table.ts";
import { describedColumns } from "./columns.ts";
import { type DescribedTable, isDescriptionHead, readDescriptions } from "./description.ts";
import { fits, judgeCounting } from "./line-cells.ts";
import { readText } from "./read-text.ts";
import { DescribedRows } from "./rows.ts";
import { BY_BYTES, POSITIONS_JOINED, UNDECLARED_WORDS } from "./words.ts";

export interface DescribedChoice {
  /** Name of the file, by which its description is found among several. */
  readonly name?: string;
  /** Name of the table that it is, as a person chose it. */
  readonly table?: string;
  /** The description, where it is a file of its own. */
  readonly companion?: AsyncIterable<Uint8Array>;
  readonly encoding?: TextEncoding;
}

/** A description, and how many lines of the data's file it takes. */
interface Described {
  readonly about: About;
  readonly table: DescribedTable;
  readonly lines: number;
  readonly isApart: boolean;
}

const noDescription = (): Error =>
  unprocessable(
    "no-description",
    "There is no byte-by-byte description of the columns in what was brought.",
    {
      hint: "Bring the file that describes them (often called ReadMe) together with the data.",
    },
  );

const noData = (tables: readonly DescribedTable[]): Error =>
  unprocessable(
    "described-no-data",
    `This file describes tables (${tables.flatMap(({ files }) => files).join(", ")}) and holds no rows of them.`,
    { hint: "Bring the file with the rows, and this one as the description that belongs to it." },
  );

/** Lines of a description have 80 characters; rows may be longer, but are not read here. */
const LONGEST_LINE = 2000;

const clipped = (text: string): string[] => text.split("\n").map((line) => line.slice(0, LONGEST_LINE));

/** The first table that rows stand right below, before another description. */
const withRows = (tables: readonly DescribedTable[], lines: readonly string[]): DescribedTable | undefined =>
  tables.find(({ end, fields }, at) =>
    lines
      .slice(end, tables[at + 1]?.begin)
      .some((line) => fits(line, fields, "characters") || fits(line, fields, "bytes")),
  );

/** A description before the rows in the same file. */
const describedInside = (source: TextSource, name: string | undefined): Described | null => {
  const lines = clipped(source.headText());
  const tables = readDescriptions(lines);
  const [first, last] = [tables[0], tables.at(-1)];
  if (!first || !last) return null;
  const about = readAbout(lines.slice(0, first.begin));
  const own = withRows(tables, lines);
  if (own) return { about, table: own, lines: own.end, isApart: false };
  const isEmpty = source.isWhole && lines.slice(last.end).every((line) => line.trim() === "");
  if (about.files.length > 0 || (isEmpty && tables.length > 1)) throw noData(tables);
  return { about, table: chooseTable(tables, name), lines: last.end, isApart: false };
};

const describedApart = async (
  companion: AsyncIterable<Uint8Array>,
  name: string | undefined,
): Promise<Described> => {
  const lines = clipped(await readText(companion));
  const tables = readDescriptions(lines);
  const [first] = tables;
  if (!first) throw noDescription();
  return { about: readAbout(lines), table: chooseTable(tables, name), lines: 0, isApart: true };
};

const describe = async (source: TextSource, choice: DescribedChoice): Promise<Described> => {
  const name = choice.table ?? choice.name;
  const hasOwn = source.headText().split("\n").some(isDescriptionHead);
  if (choice.companion && !hasOwn) return describedApart(choice.companion, name);
  const own = describedInside(source, name);
  if (!own) throw noDescription();
  return own;
};

const recordsOf = ({ about, table }: Described, name: string | undefined): number | null =>
  about.files.find(
    (file) =>
      table.files.some((own) => matchesFile(own, file.name)) &&
      (name === undefined || matchesFile(file.name, name)),
  )?.records ?? null;

async function* batchesOf(source: TextSource, rows: DescribedRows): AsyncGenerator<RowBatch> {
  for await (const lines of linesOf(source.pieces())) {
    const batch = rows.batch(lines);
    if (lines.isOpen && batch.rows > 0) rows.findings.add(OPEN_END);
    yield batch;
  }
  rows.isDone = true;
}

/**
 * Opens a table that a byte-by-byte description tells the columns of, before its rows or in a file of its own (CDS,
 * Standards for Documentation of Astronomical Catalogues 2.0, 2000, section 3; the AAS journals' machine-readable tables
 * take it over). Numbers come as such; hours or degrees, minutes and seconds become one column of degrees.
 *
 * @throws AppError `which-table` where several tables are described and the name is that of none
 */
export const openDescribed = async (
  bytes: AsyncIterable<Uint8Array>,
  choice: DescribedChoice = {},
): Promise<TableReader> => {
  const source = await TextSource.open(bytes, choice.encoding);
  checkText(source);
  const described = await describe(source, choice);
  const { about, table } = described;
  const { columns, renamed } = describedColumns(table.fields);
  const sample = source.headText().split("\n").slice(described.lines);
  const counting = source.encoding === "utf-8" ? judgeCounting(sample, table.fields) : "characters";
  const rows = new DescribedRows(table.fields, columns, counting, described.lines);
  const declaredRows = recordsOf(described, choice.table ?? choice.name);

  const findings = (): readonly TableFinding[] => {
    const all = new Findings();
    for (const finding of rows.findings.list()) addAgain(finding, all);
    const joined = columns.filter(({ group }) => group !== null);
    for (const { column } of joined) all.add(POSITIONS_JOINED, column.description.split(":")[0] ?? "");
    if (counting === "bytes") all.add(BY_BYTES);
    for (const name of renamed) all.add(headersRenamed(renamed.length), name);
    for (const example of rows.values.undeclaredExamples) all.add(UNDECLARED_WORDS, example);
    addEncoding(source, all);
    if (rows.isDone) addRowCount(declaredRows, rows.seen, all);
    return all.list();
  };

  return {
    header: {
      format: "described",
      variant: described.isApart ? "description in another file" : "description above the rows",
      encoding: source.encoding,
      columns: columns.map(({ column }) => column),
      declaredRows,
      meta: { title: about.title, description: about.description, sources: about.sources, frame: null },
    },
    batches: batchesOf(source, rows),
    findings,
  };
};
