import { describe, expect, test } from "vitest";
import { openVotable } from "#server/formats/votable/read-votable.ts";
import { inPieces, oneColumn, readWhole, refusalOf, stream, votable } from "./support.ts";

const INT = '<FIELD name="n" datatype="int"/>';
const ONE_ROW = "<TABLEDATA><TR><TD>1</TD></TR></TABLEDATA>";

const keys = (findings: readonly { key: string; level: string }[]): string[] =>
  findings.map(({ key, level }) => `${level} ${key}`);

describe("what a document says of itself", () => {
  const document = `<?xml version="1.0"?>
<v:VOTABLE xmlns:v="http://www.ivoa.net/xml/VOTable/v1.2" version="1.2">
  <v:DESCRIPTION>Of the
    whole</v:DESCRIPTION>
  <v:INFO name="citation" value="Nobody et al. 2020"/>
  <v:INFO name="bibcode">2020Test....1....1N</v:INFO>
  <v:INFO name="QUERY" value="SELECT 1"/>
  <v:COOSYS ID="J" system="ICRS" epoch="J2016.0"/>
  <v:COOSYS ID="B" system="FK4" equinox="B1950"/>
  <v:TIMESYS ID="T" timeorigin="2455197.5" timescale="TCB" refposition="BARYCENTER"/>
  <v:RESOURCE name="results" type="results">
    <v:TABLE name="stars" nrows="2">
      <v:DESCRIPTION>Of the table</v:DESCRIPTION>
      <v:GROUP><v:DESCRIPTION>of a group</v:DESCRIPTION><v:PARAM name="g" datatype="int" value="1"/></v:GROUP>
      <v:PARAM name="zero_point" datatype="double" unit="mag" value="25.1"/>
      <v:FIELD ID="ra" name="RAJ" datatype="double" unit="deg" ucd="pos.eq.ra;meta.main" ref="J">
        <v:DESCRIPTION>Right   ascension</v:DESCRIPTION>
        <v:VALUES null="-1"><v:MIN value="0"/></v:VALUES>
        <v:LINK href="http://example.org/"/>
      </v:FIELD>
      <v:FIELD ID="t" datatype="float" ref="T"/>
      <v:DATA><v:TABLEDATA>
        <v:TR><v:TD>1</v:TD><v:TD>2</v:TD></v:TR>
        <v:TR><v:TD>3</v:TD><v:TD>&#52;</v:TD></v:TR>
      </v:TABLEDATA></v:DATA>
    </v:TABLE>
  </v:RESOURCE>
</v:VOTABLE>`;

  test("goes into the header, by local names whatever the prefix", async () => {
    const { header, rows, findings } = await readWhole(document);
    const frame = { system: "ICRS", equinox: null, epoch: "J2016.0" };
    expect(header).toEqual({
      format: "votable",
      variant: "TABLEDATA",
      encoding: "utf-8",
      columns: [
        {
          name: "RAJ",
          type: "float64",
          unit: "deg",
          ucd: "pos.eq.ra;meta.main",
          description: "Right ascension",
          nullMark: "-1",
          frame,
        },
        { name: "t", type: "float32", unit: "", ucd: "", description: "", nullMark: null, frame: null },
      ],
      declaredRows: 2,
      meta: {
        title: "stars",
        description: "Of the table",
        sources: ["citation: Nobody et al. 2020", "bibcode: 2020Test....1....1N"],
        frame,
      },
    });
    expect(rows).toEqual([
      [1, 2],
      [3, 4],
    ]);
    expect(findings).toMatchObject([
      { key: "votable-time-systems", examples: ["t: scale TCB, origin 2455197.5, at BARYCENTER"] },
      { key: "votable-parameters", examples: ["zero_point = 25.1 mag"] },
    ]);
  });

  test.each([
    ["utf-16le", Buffer.from("\ufeff<VOTABLE>", "utf16le")],
    ["utf-16be", Buffer.from("\ufeff<VOTABLE>", "utf16le").swap16()],
    ["utf-8", Buffer.from("\ufeff<VOTABLE>")],
    ["windows-1252", Buffer.from('<?xml version="1.0" encoding="ISO-8859-1"?><VOTABLE>')],
  ] as const)("is decoded from %s", async (encoding, start) => {
    const rest = oneColumn('<FIELD name="x" datatype="char" arraysize="*"/>', ["Besançon"]).replace(
      /^[\s\S]*?<VOTABLE[^>]*>/,
      "",
    );
    const wide = Buffer.from(rest, "utf16le");
    const bytes = {
      "utf-16le": wide,
      "utf-16be": Buffer.from(wide).swap16(),
      "utf-8": Buffer.from(rest),
      "windows-1252": Buffer.from(rest, "latin1"),
    }[encoding];
    for (const size of [1, 2, 3, 1000]) {
      const { header, rows, findings } = await readWhole(Buffer.concat([start, bytes]), [size]);
      expect(header.encoding).toBe(encoding);
      expect(rows).toEqual([["Besançon"]]);
      expect(findings).toEqual([]);
    }
  });

  test("tells of bytes that mean nothing in the encoding", async () => {
    const cells = [...Array.from({ length: 100 }, () => "some text"), "one", "Besançon"];
    const lines = cells.length + 1;
    const document = oneColumn('<FIELD name="x" datatype="char" arraysize="*"/>', cells);
    const bytes = Buffer.from(document, "latin1");
    // The last piece looks like plain ASCII, but the decoder still holds the byte before it.
    for (const sizes of [[bytes.length], [1_500, bytes.indexOf(0xe7) + 1 - 1_500, bytes.length]]) {
      const { rows, findings } = await readWhole(bytes, sizes);
      expect(rows.slice(-2)).toEqual([["one"], ["Besan\ufffdon"]]);
      expect(findings).toMatchObject([
        { key: "votable-stray-bytes", level: "ask", count: 1, examples: [`the first on line ${lines}`] },
      ]);
    }
  });

  test("reads a document without a declaration, behind blank lines, with a DOCTYPE that is never followed", async () => {
    const document = `\n\n<!DOCTYPE VOTABLE SYSTEM "http://example.org/VOTable.dtd"><VOTABLE version="1.0"><RESOURCE><TABLE>${INT}<DATA>${ONE_ROW}</DATA></TABLE></RESOURCE></VOTABLE>`;
    expect((await readWhole(document)).rows).toEqual([[1]]);
  });
});

