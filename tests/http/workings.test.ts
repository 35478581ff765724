import { evaluate } from "mathjs/number";
import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { starWindow } from "#shared/api/stars.ts";
import { type Workings, workings } from "#shared/api/workings.ts";
import { columnsOf, errorKey } from "#shared/catalogue/columns.ts";
import { EMPTY_VIEW, viewToParams } from "#shared/catalogue/view.ts";
import { workingsText } from "#shared/format/workings-text.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { buildInstrument, buildSky, PRACTICE_STARS } from "#tests/support/sky.ts";
import { runJobs } from "#tests/support/worker.ts";

let app: TestApp;
let agent: Agent;
let programme: Programme;
let params: URLSearchParams;
let bare: URLSearchParams;
let ids: string[];

beforeAll(async () => {
  app = await startTestApp({ logLevel: "silent" });
  programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  ({ agent } = await app.asPerson("scientist", programme));
  ids = await buildSky(app.deps, programme, [
    ...PRACTICE_STARS,
    { designation: "Giant", values: { ks_mag: 3, parallax: 14, parallax_err: 0.1 } },
    {
      designation: "Sure",
      values: {
        ks_mag: 7.912,
        ks_mag_err: 0.02,
        parallax: 60,
        parallax_err: 0.1,
        teff_given: 3350,
        teff_given_err: 50,
        card_mag: 10.2,
      },
    },
  ]);
  const instrument = await buildInstrument(app.deps, programme);
  params = viewToParams({ ...EMPTY_VIEW, ...instrument });
  bare = viewToParams(EMPTY_VIEW);
});

const [A, , , GIANT, SURE] = [0, 1, 2, 3, 4];

const ask = (star: string, more: string, view = params, by: Agent = agent, of = programme) =>
  by.get(`/api/programmes/${of.id}/stars/${star}/workings?${view}&${more}`);

/** Asks again once the worker has built what was missing, as the client does. */
const read = async (star: string, more: string, view = params) => {
  const first = await ask(star, more, view);
  if (first.status !== 503) return first;
  await runJobs(app.deps);
  return ask(star, more, view);
};

const idOf = (place = 0): string => ids[place] ?? "";
const workingsOf = async (place: number | undefined, more: string, view = params): Promise<Workings> => {
  const { body, status } = await read(idOf(place), more, view);
  expect(status, JSON.stringify(body)).toBe(200);
  return workings.parse(body.workings);
};

describe("the workings of a star's number", () => {
  test("give the number and the error of the table, for every column that is worked out", async () => {
    await workingsOf(A, "key=radius");
    const { body } = await agent
      .get(`/api/programmes/${programme.id}/stars/window?${params}&limit=10`)
      .expect(200);
    const { rows } = starWindow.parse(body.window);
    for (const place of [A, SURE]) {
      const row = rows.find(({ id }) => id === idOf(place));
      for (const { key } of columnsOf("stellar", "instrument")) {
        if (key === "flags") continue;
        const [step] = (await workingsOf(place, `key=${key}`)).steps;
        const told = [row?.values[key] ?? null, row?.values[errorKey(key)] ?? null];
        expect([key, step?.key, step?.value, step?.error]).toEqual([key, key, ...told]);
      }
    }
    expect(rows.find(({ id }) => id === idOf(SURE))?.values.r_min_err).toBeGreaterThan(0);
  });

  test("name recipe, card and campaign, and go without the latter where none is chosen", async () => {
    const seen = await workingsOf(A, "key=radius");
    expect([seen.star, seen.card, seen.campaign]).toEqual(["Practice A", "Practice 30 v1", "Half a year v1"]);
    expect(seen.recipe).toContain("v1");
    const unseen = await workingsOf(A, "key=radius", bare);
    expect([unseen.card, unseen.campaign]).toEqual([null, null]);
    expect((await read(idOf(A), "key=r_min", bare)).status).toBe(404);
  });

  test("say of a blank why it is one and which range was missed", async () => {
    const { steps } = await workingsOf(GIANT, "key=radius");
    // Ks 3 at a parallax of 14 mas, by the definition of absolute magnitude: −1.27, above the range of the relation.
    expect(steps[0]).toMatchObject({ value: null, blank: { word: "out of range" } });
    expect(steps[0]?.ranges).toMatchObject([{ symbol: "M_Ks", holds: false }]);
    expect(steps[0]?.ranges[0]?.value).toBeCloseTo(-1.27, 2);
  });

  test("as text let practice star A be redone by hand", async () => {
    const answer = await workingsOf(A, "key=r_min");
    const text = workingsText(answer);
    // The figures printed for practice star A: 0.334 solar radii, 102.8 ppm, 6 transits, 0.496 Earth radii.
    for (const [symbol, printed, digits] of [
      ["R", 0.3344, 4],
      ["sigma", 102.8, 1],
      ["N", 6, 0],
      ["R_min", 0.496, 3],
    ] as const) {
      const at = text.split("\n").findIndex((line) => line.startsWith(`${symbol} = `));
      const lines = text.split("\n").slice(at, at + 3);
      const sum = lines.find((line) => line.startsWith("  = "))?.slice(4);
      const value = Number(/= (\S+)/.exec(lines[0] ?? "")?.[1]);
      expect([symbol, value.toFixed(digits)]).toEqual([symbol, printed.toFixed(digits)]);
      expect([symbol, evaluate(sum ?? "")]).toEqual([symbol, expect.closeTo(value, 9)]);
    }
  });
});

