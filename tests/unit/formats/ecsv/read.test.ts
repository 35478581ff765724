import { describe, expect, test } from "vitest";
import { openEcsv } from "#server/formats/ecsv/open-ecsv.ts";
import { ecsv, inPieces, readEcsv } from "./support.ts";

const A = "{name: a, datatype: float64}";
const B = "{name: b, datatype: string}";

describe("the header", () => {
  test("says name, type, unit, description and UCD of each column, in flow and in block style", async () => {
    const { header } = await readEcsv(
      ecsv(
        [
          `{name: pmra, unit: mas / yr, datatype: float64, description: "so: \\"it\\" \\xE9"}`,
          "name: logg\n#   unit: dex(cm s-2)\n#   datatype: float32\n#   meta: !!omap\n#   - {ucd: phys.gravity}",
          "!!omap\n#   - name: n\n#   - datatype: int64",
        ],
        "pmra logg n\n",
      ),
    );
    expect(header.format).toBe("ecsv");
    expect(header.columns).toMatchObject([
      { name: "pmra", type: "float64", unit: "mas / yr", ucd: "", description: 'so: "it" é' },
      { name: "logg", type: "float32", unit: "dex(cm s-2)", ucd: "phys.gravity", description: "" },
      { name: "n", type: "int64", unit: "" },
    ]);
  });

  test("names that other readers take for numbers and truth keep their spelling", async () => {
    const { header } = await readEcsv(
      ecsv(
        ["{name: 1e3, datatype: int8}", "{name: no, datatype: int8}", "{name: 0x10, datatype: int8}"],
        "1e3 no 0x10\n",
      ),
    );
    expect(header.columns.map((c) => c.name)).toEqual(["1e3", "no", "0x10"]);
  });

  test("meta as an ordered map gives title and comments", async () => {
    const meta = ["meta: !!omap", "- title: Nearby stars", "- comments: [one, two]", "- {n: {q: 1}}"];
    const { header } = await readEcsv(ecsv([A], "a\n1\n", meta));
    expect(header.meta).toMatchObject({ title: "Nearby stars", sources: ["one", "two"] });
  });

  test("comments in the header and a mark of the encoding count for nothing", async () => {
    const text = ecsv([A], "a\n2\n", ["datatype_comment: x"]).replace("# ---", "# ---\n##not: [yaml");
    expect((await readEcsv(`\ufeff${text}`)).rows).toEqual([[2]]);
  });

  test("columns of arrays and of complex numbers are left out, and said to be", async () => {
    const text = ecsv(
      ["{name: v, datatype: string, subtype: 'float64[2]'}", A, "{name: c, datatype: complex128}"],
      'v a c\n"[0.0,1.0]" 5 (1+2j)\n',
    );
    const reader = await openEcsv(inPieces(Buffer.from(text), 64));
    expect(reader.header.columns.map((c) => c.name)).toEqual(["a"]);
    expect(reader.findings()).toMatchObject([{ key: "columns-left-out", level: "note", count: 2 }]);
    expect((await readEcsv(text)).rows).toEqual([[5]]);
  });

  test.each([
    ["another version", ecsv([A], "a\n").replace("1.0", "7.0"), /first line/],
    ["broken YAML", ecsv(["{name: a, datatype"], "a\n"), /cannot be read as YAML/],
    ["no columns", "# %ECSV 1.0\n# ---\n# meta: {}\na\n1\n", /names no columns/],
    ["a column without a name", ecsv(["{datatype: int8}"], "a\n"), /Column 1 has no name/],
    ["two columns of one name", ecsv([A, A], "a a\n"), /Two columns are called “a”/],
    ["other names below", ecsv([A, B], "a c\n1 x\n"), /Column 2 is “b” in the header and “c”/],
    ["fewer names below", ecsv([A, B], "a\n1\n"), /“b” in the header and “”/],
    ["more names below", ecsv([A], "a b\n1 2\n"), /has 2 names and the header 1/],
    ["no line of names", ecsv([A], ""), /line of names after the header is missing/],
    ["another delimiter", ecsv([A], "a\n", ["delimiter: ';'"]), /neither a blank nor a comma/],
    ["nothing but a format line", "# %ECSV 1.0", /first line/],
  ])("%s is refused in words", async (_, text, words) => {
    await expect(readEcsv(text)).rejects.toThrow(words);
  });

  test("a header that does not end is given up, and one that unfolds without end is too", async () => {
    async function* endless(): AsyncGenerator<Uint8Array> {
      yield Buffer.from("# %ECSV 1.0\n");
      for (;;) yield Buffer.from(`# ${"x".repeat(100_000)}\n`);
    }
    await expect(openEcsv(endless())).rejects.toThrow(/does not end within 2 MB/);
    const bomb = [
      "a: &a [x, x, x, x, x, x, x, x, x]",
      ...[..."bcdefgh"].map((c, i) => {
        const before = "abcdefgh"[i];
        return `${c}: &${c} [${Array.from({ length: 9 }, () => `*${before}`).join(", ")}]`;
      }),
    ];
    await expect(readEcsv(ecsv([A], "a\n1\n", bomb), 65_536)).rejects.toThrow(/cannot be read as YAML/);
    for (const deep of ["[".repeat(1000), `\n#  ${"- ".repeat(1000)}x`, `${"[".repeat(65)}${"]".repeat(65)}`])
      await expect(readEcsv(ecsv([A], "a\n1\n", [`deep: ${deep}`]), 65_536)).rejects.toThrow(
        /too many lists within lists/,
      );
  });
});

