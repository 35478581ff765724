import { describe, expect, test } from "vitest";
import { hex, oneColumn, readWhole, stream, votable } from "./support.ts";

const column = async (field: string, cells: readonly string[]) => {
  const { rows, refused, findings } = await readWhole(oneColumn(field, cells));
  return { values: rows.map(([value]) => value), refused, findings };
};

describe("the check rows of the binary forms", () => {
  const fields =
    '<FIELD name="ra" datatype="double"/><FIELD name="n" datatype="int"/><FIELD name="s" datatype="char" arraysize="*"/>';

  // astropy 5.2.1 decodes both to the same row, with a null and −1 in the middle.
  test("BINARY2 with a null by its mask", async () => {
    const { rows } = await readWhole(
      votable(fields, '<BINARY2><STREAM encoding="base64">QEBw1y0Q++7mAAAAAAAAAANhYmM=</STREAM></BINARY2>'),
    );
    expect(rows).toEqual([[269.44850252543836, Number.NaN, "abc"]]);
  });

  test("BINARY, where −1 is a number", async () => {
    const { rows } = await readWhole(
      votable(fields, '<BINARY><STREAM encoding="base64">QHDXLRD77ub/////AAAAA2FiYw==</STREAM></BINARY>'),
    );
    expect(rows).toEqual([[269.44850252543836, -1, "abc"]]);
  });

  // Bytes by IEEE 754 and two's complement; computed.
  test.each([
    ["float", "45b46000", 5772],
    ["float", "4145851f", Math.fround(12.345)],
    ["float", "7fc00000", Number.NaN],
    ["double", "7ff8000000000000", Number.NaN],
    ["double", "fff0000000000000", Number.NEGATIVE_INFINITY],
    ["short", "d8f1", -9999],
    ["unsignedByte", "ff", 255],
    ["int", "80000000", -2147483648],
    ["long", "3e12b12000c92500", "4472832130942575872"],
    ["long", "8000000000000000", "-9223372036854775808"],
    ["boolean", "54", "true"],
    ["boolean", "31", "true"],
    ["boolean", "66", "false"],
    ["boolean", "30", "false"],
    ["boolean", "3f", ""],
    ["boolean", "20", ""],
    ["boolean", "00", ""],
    ["bit", "80", "true"],
    ["bit", "08", "true"],
    ["bit", "00", "false"],
    ["char", "41", "A"],
    ["char", "00", ""],
    ["unicodeChar", "03b1", "α"],
  ])("a %s of the bytes %s", async (datatype, bytes, value) => {
    const field = `<FIELD name="x" datatype="${datatype}"/>`;
    expect((await readWhole(votable(field, stream("BINARY", hex(bytes))))).rows).toEqual([[value]]);
  });
});

describe("numbers as text", () => {
  test("floats, among them blanks by an empty cell, by NaN and by the declared mark in any spelling", async () => {
    const cells = [
      "1.5",
      " -2e3 ",
      "NaN",
      "",
      "-99.000",
      "+Inf",
      "-Inf",
      "+4",
      ".5",
      "1.2D-3",
      "\n7\n",
      "\u22125",
    ];
    const { values, refused, findings } = await column(
      '<FIELD name="x" datatype="double"><VALUES null="-99.0"/></FIELD>',
      cells,
    );
    const { NaN: blank, POSITIVE_INFINITY: infinity } = Number;
    expect(values).toEqual([1.5, -2000, blank, blank, blank, infinity, -infinity, 4, 0.5, 0.0012, 7, -5]);
    expect(refused).toEqual([]);
    expect(findings).toEqual([]);
  });

  test("single precision is widened exactly, so that every form of a file gives the same number", async () => {
    const { values } = await column('<FIELD name="x" datatype="float"/>', ["12.345", "3e-50"]);
    expect(values).toEqual([Math.fround(12.345), 0]);
  });

  test("integers in decimal and hexadecimal digits", async () => {
    const { values } = await column('<FIELD name="x" datatype="int"><VALUES null="0x10"/></FIELD>', [
      "12",
      "-3",
      "0xFF",
      "16",
      "+7",
      "12.0",
      "",
    ]);
    expect(values).toEqual([12, -3, 255, Number.NaN, 7, 12, Number.NaN]);
  });

  test("64-bit integers keep every digit", async () => {
    const { values, refused } = await column('<FIELD name="x" datatype="long"><VALUES null="-1"/></FIELD>', [
      "3141592653589793239",
      "-9223372036854775808",
      "0x7fffffffffffffff",
      "007",
      "-1",
      "",
      "0",
      "9223372036854775808",
    ]);
    expect(values).toEqual([
      "3141592653589793239",
      "-9223372036854775808",
      "9223372036854775807",
      "7",
      "",
      "",
      "0",
    ]);
    expect(refused.map((r) => r.why)).toEqual(['"9223372036854775808" in x is not a value of the type long']);
  });

  test.each([
    ["unsignedByte", "256"],
    ["unsignedByte", "-1"],
    ["short", "40000"],
    ["int", "1.5"],
    ["int", "2147483648"],
    ["long", "1.5"],
    ["double", "12.3a"],
    ["double", "0x10"],
    ["double", "1e999"],
    ["float", "1e39"],
    ["double", "1,5"],
    ["boolean", "maybe"],
  ])("a %s of %s is refused with its row and never cut to fit", async (datatype, cell) => {
    const { values, refused } = await column(`<FIELD name="x" datatype="${datatype}"/>`, ["1", cell, "0"]);
    expect(values).toHaveLength(2);
    expect(refused).toMatchObject([{ row: 2, line: 3, text: `<TR><TD>${cell}</TD></TR>` }]);
  });

  test("words for no value are blanks, and told", async () => {
    const { values, findings } = await column('<FIELD name="x" datatype="int"/>', ["NULL", "5", "none"]);
    expect(values).toEqual([Number.NaN, 5, Number.NaN]);
    expect(findings).toMatchObject([
      { key: "votable-blank-words", count: 2, examples: ['"NULL" in x', '"none" in x'] },
    ]);
  });
});

