import { beforeAll, describe, expect, expectTypeOf, test } from "vitest";
import type { z } from "zod";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { campaignSettings, card, type cardSettings } from "#shared/api/instruments.ts";
import type { CampaignSettings, CardSettings, DetectorCard, FormulaCard } from "#shared/science/cards.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { PRACTICE_30, PRACTICE_CAMPAIGN } from "#tests/support/sky.ts";

let on: TestApp;
let agent: Agent;
let programme: Programme;
beforeAll(async () => {
  on = await startTestApp();
  ({ agent, programme } = await on.asPerson("instrument-team"));
});

const DETECTOR: CardSettings = {
  model: "detector",
  passband: "rp_mag",
  photonBand: "R",
  apertureM: 0.4,
  obstruction: 0.35,
  throughput: 0.42,
  extinction: 0.09,
  airmass: 1.2,
  siteAltitudeM: null,
  pixelScale: 1.6,
  apertureRadiusPx: 4.5,
  skyPixels: 700,
  readNoise: 8.2,
  darkRate: 0.05,
  fullWell: 98_000,
  fwhmPx: 2.4,
  skyBrightness: 20.9,
  exposureS: 10,
  overheadS: 3,
  floorPpm: 180,
  brightLimit: 8.5,
  faintLimit: 14.5,
};

const EVERYTHING: CardSettings = {
  ...DETECTOR,
  magnitudeSystem: "ab",
  gain: 1.5,
  digitisation: 0.289,
  mostCounts: 65_535,
  scintillationLaw: "osborn",
  scintillationCoefficient: 1.35,
  comparisonStars: 4,
  jitterPpm: 120,
  redNoisePpm: 80,
};

const cardsUrl = (of = programme) => `/api/programmes/${of.id}/instruments`;
const campaignsUrl = (of = programme) => `/api/programmes/${of.id}/campaigns`;
const cardBody = (more: object = {}) => ({
  name: "Practice 30",
  source: "Appendix",
  settings: PRACTICE_30,
  ...more,
});
const make = async (more: object = {}) =>
  (await agent.post(cardsUrl()).send(cardBody(more)).expect(201)).body.card;

const logbook = async (of: Programme) => {
  const { agent: reader } = await on.asPerson("lead", of);
  return (await reader.get(`/api/programmes/${of.id}/logbook`).expect(200)).body.lines;
};

test("the settings of the interface are those of the science, to the last field", () => {
  type Sent = z.output<typeof cardSettings>;
  expectTypeOf<Sent>().toExtend<CardSettings>();
  expectTypeOf<keyof Extract<Sent, { model: "formula" }>>().toEqualTypeOf<keyof FormulaCard>();
  expectTypeOf<keyof Extract<Sent, { model: "detector" }>>().toEqualTypeOf<keyof DetectorCard>();
  expectTypeOf<z.output<typeof campaignSettings>>().toExtend<CampaignSettings>();
  expectTypeOf<keyof z.output<typeof campaignSettings>>().toEqualTypeOf<keyof CampaignSettings>();
  expect(campaignSettings.parse(PRACTICE_CAMPAIGN)).toEqual(PRACTICE_CAMPAIGN);
});