describe("what the service says", () => {
  const withInfo = (info: string): string =>
    votable(INT, ONE_ROW).replace("</RESOURCE>", `${info}</RESOURCE>`);

  test("an answer cut at its limit is asked about", async () => {
    const { rows, findings } = await readWhole(withInfo('<INFO name="QUERY_STATUS" value="OVERFLOW"/>'));
    expect(rows).toEqual([[1]]);
    expect(keys(findings)).toEqual(["ask votable-overflow"]);
  });

  test("an error after the rows stops", async () => {
    const { findings } = await readWhole(
      withInfo('<INFO name="QUERY_STATUS" value="ERROR">out of time</INFO>'),
    );
    expect(findings).toMatchObject([
      { key: "votable-service-error", level: "stop", examples: ["out of time"] },
    ]);
  });

  test("an error instead of a table is shown in the service's words", async () => {
    const refusal = await refusalOf(
      '<VOTABLE><RESOURCE type="results"><INFO name="QUERY_STATUS" value="ERROR">Column "rra" is not known</INFO></RESOURCE></VOTABLE>',
    );
    expect(refusal.code).toBe("votable-service-error");
    expect(refusal.message).toContain('Column "rra" is not known');
  });

  test("a good status is no finding", async () => {
    expect((await readWhole(withInfo('<INFO name="QUERY_STATUS" value="OK"/>'))).findings).toEqual([]);
  });
});

describe("rows declared and rows found", () => {
  test.each([
    [' nrows="3"', ["stop votable-fewer-rows"]],
    [' nrows="0"', ["ask votable-more-rows"]],
    [' nrows="1"', []],
    [' nrows="many"', []],
  ])("with%s", async (attributes, expected) => {
    expect(keys((await readWhole(votable(INT, ONE_ROW, attributes))).findings)).toEqual(expected);
  });
});

describe("several tables", () => {
  const table = (name: string, data: string): string => `<TABLE name="${name}">${INT}${data}</TABLE>`;

  test("the first with data is read, and the others are named", async () => {
    const other = stream("BINARY", new Uint8Array(400_000));
    const document = `<VOTABLE><RESOURCE>${table("none", "")}${table("stars", `<DATA>${ONE_ROW}</DATA>`)}${table("more", `<DATA>${other}</DATA>`)}</RESOURCE><RESOURCE>${table("last", `<DATA>${ONE_ROW}</DATA>`)}</RESOURCE></VOTABLE>`;
    for (const size of [7, 70_000]) {
      const { header, rows, findings } = await readWhole(document, [size]);
      expect(header.meta.title).toBe("stars");
      expect(rows).toEqual([[1]]);
      expect(findings).toMatchObject([
        { key: "votable-other-tables", count: 3, examples: ["none", "more", "last"] },
      ]);
    }
  });

  test("something after the end is told", async () => {
    const { rows, findings } = await readWhole(`${votable(INT, ONE_ROW)}<VOTABLE/>`);
    expect(rows).toEqual([[1]]);
    expect(keys(findings)).toEqual(["ask votable-after-end"]);
  });
});

