import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { type ListMember, listMember, type TargetList, targetList } from "#shared/api/lists.ts";
import { EMPTY_VIEW, type ViewSpec, viewToParams } from "#shared/catalogue/view.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { buildInstrument, buildSky, type GivenStar, PRACTICE_STARS } from "#tests/support/sky.ts";
import { runJobs } from "#tests/support/worker.ts";

let on: TestApp;
let agent: Agent;
let programme: Programme;
let ranked: Partial<ViewSpec>;

const MERIT = {
  name: "Reach",
  note: "",
  terms: [
    {
      label: "reach",
      expression: "r_min",
      shape: { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 },
      weight: 1,
      blanks: "zero",
      zeroZeroesAll: false,
    },
  ],
};
const SKY: GivenStar[] = [
  ...PRACTICE_STARS,
  { designation: "Bare", values: { g_mag: 9 } },
  { designation: "Barer", values: { g_mag: 10 } },
];

beforeAll(async () => {
  on = await startTestApp();
  programme = await buildProgramme(on.deps.db, { recipe: "practice" });
  ({ agent } = await on.asPerson("scientist", programme));
  await buildSky(on.deps, programme, SKY);
  const instrument = await buildInstrument(on.deps, programme);
  const made = await agent.post(`/api/programmes/${programme.id}/merits`).send(MERIT).expect(201);
  ranked = { ...instrument, merit: made.body.merit.versionId, sort: { key: "merit", direction: "desc" } };
});

const url = (path = "", of = programme) => `/api/programmes/${of.id}/lists${path}`;
const cut = (expression: string) => ({ label: "", expression, blanks: "drop" as const });

const ask = (view: Partial<ViewSpec>, first: number, by = agent, of = programme) =>
  by.post(url("", of)).send({
    name: "First light",
    note: "",
    view: viewToParams({ ...EMPTY_VIEW, ...view }).toString(),
    first,
  });

/** Asks again once the worker has prepared the table, as the client does. */
const make = async (view: Partial<ViewSpec>, first: number, by = agent, of = programme) => {
  const answer = await ask(view, first, by, of);
  if (answer.status !== 503) return answer;
  await runJobs(on.deps);
  return ask(view, first, by, of);
};

const makeList = async (view: Partial<ViewSpec> = ranked, first = 3): Promise<TargetList> => {
  const { status, body } = await make(view, first);
  expect(status, JSON.stringify(body)).toBe(201);
  return targetList.parse(body.list);
};

const membersOf = async (list: TargetList, query = "", by = agent): Promise<ListMember[]> => {
  const { body } = await by.get(url(`/${list.id}/members${query}`)).expect(200);
  return listMember.array().parse(body.members);
};

