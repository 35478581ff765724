import { beforeAll, describe, expect, test } from "vitest";
import { LogbookLine } from "#server/database/entities/logbook-line.entity.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});

const body = {
  name: "Cool and quiet",
  note: "",
  cuts: [{ label: "cool", expression: "teff < 3900", blanks: "drop" }],
};

describe("a selection", () => {
  test("is saved in versions, and every version stays", async () => {
    const { agent, programme, person } = await app.asPerson("scientist");
    const url = `/api/programmes/${programme.id}/selections`;
    const first = (await agent.post(url).send(body).expect(201)).body.selection;
    expect(first).toMatchObject({ ...body, number: 1, savedBy: { id: person.id } });
    const changed = { ...body, name: "Cooler", cuts: [], number: 1 };
    const second = (await agent.put(`${url}/${first.id}`).send(changed).expect(200)).body.selection;
    expect(second).toMatchObject({ id: first.id, number: 2, name: "Cooler", cuts: [] });
    const { selections } = (await agent.get(url).expect(200)).body;
    expect(selections).toEqual([second]);
    const old = await agent.get(`${url}/versions/${first.versionId}`).expect(200);
    expect(old.body.selection).toEqual(first);
    const lines = await app.deps.db.manager.findBy(LogbookLine, { programmeId: programme.id });
    expect(lines.map((l) => l.action)).toEqual(["selection.make", "selection.save"]);
  });

  test("saved by two people at once keeps the first, and tells the second", async () => {
    const { agent, programme } = await app.asPerson("lead");
    const { agent: other } = await app.asPerson("curator", programme);
    const url = `/api/programmes/${programme.id}/selections`;
    const { selection } = (await agent.post(url).send(body).expect(201)).body;
    await other
      .put(`${url}/${selection.id}`)
      .send({ ...body, name: "Theirs", number: 1 })
      .expect(200);
    const late = await agent
      .put(`${url}/${selection.id}`)
      .send({ ...body, name: "Mine", number: 1 })
      .expect(409);
    expect(late.body.error.details).toMatchObject({ number: 2 });
    expect((await agent.get(url)).body.selections[0].name).toBe("Theirs");
  });

  test("with a cut that cannot be read is not saved, and the cut is named", async () => {
    const { agent, programme } = await app.asPerson("scientist");
    const url = `/api/programmes/${programme.id}/selections`;
    const cuts = [...body.cuts, { label: "", expression: "tef < 3900", blanks: "drop" }];
    const { error } = (
      await agent
        .post(url)
        .send({ ...body, cuts })
        .expect(422)
    ).body;
    expect(error.fields).toEqual({ "cuts.1.expression": "There is no column tef. Did you mean teff?" });
    expect((await agent.get(url)).body.selections).toEqual([]);
  });

  test("of another programme is not there, and who may only read cannot save", async () => {
    const { agent, programme } = await app.asPerson("scientist");
    const url = `/api/programmes/${programme.id}/selections`;
    const { selection } = (await agent.post(url).send(body).expect(201)).body;
    const { agent: stranger, programme: theirs } = await app.asPerson("scientist");
    const other = `/api/programmes/${theirs.id}/selections`;
    await stranger.get(`${other}/versions/${selection.versionId}`).expect(404);
    await stranger
      .put(`${other}/${selection.id}`)
      .send({ ...body, number: 1 })
      .expect(404);
    await stranger.get(url).expect(404);
    const { agent: reviewer } = await app.asPerson("reviewer", programme);
    await reviewer.get(url).expect(200);
    await reviewer.post(url).send(body).expect(403);
    const { agent: guest } = await app.asPerson("guest", programme);
    await guest.get(url).expect(403);
  });
});
