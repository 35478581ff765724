import { beforeAll, describe, expect, test } from "vitest";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp();
});

describe("a programme", () => {
  test("is made by an installation administrator, who administers it", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
    const { body } = await agent.post("/api/programmes").send({ name: " Cool Neighbours " }).expect(201);
    expect(body.programme).toMatchObject({
      name: "Cool Neighbours",
      description: "",
      recipe: { name: "Default", number: 1 },
      edition: null,
      stars: 0,
      counts: { members: 1, extracts: 0 },
    });
    const session = (await agent.get("/api/session")).body.session;
    expect(session.programmes).toMatchObject([{ id: body.programme.id, roles: ["administrator"] }]);
  });

  test("is listed to its members alone", async () => {
    const { agent, programme } = await on.asPerson("guest");
    await on.asPerson("guest");
    const { body } = await agent.get("/api/programmes").expect(200);
    expect(body.programmes.map((each: { id: string }) => each.id)).toEqual([programme.id]);
  });

  test("is changed once from one version: the second of two editors is told what is in force", async () => {
    const { agent, programme } = await on.asPerson("lead");
    const path = `/api/programmes/${programme.id}`;
    const { version } = (await agent.get(path)).body.programme;
    const first = await agent.patch(path).send({ name: "First", version }).expect(200);
    expect(first.body.programme).toMatchObject({ name: "First", version: version + 1 });
    const second = await agent.patch(path).send({ name: "Second", version });
    expect([second.status, second.body.error.code]).toEqual([409, "changed-meanwhile"]);
    expect(second.body.error.details).toMatchObject({ name: "First", version: version + 1 });
    expect((await agent.get(path)).body.programme.name).toBe("First");
  });

  test("two editors at the same moment: one wins", async () => {
    const { agent, programme } = await on.asPerson("lead");
    const path = `/api/programmes/${programme.id}`;
    const { version } = (await agent.get(path)).body.programme;
    const answers = await Promise.all(
      ["A", "B", "C"].map((name) => agent.patch(path).send({ name, version })),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409]);
  });

  test("without a name is refused at the field", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db, { isInstallationAdministrator: true }));
    const { body } = await agent.post("/api/programmes").send({ name: "  " }).expect(400);
    expect(body.error.fields).toEqual({ name: "Give it a name." });
  });
});
