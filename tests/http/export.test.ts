import { parse } from "csv-parse/sync";
import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { contentHash } from "#server/recipes/content-hash.ts";
import type { TargetList } from "#shared/api/lists.ts";
import { COLUMNS } from "#shared/catalogue/columns.ts";
import { EMPTY_VIEW, viewToParams } from "#shared/catalogue/view.ts";
import { PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { buildInstrument, buildSky, PRACTICE_STARS } from "#tests/support/sky.ts";
import { runJobs } from "#tests/support/worker.ts";

let on: TestApp;
let agent: Agent;
let programme: Programme;
let list: TargetList;

const LONG = 1_203;
const REASON = 'Blended,\nsays "the chart"';

const listsUrl = (of = programme) => `/api/programmes/${of.id}/lists`;
const exportUrl = (format: string, of = programme, id = list.id) =>
  `${listsUrl(of)}/${id}/export?format=${format}`;

const makeList = async (by: Agent, of: Programme, body: object): Promise<TargetList> => {
  await by.post(listsUrl(of)).send(body);
  await runJobs(on.deps);
  return (await by.post(listsUrl(of)).send(body).expect(201)).body.list;
};

beforeAll(async () => {
  on = await startTestApp({ logLevel: "silent" });
  programme = await buildProgramme(on.deps.db, { name: "Small Suns", recipe: "practice" });
  ({ agent } = await on.asPerson("scientist", programme));
  await buildSky(on.deps, programme, [
    ...PRACTICE_STARS.map((star, i) =>
      i === 0 ? { ...star, values: { ...star.values, ra: 217.425, dec: -0.2041572, epoch: 2016 } } : star,
    ),
    { designation: "=1+1", values: { g_mag: 0.1 + 0.2, parallax: -0.3, parallax_err: 0.2 } },
  ]);
  const instrument = await buildInstrument(on.deps, programme);
  const term = { label: "Reach", expression: "r_min", weight: 1, blanks: "zero", zeroZeroesAll: false };
  const shape = { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 };
  const made = await agent
    .post(`/api/programmes/${programme.id}/merits`)
    .send({ name: "Small first", note: "", terms: [{ ...term, shape }] })
    .expect(201);
  const view = viewToParams({
    ...EMPTY_VIEW,
    ...instrument,
    merit: made.body.merit.versionId,
    cuts: [{ label: "Any", expression: "teff < 3900", blanks: "keep" }],
    sort: { key: "merit", direction: "desc" },
  });
  list = await makeList(agent, programme, {
    name: "Winter, first light",
    note: "",
    view: `${view}`,
    first: 10,
  });
  const { members } = (await agent.get(`${listsUrl()}/${list.id}/members`)).body;
  const set = await agent
    .patch(`${listsUrl()}/${list.id}/members/${members[1].id}`)
    .send({ state: "out", reason: REASON, version: list.version })
    .expect(200);
  list = set.body.list;
});

type Row = Record<string, string>;
const readCsv = async (): Promise<Row[]> => {
  const { text } = await agent.get(exportUrl("csv")).expect(200);
  return parse(text, { columns: true });
};

describe("as CSV", () => {
  test("is a header and a row for each member in order of place, whatever its state", async () => {
    const { text, headers } = await agent.get(exportUrl("csv")).expect(200);
    expect(headers["content-type"]).toMatch(/^text\/csv/);
    expect(headers["content-disposition"]).toBe("attachment; filename=winter-first-light-working-copy.csv");
    expect(text).toMatch(/^place,state,reason,came_in,merit,share_1_reach,designation,/);
    expect(text.endsWith("\r\n")).toBe(true);
    const rows = await readCsv();
    expect(rows.map((r) => [r.place, r.state, r.designation])).toEqual([
      ["1", "in", "Practice A"],
      ["2", "out", "Practice B"],
      ["3", "in", "Practice C"],
      ["4", "in", "'=1+1"],
    ]);
    expect(rows[1]?.reason).toBe(REASON);
    expect(rows.every((r) => r.sky === "invented")).toBe(true);
  });

  test("has every column of the registry with its error and why it is blank", async () => {
    const [row = {}] = await readCsv();
    for (const c of COLUMNS) {
      expect(row, c.key).toHaveProperty(c.key);
      if (c.hasError) expect(row).toHaveProperty(`${c.key}_err`);
      if (c.stage !== "given") expect(row).toHaveProperty(`${c.key}_blank`);
    }
  });

  test("keeps identifiers to the last digit and numbers to the last bit", async () => {
    const rows = await readCsv();
    expect(rows.map((r) => r.source_id)).toEqual([
      "3141592653589793239",
      "1234567890123456789",
      "6917529027641081857",
      "",
    ]);
    expect(rows[0]).toMatchObject({ ra: "217.425", dec: "-0.2041572", epoch: "2016", transits: "6" });
    expect(rows[3]).toMatchObject({ g_mag: "0.30000000000000004", parallax: "-0.3" });
    const { members } = (await agent.get(`${listsUrl()}/${list.id}/members`)).body;
    for (const [i, member] of members.entries())
      for (const [key, value] of Object.entries(member.values)) expect(Number(rows[i]?.[key])).toBe(value);
  });

  test("leaves blanks empty, with the reason beside", async () => {
    const [practice, , , bare] = await readCsv();
    expect(bare).toMatchObject({
      distance: "",
      distance_blank: "parallax-not-positive",
      noise_1h: "",
      noise_1h_blank: "needs-card-magnitude",
    });
    expect(practice).toMatchObject({ distance_blank: "", noise_1h_blank: "" });
  });
});

describe("as ECSV", () => {
  const read = async () => (await agent.get(exportUrl("ecsv")).expect(200)).text;

  test("says what it is: a working copy of which list, from what, of an invented sky", async () => {
    const text = await read();
    expect(text).toMatch(/^# %ECSV 1\.0\n# ---\n/);
    for (const line of [
      '# - programme: "Small Suns"',
      '# - target_list: "Winter, first light"',
      '# - status: "working copy (draft)"',
      "# - stars: 4",
      `# - fingerprint: "${list.fingerprint}"`,
      "# - catalogue_edition: 1",
      `# - recipe: "Practice v1 · ${contentHash(PRACTICE_RECIPE.settings).slice(0, 8)}"`,
      '# - instrument_card: "Practice 30, version 1"',
      '# - campaign: "Half a year, version 1"',
      '# - figure_of_merit: "Small first, version 1"',
      "# - cuts:",
      '#   - "teff < 3900 (blank: keep)"',
      '# - invented: "The sky of this programme is invented: none of these stars exist."',
    ])
      expect(text.split("\n")).toContain(line);
  });

  test("names its columns in the header as in the first line, and each row has them all", async () => {
    const lines = (await read()).split("\n");
    const described = lines.flatMap((line) => /^# - \{name: (\w+),/.exec(line)?.[1] ?? []);
    const body = lines.filter((line) => !line.startsWith("#"));
    expect(body[0]?.split(",")).toEqual(described);
    const rows: string[][] = parse(body.join("\n"));
    expect(rows).toHaveLength(5);
    expect(rows.every((row) => row.length === described.length)).toBe(true);
  });

  test("has texts as they are, and no line break inside a row", async () => {
    const body = (await read()).split("\n").filter((line) => !line.startsWith("#"));
    const rows: Row[] = parse(body.join("\n"), { columns: true });
    expect(rows[3]?.designation).toBe("=1+1");
    expect(rows[1]?.reason).toBe('Blended, says "the chart"');
    expect(rows[0]?.source_id).toBe("3141592653589793239");
  });
});

describe("either way", () => {
  test("the same list gives the same bytes", async () => {
    for (const format of ["csv", "ecsv"]) {
      const [one, other] = [await agent.get(exportUrl(format)), await agent.get(exportUrl(format))];
      expect(other.text).toBe(one.text);
    }
  });

  test("an unknown format is refused, and a list of another programme is not there", async () => {
    await agent.get(exportUrl("xlsx")).expect(400);
    const other = await on.asPerson("scientist");
    await other.agent.get(exportUrl("csv", other.programme)).expect(404);
  });
});

describe("a long list", () => {
  let wide: Programme;
  let cookie: string;
  let id: string;
  let address: string;
  beforeAll(async () => {
    wide = await buildProgramme(on.deps.db, { isInvented: false });
    const { agent: own, session } = await on.asPerson("scientist", wide);
    cookie = `${session.cookie.name}=${session.cookie.value}`;
    const many = Array.from({ length: LONG }, (_, i) => ({
      designation: `Star ${String(i).padStart(5, "0")}`,
      values: { g_mag: 10 },
    }));
    await buildSky(on.deps, wide, many, 2n ** 42n);
    const view = viewToParams(EMPTY_VIEW).toString();
    ({ id } = await makeList(own, wide, { name: "届く", note: "", view, first: LONG }));
    address = await on.listen();
  });

  const download = () => fetch(`${address}${exportUrl("csv", wide, id)}`, { headers: { Cookie: cookie } });

  test("comes whole, without a word of an invented sky where there is none", async () => {
    const answer = await download();
    expect(answer.headers.get("content-disposition")).toContain("target-list-working-copy.csv");
    const rows: Row[] = parse(await answer.text(), { columns: true });
    expect(rows).toHaveLength(LONG);
    expect(rows.map((r) => Number(r.place))).toEqual(rows.map((_, i) => i + 1));
    expect(rows[0]).not.toHaveProperty("sky");
  });

  test("that breaks on the way does not look whole", async () => {
    await on.deps.db.query("UPDATE list_member SET `row` = 'null' WHERE target_list_id = ? AND place = 900", [
      id,
    ]);
    const answer = await download();
    expect(answer.status).toBe(200);
    await expect(answer.text()).rejects.toThrow();
  });
});
