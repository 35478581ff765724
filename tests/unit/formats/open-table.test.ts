import { gzipSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { DATA, ONE_FILE, README } from "./described/fixtures.ts";
import { ecsv } from "./ecsv/support.ts";
import { keysOf, openAny } from "./open-any.ts";
import { FILES } from "./same-table.ts";

describe("a file is known by its content", () => {
  test.each(Object.entries(FILES))(
    "%s gives the same values, packed or not",
    async (_, { bytes, format, ...choice }) => {
      const plain = await openAny(bytes(), { name: "table.pdf", ...choice });
      expect([plain.header.format, plain.isPacked]).toEqual([format, false]);
      expect(plain.header.columns.map((c) => c.name)).toEqual(["id", "name", "ra", "V"]);
      const asTexts = plain.rows.map((cells) =>
        cells.map((cell) =>
          cell === null || String(cell).trim() === "" ? null : String(cell).trim().replace(",", "."),
        ),
      );
      expect(asTexts).toEqual([
        ["3141592653589793239", "LH-0031", "217.425", "11.5"],
        ["3141592653589793240", "Étoile", "0.25", null],
        ["7", null, "359.5", "-1.25"],
      ]);
      const packed = await openAny(gzipSync(bytes()), { name: "table.csv", ...choice });
      expect(packed.isPacked).toBe(true);
      expect({ ...packed, isPacked: false, bytes: 0 }).toEqual({ ...plain, bytes: 0 });
      expect(packed.bytes).toBe(gzipSync(bytes()).length);
    },
  );

  test("what it was taken for is said in words", async () => {
    expect((await openAny("a\tb\n1\t2\n")).takenFor).toBe("text with delimiters (tabs)");
    expect((await openAny(ONE_FILE)).takenFor).toBe(
      "text with a byte-by-byte description (description above the rows)",
    );
    expect((await openAny(ecsv(["{name: a, datatype: int8}"], "a\n1\n"))).takenFor).toBe("ECSV (blanks)");
  });

  test.each([
    ["a zip archive or a spreadsheet", "PK\u0003\u0004\u0014\u0000"],
    ["a PDF document", "%PDF-1.7\n%\u00e2\u00e3"],
    ["a web page", "\n<!DOCTYPE html>\n<html><body>Sign in</body></html>"],
    ["a web page", "<html>\n<table><tr><td>1</td></tr></table>"],
    ["a picture", "\u0089PNG\r\n\u001a\n"],
    ["a text of JSON", '{"a": [1, 2]}'],
    ["a text of JSON", '[{"a": 1}]'],
    ["an xz archive", "\u00fd7zXZ\u0000\u0000"],
    ["a spreadsheet or document of an old kind", "\u00d0\u00cf\u0011\u00e0\u00a1\u00b1"],
    ["a binary file", "\u0000\u0001\u0002\u0000abc\u0000\u0000"],
  ])("%s is refused in words, packed too", async (what, text) => {
    for (const bytes of [Buffer.from(text, "latin1"), gzipSync(Buffer.from(text, "latin1"))])
      await expect(openAny(bytes, { name: "table.csv" })).rejects.toMatchObject({
        code: "not-a-table",
        message: expect.stringContaining(what),
        hint: expect.any(String),
      });
  });

  test("nothing, and gzip within gzip, are refused in words", async () => {
    await expect(openAny("")).rejects.toMatchObject({ code: "empty-file" });
    await expect(openAny(gzipSync(""))).rejects.toMatchObject({ code: "empty-file" });
    await expect(openAny(gzipSync(gzipSync("a,b\n1,2\n")))).rejects.toMatchObject({ code: "gzip-twice" });
  });

  test("a description may be packed as well", async () => {
    const table = await openAny(gzipSync(DATA), { name: "table1.dat.gz", companion: gzipSync(README) });
    expect(table.rows.length).toBe(4);
  });

  test("commas in texts between blanks, and blanks between commas, do not mislead", async () => {
    expect((await openAny("name, ra, dec\nHD 1, 10.5, -2\nHD 2, 11.5, -3\n")).header.format).toBe(
      "delimited",
    );
    const table = await openAny("name ra note\na,b 1.5 x\nc 2.5 y,z\n");
    expect(table.header.format).toBe("fixed-width");
    expect(table.rows).toEqual([
      ["a,b", "1.5", "x"],
      ["c", "2.5", "y,z"],
    ]);
  });

  test("the name decides between readings that are equally likely; without one a person is asked", async () => {
    const text = "a,x;b,y\np,q;r,s\nt,u;v,w\n";
    const asked = await openAny(text);
    expect(asked.findings).toMatchObject([{ key: "two-readings", level: "ask" }]);
    expect(keysOf(await openAny(text, { name: "t.csv" }))).toEqual([]);
    const chosen = await openAny(text, { delimiter: ";" });
    expect([chosen.header.columns.length, keysOf(chosen)]).toEqual([2, []]);
  });
});

test("a source is let go where the file is refused", async () => {
  const { openTable } = await import("#server/formats/open-table.ts");
  let isOpen = true;
  async function* source(): AsyncGenerator<Uint8Array> {
    try {
      for (let n = 0; n < 100; n++) yield Buffer.from("<html>".repeat(1000));
    } finally {
      isOpen = false;
    }
  }
  await expect(openTable(source())).rejects.toMatchObject({ code: "not-a-table" });
  expect(isOpen).toBe(false);
});
