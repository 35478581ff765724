import { describe, expect, test } from "vitest";
import { openColumns } from "#server/formats/fixed-width/open-columns.ts";
import { inPieces } from "../ecsv/support.ts";
import { keysOf, openAny } from "../open-any.ts";

const ALIGNED = `Star name     RA           V
              deg          mag
HD 1        12.5          7.11
HD 2       112.5
GJ 1214     -2.5         14.71
`;

describe("a table in columns of blanks", () => {
  test("is read between blanks where every line has as many values", async () => {
    const table = await openAny('name ra dec\n"HD 1" 1.5 -2\nHD2 10 20\n');
    expect(table.header).toMatchObject({ format: "fixed-width", variant: "blanks" });
    expect(table.rows).toEqual([
      ["HD 1", "1.5", "-2"],
      ["HD2", "10", "20"],
    ]);
  });

  test("is cut where all its lines are blank, whichever way values are aligned", async () => {
    const table = await openAny(ALIGNED);
    expect(table.header).toMatchObject({ format: "fixed-width", variant: "fixed columns" });
    expect(table.header.columns.map((c) => [c.name, c.unit])).toEqual([
      ["Star name", ""],
      ["RA", "deg"],
      ["V", "mag"],
    ]);
    expect(table.rows).toEqual([
      ["HD 1", "12.5", "7.11"],
      ["HD 2", "112.5", null],
      ["GJ 1214", "-2.5", "14.71"],
    ]);
    expect(table.refused).toEqual([]);
  });

  test("hours, minutes and seconds below one name stay together", async () => {
    const { rows } = await openAny(
      "ID        RA             V\nHD 1      00 42 44.30  7.11\nGJ 1214   10 42 44.33\n",
    );
    expect(rows).toEqual([
      ["HD 1", "00 42 44.30", "7.11"],
      ["GJ 1214", "10 42 44.33", null],
    ]);
  });

  test("a value may reach into the gap before it, and none is ever cut", async () => {
    const early = Array.from(
      { length: 2500 },
      (_, i) => `s${String(i).padEnd(8)}  ${(1.5).toFixed(3)}     x`,
    ).join("\n");
    const { rows, refused } = await openAny(
      `name         V         k\n${early}\ns1         -12.500     x\ns2     1234567.500     x\ns3       1.500x1234567 x\nsome longer name 1.5   x\n`,
    );
    expect(rows.slice(2500)).toEqual([
      ["s1", "-12.500", "x"],
      ["s2", "1234567.500", "x"],
      // It has a value for each column between blanks.
      ["s3", "1.500x1234567", "x"],
    ]);
    expect(refused).toMatchObject([{ row: 2504, line: 2505, text: "some longer name 1.5   x" }]);
  });

  test("columns below a ruled line are cut by it", async () => {
    const table = await openAny(
      "== ==== =====\na  name v\n== ==== =====\n1  ab c 2.5\n2       3.5\n== ==== =====\n",
    );
    expect(table.header.variant).toBe("ruled columns");
    expect(table.rows).toEqual([
      ["1", "ab c", "2.5"],
      ["2", null, "3.5"],
    ]);
  });

  test("names in bars bring types, units and null marks", async () => {
    const table = await openAny(
      "\\RowsRetrieved = 3\n\\ from an archive\n|   ra    | id                  |name |\n| double  |  long               |char |\n|  deg    |                     |     |\n| null    | null                |null |\n  1.5       3141592653589793239  ab\n  null      -1                   null\n  1.x       2                    c\n",
    );
    expect(table.header).toMatchObject({ format: "fixed-width", variant: "names in bars", declaredRows: 3 });
    expect(table.header.columns).toMatchObject([
      { name: "ra", type: "float64", unit: "deg", nullMark: "null" },
      { name: "id", type: "int64" },
      { name: "name", type: "text" },
    ]);
    expect(table.rows).toEqual([
      [1.5, "3141592653589793239", "ab"],
      [null, "-1", null],
    ]);
    expect(table.refused).toMatchObject([
      { row: 3, line: 9, why: "“1.x” in ra is no value of the type float64." },
    ]);
    expect(keysOf(table)).toEqual([]);
  });

  test("names in a comment, with units below them", async () => {
    const table = await openAny("# some words\n# name ra dec\n# --- deg deg\nx 1 2\ny 10 20\n#rows=3\n");
    expect(table.header.columns.map((c) => [c.name, c.unit])).toEqual([
      ["name", ""],
      ["ra", "deg"],
      ["dec", "deg"],
    ]);
    expect(keysOf(table)).toEqual(["names-in-comment", "units-line", "comment-lines", "fewer-rows"]);
  });

  test("rows that cannot be told apart are refused as a whole or one by one, never guessed", async () => {
    await expect(
      openColumns(inPieces(Buffer.from("ID RA Dec\nHD 1 00 42 44.3 -10 1\nGJ 1214 1 42 4.3 5\n"), 9)),
    ).rejects.toMatchObject({ code: "columns-not-clear" });
    const { rows, refused } = await openAny(`a b c\n1 2 3\n${"10 2 30\n".repeat(40)}1 2\n1 20 3 4\n`);
    expect(rows.length).toBe(41);
    expect(refused.map(({ line }) => line)).toEqual([43, 44]);
    const behind = await openAny(`a  b\n${"1  2\n".repeat(2500)}1  2 3\n`);
    expect(behind.refused).toMatchObject([{ line: 2502, why: "Text stands behind the last column, b." }]);
  });

  test("a last line that was cut off ends the reading", async () => {
    await expect(openAny("a b c\n1 2 3\n4 5 6\n7 8")).rejects.toMatchObject({ code: "file-cut-off" });
    await expect(openAny(ALIGNED.replace("HD 2       112.5\n", "").slice(0, -9))).rejects.toMatchObject({
      code: "file-cut-off",
    });
    expect(keysOf(await openAny("a b c\n1 2 3\n4 5 6"))).toEqual(["open-end"]);
  });
});