describe("an instrument card", () => {
  test.each([
    ["formula", PRACTICE_30] as const,
    ["detector", DETECTOR] as const,
    ["detector, with all that it may say besides,", EVERYTHING] as const,
  ])("of the model %s comes back as it was saved", async (_, settings) => {
    const made = card.parse(await make({ settings }));
    expect(made).toMatchObject({ id: made.versionId, number: 1, settings, isVerified: true });
    const { body } = await agent.get(`${cardsUrl()}/versions/${made.versionId}`).expect(200);
    expect(body.card).toEqual(made);
  });

  test("without a source is unverified", async () => {
    expect(await make({ source: "   " })).toMatchObject({ source: "", isVerified: false });
  });

  test("is saved in versions: the older one stays, a stale save is refused and changes nothing", async () => {
    const first = await make({ name: "Heron" });
    const url = `${cardsUrl()}/${first.id}`;
    const quieter = { ...PRACTICE_30, floorPpm: 10 };
    const save = cardBody({ name: "Heron", settings: quieter, number: 1 });
    const second = (await agent.put(url).send(save).expect(200)).body.card;
    expect(second).toMatchObject({ id: first.id, number: 2, settings: quieter });
    expect(second.versionId).not.toBe(first.versionId);

    const refused = await agent
      .put(url)
      .send(cardBody({ name: "Late", number: 1 }))
      .expect(409);
    expect(refused.body.error).toMatchObject({ code: "changed-meanwhile", details: { number: 2 } });

    const { cards } = (await agent.get(cardsUrl()).expect(200)).body;
    expect(cards.filter((each: { id: string }) => each.id === first.id)).toEqual([second]);
    const versions = (await agent.get(`${url}/versions`).expect(200)).body.cards;
    expect(versions).toEqual([second, first]);
  });

  test("saved by two people at once goes to one of them", async () => {
    const { id } = await make({ name: "Contested" });
    const saves = [1, 2, 3, 4].map((floorPpm) =>
      agent.put(`${cardsUrl()}/${id}`).send(cardBody({ settings: { ...PRACTICE_30, floorPpm }, number: 1 })),
    );
    const statuses = (await Promise.all(saves)).map((answer) => answer.status).sort();
    expect(statuses).toEqual([200, 409, 409, 409]);
    expect((await agent.get(`${cardsUrl()}/${id}/versions`)).body.cards).toHaveLength(2);
  });

  test.each([
    ["a limit that is none", { ...PRACTICE_30, faintLimit: 7 }, "settings.faintLimit"],
    ["negative noise", { ...PRACTICE_30, photonPpm: -1 }, "settings.photonPpm"],
    ["a passband that is no column", { ...PRACTICE_30, passband: "x_mag" }, "settings.passband"],
    ["more light than falls in", { ...DETECTOR, throughput: 1.2 }, "settings.throughput"],
    ["a mirror of no size", { ...DETECTOR, apertureM: 0 }, "settings.apertureM"],
  ])("with %s is refused at its field", async (_, settings, field) => {
    const { body } = await agent.post(cardsUrl()).send(cardBody({ settings })).expect(400);
    expect(Object.keys(body.error.fields)).toContain(field);
  });

  test("leaves a line in the logbook for each change, with what there was before", async () => {
    const own = await on.asPerson("instrument-team");
    const url = cardsUrl(own.programme);
    const made = (
      await own.agent
        .post(url)
        .send(cardBody({ name: "Logged" }))
        .expect(201)
    ).body.card;
    await own.agent
      .put(`${url}/${made.id}`)
      .send(cardBody({ name: "Renamed", number: 1 }))
      .expect(200);
    const lines = (await logbook(own.programme)).filter((line: { subject: string }) =>
      line.subject.startsWith("instrument-card "),
    );
    expect(lines.map((line: { action: string }) => line.action)).toEqual([
      "instrument-card.save",
      "instrument-card.make",
    ]);
    expect(lines[0]).toMatchObject({
      actor: own.person.name,
      before: { number: 1, name: "Logged" },
      after: { number: 2, name: "Renamed" },
    });
  });
});

describe("a campaign", () => {
  test("is saved in versions", async () => {
    const body = { name: "Half a year", settings: PRACTICE_CAMPAIGN };
    const first = (await agent.post(campaignsUrl()).send(body).expect(201)).body.campaign;
    const url = `${campaignsUrl()}/${first.id}`;
    const longer = { ...body, settings: { ...PRACTICE_CAMPAIGN, lengthDays: 365 }, number: 1 };
    const second = (await agent.put(url).send(longer).expect(200)).body.campaign;
    expect(second).toMatchObject({ id: first.id, number: 2, settings: { lengthDays: 365 } });
    await agent.put(url).send(longer).expect(409);
    expect((await agent.get(campaignsUrl()).expect(200)).body.campaigns).toEqual([second]);
    expect((await agent.get(`${url}/versions`).expect(200)).body.campaigns).toEqual([second, first]);
    const old = await agent.get(`${campaignsUrl()}/versions/${first.versionId}`).expect(200);
    expect(old.body.campaign).toEqual(first);
  });

  test.each([
    ["no length", { lengthDays: 0 }, "settings.lengthDays"],
    ["more than all of the time", { duty: 1.1 }, "settings.duty"],
    ["half a transit", { leastTransits: 1.5 }, "settings.leastTransits"],
  ])("with %s is refused at its field", async (_, wrong, field) => {
    const settings = { ...PRACTICE_CAMPAIGN, ...wrong };
    const { body } = await agent.post(campaignsUrl()).send({ name: "X", settings }).expect(400);
    expect(Object.keys(body.error.fields)).toContain(field);
  });
});

test("cards and campaigns of another programme are not there, to read or to save", async () => {
  const mine = await make();
  const other = await on.asPerson("instrument-team");
  const url = cardsUrl(other.programme);
  await other.agent.get(`${url}/versions/${mine.versionId}`).expect(404);
  await other.agent.get(`${url}/${mine.id}/versions`).expect(404);
  await other.agent
    .put(`${url}/${mine.id}`)
    .send(cardBody({ number: 1 }))
    .expect(404);
  expect((await other.agent.get(url).expect(200)).body.cards).toEqual([]);
});

test("a guest reads cards and saves none", async () => {
  const { agent: guest } = await on.asPerson("guest", programme);
  await guest.get(cardsUrl()).expect(200);
  await guest.post(cardsUrl()).send(cardBody()).expect(403);
  await guest.post(campaignsUrl()).send({ name: "X", settings: PRACTICE_CAMPAIGN }).expect(403);
});
