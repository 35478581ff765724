import { beforeAll, describe, expect, test } from "vitest";
import { startTestApp, type TestApp } from "#tests/support/app.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const term = {
  label: "Reach",
  expression: "r_min",
  shape: { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 },
  weight: 4,
  blanks: "zero",
  zeroZeroesAll: false,
};
const body = { name: "Practice", note: "", terms: [term] };

describe("a figure of merit", () => {
  test("is saved in versions, and a stale save is refused", async () => {
    const { agent, programme } = await app.asPerson("scientist");
    const url = `/api/programmes/${programme.id}/merits`;
    const { merit } = (await agent.post(url).send(body).expect(201)).body;
    const heavier = { ...body, terms: [{ ...term, weight: 5 }], number: 1 };
    const next = (await agent.put(`${url}/${merit.id}`).send(heavier).expect(200)).body.merit;
    expect(next).toMatchObject({ id: merit.id, number: 2, terms: [{ weight: 5 }] });
    await agent.put(`${url}/${merit.id}`).send(heavier).expect(409);
    expect((await agent.get(url)).body.merits).toEqual([next]);
    const old = await agent.get(`${url}/versions/${merit.versionId}`).expect(200);
    expect(old.body.merit.terms).toEqual([term]);
  });

  test.each([
    ["a term that cannot be read", { ...term, expression: "rmin" }, 422, "terms.0.expression"],
    ["a term that asks", { ...term, expression: "r_min < 1" }, 422, "terms.0.expression"],
    ["weights that are all zero", { ...term, weight: 0 }, 400, "terms"],
    [
      "a ramp with equal ends",
      { ...term, shape: { kind: "ramp", zeroAt: 1, oneAt: 1 } },
      400,
      "terms.0.shape",
    ],
  ])("with %s is refused at its place", async (_, wrong, status, field) => {
    const { agent, programme } = await app.asPerson("lead");
    const url = `/api/programmes/${programme.id}/merits`;
    const answer = await agent
      .post(url)
      .send({ ...body, terms: [wrong] })
      .expect(status);
    expect(Object.keys(answer.body.error.fields)).toEqual([field]);
  });

  test("of another programme is not there, and a reviewer cannot save", async () => {
    const { agent, programme } = await app.asPerson("scientist");
    const url = `/api/programmes/${programme.id}/merits`;
    const { merit } = (await agent.post(url).send(body).expect(201)).body;
    const { agent: stranger, programme: theirs } = await app.asPerson("scientist");
    await stranger.get(`/api/programmes/${theirs.id}/merits/versions/${merit.versionId}`).expect(404);
    const { agent: reviewer } = await app.asPerson("reviewer", programme);
    await reviewer.post(url).send(body).expect(403);
  });
});