describe("other cells as text", () => {
  test("booleans in all their forms", async () => {
    const { values } = await column('<FIELD name="x" datatype="boolean"/>', [
      "T",
      "t",
      "1",
      "true",
      "True",
      "F",
      "f",
      "0",
      "false",
      "FALSE",
      "?",
      " ",
      "",
    ]);
    const [yes, no] = ["true", "false"];
    expect(values).toEqual([yes, yes, yes, yes, yes, no, no, no, no, no, "", "", ""]);
  });

  test("texts keep their blanks and are never cut, and references stand for their signs", async () => {
    const { values } = await column('<FIELD name="x" datatype="char" arraysize="4"/>', [
      " a b ",
      "R &amp; D &lt;3",
      "<![CDATA[<b> & c]]>",
      "&#x3b1; &#945;",
      "one<!-- two -->three",
      "longer than four",
      "a\r\nb",
      "5 > 3",
    ]);
    expect(values).toEqual([
      " a b ",
      "R & D <3",
      "<b> & c",
      "α α",
      "onethree",
      "longer than four",
      "a\nb",
      "5 > 3",
    ]);
  });

  test("a declared mark of a blank text is a blank", async () => {
    const field = '<FIELD name="x" datatype="char" arraysize="*"><VALUES null="N/A"/></FIELD>';
    expect((await column(field, ["N/A", "n/a", "A"])).values).toEqual(["", "n/a", "A"]);
    const bytes = hex("00000003 4e2f41 00000001 41");
    expect((await readWhole(votable(field, stream("BINARY", bytes)))).rows).toEqual([[""], ["A"]]);
  });

  test("fixed lengths end at the first NUL", async () => {
    const field =
      '<FIELD name="x" datatype="char" arraysize="4"/><FIELD name="y" datatype="unicodeChar" arraysize="2"/>';
    const bytes = hex("41200000 03b10000  41424344 00410062 00414141 00000041");
    const { rows } = await readWhole(votable(field, stream("BINARY", bytes)));
    expect(rows).toEqual([
      ["A ", "α"],
      ["ABCD", "Ab"],
      ["", ""],
    ]);
  });

  test("declared marks of blanks count in the binary forms too", async () => {
    const field =
      '<FIELD name="x" datatype="short"><VALUES null="-9999"/></FIELD><FIELD name="y" datatype="float"><VALUES null="-99.9"/></FIELD><FIELD name="z" datatype="long"><VALUES null="+0007"/></FIELD>';
    const row = Buffer.alloc(14);
    row.writeInt16BE(-9999, 0);
    row.writeFloatBE(-99.9, 2);
    row.writeBigInt64BE(7n, 6);
    const { rows } = await readWhole(votable(field, stream("BINARY", row)));
    expect(rows).toEqual([[Number.NaN, Number.NaN, ""]]);
  });

  test("a byte that is neither yes nor no refuses its row alone", async () => {
    const field = '<FIELD name="x" datatype="boolean"/>';
    const { rows, refused } = await readWhole(votable(field, stream("BINARY", hex("54 58 46"))));
    expect(rows).toEqual([["true"], ["false"]]);
    expect(refused).toEqual([
      { row: 2, line: null, text: "58", why: "the byte 88 in x is neither yes nor no" },
    ]);
  });
});

