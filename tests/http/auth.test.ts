import supertest from "supertest";
import { beforeAll, describe, expect, test } from "vitest";
import { SESSION_COOKIE } from "#server/http/session.ts";
import { LIMITS } from "#shared/limits.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson, PASSWORD } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp({ isDemo: false });
});

/** A browser with nothing in it yet: its cookie jar fills as a person's would. */
const freshBrowser = async (): Promise<{ agent: Agent; token: string }> => {
  const agent = supertest.agent(on.app);
  const { body } = await agent.get("/api/session").expect(200);
  return { agent, token: body.session.csrfToken };
};

const signIn = async (email: string, password = PASSWORD) => {
  const { agent, token } = await freshBrowser();
  const answer = await agent.post("/api/session").set("X-CSRF-Token", token).send({ email, password });
  return { agent, answer, token: answer.body.session?.csrfToken as string };
};

const cookieOf = (answer: supertest.Response): string =>
  [answer.headers["set-cookie"]].flat().find((line) => line?.startsWith(`${SESSION_COOKIE}=`)) ?? "";

describe("signing in", () => {
  test("answers who is signed in and in which programmes, with which roles", async () => {
    const { person, programme } = await on.asPerson(["curator", "lead"]);
    const { answer } = await signIn(person.email.toUpperCase());
    expect(answer.status).toBe(200);
    expect(answer.body.session).toMatchObject({
      person: { id: person.id, email: person.email, theme: null },
      programmes: [{ id: programme.id, name: programme.name, roles: ["curator", "lead"] }],
      installation: { isDemo: false, hasMailbox: false },
    });
  });

  test("an unknown address and a wrong password are refused in the same words", async () => {
    const person = await buildPerson(on.deps.db);
    const wrong = await signIn(person.email, "not that pass phrase");
    const unknown = await signIn("nobody@example.org");
    expect(wrong.answer.status).toBe(401);
    expect(unknown.answer.status).toBe(401);
    expect(wrong.answer.text).toBe(unknown.answer.text);
  });

  test("someone deactivated or without a password cannot sign in", async () => {
    const out = await buildPerson(on.deps.db, { isActive: false });
    const invited = await buildPerson(on.deps.db, { passwordHash: null });
    expect((await signIn(out.email)).answer.status).toBe(401);
    expect((await signIn(invited.email)).answer.status).toBe(401);
  });

  test("the session is a new one: a planted id is worth nothing afterwards", async () => {
    const person = await buildPerson(on.deps.db);
    const planted = supertest.agent(on.app);
    const first = await planted.get("/api/session");
    const plantedCookie = cookieOf(first).split(";")[0] ?? "";
    const answer = await supertest(on.app)
      .post("/api/session")
      .set("Cookie", plantedCookie)
      .set("X-CSRF-Token", first.body.session.csrfToken)
      .send({ email: person.email, password: PASSWORD });
    expect(answer.status).toBe(200);
    expect(cookieOf(answer).split(";")[0]).not.toBe(plantedCookie);
    expect(answer.body.session.csrfToken).not.toBe(first.body.session.csrfToken);
    const old = await planted.get("/api/session");
    expect(old.body.session.person).toBeNull();
  });

  test("the cookie is out of reach of scripts and other sites, and the database holds only its hash", async () => {
    const person = await buildPerson(on.deps.db);
    const { answer } = await signIn(person.email);
    const cookie = cookieOf(answer);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    const id =
      decodeURIComponent(cookie.split(/[=;]/)[1] ?? "")
        .slice(2)
        .split(".")[0] ?? "";
    expect(id.length).toBeGreaterThan(20);
    const rows = await on.deps.db.query("SELECT * FROM session");
    expect(JSON.stringify(rows)).not.toContain(id);
  });
});

