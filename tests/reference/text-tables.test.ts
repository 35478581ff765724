import { gzipSync } from "node:zlib";
import { beforeAll, describe, expect, test } from "vitest";
import { isBlankWord, parseNumber } from "#server/formats/numbers.ts";
import { openTable } from "#server/formats/open-table.ts";
import { DATA, README } from "#tests/unit/formats/described/fixtures.ts";
import { inPieces, type ReadTable, readAll } from "#tests/unit/formats/ecsv/support.ts";
import { runAstropy } from "./astropy.ts";

interface AstropyColumn {
  name: string;
  unit: string;
  isNumber: boolean;
  /** With all digits; null for a blank. */
  cells: (string | null)[];
}

interface Answers {
  written: Record<string, { text: string; columns: AstropyColumn[] } | { failure: string }>;
  positions: { text: string; ra: number[]; dec: number[] };
  read: AstropyColumn[];
}

let answers: Answers;

beforeAll(async () => {
  answers = (await runAstropy("text_tables.py", { readme: README, data: DATA })) as Answers;
}, 120_000);

const open = async (text: string | Uint8Array, companion?: string): Promise<ReadTable> => {
  const bytes = inPieces(typeof text === "string" ? Buffer.from(text) : text, 101);
  const beside = companion === undefined ? undefined : inPieces(Buffer.from(companion), 101);
  const { reader } = await openTable(bytes, { name: "table1.dat", companion: beside });
  return readAll(reader);
};

/** Nothing below the names of a writer that finds no rows: what it cannot write it says itself. */
const NOT_WRITTEN = [
  "fixed_width: no rows",
  "fixed_width, bars without padding: no rows",
  "fixed_width, no bookend: no rows",
  "fixed_width, blanks: no rows",
  "fixed_width_two_line: no rows",
  "rst: no rows",
  "mrt: no rows",
];

/** A comment may be names or a sentence; without rows there is no telling. */
const ONLY_A_COMMENT = "commented_header: no rows";

const WRITERS = [
  "basic",
  "commented_header",
  "csv",
  "csv, semicolons",
  "basic, bars",
  "tab",
  "fixed_width",
  "fixed_width, bars without padding",
  "fixed_width, no bookend",
  "fixed_width, blanks",
  "fixed_width_two_line",
  "rst",
  "ipac",
  "mrt",
];
const KINDS = ["numbers", "words", "blanks", "letters", "units", "one row", "no rows"];
const NAMES = WRITERS.flatMap((writer) => KINDS.map((kind) => `${writer}: ${kind}`)).filter(
  (name) => !NOT_WRITTEN.includes(name) && name !== ONLY_A_COMMENT,
);

const written = (name: string): { text: string; columns: AstropyColumn[] } => {
  const file = answers.written[name];
  if (!file || "failure" in file) throw new Error(`astropy wrote no table ${name}: ${file?.failure}`);
  return file;
};

/** Texts are compared as such; a journal's table keeps fewer digits than the table it was written from. */
const isSame = (
  own: string | number | null,
  theirs: string | null,
  isNumber: boolean,
  name: string,
): boolean => {
  if (own === null || (typeof own === "string" && isBlankWord(own.trim()))) return theirs === null;
  if (theirs === null) return false;
  if (!isNumber) return String(own).trim() === theirs;
  // Identifiers of 19 digits are more than a double holds.
  if (/^-?\d{16,}$/.test(theirs)) return String(own).trim() === theirs;
  const value = typeof own === "number" ? own : parseNumber(own.trim(), ".");
  const allowed = name.startsWith("mrt") ? Math.abs(Number(theirs)) * 1e-9 : 0;
  return Math.abs(value - Number(theirs)) <= allowed;
};

const compare = (read: ReadTable, columns: readonly AstropyColumn[], name: string): void => {
  expect(read.refused).toEqual([]);
  expect(read.header.columns.map((c) => c.name)).toEqual(columns.map((c) => c.name));
  for (const [at, column] of columns.entries()) {
    expect(read.rows.length, column.name).toBe(column.cells.length);
    const wrong = column.cells.flatMap((theirs, row) => {
      const own = read.rows[row]?.[at] ?? null;
      return isSame(own, theirs, column.isNumber, name) ? [] : [{ column: column.name, row, own, theirs }];
    });
    expect(wrong).toEqual([]);
  }
};

describe("text that astropy wrote reads the same here", () => {
  test("but for what it does not write", () => {
    const failed = Object.entries(answers.written).flatMap(([name, file]) =>
      "failure" in file ? [name] : [],
    );
    expect(failed.sort()).toEqual([...NOT_WRITTEN].sort());
  });

  test.each(NAMES)("%s", async (name) => {
    const { text, columns } = written(name);
    compare(await open(text), columns, name);
  });

  test("a comment without rows is refused rather than taken for names", async () => {
    await expect(open(written(ONLY_A_COMMENT).text)).rejects.toMatchObject({ code: "no-table" });
  });

  test.each(WRITERS)("%s, packed with gzip", async (writer) => {
    const { text, columns } = written(`${writer}: blanks`);
    compare(await open(gzipSync(text)), columns, writer);
  });

  test("units and types come along where the format has them", async () => {
    const { header } = await open(written("ipac: units").text);
    expect(header.columns).toMatchObject([
      { name: "id", type: "int64" },
      { name: "name", type: "text" },
      { name: "plx", type: "float64", unit: "mas" },
      { name: "tiny" },
      { name: "count", unit: "ct" },
    ]);
    const { header: journal } = await open(written("mrt: units").text);
    expect(journal.columns[2]).toMatchObject({ name: "plx", type: "float64", unit: "mas" });
    expect(journal.columns[2]?.description).toMatch(/Parallax/);
  });
});

test("positions in parts are where astropy had them before it wrote them", async () => {
  const { rows, header } = await open(answers.positions.text);
  expect(header.columns.map((c) => [c.name, c.unit])).toEqual([
    ["name", ""],
    ["RAdeg", "deg"],
    ["DEdeg", "deg"],
  ]);
  for (const [row, ra] of answers.positions.ra.entries()) {
    // Ten digits of a second of time, nine of an arcsecond.
    expect(Math.abs(Number(rows[row]?.[1]) - ra)).toBeLessThan(1e-12 * 360);
    expect(Math.abs(Number(rows[row]?.[2]) - (answers.positions.dec[row] ?? 0))).toBeLessThan(1e-12 * 360);
  }
});

test("a description of its own and its data read as astropy reads them, but for positions in parts", async () => {
  const read = await open(DATA, README);
  const theirs = answers.read.filter(({ name }) => !/^(?:RA[hms]|DE[-dms])$/.test(name));
  const at = theirs.map(({ name }) => read.header.columns.findIndex((c) => c.name === name));
  compare(
    {
      ...read,
      header: { ...read.header, columns: at.flatMap((place) => read.header.columns[place] ?? []) },
      rows: read.rows.map((cells) => at.map((place) => cells[place] ?? null)),
    },
    theirs,
    "read",
  );
});