describe("columns of several values", () => {
  const arrays = [
    ["double", "3", "<TD>1 2 3</TD>", "0".repeat(48)],
    ["int", "*", "<TD>1 2</TD>", `00000002${"0".repeat(16)}`],
    ["bit", "12", "<TD>1 0 1</TD>", "ffff"],
    ["bit", "*", "<TD>1 0 1</TD>", "0000000cffff"],
    ["floatComplex", "", "<TD>1 2</TD>", "0".repeat(16)],
    ["doubleComplex", "2", "<TD>1 2 3 4</TD>", "0".repeat(64)],
    ["char", "4x2", "<TD>abcdefgh</TD>", "6162636465666768"],
    ["unicodeChar", "2x2", "<TD>abcd</TD>", "0061006200630064"],
    ["short", "2x3", "<TD>1 2 3 4 5 6</TD>", "0".repeat(24)],
    ["long", "5*", "<TD/>", "00000000"],
  ] as const;

  test.each(arrays)(
    "%s of the size %s are left out by name and move nothing",
    async (type, size, cell, bytes) => {
      const fields = `<FIELD name="a" datatype="short"/><FIELD name="many" datatype="${type}" arraysize="${size}"/><FIELD name="b" datatype="short"/>`;
      const documents = [
        votable(fields, `<TABLEDATA><TR><TD>7</TD>${cell}<TD>9</TD></TR></TABLEDATA>`),
        votable(fields, stream("BINARY", hex(`0007${bytes}0009`))),
        votable(fields, stream("BINARY2", hex(`40 0007${bytes}0009`))),
      ];
      for (const document of documents) {
        const { header, rows, findings } = await readWhole(document);
        expect(header.columns.map((c) => c.name)).toEqual(["a", "b"]);
        expect(rows).toEqual([[7, 9]]);
        expect(findings).toMatchObject([{ key: "votable-array-columns", examples: ["many"] }]);
      }
    },
  );

  test("an array of one is a single value", async () => {
    const field = '<FIELD name="x" datatype="int" arraysize="1"/>';
    expect((await readWhole(votable(field, stream("BINARY", hex("00000005"))))).rows).toEqual([[5]]);
    expect((await readWhole(oneColumn(field, ["5"]))).rows).toEqual([[5]]);
  });

  test("a blank by its mask is one in columns of every kind", async () => {
    const fields = ["boolean", "bit", "long", "double", "char"]
      .map((type) => `<FIELD name="${type}" datatype="${type}"/>`)
      .join("");
    const { rows } = await readWhole(
      votable(fields, stream("BINARY2", hex(`f8 54 80 ${"01".repeat(8)} ${"40".repeat(8)} 41`))),
    );
    expect(rows).toEqual([["", "", "", Number.NaN, ""]]);
  });

  test("the ninth field has the first bit of the second byte of the mask", async () => {
    const fields = Array.from({ length: 9 }, (_, i) => `<FIELD name="f${i}" datatype="unsignedByte"/>`).join(
      "",
    );
    const { rows } = await readWhole(votable(fields, stream("BINARY2", hex("0180 010203040506070809"))));
    expect(rows).toEqual([[1, 2, 3, 4, 5, 6, 7, Number.NaN, Number.NaN]]);
  });
});

describe("refused rows", () => {
  test("leave nothing behind, also where one is the last", async () => {
    const fields = '<FIELD name="a" datatype="char" arraysize="*"/><FIELD name="b" datatype="int"/>';
    const row = (a: string, b: string): string => `<TR><TD>${a}</TD><TD>${b}</TD></TR>`;
    const data = `<TABLEDATA>${row("x", "1")}${row("y", "?")}</TABLEDATA>`;
    const { rows, refused } = await readWhole(votable(fields, data));
    expect(rows).toEqual([["x", 1]]);
    expect(refused).toMatchObject([{ row: 2, why: '"?" in b is not a value of the type int' }]);
  });
});

describe("rows of the wrong length", () => {
  test("are refused and never shifted", async () => {
    const fields = '<FIELD name="a" datatype="int"/><FIELD name="b" datatype="int"/>';
    const { rows, refused } = await readWhole(
      votable(
        fields,
        "<TABLEDATA>\n<TR><TD>1</TD><TD>2</TD></TR>\n<TR><TD>3</TD></TR>\n<TR><TD>4</TD><TD>5</TD><TD>6</TD></TR>\n<TR><TD>7<!-- --></TD></TR>\n<TR><TD>8</TD><TD/></TR></TABLEDATA>",
      ),
    );
    expect(rows).toEqual([
      [1, 2],
      [8, Number.NaN],
    ]);
    expect(refused).toEqual([
      { row: 2, line: 4, text: "<TR><TD>3</TD></TR>", why: "it has 1 cells where the table has 2 columns" },
      {
        row: 3,
        line: 5,
        text: "<TR><TD>4</TD><TD>5</TD><TD>6</TD></TR>",
        why: "it has 3 cells where the table has 2 columns",
      },
      { row: 4, line: 6, text: "7", why: "it has 1 cells where the table has 2 columns" },
    ]);
  });
});