describe("signing out", () => {
  test("ends this session, and everywhere ends all of them", async () => {
    const person = await buildPerson(on.deps.db);
    const [one, two, three] = [
      await signIn(person.email),
      await signIn(person.email),
      await signIn(person.email),
    ];
    const isIn = async ({ agent }: { agent: Agent }) =>
      (await agent.get("/api/session")).body.session.person !== null;
    await one.agent.delete("/api/session").set("X-CSRF-Token", one.token).expect(204);
    expect([await isIn(one), await isIn(two), await isIn(three)]).toEqual([false, true, true]);
    await two.agent.delete("/api/sessions").set("X-CSRF-Token", two.token).expect(204);
    expect([await isIn(two), await isIn(three)]).toEqual([false, false]);
  });

  test("a session ends by itself after its time, and use prolongs it", async () => {
    const person = await buildPerson(on.deps.db);
    const { agent } = await on.as(person);
    const ownNow = on.deps.now;
    const days = (n: number) => () => new Date(Date.now() + n * 86_400_000);
    const isIn = async () => (await agent.get("/api/session")).body.session.person !== null;
    expect(await isIn()).toBe(true);
    on.deps.now = days(LIMITS.sessionDays - 1);
    expect(await isIn()).toBe(true);
    on.deps.now = days(2 * LIMITS.sessionDays - 2);
    expect(await isIn()).toBe(true);
    on.deps.now = days(3 * LIMITS.sessionDays);
    expect(await isIn()).toBe(false);
    on.deps.now = ownNow;
  });
});

describe("changes from elsewhere", () => {
  const rename = (agent: Agent | ReturnType<typeof supertest>) =>
    agent.patch("/api/me").send({ name: "New Name" });

  test("without the token, with another's or with none of a session nothing changes", async () => {
    const { agent, person } = await on.as(await buildPerson(on.deps.db));
    const other = await on.as(await buildPerson(on.deps.db));
    expect((await rename(agent).set("X-CSRF-Token", "")).body.error.code).toBe("stale-page");
    expect((await rename(agent).set("X-CSRF-Token", other.session.csrfToken)).status).toBe(403);
    expect((await rename(supertest(on.app)).set("X-CSRF-Token", "x")).status).toBe(401);
    expect((await agent.get("/api/session")).body.session.person.name).toBe(person.name);
  });

  test("a request from another origin is refused even with the token", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db));
    const foreign = await rename(agent).set("Origin", "https://elsewhere.example");
    expect([foreign.status, foreign.body.error.code]).toEqual([403, "foreign-origin"]);
    expect((await rename(agent).set("Origin", on.deps.config.publicUrl)).status).toBe(200);
  });
});

describe("changing the password", () => {
  const next = "another long pass phrase";

  test("needs the present one, ends the other sessions and keeps this one", async () => {
    const person = await buildPerson(on.deps.db);
    const [here, there] = [await on.as(person), await on.as(person)];
    const wrong = await here.agent.put("/api/me/password").send({ current: "wrong", next });
    expect([wrong.status, Object.keys(wrong.body.error.fields)]).toEqual([422, ["current"]]);
    expect((await there.agent.get("/api/session")).body.session.person).not.toBeNull();

    await here.agent.put("/api/me/password").send({ current: PASSWORD, next }).expect(204);
    expect((await here.agent.get("/api/session")).body.session.person).not.toBeNull();
    expect((await there.agent.get("/api/session")).body.session.person).toBeNull();
    expect((await signIn(person.email)).answer.status).toBe(401);
    expect((await signIn(person.email, next)).answer.status).toBe(200);
  });

  test("refuses a short one at its field", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db));
    const answer = await agent.put("/api/me/password").send({ current: PASSWORD, next: "short" });
    expect([answer.status, Object.keys(answer.body.error.fields)]).toEqual([400, ["next"]]);
  });
});

test("name and theme are kept", async () => {
  const { agent } = await on.as(await buildPerson(on.deps.db));
  const { body } = await agent
    .patch("/api/me")
    .send({ name: "Ada Somebody", theme: "dark-adapted" })
    .expect(200);
  expect(body.session.person).toMatchObject({ name: "Ada Somebody", theme: "dark-adapted" });
});
