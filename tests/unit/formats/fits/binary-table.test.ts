import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { binaryFile, bytesOf, fitsFile, readFits } from "./fits-file.ts";

const { uint8, int16, int32, int64, float32, float64, text, hex } = bytesOf;

describe("a binary table", () => {
  // The bytes of this row as astropy writes it (computed).
  test("is read from its bytes", async () => {
    const file = binaryFile([
      { name: "ra", form: "D", cells: [hex("4070d72d10fbeee6")] },
      { name: "n", form: "J", keywords: { TNULL: -99 }, cells: [hex("ffffff9d")] },
      { name: "flux", form: "I", keywords: { TSCAL: 1, TZERO: 32768 }, cells: [hex("1c40")] },
      { name: "id", form: "5A", cells: [hex("6162630000")] },
    ]);
    expect(file.length).toBe(8640);
    const { names, types, cells, reader } = await readFits(file);
    expect(names).toEqual(["ra", "n", "flux", "id"]);
    expect(types).toEqual(["float64", "int32", "uint16", "text"]);
    expect(cells).toEqual([[269.44850252543836], [Number.NaN], [40000], ["abc"]]);
    expect(reader.header).toMatchObject({
      format: "fits",
      variant: "binary table",
      declaredRows: 1,
      encoding: null,
    });
    expect(reader.header.columns[1]?.nullMark).toBe("-99");
  });

  // 3 000 000 000 less 2³¹ is 852 516 352 (computed).
  test("holds unsigned numbers by the zero of their convention, all digits kept", async () => {
    const { types, cells } = await readFits(
      binaryFile([
        { form: "J", keywords: { TZERO: 2147483648 }, cells: [hex("32d05e00")] },
        { form: "K", keywords: { TZERO: 9223372036854775808n }, cells: [hex("7fffffffffffffff")] },
        { form: "K", keywords: { TZERO: "'9223372036854775808.'" }, cells: [hex("8000000000000000")] },
        { form: "B", keywords: { TZERO: -128 }, cells: [hex("00")] },
        { form: "K", keywords: { TZERO: 10 }, cells: [int64(3141592653589793229n)] },
      ]),
    );
    expect(types).toEqual(["uint32", "uint64", "uint64", "int8", "int64"]);
    expect(cells).toEqual([[3000000000], ["18446744073709551615"], ["0"], [-128], ["3141592653589793239"]]);
  });

  test("keeps each type of a number at its limits", async () => {
    const { types, cells } = await readFits(
      binaryFile([
        { form: "B", cells: [uint8(0), uint8(255)] },
        { form: "I", cells: [int16(-32768), int16(32767)] },
        { form: "1J", cells: [int32(-2147483648), int32(2147483647)] },
        { form: "K", cells: [int64(-(2n ** 63n)), int64(2n ** 63n - 1n)] },
        { form: "E", cells: [float32(0.1), float32(Number.NaN)] },
        { form: "D", cells: [float64(-0), float64(5e-324)] },
      ]),
    );
    expect(types).toEqual(["uint8", "int16", "int32", "int64", "float32", "float64"]);
    expect(cells).toEqual([
      [0, 255],
      [-32768, 32767],
      [-2147483648, 2147483647],
      ["-9223372036854775808", "9223372036854775807"],
      [Math.fround(0.1), Number.NaN],
      [-0, 5e-324],
    ]);
  });

  test("compares TNULL with what is stored, before the scale", async () => {
    const scale = { TSCAL: 0.5, TZERO: 100 };
    const { types, cells } = await readFits(
      binaryFile([
        { form: "B", keywords: { TNULL: 255, ...scale }, cells: [uint8(255), uint8(4)] },
        { form: "I", keywords: { TNULL: -1, ...scale }, cells: [int16(-1), int16(4)] },
        { form: "J", keywords: { TNULL: -1, ...scale }, cells: [int32(-1), int32(4)] },
        { form: "K", keywords: { TNULL: -1, ...scale }, cells: [int64(-1n), int64(4n)] },
        { form: "K", keywords: { TNULL: 0, TZERO: 2n ** 63n }, cells: [int64(0n), int64(1n)] },
        { form: "E", keywords: scale, cells: [float32(Number.NaN), float32(4)] },
      ]),
    );
    expect(types).toEqual(["float64", "float64", "float64", "float64", "uint64", "float64"]);
    for (const column of [0, 1, 2, 3, 5]) expect(cells[column]).toEqual([Number.NaN, 102]);
    expect(cells[4]).toEqual(["", "9223372036854775809"]);
  });

  test("asks about numbers that equal the TNULL of an unsigned column, which is a stored value", async () => {
    const { cells, findings } = await readFits(
      binaryFile([
        {
          name: "u2",
          form: "I",
          keywords: { TNULL: 99, TZERO: 32768 },
          cells: [int16(99), int16(99 - 32768)],
        },
        {
          name: "u8",
          form: "K",
          keywords: { TNULL: 7, TZERO: 2n ** 63n },
          cells: [int64(7n), int64(7n - 2n ** 63n)],
        },
      ]),
    );
    expect(cells).toEqual([
      [Number.NaN, 99],
      ["", "7"],
    ]);
    expect(findings).toMatchObject([
      { key: "fits-unsigned-null", level: "ask", examples: ["row 2, u2: 99", "row 2, u8: 7"] },
    ]);
  });

  test("reads logical values and bits as words, and a null byte as blank", async () => {
    const { types, cells, findings } = await readFits(
      binaryFile([
        { name: "l", form: "L", cells: [text("T", 1), text("F", 1), uint8(0), uint8(1)] },
        { name: "x", form: "X", cells: [hex("80"), hex("7f"), hex("ff"), hex("00")] },
        { name: "flags", form: "11X", cells: [hex("a020"), hex("0000"), hex("ffe0"), hex("001f")] },
      ]),
    );
    expect(types).toEqual(["boolean", "boolean", "text"]);
    expect(cells).toEqual([
      ["true", "false", "", ""],
      ["true", "false", "true", "false"],
      ["10100000001", "00000000000", "11111111111", "00000000000"],
    ]);
    expect(findings).toMatchObject([
      { key: "fits-strange-logical", level: "ask", count: 1, examples: ["row 4, l: byte 1"] },
    ]);
  });

  test("ends texts at a NUL and without the blanks behind them", async () => {
    const { cells } = await readFits(
      binaryFile([
        {
          form: "6A",
          cells: [
            text("ab", 6, 32),
            text("ab\0cd", 6),
            text(" a b", 6),
            text("", 6, 32),
            text("", 6),
            text("123456", 6),
            text("\0zzz", 6),
          ],
        },
      ]),
    );
    expect(cells[0]).toEqual(["ab", "ab", " a b", "", "", "123456", ""]);
  });

  test("reads letters beyond ASCII where UTF-8 or Latin makes sense of them, and says so", async () => {
    const { cells, findings } = await readFits(
      binaryFile([
        { name: "who", form: "8A", cells: [text("Müller", 8), hex("4de9726500202020"), text("abc", 8)] },
      ]),
    );
    expect(cells[0]).toEqual(["Müller", "Mére", "abc"]);
    expect(findings.map(({ key, level, examples }) => [key, level, examples[0]])).toEqual([
      ["fits-utf8", "note", "row 1, who: Müller"],
      ["fits-latin", "ask", "row 2, who: Mére"],
    ]);
  });

  test("leaves out columns that have no one value for a row, by name, and shifts nothing", async () => {
    const heap = Buffer.concat([float32(1), float32(2), float32(3)]);
    const { names, cells, findings } = await readFits(
      binaryFile(
        [
          { name: "a", form: "J", cells: [int32(1), int32(2)] },
          { name: "spectrum", form: "1PE(2)", cells: [hex("0000000200000000"), hex("0000000100000008")] },
          { name: "long", form: "QE(2)", cells: [hex("00".repeat(16)), hex("00".repeat(16))] },
          { name: "cube", form: "3E", cells: [hex("00".repeat(12)), hex("00".repeat(12))] },
          { name: "words", form: "6A", keywords: { TDIM: "(3,2)" }, cells: [text("abcdef", 6), text("", 6)] },
          { name: "more", form: "6A3", cells: [text("abcdef", 6), text("", 6)] },
          { name: "z", form: "C", cells: [hex("00".repeat(8)), hex("00".repeat(8))] },
          { name: "zz", form: "M", cells: [hex("00".repeat(16)), hex("00".repeat(16))] },
          { name: "none", form: "0D", cells: [hex(""), hex("")] },
          { name: "many", form: "65X", cells: [hex("00".repeat(9)), hex("00".repeat(9))] },
          { name: "dim", form: "3A", keywords: { TDIM: "(3)" }, cells: [text("abc", 3), text("de", 3)] },
          { name: "empty", form: "0A", cells: [hex(""), hex("")] },
          { name: "b", form: "D", cells: [float64(0.1), float64(0.2)] },
        ],
        { heap },
      ),
    );
    expect(names).toEqual(["a", "dim", "empty", "b"]);
    expect(cells).toEqual([
      [1, 2],
      ["abc", "de"],
      ["", ""],
      [0.1, 0.2],
    ]);
    expect(Object.fromEntries(findings.map(({ key, examples }) => [key, examples]))).toEqual({
      "fits-left-out-variable": ["spectrum (1PE(2))", "long (QE(2))"],
      "fits-left-out-array": ["cube (3E)", "words (6A)", "more (6A3)", "many (65X)"],
      "fits-left-out-complex": ["z (C)", "zz (M)"],
      "fits-left-out-empty": ["none (0D)"],
    });
  });

  test("leaves out a column whose scale is no number, rather than give its stored values", async () => {
    const { names, findings } = await readFits(
      binaryFile([
        { name: "a", form: "J", keywords: { TSCAL: "much" }, cells: [int32(1)] },
        { name: "b", form: "E", keywords: { TSCAL: 0 }, cells: [float32(1)] },
        { name: "c", form: "J", cells: [int32(1)] },
      ]),
    );
    expect(names).toEqual(["c"]);
    expect(findings).toMatchObject([{ key: "fits-left-out-scale", level: "ask", count: 2 }]);
  });

  test("does not use a TNULL that the column cannot hold", async () => {
    const { cells, reader, findings } = await readFits(
      binaryFile([
        { name: "b", form: "B", keywords: { TNULL: 999999 }, cells: [uint8(63)] },
        { name: "e", form: "E", keywords: { TNULL: -99 }, cells: [float32(-99)] },
        { name: "j", form: "J", keywords: { TNULL: "x" }, cells: [int32(0)] },
      ]),
    );
    expect(cells).toEqual([[63], [-99], [0]]);
    expect(reader.header.columns.map((column) => column.nullMark)).toEqual([null, null, null]);
    expect(findings).toMatchObject([{ key: "fits-useless-null", examples: ["b: 999999", "e: -99", "j: x"] }]);
  });

  test("gives its rows in several batches and never the whole file", async () => {
    const rows = Array.from({ length: 40_000 }, (_, row) => int32(row));
    const { reader, cells, rows: count } = await readFits(binaryFile([{ form: "J", cells: rows }]), 1000);
    expect(count).toBe(40_000);
    expect(cells[0]?.every((value, row) => value === row)).toBe(true);
    expect(reader.header.declaredRows).toBe(40_000);
  });

  test("counts the rows that it speaks of over all batches", async () => {
    const cells = Array.from({ length: 30_000 }, (_, row) => text(row === 29_998 ? "?" : "T", 1));
    const { findings } = await readFits(binaryFile([{ name: "l", form: "L", cells }]));
    expect(findings[0]?.examples).toEqual(["row 29999, l: byte 63"]);
  });

  test("may have no rows", async () => {
    const { names, rows, findings } = await readFits(
      fitsFile({ columns: [{ name: "a", form: "D" }], rows: [], counts: { NAXIS1: 8 } }),
    );
    expect([names, rows, findings]).toEqual([["a"], 0, []]);
  });
});

