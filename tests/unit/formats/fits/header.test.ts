import { describe, expect, test } from "vitest";
import { binaryFile, bytesOf, card, extension, fitsFile, header, primary, readFits } from "./fits-file.ts";

const { int32, float64 } = bytesOf;
const oneRow = { columns: [{ name: "a", form: "J" }], rows: [int32(1)] };

const columnsOf = async (bytes: Uint8Array) => (await readFits(bytes)).reader.header.columns;
const metaOf = async (cards: readonly string[], ofFile: readonly string[] = []) => {
  const { reader, findings } = await readFits(
    Buffer.concat([primary(ofFile), extension({ ...oneRow, cards })]),
  );
  return { meta: reader.header.meta, findings };
};

describe("what a header says of its columns", () => {
  test("is their name, unit, UCD and description", async () => {
    const [column] = await columnsOf(
      binaryFile([
        {
          name: "plx",
          form: "D",
          keywords: { TUNIT: "mas", TUCD: "pos.parallax.trig", TCOMM: "Parallax, the star's own" },
          cells: [float64(1)],
        },
      ]),
    );
    expect(column).toMatchObject({
      name: "plx",
      unit: "mas",
      ucd: "pos.parallax.trig",
      description: "Parallax, the star's own",
      nullMark: null,
      frame: null,
    });
  });

  test.each([
    ["Parallax at the epoch", "Parallax at the epoch"],
    ["label for field   1", ""],
    ["name of column 1", ""],
    ["Field name", ""],
    ["column label", ""],
  ])("may be a comment beside the name: %s", async (comment, description) => {
    const cards = [card("TTYPE1", "plx", comment)];
    const [column] = await columnsOf(fitsFile({ columns: [{ form: "J" }], rows: [int32(1)], cards }));
    expect(column).toMatchObject({ name: "plx", description });
  });

  describe("may stand in a block of comments", () => {
    const blockCards = (yaml: readonly string[]) => [
      "COMMENT --BEGIN-INVENTED-SERIALIZED-COLUMNS--",
      ...yaml.map((line) => `COMMENT ${line}`),
      "COMMENT --END-INVENTED-SERIALIZED-COLUMNS--",
    ];
    const described = (yaml: readonly string[]) =>
      columnsOf(
        fitsFile({
          columns: [
            { name: "a", form: "J", keywords: { TUNIT: "mag" } },
            { name: "b", form: "J" },
          ],
          rows: [Buffer.alloc(8)],
          cards: blockCards(yaml),
        }),
      );

    test("where the keywords are silent", async () => {
      const long = "  description: Brightness of the star in a band that has a long name, ";
      const columns = await described([
        "datatype:",
        "- name: a",
        "  unit: Jy",
        // Lines of more than 70 characters are cut there, and marked by one more.
        `${long.padEnd(70, ".")}\\`,
        "and so on",
        "  meta: !!omap",
        "  - {ucd: phot.mag}",
        "- {name: b, unit: mas, meta: {ucd: pos.parallax}}",
        "- {name: c, unit: m}",
      ]);
      expect(columns).toMatchObject([
        {
          name: "a",
          unit: "mag",
          ucd: "phot.mag",
          description: `${long.slice(15).padEnd(55, ".")}and so on`,
        },
        { name: "b", unit: "mas", ucd: "pos.parallax", description: "" },
      ]);
    });

    test.each([
      [["datatype: {"]],
      [["datatype: 5"]],
      [["- - -"]],
      [["[".repeat(60), "[".repeat(60)]],
      [["datatype:", "- 7", "- {name: [a]}"]],
    ])("which is passed over where it makes no sense: %j", async (yaml) => {
      expect(await described(yaml)).toMatchObject([
        { name: "a", unit: "mag", ucd: "", description: "" },
        { name: "b", unit: "", ucd: "", description: "" },
      ]);
    });
  });

  test("goes on in CONTINUE records", async () => {
    const cards = [
      "TTYPE1  = 'a&'                 / first",
      "CONTINUE  '_name_of_more_than_sixty_eight_letters_as_some_programs_write&'",
      "CONTINUE  ' it''s&' / second",
      "CONTINUE  ''",
      "TUNIT1  = 'this & that&'",
      "TUCD1   = 'meta.id'",
      "CONTINUE  'stray'",
    ];
    const { reader, findings } = await readFits(
      fitsFile({ columns: [{ form: "J" }], rows: [int32(1)], cards }),
    );
    expect(reader.header.columns[0]).toMatchObject({
      name: "a_name_of_more_than_sixty_eight_letters_as_some_programs_write it's",
      description: "first second",
      unit: "this & that&",
      ucd: "meta.id",
    });
    expect(findings).toMatchObject([
      { key: "fits-unreadable-records", level: "note", count: 1, examples: ["CONTINUE  'stray'"] },
    ]);
  });

  test("may spell numbers with D, and stand anywhere behind its equals sign", async () => {
    const cards = ["TSCAL1=  5.0D-1/ half", "TZERO1  = 1.0d2", "TTYPE1  =   'x' / name"].map((record) =>
      record.replace("TSCAL1=", "TSCAL1  ="),
    );
    const { names, cells } = await readFits(fitsFile({ columns: [{ form: "J" }], rows: [int32(4)], cards }));
    expect([names, cells]).toEqual([["x"], [[102]]]);
  });

  test("holds the first of two equal keywords", async () => {
    const cards = [card("TTYPE1", "second"), card("TUNIT1", "m"), card("TUNIT1", "s")];
    expect((await columnsOf(fitsFile({ ...oneRow, cards })))[0]).toMatchObject({ name: "a", unit: "m" });
  });

  test("may leave out names or give one twice", async () => {
    const columns = [
      { form: "J" },
      { name: " ", form: "I" },
      { name: "ra", form: "I" },
      { name: "RA", form: "I" },
    ];
    const { names, findings } = await readFits(fitsFile({ columns, rows: [Buffer.alloc(10)] }));
    expect(names).toEqual(["column 1", "column 2", "ra", "RA (2)"]);
    expect(findings).toMatchObject([
      { key: "headers-renamed", level: "note", count: 3, examples: ["column 1", "column 2", "RA (2)"] },
    ]);
  });

  test("is read past records that make no sense", async () => {
    const cards = ["T YPE9 = 'x'", "TUNIT1  = 'never closed", "lower   = 1", "no value here", "AB      =1"];
    const { cells, findings } = await readFits(fitsFile({ ...oneRow, cards }));
    expect(cells).toEqual([[1]]);
    expect(findings).toMatchObject([{ key: "fits-unreadable-records", count: 4 }]);
  });
});

