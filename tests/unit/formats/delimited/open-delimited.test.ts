import { describe, expect, test } from "vitest";
import { openDelimited } from "#server/formats/delimited/open-delimited.ts";
import { inPieces, type ReadTable, readAll } from "../ecsv/support.ts";
import { keysOf, openAny } from "../open-any.ts";

const open = (text: string | Uint8Array, choice?: Parameters<typeof openDelimited>[1], piece = 5) =>
  openDelimited(inPieces(typeof text === "string" ? Buffer.from(text) : text, piece), choice);

describe("a table as text", () => {
  test.each([
    [",", "commas", "."],
    [";", "semicolons", "."],
    ["\t", "tabs", "."],
    ["|", "bars", "."],
  ] as const)(
    "is told by its content to have %j between its values",
    async (delimiter, variant, decimalMark) => {
      const table = await open(`a,b,c\n1.5,x,\n2.5,"y",z\n`.replaceAll(",", delimiter));
      expect(table.header).toMatchObject({
        format: "delimited",
        variant,
        encoding: "utf-8",
        declaredRows: null,
      });
      expect(table.dialect).toEqual({ encoding: "utf-8", delimiter, decimalMark });
      const { rows } = await readAll(table);
      expect(rows).toEqual([
        ["1.5", "x", null],
        ["2.5", "y", "z"],
      ]);
    },
  );

  test("decimal commas are found, and a choice counts before what is found", async () => {
    expect((await open("a;b\n1,5;2,5\n")).dialect.decimalMark).toBe(",");
    expect((await open("a;b\n1,5;2,5\n", { decimalMark: "." })).dialect.decimalMark).toBe(".");
    expect((await open("a;b\n1,5;2,5\n", { delimiter: "," })).header.columns.map((c) => c.name)).toEqual([
      "a;b",
    ]);
  });

  test("columns are texts without unit, told apart where names are missing or double", async () => {
    const table = await open("ra,,RA\n1,2,3\n");
    expect(table.header.columns).toMatchObject([
      { name: "ra", type: "text", unit: "" },
      { name: "column 2" },
      { name: "RA (2)" },
    ]);
    expect(table.findings()).toMatchObject([{ key: "headers-renamed", level: "note", count: 2 }]);
  });

  test("rows of another width are refused with row and line; blank lines are no rows", async () => {
    const { rows, refused } = await readAll(await open("a,b\n1,2\n\n3\n4,5\n6,7,8\n"));
    expect(rows).toEqual([
      ["1", "2"],
      ["4", "5"],
    ]);
    expect(refused.map(({ row, line, text }) => [row, line, text])).toEqual([
      [2, 4, "3"],
      [4, 6, "6,7,8"],
    ]);
  });

  test("UTF-16 and Latin letters are read, and a guess is said to be one", async () => {
    const wide = Buffer.from("\ufeffname,a\né☉,1\n", "utf16le");
    expect((await readAll(await open(wide, {}, 3))).rows).toEqual([["é☉", "1"]]);
    const table = await open(Buffer.from("name,a\né,1\n", "latin1"));
    expect(table.findings()).toMatchObject([{ key: "encoding-guessed", level: "note" }]);
    expect((await readAll(table)).rows).toEqual([["é", "1"]]);
  });

  test.each([
    ["nothing", ""],
    ["blank lines alone", "\n\n"],
    ["a picture", Buffer.from("\u0089PNG\r\n\u001a\n", "latin1")],
    ["an archive", Buffer.from([0x1f, 0x8b, 8, 0])],
  ])("%s is refused in words", async (_, content) => {
    await expect(open(content)).rejects.toMatchObject({ status: 422, hint: expect.any(String) });
  });

  test("a file that ends within a row was cut off", async () => {
    await expect(open("a,b\n1,2\n3").then(readAll)).rejects.toThrow(/ends in the middle of line 3/);
  });
});