describe("what cannot be answered", () => {
  test("an unknown star or quantity is not found; a missing key cannot be read", async () => {
    await workingsOf(A, "key=radius");
    for (const [star, key] of [
      ["999999", "radius"],
      ["abc", "radius"],
      ["9".repeat(19), "radius"],
      [idOf(A), "ra"],
      [idOf(A), "nothing_here"],
      [idOf(A), "constructor"],
    ] as const)
      expect([star, key, (await ask(star, `key=${key}`)).status]).toEqual([star, key, 404]);
    expect((await ask(idOf(A), "")).status).toBe(400);
  });

  test("whoever may not read the catalogue learns nothing", async () => {
    expect((await ask(idOf(A), "key=radius", params, await app.visitor())).status).toBe(401);
    const stranger = await app.asPerson("scientist");
    expect((await ask(idOf(A), "key=radius", params, stranger.agent)).status).toBe(404);
    const inTheirs = await ask(idOf(A), "key=radius", bare, stranger.agent, stranger.programme);
    expect(inTheirs.status).not.toBe(200);
  });
});

describe("draws", () => {
  test("are the same by the same seed and others by another", async () => {
    const [first, again, other] = [
      await workingsOf(SURE, "key=radius&draws=500&seed=7"),
      await workingsOf(SURE, "key=radius&draws=500&seed=7"),
      await workingsOf(SURE, "key=radius&draws=500&seed=8"),
    ];
    expect(first.drawn).toMatchObject({ draws: 500, seed: 7 });
    expect(again.drawn).toEqual(first.drawn);
    expect(other.drawn?.intervals.radius).not.toEqual(first.drawn?.intervals.radius);
    const { p16, p50, p84 } = first.drawn?.intervals.radius ?? { p16: 0, p50: 0, p84: 0 };
    expect(p16 < p50 && p50 < p84).toBe(true);
  });

  test("are not made unless asked for, nor of what has no error, nor without end", async () => {
    expect((await workingsOf(SURE, "key=radius")).drawn).toBeNull();
    // Practice star A comes without an error of its Ks magnitude.
    const { drawn } = await workingsOf(A, "key=radius&draws=100");
    expect(drawn?.intervals.radius ?? null).toBeNull();
    for (const wrong of ["draws=99", "draws=20001", "draws=1.5", "draws=100&seed=0", "draws=ten"])
      expect([wrong, (await ask(idOf(SURE), `key=radius&${wrong}`)).status]).toEqual([wrong, 400]);
  });
});
