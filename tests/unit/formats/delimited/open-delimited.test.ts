import { describe, expect, test } from "vitest";
import { openDelimited } from "#server/formats/delimited/open-delimited.ts";
import { inPieces, readAll } from "../ecsv/support.ts";

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
