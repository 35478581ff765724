import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readAsciiNumber, readPlainNumber } from "#server/formats/fits/ascii-numbers.ts";
import { asciiFile, keysOf, readFits } from "./fits-file.ts";

describe("an ASCII table", () => {
  test("has its fields where TBCOL says", async () => {
    const { reader, names, types, cells, findings } = await readFits(
      asciiFile(
        [
          { name: "name", form: "A6", from: 1 },
          { name: "n", form: "I5", from: 7, keywords: { TNULL: "-99" } },
          { name: "v", form: "F7.2", from: 12 },
          { name: "e", form: "E11.3", from: 19, keywords: { TUNIT: "mag" } },
          { name: "d", form: "D13.5", from: 30 },
          { name: "id", form: "I21", from: 43 },
        ],
        [
          "Star A   12   7.91  1.250E-03  1.25000D+02  3141592653589793239",
          "S B     -99  -0.50   -1.0E+00     -2.5D-03                 +007",
        ],
      ),
    );
    expect(reader.header.variant).toBe("ASCII table");
    expect(names).toEqual(["name", "n", "v", "e", "d", "id"]);
    expect(types).toEqual(["text", "int32", "float64", "float64", "float64", "int64"]);
    expect(cells).toEqual([
      ["Star A", "S B"],
      [12, Number.NaN],
      [7.91, -0.5],
      [1.25e-3, -1],
      [125, -0.0025],
      ["3141592653589793239", "7"],
    ]);
    expect(reader.header.columns[3]?.unit).toBe("mag");
    expect(findings).toEqual([]);
  });

  test("takes marks, empty fields, words for nothing and overflown fields as blank", async () => {
    const { cells, findings, refused } = await readFits(
      asciiFile(
        [
          { name: "v", form: "F6.2", from: 1, keywords: { TNULL: "-9.99" } },
          { name: "k", form: "I12", from: 7, keywords: { TNULL: "0" } },
          { name: "a", form: "A3", from: 19, keywords: { TNULL: "***" } },
        ],
        ["-9.990           0***", "                  ab ", "******         NaNxyz", "  1.00           5***"],
      ),
    );
    expect(cells).toEqual([
      [Number.NaN, Number.NaN, Number.NaN, 1],
      ["", "", "", "5"],
      ["", "ab", "xyz", ""],
    ]);
    expect(refused).toEqual([]);
    expect(findings).toMatchObject([
      { key: "fits-empty-number", level: "note", count: 2, examples: ["row 2, v", "row 2, k"] },
    ]);
  });

  test("refuses a row with a field that is no number, with its text, and shifts nothing", async () => {
    const { cells, rows, refused } = await readFits(
      asciiFile(
        [
          { name: "v", form: "F5.2", from: 1 },
          { name: "n", form: "I3", from: 7 },
          { name: "id", form: "I10", from: 11 },
        ],
        [
          " 1.00   1          1",
          " 2.0a   2          2",
          " 3.00 2.5          3",
          " 4.00   4        4 4",
          " 5.00   5          5",
        ],
      ),
    );
    expect(rows).toBe(2);
    expect(cells).toEqual([
      [1, 5],
      [1, 5],
      ["1", "5"],
    ]);
    expect(refused).toEqual([
      { row: 2, text: " 2.0a   2          2", why: "v is “2.0a”, which is not a number." },
      { row: 3, text: " 3.00 2.5          3", why: "n is “2.5”, which is not a number." },
      { row: 4, text: " 4.00   4        4 4", why: "id is “4 4”, which is not a number." },
    ]);
  });

  test("puts a left-out point where the form has it, and asks", async () => {
    const { cells, findings } = await readFits(
      asciiFile([{ name: "v", form: "F6.2", from: 1 }], ["  1234", " 12.34"]),
    );
    expect(cells[0]).toEqual([12.34, 12.34]);
    expect(findings).toMatchObject([
      { key: "fits-left-out-point", level: "ask", count: 1, examples: ["row 1, v: 1234 read as 12.34"] },
    ]);
  });

  test("applies scales, and then gives whole numbers as measured ones", async () => {
    const { types, cells } = await readFits(
      asciiFile(
        [
          { form: "I4", from: 1, keywords: { TSCAL: 0.1, TNULL: "-1" } },
          { form: "F5.1", from: 5, keywords: { TZERO: 100 } },
          { form: "I4", from: 1, keywords: { TSCAL: "many" } },
        ],
        ["  25  1.5", "  -1 -1.5"],
      ),
    );
    expect(types).toEqual(["float64", "float64"]);
    expect(cells).toEqual([
      [2.5, Number.NaN],
      [101.5, 98.5],
    ]);
  });

  test.each([
    [{ form: "F6.2", from: 6 }, /takes the characters 6 to 11 of a row, but a row has 10/],
    [{ form: "I3", from: 0 }, /takes the characters 0 to 2/],
    [{ form: "E", from: 1 }, /has the form “E”, which cannot be read/],
    [{ form: "I0", from: 1 }, /has the form “I0”/],
  ])("is refused where a field cannot be: %j", async (column, message) => {
    await expect(readFits(asciiFile([{ name: "x", ...column }], ["          "]))).rejects.toMatchObject({
      code: "fits-header",
      message: expect.stringMatching(message),
    });
  });

  test("is refused where its columns lie over each other many times over", async () => {
    const columns = Array.from({ length: 900 }, () => ({ form: "A5000", from: 1 }));
    await expect(readFits(asciiFile(columns, [" ".repeat(5000)]))).rejects.toMatchObject({
      code: "fits-limit",
    });
  });

  test("keeps count of its findings over all rows", async () => {
    const { findings } = await readFits(
      asciiFile([{ name: "v", form: "F4.1", from: 1 }], Array(30_000).fill("    ")),
    );
    expect(keysOf(findings)).toEqual(["fits-empty-number"]);
    expect(findings[0]?.count).toBe(30_000);
    expect(findings[0]?.examples).toHaveLength(5);
  });
});