describe("no rows", () => {
  test.each(["<TABLEDATA/>", "<TABLEDATA> </TABLEDATA>", "<BINARY><STREAM/></BINARY>", "<BINARY2/>"])(
    "of %s are a table of none",
    async (data) => {
      const { header, rows } = await readWhole(votable(INT, data));
      expect(header.columns.map((c) => c.name)).toEqual(["n"]);
      expect(rows).toEqual([]);
    },
  );
});

describe("no data at all", () => {
  test("is a table of no rows where there are columns, and asked about", async () => {
    const empty = (name: string): string => `<TABLE name="${name}">${INT}</TABLE>`;
    const document = `<VOTABLE><RESOURCE><TABLE name="bare"/>${empty("stars")}${empty("more")}</RESOURCE></VOTABLE>`;
    const { header, rows, findings } = await readWhole(document);
    expect(header.meta.title).toBe("stars");
    expect(header.columns.map((c) => c.name)).toEqual(["n"]);
    expect(rows).toEqual([]);
    expect(findings).toMatchObject([
      { key: "votable-other-tables", examples: ["bare", "more"] },
      { key: "votable-no-data", level: "ask" },
    ]);
  });
});

describe("files that cannot be read say why", () => {
  const elsewhere = '<BINARY><STREAM href="http://example.org/rows"/></BINARY>';

  test.each([
    ["not-a-votable", "", "empty"],
    ["not-a-votable", "ra,dec\n1,2\n", "does not begin with markup"],
    ["not-a-votable", "<!DOCTYPE html><html><body>", "html"],
    ["votable-no-table", "<VOTABLE/>", "no table"],
    ["votable-no-table", "<VOTABLE><RESOURCE><TABLE/></RESOURCE></VOTABLE>", "no table"],
    ["votable-no-columns", votable("", ONE_ROW), "no FIELD"],
    ["votable-fits-inside", votable(INT, '<FITS><STREAM encoding="base64"/></FITS>'), "FITS"],
    ["votable-data-elsewhere", votable(INT, elsewhere), "not in the file"],
    ["votable-stream-encoding", votable(INT, '<BINARY><STREAM encoding="gzip">x</STREAM></BINARY>'), "gzip"],
    [
      "votable-unknown-width",
      votable('<FIELD name="q" datatype="quad"/>', stream("BINARY", new Uint8Array(4))),
      '"quad"',
    ],
    [
      "votable-unclear-count",
      votable('<FIELD name="q" datatype="int" arraysize="3x*"/>', stream("BINARY", new Uint8Array(4))),
      "3x*",
    ],
    ["file-cut-off", votable(INT, ONE_ROW).slice(0, -20), "not closed"],
    ["file-cut-off", votable(INT, ONE_ROW).slice(0, 120), "before the rows"],
    ["file-cut-off", votable(INT, ONE_ROW).replace(/<\/TD>[\s\S]*/, ""), "after 0 rows"],
    ["votable-broken", votable(INT, "<TABLEDATA><TR><TD>1</TR></TABLEDATA>"), "on line 2"],
    ["votable-broken", votable(INT, "<TABLEDATA>\n<TR><TD>&nbsp;</TD></TR></TABLEDATA>"), "on line 3"],
    ["votable-broken", votable(INT, "<TABLEDATA>\n\n<TR><TD>\u0001</TD></TR></TABLEDATA>"), "on line 4"],
    ["votable-broken", votable(INT, "<TABLEDATA><TR><B>1</B></TR></TABLEDATA>"), "element B"],
    ["votable-broken", votable(INT, stream("BINARY", new Uint8Array(7))), "Row 2"],
    ["votable-broken", votable(INT, "<BINARY><STREAM>AAAAA</STREAM></BINARY>"), "inside a group"],
    ["votable-broken", votable(INT, "<BINARY><STREAM>AA\n*A</STREAM></BINARY>"), "on line 3"],
    ["votable-broken", votable(INT, "<BINARY><STREAM>AA==AAAA</STREAM></BINARY>"), "base64"],
    [
      "votable-broken",
      votable('<FIELD name="x" datatype="int" arraysize="0"/>', stream("BINARY", new Uint8Array(1))),
      "no bytes",
    ],
    [
      "votable-broken",
      votable(
        '<FIELD name="s" datatype="char" arraysize="*"/>',
        stream("BINARY", Buffer.from("7fffffff41", "hex")),
      ),
      "2,147,483,647",
    ],
    [
      "votable-broken",
      votable(
        '<FIELD name="s" datatype="char" arraysize="*"/>',
        stream("BINARY", Buffer.from("ffffffff41", "hex")),
      ),
      "-1",
    ],
    ["unknown-encoding", '<?xml version="1.0" encoding="EBCDIC-7"?><VOTABLE/>', "EBCDIC-7"],
    [
      "votable-entities",
      '<!DOCTYPE VOTABLE [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;">]><VOTABLE>&b;</VOTABLE>',
      "entities",
    ],
    ["votable-broken", `<VOTABLE>${"<GROUP>".repeat(100)}`, "more than 64 deep"],
  ])("%s", async (code, document, words) => {
    const refusal = await refusalOf(document);
    expect(refusal.code).toBe(code);
    expect(refusal.message).toContain(words);
    expect(refusal.hint).toBeTruthy();
  });

  test("columns of an unknown datatype are texts where cells are", async () => {
    const { header, rows, findings } = await readWhole(
      oneColumn('<FIELD name="q" datatype="quad"/>', ["1.50"]),
    );
    expect(header.columns[0]?.type).toBe("text");
    expect(rows).toEqual([["1.50"]]);
    expect(keys(findings)).toEqual(["ask votable-unknown-datatypes"]);
  });
});

