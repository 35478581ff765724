import { rm } from "node:fs/promises";
import { beforeAll, describe, expect, test } from "vitest";
import { Extract } from "#server/database/entities/extract.entity.ts";
import { JobRow } from "#server/database/entities/job.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { starSheet, starWindow, type ViewSummary, viewSummary } from "#shared/api/stars.ts";
import { EMPTY_VIEW, type ViewSpec, viewToParams } from "#shared/catalogue/view.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { buildInstrument, buildSky, type GivenStar, PRACTICE_STARS } from "#tests/support/sky.ts";
import { runJobs } from "#tests/support/worker.ts";

let app: TestApp;
let agent: Agent;
let programme: Programme;
let instrument: { card: string; campaign: string };
let ids: string[];

const practiceMerit = {
  name: "Practice",
  note: "",
  terms: [
    ["r_min", { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 }, 4],
    ["transit_probability", { kind: "ramp", zeroAt: 0.005, oneAt: 0.02 }, 2],
    ["transits", { kind: "ramp", zeroAt: 1, oneAt: 6 }, 2],
    ["light_share", { kind: "ramp", zeroAt: 0.7, oneAt: 1 }, 1],
    ["flags", { kind: "loss", perUnit: 0.25 }, 1],
  ].map(([expression, shape, weight]) => ({
    label: expression,
    expression,
    shape,
    weight,
    blanks: "zero",
    zeroZeroesAll: false,
  })),
};
let merit: string;

beforeAll(async () => {
  app = await startTestApp({ logLevel: "silent" });
  programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  ({ agent } = await app.asPerson(["scientist", "curator"], programme));
  ids = await buildSky(app.deps, programme, [
    ...PRACTICE_STARS,
    { designation: "Giant", values: { ks_mag: 3, parallax: 14, parallax_err: 0.1, ruwe: 1.6, g_mag: 7 } },
    { designation: "Bare", values: { g_mag: 9 } },
    { designation: "bare 100% _x", values: { g_mag: 8, parallax: -0.3, parallax_err: 0.2, ruwe: 1 } },
  ]);
  instrument = await buildInstrument(app.deps, programme);
  const made = await agent.post(`/api/programmes/${programme.id}/merits`).send(practiceMerit).expect(201);
  merit = made.body.merit.versionId;
});

const ask = (path: string, view: Partial<ViewSpec> = {}, more = "", by: Agent = agent, of = programme) =>
  by.get(`/api/programmes/${of.id}/stars/${path}?${viewToParams({ ...EMPTY_VIEW, ...view })}${more}`);

/** Asks again once the worker has built what was missing, as the client does. */
const read = async (
  path: string,
  view: Partial<ViewSpec> = {},
  more = "",
  by: Agent = agent,
  of = programme,
) => {
  const first = await ask(path, view, more, by, of);
  if (first.status !== 503) return first;
  expect(first.body.error.code).toBe("scan-index-building");
  await runJobs(app.deps);
  return ask(path, view, more, by, of);
};
const summary = async (view: Partial<ViewSpec>): Promise<ViewSummary> => {
  const { body, status } = await read("summary", view);
  expect(status, JSON.stringify(body)).toBe(200);
  return viewSummary.parse(body.summary);
};
const names = async (view: Partial<ViewSpec>, more = ""): Promise<string[]> => {
  const { body } = await read("window", view, more);
  return starWindow.parse(body.window).rows.map((row) => row.designation);
};
const cut = (expression: string, blanks: "keep" | "drop" = "drop") => ({ label: "", expression, blanks });

