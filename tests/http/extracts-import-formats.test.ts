import { gzipSync } from "node:zlib";
import { beforeAll, describe, expect, test } from "vitest";
import type { ColumnHealth } from "#shared/api/extracts.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { bringIn, commit, extractsUrl, receive, runJobs } from "#tests/support/extracts.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { type BinaryColumn, type BinaryRow, fitsTable, votableTable } from "#tests/support/table-files.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const COLUMNS: readonly BinaryColumn[] = [
  { name: "source_id", unit: "", characters: 19 },
  { name: "ra", unit: "deg", characters: null },
  { name: "dec", unit: "deg", characters: null },
  { name: "ref_epoch", unit: "yr", characters: null },
  { name: "parallax", unit: "mas", characters: null },
  { name: "parallax_error", unit: "mas", characters: null },
  { name: "ks_mag", unit: "mag", characters: null },
];
const NONE = Number.NaN;
const ROWS: readonly BinaryRow[] = [
  ["3141592653589793239", 150.1, -12.5, 2016, 60, 0.05, 7.912],
  ["1234567890123456789", 200.2, 40.25, 2016, 81.3, 0.05, NONE],
  ["6917529027641081857", 310.3, -0.000056, 2016, 38.5, NONE, 6.85],
];
const NAMES = COLUMNS.map((c) => c.name);
const cell = (value: number | string): string => (Number.isNaN(value) ? "" : String(value));
const texts = ROWS.map((row) => row.map(cell));

const separated = (delimiter: string): string =>
  `${[NAMES, ...texts].map((cells) => cells.join(delimiter)).join("\n")}\n`;

const WIDTH = 22;
const inColumns = (): string =>
  `${[NAMES, ...texts].map((cells) => cells.map((text) => (text || "--").padStart(WIDTH)).join("")).join("\n")}\n`;

const ecsv = (): string =>
  [
    "# %ECSV 1.0",
    "# ---",
    "# delimiter: ','",
    "# datatype:",
    ...COLUMNS.map(({ name, unit, characters }) => {
      const type = characters === null ? "float64" : "string";
      return `# - {name: ${name}, datatype: ${type}${unit === "" ? "" : `, unit: ${unit}`}}`;
    }),
    separated(",")
      .replaceAll(/,(?=,|\n)/g, ',""')
      .trimEnd(),
    "",
  ].join("\n");

const tabledata = (): string => {
  const fields = COLUMNS.map(({ name, unit, characters }) => {
    const type = characters === null ? 'datatype="double"' : 'datatype="char" arraysize="*"';
    return `<FIELD name="${name}" ${type} unit="${unit}"/>`;
  });
  const rows = texts.map((cells) => `<TR>${cells.map((text) => `<TD>${text}</TD>`).join("")}</TR>`);
  return `<?xml version="1.0"?><VOTABLE version="1.4"><RESOURCE><TABLE nrows="3">${fields.join("")}<DATA><TABLEDATA>${rows.join("\n")}</TABLEDATA></DATA></TABLE></RESOURCE></VOTABLE>`;
};

const described = (): string => {
  const lines = COLUMNS.map(({ name, unit, characters }, i) => {
    const [from, to] = [i * WIDTH + 1, (i + 1) * WIDTH];
    const format = characters === null ? `F${WIDTH}.6` : `A${WIDTH}`;
    return `${String(from).padStart(4)}-${String(to).padStart(4)}  ${format.padEnd(8)}${(unit || "---").padEnd(8)}${name.padEnd(16)}${characters === null ? "? " : ""}${name}`;
  });
  const rule = "-".repeat(80);
  return [
    "Title: Three stars",
    "Byte-by-byte Description of file: table.dat",
    rule,
    "   Bytes  Format  Units   Label           Explanations",
    rule,
    ...lines,
    rule,
    ...texts.map((cells) => cells.map((text) => text.padStart(WIDTH)).join("")),
    "",
  ].join("\n");
};