describe("a list made from a view", () => {
  test("takes the first stars in order, and says from what and how each came in", async () => {
    const list = await makeList(ranked, 2);
    expect(list).toMatchObject({
      state: "draft",
      stars: 2,
      byState: { in: 2, reserve: 0, held: 0, out: 0 },
      catalogueEdition: 1,
      recipe: { name: "Practice", number: 1, versionId: programme.recipeVersionId },
      merit: { name: "Reach", number: 1, terms: ["reach"] },
      card: { name: "Practice 30" },
      campaign: { name: "Half a year" },
      isInvented: true,
    });
    expect(new URLSearchParams(list.viewParams).get("edition")).toBe("1");
    const members = await membersOf(list);
    expect(members.map((m) => [m.place, m.designation, m.state, m.cameIn])).toEqual([
      [1, "Practice A", "in", "place 1 of 5 by merit"],
      [2, "Practice B", "in", "place 2 of 5 by merit"],
    ]);
  });

  test("keeps the values it was made on, as the table showed them", async () => {
    const list = await makeList();
    const view = viewToParams({ ...EMPTY_VIEW, ...ranked });
    const { body } = await agent
      .get(`/api/programmes/${programme.id}/stars/window?${view}&limit=3`)
      .expect(200);
    const members = await membersOf(list);
    expect(members.map(({ state, reason, cameIn, ...row }) => row)).toEqual(body.window.rows);
    expect(members[0]?.sourceId).toBe("3141592653589793239");
  });

  test("larger than the result takes all and says so", async () => {
    const { body, status } = await make(ranked, 100);
    expect(status).toBe(201);
    expect(body.list.stars).toBe(5);
    expect(body.note).toBe("Only 5 stars pass the cuts: the list has all of them.");
    expect((await make({ ...ranked, cuts: [cut("teff < 3000")] }, 9)).body.note).toContain(
      "Only 1 star passes",
    );
    expect((await make(ranked, 5)).body.note).toBeNull();
  });

  test("of no star is refused, and of part of a view too", async () => {
    const nothing = await make({ cuts: [cut("teff < 100")] }, 5);
    expect([nothing.status, nothing.body.error.code]).toEqual([422, "no-stars"]);
    const broken = await make({ cuts: [cut("tef < 4000")] }, 5);
    expect(broken.body.error).toMatchObject({
      code: "view-not-whole",
      message: expect.stringContaining("tef"),
    });
    const lost = await make({ merit: "424242" }, 5);
    expect(lost.body.error).toMatchObject({
      code: "view-not-whole",
      message: expect.stringContaining("merit"),
    });
  });

  test("has the fingerprint of its stars, whatever their order and the programme", async () => {
    const three = await makeList({ cuts: [cut("light_share > 0")] }, 3);
    const same = await makeList(ranked, 3);
    expect(same.fingerprint).toBe(three.fingerprint);
    expect(three.fingerprint).toMatch(/^[0-9a-f]{4}-[0-9a-f]{4}$/);
    expect((await makeList(ranked, 2)).fingerprint).not.toBe(three.fingerprint);
    const twin = await buildProgramme(on.deps.db, { recipe: "practice" });
    const { agent: other } = await on.asPerson("scientist", twin);
    await buildSky(on.deps, twin, PRACTICE_STARS.toReversed(), 2n ** 41n);
    expect((await make({}, 9, other, twin)).body.list.fingerprint).toBe(three.fingerprint);
  });

  test("may be longer than one batch, with every place once", async () => {
    const wide = await buildProgramme(on.deps.db);
    const { agent: own } = await on.asPerson("scientist", wide);
    const many = Array.from({ length: 1_203 }, (_, i) => ({
      designation: `Star ${String(i).padStart(5, "0")}`,
      values: { g_mag: 10 },
    }));
    await buildSky(on.deps, wide, many, 2n ** 42n);
    const { body } = await make({}, 1_100, own, wide);
    expect(body.list.stars).toBe(1_100);
    const page = async (offset: number) =>
      (await own.get(url(`/${body.list.id}/members?offset=${offset}&limit=500`, wide)).expect(200)).body;
    const pages = [await page(0), await page(500), await page(1_000)];
    expect(pages.map((p) => p.members.length)).toEqual([500, 500, 100]);
    expect(pages[0].count).toBe(1_100);
    const places = pages.flatMap((p) => p.members.map((m: ListMember) => m.place));
    expect(places).toEqual(Array.from({ length: 1_100 }, (_, i) => i + 1));
    expect(pages[2].members.at(-1).designation).toBe("Star 01099");
  });
});

test("a list stays as it was when the catalogue moves on", async () => {
  const moving = await buildProgramme(on.deps.db);
  const { agent: own } = await on.asPerson("scientist", moving);
  await buildSky(on.deps, moving, [{ designation: "Old", values: { g_mag: 9 } }], 2n ** 43n);
  const { list } = (await make({}, 5, own, moving)).body;
  await buildSky(on.deps, moving, [{ designation: "New", values: { g_mag: 8 } }], 2n ** 44n);
  await on.deps.db.query("DELETE FROM star WHERE programme_id = ? AND designation = 'Old'", [moving.id]);
  const { members } = (await own.get(url(`/${list.id}/members`, moving)).expect(200)).body;
  expect(members).toMatchObject([{ designation: "Old", values: { g_mag: 9 } }]);
});

describe("changing a list", () => {
  test("name and note change, a stale change is refused", async () => {
    const list = await makeList();
    const patch = { name: "Winter", version: list.version };
    const { body } = await agent
      .patch(url(`/${list.id}`))
      .send(patch)
      .expect(200);
    expect(body.list).toMatchObject({ name: "Winter", note: "", version: list.version + 1 });
    const stale = await agent
      .patch(url(`/${list.id}`))
      .send({ ...patch, name: "Mine" })
      .expect(409);
    expect(stale.body.error).toMatchObject({ code: "changed-meanwhile", details: { name: "Winter" } });
  });

  test("goes to review and back, and nowhere else", async () => {
    const list = await makeList();
    const move = (state: string, version: number) =>
      agent.post(url(`/${list.id}/state`)).send({ state, version });
    const sent = (await move("in-review", list.version).expect(200)).body.list;
    expect(sent.state).toBe("in-review");
    await move("in-review", sent.version).expect(409);
    await move("draft", list.version).expect(409);
    await move("agreed", sent.version).expect(400);
    await agent.delete(url(`/${list.id}`)).expect(409);
    expect((await move("draft", sent.version).expect(200)).body.list.state).toBe("draft");
    await agent.delete(url(`/${list.id}`)).expect(204);
    await agent.get(url(`/${list.id}`)).expect(404);
    await agent.get(url(`/${list.id}/members`)).expect(404);
  });
});