describe("the practice stars", () => {
  test("have the printed figures", async () => {
    const view = { ...instrument, merit, sort: { key: "merit", direction: "desc" } } as const;
    const { body } = await read("window", view);
    const { rows } = starWindow.parse(body.window);
    expect(rows.slice(0, 3).map((r) => [r.place, r.designation])).toEqual([
      [1, "Practice B"],
      [2, "Practice A"],
      [3, "Practice C"],
    ]);
    const star = (name: string) => {
      const row = rows.find((r) => r.designation === `Practice ${name}`);
      if (!row) throw new Error(`No star ${name}.`);
      return row;
    };
    const rounded = (name: string, key: string, decimals: number) =>
      star(name).values[key]?.toFixed(decimals);
    for (const [name, radius, noise, transits, rMin] of [
      ["A", "0.3344", "102.8", "6", "0.496"],
      ["B", "0.1452", "294.1", "20", "0.337"],
      ["C", "0.6533", "64.7", "2", "0.840"],
    ] as const) {
      expect(rounded(name, "radius", 4)).toBe(radius);
      expect(rounded(name, "noise_1h", 1)).toBe(noise);
      expect(rounded(name, "transits", 0)).toBe(transits);
      expect(rounded(name, "r_min", 3)).toBe(rMin);
    }
    expect([star("A"), star("B"), star("C")].map((r) => r.merit?.toFixed(2))).toEqual([
      "91.74",
      "97.07",
      "59.23",
    ]);
    const shares = star("A").shares.reduce((a, b) => a + b, 0);
    expect(shares).toBeCloseTo(star("A").merit ?? Number.NaN, 9);
    expect(star("A").sourceId).toBe("3141592653589793239");
  });

  test("a cut on what the instrument sees agrees with the rows", async () => {
    const view = { ...instrument, cuts: [cut("r_min < 0.5")] };
    expect(await names(view)).toEqual(["Practice A", "Practice B"]);
  });
});

describe("the ladder", () => {
  test("counts what each cut leaves, lets fall, would drop alone, and finds blank", async () => {
    const { ladder, total, count } = await summary({
      cuts: [cut("parallax > 0"), cut("ruwe < 1.4", "keep"), cut("teff < 3500")],
    });
    expect({ total, count }).toEqual({ total: 6, count: 2 });
    expect(ladder.map(({ left, fell, alone, blank }) => [left, fell, alone, blank])).toEqual([
      [4, 2, 2, 1],
      [3, 1, 1, 4],
      [2, 1, 4, 3],
    ]);
  });

  test("turning a cut's rule for blanks changes the total by exactly those", async () => {
    const before = await summary({ cuts: [cut("ruwe < 1.4", "keep")] });
    const after = await summary({ cuts: [cut("ruwe < 1.4", "drop")] });
    expect(before.count - after.count).toBe(before.ladder[0]?.blank);
  });

  test("names a cut that cannot be read, leaves it out and shows the rest", async () => {
    const { ladder, count } = await summary({ cuts: [cut("tef < 3500"), cut("parallax > 0")] });
    expect(ladder[0]?.error).toMatchObject({ hint: "Did you mean teff?", position: 0 });
    expect(count).toBe(4);
  });
});

describe("the fingerprint", () => {
  test("is of the set of stars: order of cuts and of the table do not matter", async () => {
    const cuts = [cut("parallax > 0"), cut("teff < 3500")];
    const one = await summary({ cuts });
    const other = await summary({ cuts: cuts.toReversed(), sort: { key: "teff", direction: "desc" } });
    expect(one.fingerprint).toMatch(/^[0-9a-f]{4}-[0-9a-f]{4}$/);
    expect(other.fingerprint).toBe(one.fingerprint);
    expect((await summary({ cuts: cuts.slice(0, 1) })).fingerprint).not.toBe(one.fingerprint);
  });

  test("is the same where the same stars have other ids", async () => {
    const twin = await buildProgramme(app.deps.db, { recipe: "practice" });
    const { agent: other } = await app.asPerson("scientist", twin);
    await buildSky(app.deps, twin, PRACTICE_STARS.toReversed(), 2n ** 40n + 7n);
    const { body } = await read("summary", {}, "", other, twin);
    const three = await summary({ cuts: [cut("light_share > 0")] });
    expect(body.summary.fingerprint).toBe(three.fingerprint);
  });
});

describe("the order", () => {
  test("has blanks last both ways, and equals by brightness and then by name", async () => {
    const teff = (direction: "asc" | "desc") => names({ sort: { key: "teff", direction } });
    const blanks = ["Giant", "bare 100% _x", "Bare"];
    expect(await teff("asc")).toEqual(["Practice B", "Practice A", "Practice C", ...blanks]);
    expect(await teff("desc")).toEqual(["Practice C", "Practice A", "Practice B", ...blanks]);
  });

  test("windows continue each other and stop at the end", async () => {
    const all = await names({});
    expect([...(await names({}, "&offset=0&limit=4")), ...(await names({}, "&offset=4&limit=4"))]).toEqual(
      all,
    );
    expect(all).toHaveLength(6);
    expect(await names({}, "&offset=600&limit=4")).toEqual([]);
  });
});