const FILES: readonly (readonly [string, string, () => string | Buffer])[] = [
  ["commas", "delimited", () => separated(",")],
  ["semicolons", "delimited", () => separated(";")],
  ["tabs", "delimited", () => separated("\t")],
  ["columns of blanks", "fixed-width", inColumns],
  ["ECSV", "ecsv", ecsv],
  ["VOTable as text", "votable", tabledata],
  ["VOTable BINARY2", "votable", () => Buffer.concat([...votableTable(COLUMNS, [ROWS])])],
  ["FITS", "fits", () => Buffer.concat([...fitsTable(COLUMNS, [ROWS], ROWS.length)])],
  ["a byte-by-byte description", "described", described],
];

const curator = async () => {
  const programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  return { ...(await app.asPerson("curator", programme)), programme };
};

/** Fingerprint of the catalogue that the file makes, and what is told of its columns. */
const catalogueOf = async (content: string | Buffer) => {
  const { agent, programme } = await curator();
  const extract = await bringIn(app.deps, agent, programme, content);
  expect(extract.failure).toBeNull();
  expect(extract.rows).toEqual({ read: 3, accepted: 3, refused: 0, skipped: 0 });
  const { catalogue } = (await agent.get(`/api/programmes/${programme.id}/catalogue`).expect(200)).body;
  const health = await agent.get(`${extractsUrl(programme)}/${extract.id}/health`).expect(200);
  return {
    fingerprint: catalogue.editions[0].fingerprint,
    columns: health.body.columns as ColumnHealth[],
    extract,
  };
};

describe("the same stars from any format", () => {
  let first: Awaited<ReturnType<typeof catalogueOf>>;
  beforeAll(async () => {
    first = await catalogueOf(separated(","));
  });

  test.each(FILES)("%s", async (_name, format, content) => {
    const found = await catalogueOf(content());
    expect(found.extract.plan?.format).toBe(format);
    expect(found.fingerprint).toBe(first.fingerprint);
    const told = found.columns.map(({ means, values, low, median, high }) => [
      means,
      values,
      low,
      median,
      high,
    ]);
    expect(told).toEqual([
      ["source_id", 3, null, null, null],
      ["ra", 3, 150.1, 200.2, 310.3],
      ["dec", 3, -12.5, -0.000056, 40.25],
      ["epoch", 3, 2016, 2016, 2016],
      ["parallax", 3, 38.5, 60, 81.3],
      ["parallax_err", 2, 0.05, 0.05, 0.05],
      ["ks_mag", 2, 6.85, expect.closeTo(7.381, 9), 7.912],
    ]);
    expect(found.columns.map((c) => c.blanks.reduce((sum, b) => sum + b.count, 0))).toEqual([
      0, 0, 0, 0, 0, 1, 1,
    ]);
  });

  test.each([FILES[0], FILES[5], FILES[7]].flatMap((file) => (file ? [file] : [])))(
    "%s, packed with gzip",
    async (_name, _format, content) => {
      const found = await catalogueOf(gzipSync(content()));
      expect(found.fingerprint).toBe(first.fingerprint);
    },
  );
});

describe("a table that is not all there", () => {
  test("fewer rows than the file declares stop the import, and nothing is kept but the original", async () => {
    const { agent, programme } = await curator();
    // Long enough that its end is not seen before the import.
    const rows = Array.from(
      { length: 140_000 },
      (_, i) => `<TR><TD>${i}</TD><TD>10</TD><TD>20</TD><TD>2016</TD><TD>50</TD><TD>1</TD><TD>8</TD></TR>`,
    );
    const content = tabledata()
      .replace('nrows="3"', 'nrows="500000"')
      .replace("<TABLEDATA>", `<TABLEDATA>${rows.join("")}`);
    const received = await receive(agent, programme, content);
    await commit(agent, programme, received, { accepted: received.preview.findings.map((f) => f.code) });
    await runJobs(app.deps);
    const { extract } = (await agent.get(`${extractsUrl(programme)}/${received.extract.id}`)).body;
    expect(extract).toMatchObject({ state: "planning", rows: null, edition: null });
    expect(extract.failure.message).toMatch(/500,000/);
    const [left] = await app.deps.db.query("SELECT COUNT(*) AS n FROM entry WHERE extract_id = ?", [
      extract.id,
    ]);
    expect(Number(left.n)).toBe(0);
  });
});
