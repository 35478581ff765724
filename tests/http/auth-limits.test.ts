import { beforeAll, expect, test } from "vitest";
import { LIMITS } from "#shared/limits.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson, PASSWORD } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp({ rateLimits: true });
});

const attempt = (agent: Agent, email: string, password: string) =>
  agent.post("/api/session").send({ email, password });

test("too many wrong passwords stop an account for a while, which is said in words; others go on", async () => {
  const [person, other] = [await buildPerson(on.deps.db), await buildPerson(on.deps.db)];
  const agent = await on.visitor();
  for (let n = 0; n < LIMITS.signInAttempts; n++)
    expect((await attempt(agent, person.email, "wrong")).status).toBe(401);

  const stopped = await attempt(agent, person.email, PASSWORD);
  expect(stopped.status).toBe(429);
  expect(stopped.body.error.hint).toMatch(/^Wait 1[45] minutes/);
  expect(Number(stopped.headers["retry-after"])).toBeGreaterThan(600);
  expect((await attempt(await on.visitor(), other.email, PASSWORD)).status).toBe(200);

  // Another process of the same installation counts the same attempts.
  const elsewhere = await startTestApp({ rateLimits: true });
  expect((await attempt(await elsewhere.visitor(), person.email, PASSWORD)).status).toBe(429);

  const ownNow = on.deps.now;
  on.deps.now = () => new Date(Date.now() + (LIMITS.signInWindowMinutes + 1) * 60_000);
  expect((await attempt(await on.visitor(), person.email, PASSWORD)).status).toBe(200);
  on.deps.now = ownNow;
});

test("signing in often is not held against anyone", async () => {
  const person = await buildPerson(on.deps.db);
  for (let n = 0; n < LIMITS.signInAttempts + 2; n++)
    expect((await attempt(await on.visitor(), person.email, PASSWORD)).status).toBe(200);
});

test("guessing the present password from an open session is limited too", async () => {
  const { agent } = await on.as(await buildPerson(on.deps.db));
  const guess = () =>
    agent.put("/api/me/password").send({ current: "wrong", next: "a new long pass phrase" });
  for (let n = 0; n < LIMITS.signInAttempts; n++) expect((await guess()).status).toBe(422);
  expect((await guess()).status).toBe(429);
});