describe("what a header says of the table", () => {
  test("is its name, its words and where it comes from, without words about the format", async () => {
    const { meta } = await metaOf(
      [
        card("EXTNAME", "stars"),
        card("REFERENC", "2099ApJ...123..456Q"),
        card("AUTHOR", "The survey's authors"),
        "COMMENT A sample of invented stars.",
        "COMMENT Distances of 2098A&A...649A...1Q were used.",
        "COMMENT FITS (Flexible Image Transport System) format is defined in 'Astronomy",
        "COMMENT and Astrophysics', volume 376, page 359; bibcode: 2001A&A...376..359H",
        "COMMENT --BEGIN-SERIALIZED-COLUMNS--",
        "COMMENT - {name: a, datatype: int32}",
        "COMMENT --END-SERIALIZED-COLUMNS--",
        "HISTORY Cut at 50 pc, see doi:10.9999/invented.1",
      ],
      [card("ORIGIN", "An archive"), card("AUTHOR", "Nobody")],
    );
    expect(meta).toEqual({
      title: "stars",
      description:
        "A sample of invented stars.\nDistances of 2098A&A...649A...1Q were used.\nCut at 50 pc, see doi:10.9999/invented.1",
      sources: [
        "2099ApJ...123..456Q",
        "The survey's authors",
        "Nobody",
        "An archive",
        "Distances of 2098A&A...649A...1Q were used.",
        "Cut at 50 pc, see doi:10.9999/invented.1",
      ],
      frame: null,
    });
  });

  test("is nothing where it says nothing", async () => {
    expect((await metaOf([])).meta).toEqual({ title: null, description: null, sources: [], frame: null });
  });

  test("ties a frame, an equinox and an epoch to the positions, each as it spells them", async () => {
    const { meta } = await metaOf(
      [card("RADESYS", "FK5"), card("REFEPOCH", 1991.25)],
      [card("EQUINOX", "2000.0")],
    );
    expect(meta.frame).toEqual({ system: "FK5", equinox: "2000.0", epoch: "1991.25" });
    const long = await metaOf(["HIERARCH ref_epoch = 2016.0 / of the positions"]);
    expect(long.meta.frame).toEqual({ system: null, equinox: null, epoch: "2016.0" });
  });

  test("takes EPOCH for the equinox that it is, and says so", async () => {
    const { meta, findings } = await metaOf([card("EPOCH", 1950)]);
    expect(meta.frame).toEqual({ system: null, equinox: "1950", epoch: null });
    expect(findings).toMatchObject([
      { key: "fits-epoch-is-equinox", level: "note", examples: ["EPOCH = 1950"] },
    ]);
    const both = await metaOf([card("EPOCH", 1950), card("EQUINOX", 2000)]);
    expect([both.meta.frame?.equinox, both.findings]).toEqual(["2000", []]);
  });
});

