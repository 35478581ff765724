import { beforeAll, describe, expect, test } from "vitest";
import { Person } from "#server/database/entities/person.entity.ts";
import { Programme } from "#server/database/entities/programme.entity.ts";
import { demoSignIns, needsSeed, seedDemo } from "#server/demo/seed.ts";
import { verifyLogbook } from "#server/logbook/verify.ts";
import { EMPTY_VIEW, viewToParams } from "#shared/catalogue/view.ts";
import { ROLES } from "#shared/policy/roles.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson, buildProgramme } from "#tests/support/factories.ts";
import { runJobs } from "#tests/support/worker.ts";

let on: TestApp;
let programme: Programme;

const people = () => on.deps.db.manager.find(Person);

/** What a seed that was cut short leaves: people who cannot sign in, and half a programme. */
const leaveHalfASeed = async (): Promise<void> => {
  await buildPerson(on.deps.db, { email: "curator@example.org", name: "Demo Curator", isActive: false });
  await buildProgramme(on.deps.db, { name: "Small Suns" });
};

/** Two imports with the tables of all instruments: a busy machine takes its time. */
const SEED_TIMEOUT = 600_000;

beforeAll(async () => {
  on = await startTestApp();
  expect(await needsSeed(on.deps.db)).toBe(true);
  await leaveHalfASeed();
  expect(await needsSeed(on.deps.db)).toBe(true);
  await seedDemo(on.deps.db, on.deps.config);
  const [only, ...more] = await on.deps.db.manager.find(Programme);
  if (!only || more.length > 0) throw new Error("One programme was to be made.");
  programme = only;
}, SEED_TIMEOUT);

const url = (path: string) => `/api/programmes/${programme.id}/${path}`;

const as = async (name: string): Promise<Agent> => {
  const person = (await people()).find((each) => each.name === name);
  if (!person) throw new Error(`Nobody is called ${name}.`);
  return (await on.as(person)).agent;
};

describe("the people", () => {
  test("are one for each role, and each signs in with what is printed", async () => {
    const signIns = await demoSignIns(on.deps.db);
    for (const role of ROLES) expect(signIns.map((each) => each.roles.split(", ")[0])).toContain(role);
    for (const { email, password } of signIns) {
      expect(email).toMatch(/@example\.org$/);
      const visitor = await on.visitor();
      await visitor.post("/api/session").send({ email, password }).expect(200);
    }
  });

  test("make a second seed needless, and someone real makes it impossible", async () => {
    expect(await needsSeed(on.deps.db)).toBe(false);
    await on.deps.db.manager.update(Person, { isActive: true }, { isActive: false });
    expect(await needsSeed(on.deps.db)).toBe(true);
    const someone = await buildPerson(on.deps.db, { isActive: false });
    expect(await needsSeed(on.deps.db)).toBe(false);
    await on.deps.db.manager.delete(Person, { id: someone.id });
    await on.deps.db.manager.update(Person, { isActive: false }, { isActive: true });
  });
});

describe("the programme", () => {
  test("says that its sky is invented", async () => {
    expect(programme).toMatchObject({ name: "Small Suns", isInvented: true, edition: 2 });
    const { body } = await (await as("Demo Guest")).get(`/api/programmes/${programme.id}`).expect(200);
    expect(body.programme.isInvented).toBe(true);
  });

  test("has two extracts whose rows add up, with some refused, and 20 000 stars", async () => {
    const { extracts } = (await (await as("Demo Curator")).get(url("extracts")).expect(200)).body;
    expect(extracts).toHaveLength(2);
    for (const { state, isInvented, rows } of extracts) {
      expect({ state, isInvented }).toEqual({ state: "committed", isInvented: true });
      expect(rows.read).toBe(13_005);
      expect(rows.accepted + rows.refused + rows.skipped).toBe(rows.read);
      expect(rows.refused).toBeGreaterThan(0);
    }
    const { catalogue } = (await (await as("Demo Guest")).get(url("catalogue")).expect(200)).body;
    const { stars } = catalogue.editions.find((each: { number: number }) => each.number === 2);
    expect(stars).toBeGreaterThan(19_900);
    expect(stars).toBeLessThanOrEqual(20_000);
  });

  test("has cards, campaigns, selections and a figure of merit", async () => {
    const scientist = await as("Demo Scientist");
    const names = async (what: string) =>
      (await scientist.get(url(what)).expect(200)).body[what === "instruments" ? "cards" : what].map(
        (each: { name: string }) => each.name,
      );
    expect(await names("instruments")).toEqual(["Heron 0.4 m", "Practice 30"]);
    expect(await names("campaigns")).toEqual(["180 days", "60 nights"]);
    expect(await names("selections")).toEqual(["Nearby cool dwarfs", "Quiet neighbours"]);
    expect(await names("merits")).toEqual(["Small suns, warm rocks"]);
  });

  test("has one list in review, ranked, of stars that the instrument can use", async () => {
    const scientist = await as("Demo Scientist");
    const { lists } = (await scientist.get(url("lists")).expect(200)).body;
    expect(lists).toMatchObject([{ state: "in-review", stars: 80, isInvented: true, catalogueEdition: 2 }]);
    const { members } = (await scientist.get(url(`lists/${lists[0].id}/members?limit=500`))).body;
    const merits = members.map((m: { merit: number }) => m.merit);
    expect(merits).toEqual(merits.toSorted((a: number, b: number) => b - a));
    expect(merits[0]).toBeGreaterThan(merits.at(-1));
    for (const { values } of members) expect(values.r_min).toBeGreaterThan(0);
    expect(members[0].cameIn).toMatch(/^place 1 of \d+ by merit$/);
    const [, passing] = /of (\d+) by/.exec(members[0].cameIn) ?? [];
    expect(Number(passing)).toBeGreaterThan(members.length);
  });

  test("shows figures with either card", async () => {
    const scientist = await as("Demo Scientist");
    const { cards } = (await scientist.get(url("instruments"))).body;
    const { campaigns } = (await scientist.get(url("campaigns"))).body;
    for (const card of cards) {
      const cut = { label: "", expression: "r_min < 2", blanks: "drop" as const };
      const view = { ...EMPTY_VIEW, card: card.versionId, campaign: campaigns[0].versionId, cuts: [cut] };
      const ask = () => scientist.get(url(`stars/summary?${viewToParams(view)}`));
      if ((await ask()).status === 503) await runJobs(on.deps);
      const { summary } = (await ask().expect(200)).body;
      expect(summary.count, card.name).toBeGreaterThan(500);
    }
  });

  test("has a logbook that fits together", async () => {
    for (const report of await verifyLogbook(on.deps.db)) expect(report.fault).toBeNull();
  });
});
