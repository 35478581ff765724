import { describe, expect, test, vi } from "vitest";
import { openFits } from "#server/formats/fits/open-fits.ts";
import {
  bytesOf,
  card,
  extension,
  fitsFile,
  header,
  image,
  keysOf,
  pieces,
  primary,
  readFits,
} from "./fits-file.ts";

const { int32 } = bytesOf;
const table = (name: string, rows: number, value = 1) => ({
  columns: [{ name, form: "J" }],
  rows: Array.from({ length: rows }, () => int32(value)),
  counts: { NAXIS1: 4 },
  cards: [card("EXTNAME", name)],
});

describe("a file of several parts", () => {
  test("gives the first table that has rows, and names the others", async () => {
    const file = Buffer.concat([
      primary(),
      image(5000),
      extension(table("empty", 0)),
      extension(table("stars", 3)),
      image(100),
      extension(table("errors", 1200)),
      extension({ ...table("", 1), cards: [] }),
    ]);
    const { names, rows, reader, findings } = await readFits(file, 777);
    expect([names, rows, reader.header.meta.title]).toEqual([["stars"], 3, "stars"]);
    expect(findings).toMatchObject([
      {
        key: "fits-other-tables",
        level: "note",
        count: 3,
        examples: ["empty: 0 rows", "errors: 1,200 rows", "extension 6: 1 rows"],
      },
    ]);
  });

  test("gives a table without rows where there is no other", async () => {
    const file = Buffer.concat([primary(), extension(table("a", 0)), image(10), extension(table("b", 0))]);
    const { names, rows, findings } = await readFits(file);
    expect([names, rows]).toEqual([["a"], 0]);
    expect(findings).toMatchObject([{ key: "fits-other-tables", examples: ["b: 0 rows"] }]);
  });

  test("passes over the picture that it begins with", async () => {
    const first = header([
      card("SIMPLE", true),
      card("BITPIX", -32),
      card("NAXIS", 2),
      card("NAXIS1", 30),
      card("NAXIS2", 40),
    ]);
    const file = Buffer.concat([first, Buffer.alloc(2880 * 2, 7), extension(table("a", 2))]);
    expect((await readFits(file)).cells).toEqual([[1, 1]]);
  });

  test("passes over random groups, whose first axis is empty", async () => {
    const first = header([
      card("SIMPLE", true),
      card("BITPIX", 8),
      card("NAXIS", 2),
      card("NAXIS1", 0),
      card("NAXIS2", 100),
      card("GROUPS", true),
      card("PCOUNT", 20),
      card("GCOUNT", 25),
    ]);
    const file = Buffer.concat([first, Buffer.alloc(2880 * 2, 7), extension(table("a", 2))]);
    expect((await readFits(file)).cells).toEqual([[1, 1]]);
  });

  test("passes over the arrays behind the rows", async () => {
    const first = { ...table("a", 1), heap: Buffer.alloc(10_000, 1) };
    const { cells, findings } = await readFits(fitsFile(first, table("b", 2)));
    expect(cells).toEqual([[1]]);
    expect(findings).toMatchObject([{ key: "fits-other-tables", examples: ["b: 2 rows"] }]);
  });

  test.each([
    [[image(10), image(20)], "2 images"],
    [[], "headers"],
    [[extension({ ...table("a", 1), cards: [card("ZIMAGE", true)] })], "1 image"],
    [[header([card("XTENSION", "FOREIGN"), card("BITPIX", 8), card("NAXIS", 0)])], "1 part of other kinds"],
  ])("is refused without a table", async (parts, contents) => {
    await expect(readFits(Buffer.concat([primary(), ...parts]))).rejects.toMatchObject({
      code: "fits-no-table",
      message: `This FITS file holds no table, only ${contents}.`,
    });
  });
});

describe("the end of a file", () => {
  const whole = fitsFile(table("a", 1000));
  const dataFrom = 2880 * 2;

  test("may come before the last block is full", async () => {
    const { rows, findings } = await readFits(whole.subarray(0, dataFrom + 4000));
    expect(rows).toBe(1000);
    expect(findings).toMatchObject([
      { key: "fits-short-end", level: "note", examples: ["1,760 bytes missing"] },
    ]);
  });

  test.each([dataFrom + 3999, dataFrom + 1, dataFrom])(
    "is a cut when rows are missing: at byte %i",
    async (end) => {
      await expect(readFits(whole.subarray(0, end))).rejects.toMatchObject({
        code: "file-cut-off",
        message: expect.stringMatching(/: (999|0) of the 1,000 rows of the table are there/),
        hint: expect.stringContaining("Get the file again"),
      });
    },
  );

  test("is a cut within a header after a table without rows", async () => {
    const file = Buffer.concat([
      primary(),
      extension(table("a", 0)),
      extension(table("b", 5)).subarray(0, 2000),
    ]);
    await expect(readFits(file)).rejects.toMatchObject({ code: "file-cut-off" });
    const { rows, findings } = await readFits(
      Buffer.concat([primary(), extension(table("a", 0)), Buffer.alloc(2000)]),
    );
    expect([rows, keysOf(findings)]).toEqual([0, ["fits-rest"]]);
  });

  test("is a cut within the data before the table", async () => {
    const file = Buffer.concat([primary(), image(10_000)]).subarray(0, 9000);
    await expect(readFits(file)).rejects.toMatchObject({
      code: "file-cut-off",
      message: expect.stringContaining("3,240 of 10,000 bytes"),
    });
  });

  test.each([
    ["text", Buffer.from("something else entirely\n")],
    ["zeros", Buffer.alloc(2880 * 3)],
    ["half a header", image(10).subarray(0, 1000)],
    ["a broken header", header([card("XTENSION", "IMAGE"), card("BITPIX", 8), card("NAXIS", -5)])],
  ])("may be followed by %s", async (_, rest) => {
    const { rows, findings } = await readFits(Buffer.concat([whole, rest]));
    expect([rows, keysOf(findings)]).toEqual([1000, ["fits-rest"]]);
  });

  test.each([
    ["nothing", ""],
    ["a table as text", "a,b\n1,2\n"],
    ["the beginning of one", "SIMP"],
    ["pictures", "\u0089PNG".repeat(2000)],
  ])("%s is no FITS file", async (_, text) => {
    await expect(readFits(Buffer.from(text, "latin1"))).rejects.toMatchObject({ code: "not-fits" });
  });
});