describe("a header that cannot be trusted", () => {
  const broken = async (bytes: Uint8Array) => {
    const error = await readFits(bytes).then(
      () => null,
      (reason: unknown) => reason,
    );
    return error as { code: string; message: string; hint: string } | null;
  };

  test.each([
    [{ NAXIS1: 5 }, "fits-header", /The columns take 4 bytes together, but NAXIS1 says 5 for a row/],
    [{ NAXIS1: -4 }, "fits-header", /NAXIS1 of a header is “-4”, which is no count/],
    [{ NAXIS2: "many" }, "fits-header", /NAXIS2 of a header is “many”/],
    [{ NAXIS2: 1.5 }, "fits-header", /NAXIS2 of a header is “1.5”/],
    [{ NAXIS2: 1e21 }, "fits-header", /NAXIS2 of a header is/],
    [{ NAXIS2: 9e15 }, "fits-header", /data larger than any file/],
    [{ PCOUNT: -1 }, "fits-header", /PCOUNT of a header is “-1”/],
    [{ BITPIX: 16 }, "fits-header", /has BITPIX = 16 where the format wants 8/],
    [{ BITPIX: 7 }, "fits-header", /has BITPIX = 7/],
    [{ NAXIS: 3 }, "fits-header", /has NAXIS = 3/],
    [{ GCOUNT: 2 }, "fits-header", /has GCOUNT = 2/],
    [{ TFIELDS: -1 }, "fits-header", /TFIELDS of a header is “-1”/],
    [{ TFIELDS: 2 }, "fits-header", /Column 2 \(column 2\) has no TFORM/],
    [{ TFIELDS: 0, NAXIS1: 0 }, "fits-no-columns", /has no column that can be read/],
    [{ TFIELDS: 1000 }, "fits-limit", /has 1,000 columns; FITS allows 999/],
    [{ NAXIS1: 5_000_000 }, "fits-limit", /5,000,000 bytes; 4,194,304 are the most/],
    [{ NAXIS2: 10 }, null, /./],
    [{ NAXIS2: 1000 }, "file-cut-off", /720 of the 1,000 rows of the table are there/],
    [{ NAXIS2: 10 ** 12 }, "file-cut-off", /720 of the 1,000,000,000,000 rows/],
  ] as const)("%j", async (counts, code, message) => {
    const error = await broken(fitsFile({ ...oneRow, counts }));
    expect(error?.code ?? null).toBe(code);
    if (code === null) return;
    expect(error?.message).toMatch(message);
    expect(error?.hint).toBeTruthy();
  });

  test.each(["Z", "", "-1J", "1", "J99999999"])("the form %j", async (form) => {
    const error = await broken(fitsFile({ columns: [{ form }, { form: "J" }], rows: [Buffer.alloc(4)] }));
    // What follows a code is free; the form is then read, and only its width can be wrong.
    expect(error).toMatchObject({
      code: "fits-header",
      message: expect.stringMatching(/Column 1 \(column 1\)|8 bytes/),
    });
  });

  test("widths beyond all counting", async () => {
    const error = await broken(fitsFile({ columns: [{ form: "999999999999D" }], rows: [Buffer.alloc(4)] }));
    expect(error?.message).toMatch(/take 7,999,999,999,992 bytes together, but NAXIS1 says 4/);
  });

  test("no columns but such as are left out", async () => {
    const error = await broken(fitsFile({ columns: [{ name: "s", form: "2D" }], rows: [Buffer.alloc(16)] }));
    expect(error).toMatchObject({
      code: "fits-no-columns",
      message: expect.stringContaining("several values"),
    });
  });

  test("rows without end since they are without bytes", async () => {
    const counts = { NAXIS1: 0, NAXIS2: 10 ** 15 };
    const error = await broken(fitsFile({ columns: [{ name: "a", form: "0A" }], rows: [], counts }));
    expect(error?.code).toBe("fits-no-columns");
  });

  test("a table compressed inside its rows", async () => {
    const error = await broken(fitsFile({ ...oneRow, cards: [card("ZTABLE", true)] }));
    expect(error?.message).toMatch(/is compressed inside its rows/);
  });

  test("no END before the data, before the end, or at all", async () => {
    const cards = [card("SIMPLE", true), card("BITPIX", 8), card("NAXIS", 0)];
    const noEnd = header(cards, "");
    expect(await broken(noEnd)).toMatchObject({
      code: "file-cut-off",
      message: expect.stringContaining("END"),
    });
    expect(await broken(Buffer.concat([noEnd, Buffer.alloc(2880, 200)]))).toMatchObject({
      code: "fits-header",
      message: expect.stringContaining("no END"),
    });
    expect(await broken(Buffer.concat([noEnd, Buffer.alloc(2880 * 1200, " ")]))).toMatchObject({
      code: "fits-limit",
      message: expect.stringContaining("36,000 records"),
    });
  });
});