describe("what stands around the rows", () => {
  const names = ({ header }: ReadTable): (readonly [string, string])[] =>
    header.columns.map((c) => [c.name, c.unit]);

  test.each([
    ["comments before the names", "# from an archive\n! and more\n\nid,ra\n1,2.5\n2,3.5\n"],
    ["names in a comment", "# from an archive\n# id,ra\n1,2.5\n2,3.5\n"],
    ["comments between and after the rows", "# one\nid,ra\n1,2.5\n# two\n2,3.5\n#end"],
    ["line ends of every kind", "# one\r\nid,ra\r1,2.5\n2,3.5\r\n"],
  ])("%s", async (_, text) => {
    const table = await openAny(text);
    expect(names(table)).toEqual([
      ["id", ""],
      ["ra", ""],
    ]);
    expect(table.rows).toEqual([
      ["1", "2.5"],
      ["2", "3.5"],
    ]);
    expect(table.refused).toEqual([]);
  });

  test("units below the names, in either order with a ruled line, are no row", async () => {
    const expected = [
      ["id", ""],
      ["plx", "mas"],
      ["logg", "[cm/s2]"],
    ];
    for (const head of [
      "\tmas\t[cm/s2]\n---\t---\t---",
      "---\t----\t---\n-\t(mas)\t[cm/s2]",
      "\tmas\t[cm/s2]",
    ]) {
      const table = await openAny(`id\tplx\tlogg\n${head}\n1\t2.5\t4.5\n`);
      expect(names(table)).toEqual(expected);
      expect(table.rows).toEqual([["1", "2.5", "4.5"]]);
      expect(keysOf(table)).toEqual(["units-line"]);
    }
    // A row of texts is none of units.
    expect((await openAny("id,type\nK,mag\nG,dwarf\n")).rows.length).toBe(2);
  });

  test("what archives say of each column in comments comes along", async () => {
    const { header } = await openAny(
      "#Title: Some stars\n#Column\tra\t(F11.7)\tRight ascension\t[ucd=pos.eq.ra]\nra\tV\ndeg\tmag\n---\t---\n1.5\t2\n",
    );
    expect(header.columns[0]).toMatchObject({
      unit: "deg",
      ucd: "pos.eq.ra",
      description: "Right ascension",
    });
    expect(header.meta).toMatchObject({ title: "Some stars", sources: ["Title: Some stars"] });
  });

  test.each([
    ["#rows=3\na,b\n1,2\n", "fewer-rows", 2],
    ["# number of rows: 1,000\na,b\n1,2\n", "fewer-rows", 999],
    ["a,b\n1,2\n3,4\n# rows = 1\n", "more-rows", 1],
    [" a | b \n---+---\n 1 | 2\n(2 rows)\n", "fewer-rows", 1],
  ])("declared rows are compared with those that are there: %j", async (text, key, count) => {
    expect((await openAny(text)).findings).toContainEqual(expect.objectContaining({ key, count }));
  });

  test("refused rows count among those that are there", async () => {
    const table = await openAny("#rows=2\na,b\n1,2\n3\n");
    expect(table.header.declaredRows).toBe(2);
    expect(table.refused.map(({ line, text }) => [line, text])).toEqual([[4, "3"]]);
    expect(keysOf(table)).toEqual([]);
  });

  test("frames of bars and rules are no values", async () => {
    for (const text of [
      "+----+-----+\n| a  | b   |\n+----+-----+\n| 1  | x y |\n| 2  |     |\n+----+-----+\n",
      "| a | b |\n|---|:--|\n| 1 | x y |\n| 2 | |\n",
    ]) {
      const table = await openAny(text);
      expect(table.header.variant).toBe("framed by bars");
      expect(names(table).flat().filter(Boolean)).toEqual(["a", "b"]);
      expect(table.rows).toEqual([
        ["1", "x y"],
        ["2", null],
      ]);
    }
    const open = await openAny("| a | b |\n| 1 | 2 |\n| 3 | 4\n| 5 | 6 |\n");
    expect([open.rows.length, open.refused.map(({ line }) => line)]).toEqual([2, [3]]);
  });

  test("without names the columns get made ones, and a person is asked", async () => {
    for (const text of ["1.5,2\n2.5,3\n", "LH-0031,1\nLH-0032,2\n", "LH-0031\nLH-0032\n"]) {
      const table = await openAny(text);
      expect(table.header.columns[0]?.name).toBe("column 1");
      expect(table.rows.length).toBe(2);
      expect(table.findings).toMatchObject([{ key: "no-names", level: "ask" }]);
    }
  });

  test("a last line without an end is told, and one that lacks values ends the reading", async () => {
    expect(keysOf(await openAny("a,b\n1,2\n3,4"))).toEqual(["open-end"]);
    await expect(openAny('a,b\n1,2\n3,"4')).rejects.toMatchObject({ code: "file-cut-off" });
    await expect(openAny("| a | b |\n| 1 | 2 |\n| 3 | 4")).rejects.toMatchObject({ code: "file-cut-off" });
  });

  test("stray bytes stay one by one, each told with its line; many make the text Latin", async () => {
    const bytes = Buffer.from(`name,a\n${"é,1\n".repeat(30)}x\u0001y,2\n${"α,1\n".repeat(30)}`);
    bytes[bytes.indexOf(1)] = 0xe9;
    const table = await openAny(bytes);
    expect(table.header.encoding).toBe("utf-8");
    expect(table.rows[30]).toEqual(["x\ufffdy", "2"]);
    expect(table.findings).toMatchObject([{ key: "stray-bytes", level: "ask", count: 1 }]);
    expect(table.findings[0]?.examples[0]).toMatch(/^line 32: .*x\ufffdy,2/);
  });

  test("too many columns and too long a value are named with the limit", async () => {
    const wide = Array.from({ length: 3001 }, (_, i) => `c${i}`).join(",");
    await expect(openAny(`${wide}\n`, {}, 4096)).rejects.toThrow(/3,001 columns; 3,000 are the most/);
    const long = await openAny(`a,b\n1,${"x".repeat(1_000_001)}\n2,3\n`, {}, 65_536);
    expect(long.refused).toMatchObject([{ row: 1, line: 2 }]);
    expect(long.rows).toEqual([["2", "3"]]);
    await expect(openAny(`a,b\n1,${"x".repeat(4_100_000)}`, {}, 65_536)).rejects.toMatchObject({
      code: "record-too-long",
    });
  });
});