test("a blank cell has its reason and no number, and a measured negative stays as it is", async () => {
  const { body } = await read("window", instrument);
  const rows = starWindow.parse(body.window).rows;
  const row = (name: string) => rows.find((r) => r.designation === name);
  expect(row("Bare")?.values.parallax).toBeUndefined();
  expect(row("Bare")?.blanks).toMatchObject({ parallax: 1, distance: 2, radius: expect.any(Number) });
  expect(row("Bare")?.blanks.r_min).toBeGreaterThan(0);
  expect(row("bare 100% _x")?.values.parallax).toBe(-0.3);
  expect(row("bare 100% _x")?.blanks.distance).toBe(4);
});

describe("histograms", () => {
  test("add up to the catalogue, with the selection lit", async () => {
    const { body } = await read(
      "histograms",
      { cuts: [cut("teff < 3500")] },
      "&columns=teff,g_mag,nonsense,r_min",
    );
    const sum = (bins: number[]) => bins.reduce((a, b) => a + b, 0);
    expect(body.histograms.map((h: { key: string }) => h.key)).toEqual(["teff", "g_mag", "r_min"]);
    for (const h of body.histograms) {
      expect(h.all).toHaveLength(26);
      expect(sum(h.all) + h.blanks).toBe(6);
    }
    expect(sum(body.histograms[0].selected)).toBe(2);
    const whole = (await read("histograms", {}, "&columns=teff,g_mag,distance")).body.histograms;
    for (const h of whole) expect(h.selected).toEqual(h.all);
  });
});

describe("a star's sheet", () => {
  test("tells place, methods, dropping cuts and reach", async () => {
    const view = {
      ...instrument,
      cuts: [cut("teff < 3500"), cut("parallax > 1", "keep"), cut("ruwe < 1", "drop")],
    };
    const { body } = await read(ids[2] ?? "", view);
    const sheet = starSheet.parse(body.star);
    expect(sheet).toMatchObject({ designation: "Practice C", place: null, count: 0, droppedBy: [0, 2] });
    expect(sheet.methods).toMatchObject({ teff: expect.stringContaining("given") });
    expect(sheet.changedAt).toMatch(/^\d{4}-/);
    const found = sheet.reach.filter((p) => p.rMin !== null);
    expect(found.length).toBeGreaterThan(50);
    expect(sheet.reach.at(-1)?.rMin).toBeNull();
  });

  test("of no star, of a strange id and of another programme's star is not there", async () => {
    const other = await buildProgramme(app.deps.db, { recipe: "practice" });
    const { agent: stranger } = await app.asPerson("scientist", other);
    await buildSky(app.deps, other, [{ designation: "Else", values: { g_mag: 9 } }], 2n ** 50n);
    await read("999", {});
    for (const id of ["999", "abc", "99999999999999999999", String(2n ** 50n)]) await ask(id).expect(404);
    expect((await read(ids[0] ?? "", {}, "", stranger, other)).status).toBe(404);
    await ask("summary", {}, "", stranger, programme).expect(404);
  });
});

describe("finding a star", () => {
  const found = async (q: string, view: Partial<ViewSpec> = {}) =>
    (await read("find", view, `&q=${encodeURIComponent(q)}`)).body.matches.map(
      (m: { designation: string; place: number | null }) => [m.designation, m.place],
    );
  test("goes by designation or identifier, with its place where it has one", async () => {
    expect(await found("practice b")).toEqual([["Practice B", 4]]);
    expect(await found("31415926")).toEqual([["Practice A", 3]]);
    expect(await found("practice", { cuts: [cut("teff < 3400")] })).toEqual([
      ["Practice A", 1],
      ["Practice B", 2],
      ["Practice C", null],
    ]);
  });
  test("takes signs of patterns as they are", async () => {
    expect(await found("bare 100%")).toHaveLength(1);
    expect(await found("%")).toEqual([]);
    expect(await found("_")).toEqual([]);
  });
});

