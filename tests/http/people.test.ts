import { beforeAll, describe, expect, test } from "vitest";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildMember, buildPerson } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp();
});

describe("members", () => {
  test("are listed by name with their roles", async () => {
    const { agent, programme, person } = await on.asPerson("reviewer");
    const { person: other } = await buildMember(on.deps.db, { roles: ["lead", "curator"], programme });
    const { body } = await agent.get(`/api/programmes/${programme.id}/members`).expect(200);
    expect(body.members).toMatchObject([
      { person: { id: person.id, email: person.email }, roles: ["reviewer"], state: "active" },
      { person: { id: other.id }, roles: ["lead", "curator"] },
    ]);
  });

  test("get other roles, each once, and the change is in force with the next request", async () => {
    const { agent, programme } = await on.asPerson("administrator");
    const member = await on.asPerson("guest", programme);
    const logbook = () => member.agent.get(`/api/programmes/${programme.id}/logbook`);
    expect((await logbook()).status).toBe(403);
    const { body } = await agent
      .patch(`/api/programmes/${programme.id}/members/${member.person.id}`)
      .send({ roles: ["lead", "scientist", "lead"] })
      .expect(200);
    expect(body.member.roles).toEqual(["scientist", "lead"]);
    expect((await logbook()).body.lines[0]).toMatchObject({
      action: "member.edit",
      before: { roles: ["guest"] },
      after: { roles: ["scientist", "lead"] },
    });
  });

  test("of no role or an unknown one are refused", async () => {
    const { agent, programme, person } = await on.asPerson("administrator");
    const path = `/api/programmes/${programme.id}/members/${person.id}`;
    expect((await agent.patch(path).send({ roles: [] })).status).toBe(400);
    expect((await agent.patch(path).send({ roles: ["owner"] })).status).toBe(400);
  });

  test("may leave by themselves, and are strangers then", async () => {
    const { programme } = await on.asPerson("administrator");
    const { agent } = await on.asPerson("guest", programme);
    await agent.delete(`/api/programmes/${programme.id}/members/me`).expect(204);
    expect((await agent.get(`/api/programmes/${programme.id}`)).status).toBe(404);
  });

  test("of another programme are out of reach", async () => {
    const { agent, programme } = await on.asPerson("administrator");
    const elsewhere = await on.asPerson("guest");
    const path = `/api/programmes/${programme.id}/members/${elsewhere.person.id}`;
    expect((await agent.delete(path)).status).toBe(404);
    expect((await elsewhere.agent.get(`/api/programmes/${elsewhere.programme.id}`)).status).toBe(200);
  });
});

describe("the last administrator", () => {
  test("can neither leave nor lose the role, and is told what to do", async () => {
    const { agent, programme, person } = await on.asPerson(["administrator", "lead"]);
    await buildMember(on.deps.db, { roles: ["lead"], programme });
    const out = await buildPerson(on.deps.db, { isActive: false });
    await buildMember(on.deps.db, { roles: ["administrator"], programme, person: out });
    const path = `/api/programmes/${programme.id}/members`;
    for (const answer of [
      await agent.delete(`${path}/me`),
      await agent.delete(`${path}/${person.id}`),
      await agent.patch(`${path}/${person.id}`).send({ roles: ["lead"] }),
    ]) {
      expect([answer.status, answer.body.error.code]).toEqual([409, "last-administrator"]);
      expect(answer.body.error.hint).toMatch(/Give the role Administrator to someone else/);
    }
  });

  test("stays even when two administrators leave at the same moment", async () => {
    const one = await on.asPerson("administrator");
    const two = await on.asPerson("administrator", one.programme);
    const path = `/api/programmes/${one.programme.id}/members/me`;
    const answers = await Promise.all([one.agent.delete(path), two.agent.delete(path)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([204, 409]);
  });
});
