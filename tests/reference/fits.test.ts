import { mkdtemp, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { keysOf, type ReadTable, readFits } from "#tests/unit/formats/fits/fits-file.ts";
import { runAstropy } from "./astropy.ts";

/** A file that astropy wrote, and what it read from it: numbers with all their digits, null for a blank. */
interface WrittenFile {
  path: string;
  columns: { name: string; cells: (string | null)[] }[];
  leftOut?: string[];
  others?: string[];
  descriptions?: string[];
  ucds?: string[];
  /** Blank cells by astropy's own reading. */
  masked?: number;
  header?: Record<"ucd" | "description" | "title" | "source" | "equinox" | "system", string>;
}

let folder = "";
let files: Record<string, WrittenFile> = {};

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "fits-reference-"));
  files = (await runAstropy("fits_files.py", { folder })) as typeof files;
}, 120_000);

afterAll(async () => {
  await rm(folder, { recursive: true, force: true });
});

const written = (name: string): WrittenFile => {
  const file = files[name];
  if (!file) throw new Error(`astropy wrote no file ${name}.`);
  return file;
};

const read = async (name: string): Promise<ReadTable> => readFits(await readFile(written(name).path), 10_007);

const numberOf = (cell: string | null): number => {
  if (cell === null) return Number.NaN;
  if (cell.endsWith("inf")) return cell.startsWith("-") ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  return Number(cell);
};

/** Cells as our reader gives them in a column of that type. */
const expectedCells = (type: string | undefined, cells: readonly (string | null)[]): (number | string)[] =>
  type === "text" || type === "boolean" || type?.endsWith("int64")
    ? cells.map((cell) => cell ?? "")
    : cells.map(numberOf);

const compare = (name: string, table: ReadTable): void => {
  const { columns } = written(name);
  expect(table.names).toEqual(columns.map((column) => column.name));
  for (const [index, { cells }] of columns.entries())
    expect(table.cells[index], `${name}: ${table.names[index]}`).toEqual(
      expectedCells(table.types[index], cells),
    );
};

describe("a FITS file that astropy wrote", () => {
  test.each([
    ["types", 200],
    ["no_rows", 0],
    ["one_row", 1],
    ["many_rows", 40_000],
    ["many_columns", 3],
    ["masked", 50],
    ["scaled", 5],
    ["ascii_table", 40],
  ])("is read as astropy reads it, cell by cell: %s", async (name, rows) => {
    const table = await read(name);
    expect(table.rows).toBe(rows);
    compare(name, table);
    expect(table.refused).toEqual([]);
    expect(table.findings).toEqual([]);
  });

  test("has the types that it was written with", async () => {
    expect((await read("types")).types).toEqual([
      "uint8",
      "int16",
      "uint16",
      "int32",
      "uint32",
      "int64",
      "uint64",
      "float32",
      "float64",
      "text",
      "boolean",
    ]);
    expect((await read("types")).reader.header.columns[0]?.unit).toBe("mag");
  });

  test("is asked about where it masks unsigned numbers by another rule than the format's", async () => {
    const { findings } = await read("masked_unsigned");
    expect(findings).toMatchObject([
      { key: "fits-unsigned-null", level: "ask", count: written("masked_unsigned").masked },
    ]);
  });

  test("may hold letters beyond ASCII", async () => {
    const table = await read("unicode_texts");
    compare("unicode_texts", table);
    expect(keysOf(table.findings)).toEqual(["fits-utf8"]);
  });

  test("loses its arrays by name, and nothing is shifted by them", async () => {
    const table = await read("arrays");
    compare("arrays", table);
    const named = table.findings.flatMap((finding) =>
      finding.examples.map((text) => text.replace(/ \(.*/, "")),
    );
    expect(named.sort()).toEqual([...(written("arrays").leftOut ?? [])].sort());
  });

  test("may hold pictures and further tables", async () => {
    const table = await read("several_parts");
    compare("several_parts", table);
    expect(table.findings).toMatchObject([
      { key: "fits-other-tables", examples: written("several_parts").others },
    ]);
  });

  test("describes its columns in comments", async () => {
    const table = await read("described");
    compare("described", table);
    const { columns, meta } = table.reader.header;
    expect(columns.map((column) => column.description)).toEqual(written("described").descriptions);
    expect(columns.map((column) => column.ucd)).toEqual(written("described").ucds);
    expect([columns[1]?.unit, meta.description]).toEqual(["mas yr-1", null]);
  });

  test("says the same of itself", async () => {
    const table = await read("long_header");
    compare("long_header", table);
    const { columns, meta } = table.reader.header;
    expect({
      ucd: columns[0]?.ucd,
      description: columns[0]?.description,
      title: meta.title,
      source: meta.sources[0],
      equinox: meta.frame?.equinox,
      system: meta.frame?.system,
    }).toEqual(written("long_header").header);
    expect(table.findings).toEqual([]);
  });
});