describe("the body", () => {
  test("blanks are empty cells and NaN, between blanks and between commas", async () => {
    const columns = [A, B, "{name: n, datatype: int32}"];
    const rows = [
      [1.5, "x y", null],
      [null, null, 7],
      [null, 'q"z', null],
    ];
    const spaced = ecsv(columns, 'a b n\n1.5 "x y" ""\n"" "" 7\nnan "q""z" ""\n');
    const comma = ecsv(columns, 'a,b,n\n1.5,x y,\n,,7\nnan,"q""z",\n', ["delimiter: ','"]);
    for (const text of [spaced, comma, comma.replaceAll("\n", "\r\n")])
      for (const piece of [1, 3, 1000]) expect((await readEcsv(text, piece)).rows).toEqual(rows);
  });

  test("64-bit numbers keep every digit as text, and booleans have two words", async () => {
    const columns = [
      "{name: i, datatype: int64}",
      "{name: u, datatype: uint64}",
      "{name: b, datatype: bool}",
    ];
    const { rows } = await readEcsv(
      ecsv(columns, 'i u b\n-9223372036854775808 18446744073709551615 True\n3141592653589793239 "" False\n'),
    );
    expect(rows).toEqual([
      ["-9223372036854775808", "18446744073709551615", "true"],
      ["3141592653589793239", null, "false"],
    ]);
  });

  test("single precision is widened exactly", async () => {
    const { rows } = await readEcsv(ecsv(["{name: f, datatype: float32}"], "f\n12.345\n"));
    expect(rows).toEqual([[Math.fround(12.345)]]);
  });

  test("half precision is rounded as numpy rounds it", async () => {
    const texts = ["0.1", "65500.0", "65520", "6e-08", "-1.00048828125", "1.00146484375", "nan"];
    const { rows } = await readEcsv(ecsv(["{name: h, datatype: float16}"], `h\n${texts.join("\n")}\n`));
    // Computed by numpy: float(np.float16(x)).
    const halves = [0.0999755859375, 65504, Number.POSITIVE_INFINITY, 2 ** -24, -1, 1.001953125, null];
    expect(rows).toEqual(halves.map((value) => [value]));
  });

  test("comments and blank lines stand between rows; a quoted hash is a value", async () => {
    expect((await readEcsv(ecsv([B], 'b\n# no row\n\n"#1"\nx\n'))).rows).toEqual([["#1"], ["x"]]);
  });

  test("more blanks than need be part the same cells", async () => {
    expect((await readEcsv(ecsv([A, B], 'a b\n  1   "x  y" \n'))).rows).toEqual([[1, "x  y"]]);
    const comma = ecsv([A, B], 'a,b\n 1 , "x,y" \n', ["delimiter: ','"]);
    expect((await readEcsv(comma)).rows).toEqual([[1, "x,y"]]);
  });

  test("a quoted text may hold a line's end", async () => {
    expect((await readEcsv(ecsv([B, A], 'b a\n"p\nq" 1\n'))).rows).toEqual([["p\nq", 1]]);
  });

  test("a row of another width, and a text that is none of its type, are refused with row and line", async () => {
    const columns = [A, "{name: n, datatype: uint8}"];
    const { rows, refused } = await readEcsv(ecsv(columns, "a n\n1 2\n1\n1 256\nx 1\n1 2.0\n4 5\n"));
    expect(rows).toEqual([
      [1, 2],
      [4, 5],
    ]);
    expect(refused.map(({ row, line, why }) => [row, line, why])).toEqual([
      [2, 8, "This row has 1 values; the table has 2 columns."],
      [3, 9, "“256” in n is no value of the type uint8."],
      [4, 10, "“x” in a is no value of the type float64."],
      [5, 11, "“2.0” in n is no value of the type uint8."],
    ]);
  });

  test("values under a mask are blank", async () => {
    const meta = [
      "meta:",
      "  __serialized_columns__:",
      "    a:",
      "      __class__: astropy.table.column.MaskedColumn",
      "      data: !astropy.table.SerializedColumn {name: a}",
      "      mask: !astropy.table.SerializedColumn {name: a.mask}",
    ];
    const { rows } = await readEcsv(
      ecsv([A, "{name: a.mask, datatype: bool}"], "a a.mask\n1.5 False\n99 True\n", meta),
    );
    expect(rows).toEqual([
      [1.5, "false"],
      [null, "true"],
    ]);
  });

  test("no rows are no rows, and all bytes are counted", async () => {
    const text = ecsv([A], "a\n");
    const { rows, bytes } = await readEcsv(text);
    expect(rows).toEqual([]);
    expect(bytes).toBe(text.length);
  });

  test("a file that ends within a row was cut off", async () => {
    await expect(readEcsv(ecsv([A, B], "a b\n1 x\n2"))).rejects.toThrow(/ends in the middle of line/);
  });
});
