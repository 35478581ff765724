import { mkdtemp, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { ColumnType } from "#server/formats/table.ts";
import { type Cell, readWhole, type WholeTable } from "#tests/unit/formats/votable/support.ts";
import { runAstropy } from "./astropy.ts";

/** A file that astropy wrote, and what it read from it: numbers with all their digits, null for a blank. */
interface WrittenFile {
  path: string;
  form: string;
  columns: { name: string; cells: (string | null)[] }[];
}

let folder = "";
let files: Record<string, WrittenFile> = {};
let arrays: string[] = [];

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "votable-reference-"));
  ({ files, arrays } = (await runAstropy("votable_files.py", { folder })) as {
    files: typeof files;
    arrays: string[];
  });
}, 180_000);

afterAll(async () => {
  await rm(folder, { recursive: true, force: true });
});

const written = (name: string): WrittenFile => {
  const file = files[name];
  if (!file) throw new Error(`astropy wrote no file ${name}.`);
  return file;
};

const numberOf = (cell: string): number => {
  if (cell.endsWith("inf")) return cell.startsWith("-") ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  return Number(cell);
};

/** A cell as our reader gives it in a column of that type. */
const expectedCell = (type: ColumnType | undefined, cell: string | null): Cell => {
  if (type === "text" || type === "boolean" || type === "int64") return cell ?? "";
  return cell === null ? Number.NaN : numberOf(cell);
};

/** astropy drops the blanks around the texts of TABLEDATA, which the standard counts. */
const compare = (name: string, { header, rows, refused }: WholeTable): void => {
  const { columns, form } = written(name);
  if (rows.length > 0) expect(header.variant).toBe(form);
  expect(header.columns.map((column) => column.name)).toEqual(columns.map((column) => column.name));
  for (const [index, { name: column, cells }] of columns.entries()) {
    const expected = cells.map((cell) => expectedCell(header.columns[index]?.type, cell));
    const isTrimmed = form === "TABLEDATA" && header.columns[index]?.type === "text";
    expect(
      rows.map((row) => (isTrimmed ? String(row[index]).trim() : row[index])),
      `${name}: ${column}`,
    ).toEqual(expected);
  }
  expect(refused).toEqual([]);
};

const read = async (name: string): Promise<WholeTable> =>
  readWhole(await readFile(written(name).path), [10_007]);

describe.each(["tabledata", "binary", "binary2"])("a VOTable that astropy wrote as %s", (form) => {
  test.each([
    ["types", 200],
    ["masked", 100],
    ["no_rows", 0],
    ["one_row", 1],
    ["many_columns", 3],
  ])("is read as astropy reads it, cell by cell: %s", async (name, rows) => {
    const table = await read(`${name}_${form}`);
    expect(table.rows).toHaveLength(rows);
    compare(`${name}_${form}`, table);
    // It writes a table of no rows without data, in whatever form.
    expect(table.findings.map((finding) => finding.key)).toEqual(rows === 0 ? ["votable-no-data"] : []);
  });

  test("loses its arrays by name, and nothing is shifted by them", async () => {
    const table = await read(`arrays_${form}`);
    compare(`arrays_${form}`, table);
    expect(table.findings).toMatchObject([{ key: "votable-array-columns", examples: arrays }]);
  });

  test("has the types that it was written with", async () => {
    const { header } = await read(`types_${form}`);
    expect(header.columns.map((column) => column.type)).toEqual([
      "int64",
      "float64",
      "float32",
      "int32",
      "int16",
      "uint8",
      "boolean",
      "boolean",
      ...Array.from({ length: 6 }, () => "text"),
    ]);
  });
});

test.each(["tabledata", "binary"])(
  "a VOTable 1.2 that astropy wrote as %s is read the same",
  async (form) => {
    compare(`old_${form}`, await read(`old_${form}`));
  },
);