describe("any table", () => {
  const kinds = {
    uint8: fc.integer({ min: 0, max: 255 }),
    int16: fc.integer({ min: -32768, max: 32767 }),
    int32: fc.integer(),
    float32: fc.float(),
    float64: fc.double(),
  };
  const FORMS = { uint8: "B", int16: "I", int32: "J", float32: "E", float64: "D" } as const;
  type Kind = keyof typeof kinds;

  const column = fc
    .constantFrom(...(Object.keys(kinds) as Kind[]))
    .chain((kind) =>
      fc.record({ kind: fc.constant(kind), values: fc.array(kinds[kind], { minLength: 20, maxLength: 20 }) }),
    );
  const words = fc.record({
    kind: fc.constant("text" as const),
    values: fc.array(fc.string({ unit: fc.constantFrom("a", " ", "9", "-"), maxLength: 9 }), {
      minLength: 20,
      maxLength: 20,
    }),
  });
  const ids = fc.record({
    kind: fc.constant("int64" as const),
    values: fc.array(fc.bigInt({ min: -(2n ** 63n), max: 2n ** 63n - 1n }), { minLength: 20, maxLength: 20 }),
  });

  test("comes out cell by cell as it was written, however its bytes arrive", async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.oneof(column, words, ids), { minLength: 1, maxLength: 8 }),
        fc.integer({ min: 1, max: 20 }),
        fc.integer({ min: 1, max: 4000 }),
        async (columns, rows, size) => {
          const file = binaryFile(
            columns.map(({ kind, values }, index) => ({
              name: `c${index}`,
              form: kind === "text" ? "9A" : kind === "int64" ? "K" : FORMS[kind],
              cells: values.slice(0, rows).map((value) => {
                if (typeof value === "string") return text(value, 9);
                if (typeof value === "bigint") return int64(value);
                return bytesOf[kind as Kind](value);
              }),
            })),
          );
          const read = await readFits(file, size);
          expect(read.cells).toEqual(
            columns.map(({ values }) =>
              values.slice(0, rows).map((value) => {
                if (typeof value === "string") return value.trimEnd();
                return typeof value === "bigint" ? value.toString() : value;
              }),
            ),
          );
          expect(read.findings).toEqual([]);
        },
      ),
      { numRuns: 150 },
    );
  });
});