describe("reading in bounded memory", { timeout: 60_000 }, () => {
  const TEXT = '<FIELD name="s" datatype="char" arraysize="*"/>';

  /** A document whose middle is repeated as often as the reader asks for it. */
  async function* endless(start: string, piece: string, most: number): AsyncGenerator<Uint8Array> {
    yield Buffer.from(start);
    const bytes = Buffer.from(piece.repeat(Math.ceil(65_536 / piece.length)));
    for (let given = 0; given < most; given += bytes.length) yield bytes;
    throw new Error("The reader went on without an end.");
  }

  const start = votable(TEXT, "|").split("|")[0] ?? "";
  test.each([
    ["a cell", `${start}<TABLEDATA><TR><TD>`, "x"],
    ["a cell with references", `${start}<TABLEDATA><TR><TD>`, "&amp;x"],
    ["a row of cells", `${start}<TABLEDATA><TR>`, "<TD>x</TD>"],
    ["a row with an attribute", `${start}<TABLEDATA><TR ID="a">`, `<TD>${"x".repeat(1_000)}</TD>`],
    ["a comment", `${start}<TABLEDATA><!--`, "x"],
    ["a section", `${start}<TABLEDATA><TR><TD><![CDATA[`, "x"],
    ["an attribute", '<VOTABLE a="', "x"],
    ["a tag of attributes", "<VOTABLE ", "\n"],
    ["a comment in the stream", `${start}<BINARY><STREAM><!--`, "A"],
    ["a DOCTYPE", "<!DOCTYPE VOTABLE [", "<!ELEMENT A ANY>"],
  ])("%s without an end is refused", async (_, beginning, piece) => {
    const read = async (): Promise<void> => {
      const reader = await openVotable(endless(beginning, piece, 50_000_000));
      for await (const batch of reader.batches) expect(batch.rows).toBeLessThan(1);
    };
    await expect(read()).rejects.toMatchObject({ code: "votable-too-long" });
  });

  test("a head without an end is refused", async () => {
    const read = openVotable(endless("<VOTABLE>", "<INFO name='a' value='b'/>", 200_000_000));
    await expect(read).rejects.toMatchObject({ code: "not-a-votable" });
  });

  test("rows come in batches while the file is still being read, and progress is in its bytes", async () => {
    const rows = 60_000;
    const document = Buffer.from(
      votable(INT, `<TABLEDATA>${"<TR><TD>1</TD></TR>".repeat(rows)}</TABLEDATA>`),
    );
    const { batches } = await openVotable(inPieces(document, [50_000]));
    const seen: number[] = [];
    const bytes: number[] = [];
    for await (const batch of batches) {
      seen.push(batch.rows);
      bytes.push(batch.bytes);
    }
    expect(seen).toEqual([20_000, 20_000, 20_000]);
    expect(bytes[0]).toBeGreaterThan(rows * 6);
    expect(bytes[0]).toBeLessThan(document.length / 2);
    expect(bytes[2]).toBeLessThanOrEqual(document.length);
  });

  test("few rows come at a time where texts are long", async () => {
    const document = votable(
      TEXT,
      `<TABLEDATA>${`<TR><TD>${"x".repeat(1_000_000)}</TD></TR>`.repeat(20)}</TABLEDATA>`,
    );
    const { batches } = await openVotable(inPieces(Buffer.from(document), [65_536]));
    const seen: number[] = [];
    for await (const batch of batches) seen.push(batch.rows);
    expect(seen).toEqual([8, 8, 4]);
  });

  test("the source is closed when the reading is given up", async () => {
    let isClosed = false;
    async function* source(): AsyncGenerator<Uint8Array> {
      try {
        yield* inPieces(Buffer.from(votable(INT, ONE_ROW.repeat(1))), [50]);
      } finally {
        isClosed = true;
      }
    }
    const { batches } = await openVotable(source());
    for await (const _ of batches) break;
    expect(isClosed).toBe(true);
  });
});