describe("the sum of the data", () => {
  // 1 000 times 1, and the heap's 5 bytes 01 to 05 as 0x01020304 and 0x05000000 (computed).
  const sum = 1000 + 0x01020304 + 0x05000000;
  const summed = (value: string) => {
    const first = table("a", 1000);
    const heap = Buffer.from([1, 2, 3, 4, 5]);
    return fitsFile({ ...first, heap, cards: [card("DATASUM", value)] }, table("b", 2));
  };

  test.each([1, 3, 2880, 10_007])("is that of the file, in pieces of %i bytes", async (size) => {
    const { findings } = await readFits(summed(String(sum)), size);
    expect(keysOf(findings)).toEqual(["fits-other-tables"]);
  });

  test("brings its carries around", async () => {
    const rows = Array.from({ length: 5 }, () => int32(-2));
    const columns = [{ name: "a", form: "J" }];
    // Five times 2³² − 2 is 5 × 2³² − 10, and the carries add 4 to 2³² − 10 (computed).
    const cards = [card("DATASUM", String(2 ** 32 - 6))];
    expect(keysOf((await readFits(fitsFile({ columns, rows, cards }))).findings)).toEqual([]);
  });

  test("asks where it is another", async () => {
    const file = summed(String(sum));
    file[2880 * 2 + 2000] = 9;
    const { findings } = await readFits(file);
    expect(findings[0]).toMatchObject({
      key: "fits-sum",
      level: "ask",
      examples: [`${sum} in the file, ${sum + 9 * 2 ** 24} from its bytes`],
    });
  });

  test.each(["", "unknown"])("is not looked at where the file has none: %j", async (value) => {
    expect(keysOf((await readFits(summed(value))).findings)).toEqual(["fits-other-tables"]);
  });
});

describe("the source", () => {
  test("is let go after the last row, at a stop in between and at an error", async () => {
    const file = fitsFile(table("a", 50_000));
    const released = vi.fn();
    async function* watched(bytes: Uint8Array) {
      try {
        yield* pieces(bytes, 10_000);
      } finally {
        released();
      }
    }
    for await (const _ of (await openFits(watched(file))).batches) break;
    expect(released).toHaveBeenCalledTimes(1);
    await expect(openFits(watched(Buffer.from("x".repeat(30_000))))).rejects.toThrow();
    expect(released).toHaveBeenCalledTimes(2);
    for await (const _ of (await openFits(watched(file))).batches);
    expect(released).toHaveBeenCalledTimes(3);
  });

  test("is read no further than its batches are taken, however long it is", async () => {
    const head = fitsFile({
      ...table("a", 0),
      counts: { NAXIS1: 4000, NAXIS2: 2 ** 40 },
      columns: [{ form: "4000A" }],
    });
    let given = 0;
    async function* endless() {
      yield head;
      const piece = new Uint8Array(100_000);
      for (;;) {
        given += piece.length;
        yield piece;
      }
    }
    let batches = 0;
    for await (const batch of (await openFits(endless())).batches) {
      expect(given - (batch.bytes - head.length)).toBeLessThan(100_000);
      expect(batch.rows * 4000).toBeLessThan(2 ** 23);
      if (++batches === 5) break;
    }
    expect(batches).toBe(5);
  });

  test("is counted as it is read", async () => {
    const file = fitsFile(table("a", 50_000));
    const seen: number[] = [];
    for await (const batch of (await openFits(pieces(file))).batches) seen.push(batch.bytes);
    expect(seen.length).toBeGreaterThan(2);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(seen.at(-1)).toBe(2880 * 2 + 200_000);
  });

  test("hands on its own failure", async () => {
    async function* failing() {
      yield fitsFile(table("a", 50_000)).subarray(0, 20_000);
      throw new Error("the disk is gone");
    }
    const reader = await openFits(failing());
    await expect(reader.batches[Symbol.asyncIterator]().next()).rejects.toThrow("the disk is gone");
  });
});