describe("setting a star", () => {
  test("out needs a reason in words, which stays with it", async () => {
    const list = await makeList();
    const [first] = await membersOf(list);
    const set = (body: object) => agent.patch(url(`/${list.id}/members/${first?.id}`)).send(body);
    for (const reason of [undefined, "x", "         .        "]) {
      const { body } = await set({ state: "out", reason, version: list.version }).expect(400);
      expect(body.error.fields.reason).toContain("10 characters");
    }
    const reason = "Blended with a brighter neighbour";
    const { body } = await set({ state: "out", reason, version: list.version }).expect(200);
    expect(body.member).toMatchObject({ id: first?.id, state: "out", reason, place: 1 });
    expect(body.list).toMatchObject({
      byState: { in: 2, out: 1 },
      version: list.version + 1,
      fingerprint: list.fingerprint,
    });
    expect((await membersOf(list))[0]).toMatchObject({ state: "out", reason });
  });

  test("over someone else's word is refused", async () => {
    const list = await makeList();
    const [a, b] = await membersOf(list);
    const set = (star: ListMember | undefined, version: number, by: Agent) =>
      by.patch(url(`/${list.id}/members/${star?.id}`)).send({ state: "held", version });
    const { agent: reviewer } = await on.asPerson("reviewer", programme);
    const now = (await set(a, list.version, reviewer).expect(200)).body.list.version;
    await set(b, list.version, agent).expect(409);
    await set(b, now, agent).expect(200);
  });

  test("that is not of the list is not there", async () => {
    const list = await makeList(ranked, 1);
    const version = list.version;
    await agent
      .patch(url(`/${list.id}/members/999`))
      .send({ state: "held", version })
      .expect(404);
  });

  test("is told in the logbook, with the star's name and both states", async () => {
    const list = await makeList(ranked, 1);
    const [star] = await membersOf(list);
    await agent
      .patch(url(`/${list.id}/members/${star?.id}`))
      .send({ state: "reserve", version: list.version })
      .expect(200);
    const { lines } = (await agent.get(`/api/programmes/${programme.id}/logbook`).expect(200)).body;
    expect(lines[0]).toMatchObject({
      action: "list.set-star",
      before: { star: "Practice A", state: "in" },
      after: { star: "Practice A", state: "reserve" },
    });
  });
});

describe("who may see what", () => {
  test("a list of another programme is not there", async () => {
    const list = await makeList();
    const stranger = await on.asPerson(["scientist", "lead"]);
    const theirs = (path: string) => url(path, stranger.programme);
    await stranger.agent.get(theirs(`/${list.id}`)).expect(404);
    await stranger.agent.get(theirs(`/${list.id}/members`)).expect(404);
    await stranger.agent
      .patch(theirs(`/${list.id}`))
      .send({ name: "X", version: 1 })
      .expect(404);
    await stranger.agent
      .post(theirs(`/${list.id}/state`))
      .send({ state: "in-review", version: 1 })
      .expect(404);
    await stranger.agent.delete(theirs(`/${list.id}`)).expect(404);
    expect((await stranger.agent.get(theirs("")).expect(200)).body.lists).toEqual([]);
  });

  test("a guest reads a list without its figure of merit, and changes nothing", async () => {
    const list = await makeList();
    const { agent: guest } = await on.asPerson("guest", programme);
    const one = (await guest.get(url(`/${list.id}`)).expect(200)).body.list;
    const { lists } = (await guest.get(url()).expect(200)).body;
    for (const seen of [one, lists.find((each: TargetList) => each.id === list.id)]) {
      expect(seen.merit).toBeNull();
      expect(seen.viewParams).not.toContain("merit");
      expect(seen.card).toEqual(list.card);
    }
    for (const member of await membersOf(list, "", guest))
      expect(member).toMatchObject({ merit: null, shares: [], cameIn: "" });
    await guest
      .patch(url(`/${list.id}`))
      .send({ name: "Mine", version: list.version })
      .expect(403);
    await guest.get(url(`/${list.id}/export?format=csv`)).expect(403);
    expect((await membersOf(list))[0]?.shares).toHaveLength(1);
  });
});