describe("the extracts' own words", () => {
  test("find a star and stand on its sheet, for who may read extracts alone", async () => {
    const { manager } = app.deps.db;
    const extract = await manager.save(
      manager.create(Extract, {
        programmeId: programme.id,
        number: 1,
        name: "Southern dwarfs",
        state: "committed",
        fileName: "south.csv",
        bytes: "1",
        uploadedBy: "1",
        createdAt: new Date(),
      }),
    );
    await app.deps.db.query(
      "INSERT INTO entry (extract_id, `row_number`, programme_id, star_id, designation, ks_mag, teff_given) VALUES (?, 12, ?, ?, ?, 7.9, 3360)",
      [extract.id, programme.id, ids[0], "SD 417"],
    );
    const { agent: guest } = await app.asPerson("guest", programme);
    const matches = async (by: Agent) => (await read("find", {}, "&q=sd%204", by)).body.matches;
    expect(await matches(agent)).toMatchObject([{ id: ids[0], designation: "Practice A" }]);
    expect(await matches(guest)).toEqual([]);
    const sheet = async (by: Agent) => starSheet.parse((await read(ids[0] ?? "", {}, "", by)).body.star);
    expect((await sheet(agent)).entries).toMatchObject([
      {
        extractName: "Southern dwarfs",
        rowNumber: 12,
        designation: "SD 417",
        values: { ks_mag: 7.9, teff: 3360 },
      },
    ]);
    expect((await sheet(guest)).entries).toEqual([]);
  });
});

describe("what is not to be had", () => {
  test("is named and the rest is shown", async () => {
    const other = await buildProgramme(app.deps.db);
    const foreign = await buildInstrument(app.deps, other);
    const { ignored, count, card } = await summary({
      ...foreign,
      merit: "424242",
      edition: 7,
      sort: { key: "nonsense; drop table star", direction: "asc" },
    });
    expect(ignored).toEqual(["edition", "card", "campaign", "merit", "sort"]);
    expect({ count, card }).toEqual({ count: 6, card: null });
  });

  test("a guest sees no merit and no extract, not even by sorting", async () => {
    const { agent: guest } = await app.asPerson("guest", programme);
    const view = { merit, sort: { key: "merit", direction: "desc" } } as const;
    const { body } = await read("summary", view, "", guest);
    expect(body.summary).toMatchObject({ merit: null, ignored: ["merit", "sort"] });
    expect((await read("window", view, "", guest)).body.window.rows[0]).toMatchObject({
      merit: null,
      shares: [],
    });
  });

  test("before the first edition there are no stars, and cuts are read", async () => {
    const empty = await buildProgramme(app.deps.db);
    const { agent: own } = await app.asPerson("scientist", empty);
    const { body } = await ask("summary", { cuts: [cut("tef < 1")] }, "", own, empty).expect(200);
    expect(body.summary).toMatchObject({ edition: null, total: 0, count: 0 });
    expect(body.summary.ladder[0].error.hint).toContain("teff");
    const window = await ask("window", {}, "", own, empty).expect(200);
    expect(window.body.window).toMatchObject({ count: 0, rows: [] });
  });
});

describe("the scan index", () => {
  test("that is missing is asked for once, and built from the catalogue again", async () => {
    await read("summary");
    await rm(app.deps.config.folders.scan, { recursive: true });
    const before = await app.deps.db.manager.countBy(JobRow, { programmeId: programme.id });
    const first = await ask("summary").expect(503);
    const second = await ask("window").expect(503);
    expect(second.body.error.details.jobId).toBe(first.body.error.details.jobId);
    expect(await app.deps.db.manager.countBy(JobRow, { programmeId: programme.id })).toBe(before + 1);
    await runJobs(app.deps);
    expect((await summary({})).count).toBe(6);
  });

  test("of a new edition shows the new edition, and the old one stays to be had", async () => {
    const sky = await buildProgramme(app.deps.db, { recipe: "practice" });
    const { agent: own } = await app.asPerson("scientist", sky);
    const more: GivenStar = { designation: "Late", values: { g_mag: 5 } };
    await buildSky(app.deps, sky, PRACTICE_STARS);
    await read("summary", {}, "", own, sky);
    await buildSky(app.deps, sky, [more], 2n ** 33n);
    expect((await read("summary", {}, "", own, sky)).body.summary).toMatchObject({ edition: 2, count: 4 });
    expect((await read("summary", { edition: 1 }, "", own, sky)).body.summary).toMatchObject({
      edition: 1,
      count: 3,
    });
  });
});