// Definition of the FITS, version 4.0, section 7.2.5 (from memory).
describe("numbers in ASCII", () => {
  test.each([
    ["1.5", 0, 1.5],
    ["-.5", 3, -0.5],
    ["5.", 2, 5],
    ["1.5E3", 0, 1500],
    ["1.5D-3", 0, 0.0015],
    ["1.5d+03", 0, 1500],
    ["1.5+3", 0, 1500],
    ["15-3", 1, 0.0015],
    ["12", 0, 12],
    ["123", 2, 1.23],
    ["-5", 3, -0.005],
    ["1234E2", 2, 1234],
  ])("%s with %i decimals is %d", (text, decimals, value) =>
    expect(readAsciiNumber(text, decimals)).toBe(value),
  );

  test.each(["", "-", ".", "1.2.3", "1 2", "0x1.", "Infinity", "1e5x", "abc", "1,5", "--1", "E5"])(
    "%j is none",
    (text) => expect(readAsciiNumber(text, 0)).toBeNaN(),
  );

  test("come out as they were written, with any mark of the exponent", () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.constantFrom("E", "e", "D", "d"),
        (value, mark) => {
          // Zero is written without its sign.
          const text = value.toExponential();
          expect(
            readAsciiNumber(text.includes(".") ? text.replace("e", mark) : text.replace("e", `.${mark}`), 3),
          ).toBe(value + 0);
        },
      ),
    );
  });

  // Whatever the quick way reads, it reads to the last digit as the thorough one does, which goes by way of a text.
  test("are the same from their bytes as from their text", () => {
    const digits = fc.string({ unit: fc.constantFrom(..."0123456789"), maxLength: 9 });
    const field = fc
      .tuple(
        fc.constantFrom("", " ", "-", "+", "--"),
        digits,
        fc.constantFrom("", ".", ".", "..", ","),
        digits,
        fc.constantFrom("", "", "E", "e-", "D+", "d", "x"),
        fc.constantFrom("", "", "0", "5", "12", "22", "40", "400"),
        fc.constantFrom("", " ", "\0"),
      )
      .map((parts) => parts.join(""));
    let plain = 0;
    fc.assert(
      fc.property(field, (text) => {
        const bytes = Buffer.from(`9${text}9`);
        const value = readPlainNumber(bytes, 1, bytes.length - 1, false);
        if (Number.isNaN(value)) return;
        plain++;
        expect(value).toBe(readAsciiNumber(text.trim(), 0));
      }),
      { numRuns: 3000 },
    );
    expect(plain).toBeGreaterThan(200);
  });

  test("are left to a closer look without the point that their form leaves out", () => {
    const bytes = Buffer.from("  12  1.2");
    expect(readPlainNumber(bytes, 0, 4, true)).toBeNaN();
    expect(readPlainNumber(bytes, 0, 4, false)).toBe(12);
    expect(readPlainNumber(bytes, 4, 9, true)).toBe(1.2);
  });
});
