import { beforeAll, expect, test } from "vitest";
import { removeExpired } from "#server/http/expired.ts";
import { makeInstallationAdministrator } from "#server/people/installation-administrator.ts";
import { LIMITS } from "#shared/limits.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson } from "#tests/support/factories.ts";

const NEW = "an entirely new pass phrase";
let on: TestApp;
beforeAll(async () => {
  on = await startTestApp();
});

test("the first administrator of an empty installation chooses a password by a link and can make a programme", async () => {
  const link = await makeInstallationAdministrator(on.deps, { email: " Chief@Example.org", name: "Chief" });
  const path = new URL(link).pathname;
  const visitor = on.visitor;
  const token = path.split("/").at(-1) ?? "";
  const { body } = await (await visitor())
    .post(`/api/password-resets/${token}`)
    .send({ password: NEW })
    .expect(200);
  expect(body.session.person).toMatchObject({
    email: "chief@example.org",
    isInstallationAdministrator: true,
  });
});

test("someone with an account becomes one too, keeping name and password", async () => {
  const person = await buildPerson(on.deps.db);
  const { agent } = await on.as(person);
  expect((await agent.post("/api/programmes").send({ name: "X" })).status).toBe(403);
  await makeInstallationAdministrator(on.deps, { email: person.email, name: "Another Name" });
  expect((await agent.post("/api/programmes").send({ name: "X" })).status).toBe(201);
  expect((await agent.get("/api/session")).body.session.person.name).toBe(person.name);
});

test("expired sessions are removed, others stay", async () => {
  const { agent } = await on.as(await buildPerson(on.deps.db));
  await removeExpired(on.deps);
  expect((await agent.get("/api/session")).body.session.person).not.toBeNull();
  const later = new Date(Date.now() + (LIMITS.sessionDays + 2) * 86_400_000);
  await removeExpired({ ...on.deps, now: () => later });
  const [row] = await on.deps.db.query<{ n: string }[]>("SELECT COUNT(*) AS n FROM session");
  expect(Number(row?.n)).toBe(0);
});
