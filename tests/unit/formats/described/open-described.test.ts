import { describe, expect, test } from "vitest";
import { keysOf, type OpenedAny, openAny } from "../open-any.ts";
import { DATA, ONE_FILE, README } from "./fixtures.ts";

const RULE = "-".repeat(80);

/** A file of that description and those rows. */
const described = (columns: string, rows: string, notes = ""): string =>
  `Byte-by-byte Description of file: t.dat\n${RULE}\n   Bytes Format Units Label Explanations\n${RULE}\n${columns}\n${RULE}\n${notes}${rows}`;

const column = ({ header, rows }: OpenedAny, name: string): (string | number | null)[] => {
  const at = header.columns.findIndex((c) => c.name === name);
  return rows.map((cells) => cells[at] ?? null);
};

/** Degrees of the fixture's positions; computed from their parts. */
const RA = [(42 / 60 + 44.33 / 3600) * 15, 180, (23 + 59 / 60 + 59.99 / 3600) * 15, 82.5625];
const DEC = [-0.20415722, 41.26888889, -89.99999972, 5.50833333];

describe("a table with a byte-by-byte description", () => {
  test.each([
    ["in the same file", () => openAny(ONE_FILE)],
    ["in a file of its own", () => openAny(DATA, { name: "table1.dat", companion: README })],
    [
      "in a file of its own, with CR LF",
      () =>
        openAny(DATA.replaceAll("\n", "\r\n"), {
          name: "TABLE1.DAT.gz",
          companion: README.replaceAll("\n", "\r\n"),
        }),
    ],
    [
      "with columns that a person chose",
      () => openAny(DATA, { name: "x.txt", table: "table1.dat", companion: README }),
    ],
  ])("%s gives columns of its types with units and words", async (_, open) => {
    const table = await open();
    expect(table.header.format).toBe("described");
    expect(table.header.columns).toMatchObject([
      { name: "Name", type: "text", unit: "", description: "Name of the star (Note 1: Names are made up.)" },
      {
        name: "Flag",
        type: "int32",
        description: "A flag that means nothing and runs over three lines [0/3]",
      },
      { name: "RAdeg", type: "float64", unit: "deg", frame: { system: null, equinox: "J2000", epoch: null } },
      { name: "DEdeg", type: "float64", unit: "deg" },
      { name: "[Fe/H]", type: "float64", unit: "[-]", nullMark: "---" },
      { name: "logg", unit: "[cm/s2]", nullMark: "-9.99", description: "Surface gravity" },
      { name: "plx", unit: "mas", nullMark: null, description: "Parallax" },
      { name: "ID", type: "int64" },
    ]);
    expect(column(table, "[Fe/H]")).toEqual([-0.12, null, 0.3, -0.05]);
    expect(column(table, "logg")).toEqual([4.812, null, 5.01, 4.5]);
    expect(column(table, "ID")).toEqual(["314159265358979323", null, "-1", null]);
    for (const [row, ra] of RA.entries()) {
      expect(column(table, "RAdeg")[row]).toBeCloseTo(ra, 10);
      expect(column(table, "DEdeg")[row]).toBeCloseTo(DEC[row] ?? 0, 8);
    }
    expect(table.refused).toEqual([]);
    expect(keysOf(table)).toEqual(["sixty-carried", "described-positions"]);
  });

  test("says of what it is, and how many rows the description promises", async () => {
    const own = await openAny(DATA, { name: "table1.dat", companion: README });
    expect(own.header).toMatchObject({ variant: "description in another file", declaredRows: 4 });
    expect(own.header.meta).toMatchObject({
      title: "Red dwarfs of an invented sky (Nobody+, 2031)",
      sources: ["J/Inv/1/1"],
    });
    expect((await openAny(ONE_FILE)).header.meta).toMatchObject({
      title: "Red dwarfs of an invented sky",
      description: "Positions",
      sources: ["Nobody A., Noone B."],
    });
    const fewer = await openAny(DATA.split("\n").slice(0, 2).join("\n").concat("\n"), {
      name: "table1.dat",
      companion: README,
    });
    expect(fewer.findings).toContainEqual(expect.objectContaining({ key: "fewer-rows", level: "stop" }));
  });

  test("of several the one with the file's name is taken; without one a person must say", async () => {
    const asked = openAny(DATA, { name: "stars.txt", companion: README });
    await expect(asked).rejects.toMatchObject({ code: "which-table", details: ["table1.dat", "refs.dat"] });
    const pattern = README.replaceAll("file: table1.dat", "file: table[1-3].dat");
    expect((await openAny(DATA, { name: "a/table2.dat", companion: pattern })).rows.length).toBe(4);
    const both = README.replaceAll("file: table1.dat", "file: t1.dat t2.dat\n   table1.dat");
    expect((await openAny(DATA, { name: "table1.dat", companion: both })).rows.length).toBe(4);
  });

  test("a description alone, and data alone, say what belongs to them", async () => {
    await expect(openAny(README, { name: "ReadMe" })).rejects.toMatchObject({ code: "described-no-data" });
    await expect(openAny(DATA, { companion: "no description at all\n" })).rejects.toMatchObject({
      code: "no-description",
    });
  });

  test("a ruled line between description and rows may be missing, below notes too", async () => {
    const columns = "   1-  4 A4  --- Name Name\n   6-  9 F4.1 mag V    Brightness";
    const rows = "abcd 12.5\nefgh  7.5\n";
    const bare = described(columns, rows).replace(`${columns}\n${RULE}\n`, `${columns}\n`);
    expect((await openAny(bare)).rows).toEqual([
      ["abcd", 12.5],
      ["efgh", 7.5],
    ]);
    const noted = described(columns, rows, "Note (1): Words that\n   go on.\n");
    expect((await openAny(noted)).rows.length).toBe(2);
  });

  test("the same description again between the rows is passed over, another one is told", async () => {
    const columns = "   1-  4 A4  --- Name Name\n   6-  9 F4.1 mag V    Brightness";
    const again = await openAny(described(columns, `abcd 12.5\n${described(columns, "efgh  7.5\n")}`));
    expect(again.rows.length).toBe(2);
    const other = await openAny(
      described(columns, `abcd 12.5\n${described(columns.replace("mag V", "mag B"), "efgh  7.5\n")}`),
    );
    expect(other.rows.length).toBe(1);
    expect(other.findings).toMatchObject([{ key: "described-second-table", level: "stop" }]);
  });

  test("lines that do not fit the description are told with both lengths", async () => {
    const columns = "   1-  4 A4  --- Name Name\n   6- 10 F5.2 mag V    Brightness";
    await expect(openAny(described(columns, "abcd 12.50\nefgh  7.50 more\n"))).rejects.toThrow(
      /Line 9 has 15 characters, and the description ends at 10/,
    );
    const short = await openAny(described(columns, "abcd 12.50\nefgh\nijkl  7.5\nmnop  1.25\n"));
    expect(short.rows.length).toBe(2);
    expect(short.refused.map(({ line, text }) => [line, text])).toEqual([
      [9, "efgh"],
      [10, "ijkl  7.5"],
    ]);
    expect(short.findings).toMatchObject([
      {
        key: "described-short-lines",
        level: "stop",
        count: 2,
        examples: ["line 9: 4 of 10 characters", "line 10: 9 of 10 characters"],
      },
    ]);
    await expect(openAny(described(columns, "abcd 12.50\nefgh  7."))).rejects.toMatchObject({
      code: "file-cut-off",
    });
  });

  test("what is no number in a column of numbers is refused; words for a blank are told", async () => {
    const columns = "   1-  4 A4  --- Name Name\n   6- 10 F5.2 mag V    Brightness";
    const table = await openAny(described(columns, "abcd 12.5a\nefgh  --- \nijkl      \nmnop  1D+1\n"));
    expect(table.refused).toMatchObject([{ line: 8, text: "abcd 12.5a" }]);
    expect(table.rows).toEqual([
      ["efgh", null],
      ["ijkl", null],
      ["mnop", 10],
    ]);
    expect(keysOf(table)).toEqual(["described-unmarked-blanks", "undeclared-blanks"]);
  });

  test("positions whose parts are none are refused, and half ones stay blank", async () => {
    const columns = [
      "   1-  2 I2  h      RAh  ? Hour",
      "   4-  5 I2  min    RAm  ? Minute",
      "       7 A1  ---    DE-  ? Sign",
      "   8-  9 I2  deg    DEd  ? Degree",
      "  11- 14 F4.1 arcmin DEm ? Arcminute",
    ].join("\n");
    const table = await openAny(
      described(
        columns,
        "12 30 -00 30.0\n24 00 +10 00.0\n12 61 +10 00.0\n12 30 x10 00.0\n12    +10 00.0\n05 60 -90 00.0\n05 00 -90 00.1\n",
      ),
    );
    expect(table.rows).toEqual([
      [187.5, -0.5],
      [null, 10],
      [90, -90],
    ]);
    expect(table.refused.map(({ line }) => line)).toEqual([13, 14, 15, 18].map((line) => line - 1));
    expect(keysOf(table)).toContain("described-parts-blank");
  });

  test("places are counted in characters or in bytes, whichever the values fit", async () => {
    const columns = "   1-  8 A8  --- Name Name\n  10- 14 F5.2 mag V    Brightness";
    const characters = await openAny(described(columns, "α Étoile 12.50\nplain     7.25\n"));
    expect(characters.rows).toEqual([
      ["α Étoile", 12.5],
      ["plain", 7.25],
    ]);
    const bytes = await openAny(described(columns, "Étoilé 12.50\nplain     7.25\n"));
    expect(bytes.rows).toEqual([
      ["Étoilé", 12.5],
      ["plain", 7.25],
    ]);
    expect(keysOf(bytes)).toEqual(["described-by-bytes"]);
  });
});
