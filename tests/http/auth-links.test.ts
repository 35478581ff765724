import { beforeAll, describe, expect, test } from "vitest";
import { Mail } from "#server/database/entities/mail.entity.ts";
import { LIMITS } from "#shared/limits.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson, PASSWORD } from "#tests/support/factories.ts";

const NEW = "an entirely new pass phrase";
let on: TestApp;
beforeAll(async () => {
  on = await startTestApp({ isDemo: true });
});

const mailsTo = (email: string) =>
  on.deps.db.manager.find(Mail, { where: { to: email }, order: { id: "DESC" } });

const tokenIn = (mail: Mail | undefined): string => mail?.body.match(/\/([\w-]{43})$/m)?.[1] ?? "";

const askReset = async (email: string): Promise<string> => {
  await (await on.visitor()).post("/api/password-resets").send({ email }).expect(202);
  return tokenIn((await mailsTo(email))[0]);
};

const at = async <T>(milliseconds: number, work: () => Promise<T>): Promise<T> => {
  const ownNow = on.deps.now;
  on.deps.now = () => new Date(Date.now() + milliseconds);
  try {
    return await work();
  } finally {
    on.deps.now = ownNow;
  }
};

describe("a password reset", () => {
  test("is answered alike whether or not there is an account, and mails only where there is", async () => {
    const person = await buildPerson(on.deps.db);
    const visitor = await on.visitor();
    const known = await visitor.post("/api/password-resets").send({ email: person.email });
    const unknown = await visitor.post("/api/password-resets").send({ email: "nobody@example.org" });
    expect([known.status, known.text]).toEqual([202, unknown.text]);
    expect(unknown.status).toBe(202);
    expect(await mailsTo(person.email)).toHaveLength(1);
    expect(await mailsTo("nobody@example.org")).toHaveLength(0);
  });

  test("sets the password, signs in, ends other sessions, and works once", async () => {
    const person = await buildPerson(on.deps.db);
    const elsewhere = await on.as(person);
    const token = await askReset(person.email);
    const visitor = await on.visitor();
    const { body } = await visitor.get(`/api/password-resets/${token}`).expect(200);
    expect(body.link).toMatchObject({ purpose: "password-reset", email: person.email, programme: null });
    const done = await visitor.post(`/api/password-resets/${token}`).send({ password: NEW }).expect(200);
    expect(done.body.session.person.id).toBe(person.id);
    expect((await elsewhere.agent.get("/api/session")).body.session.person).toBeNull();
    const again = await (await on.visitor()).post(`/api/password-resets/${token}`).send({ password: NEW });
    expect([again.status, again.body.error.code]).toEqual([410, "link-used"]);
  });

  test("used twice at the same moment still works once", async () => {
    const person = await buildPerson(on.deps.db);
    const token = await askReset(person.email);
    const agents = await Promise.all([on.visitor(), on.visitor(), on.visitor()]);
    const answers = await Promise.all(
      agents.map((agent) => agent.post(`/api/password-resets/${token}`).send({ password: NEW })),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 410, 410]);
  });

  test("expires, and a newer link ends the older", async () => {
    const person = await buildPerson(on.deps.db);
    const older = await askReset(person.email);
    const newer = await askReset(person.email);
    const visitor = await on.visitor();
    const read = (token: string) => visitor.get(`/api/password-resets/${token}`);
    expect((await read(older)).body.error.code).toBe("link-withdrawn");
    await read(newer).expect(200);
    const late = await at(LIMITS.passwordResetHours * 3600_000 + 1000, () => read(newer));
    expect([late.status, late.body.error.code]).toEqual([410, "link-expired"]);
  });

  test("the database keeps only the token's hash, and a made-up token opens nothing", async () => {
    const person = await buildPerson(on.deps.db);
    const token = await askReset(person.email);
    expect(token).toHaveLength(43);
    expect(JSON.stringify(await on.deps.db.query("SELECT * FROM one_time_link"))).not.toContain(token);
    const visitor = await on.visitor();
    expect((await visitor.get(`/api/password-resets/${"x".repeat(43)}`)).status).toBe(404);
    expect((await visitor.get(`/api/invitations/${token}`)).status).toBe(404);
  });
});

describe("an invitation", () => {
  const invite = async (email: string, roles = ["scientist"]) => {
    const admin = await on.asPerson("administrator");
    const { body } = await admin.agent
      .post(`/api/programmes/${admin.programme.id}/invitations`)
      .send({ email, roles })
      .expect(201);
    return { ...admin, invitation: body.invitation, token: tokenIn((await mailsTo(email.toLowerCase()))[0]) };
  };

  test("makes an account for someone new, with the roles, and works once", async () => {
    const { programme, token } = await invite("New.Person@example.org");
    const visitor = await on.visitor();
    const { body } = await visitor.get(`/api/invitations/${token}`).expect(200);
    expect(body.link).toMatchObject({
      purpose: "invitation",
      email: "new.person@example.org",
      programme: programme.name,
      hasAccount: false,
    });
    const accepted = await visitor
      .post(`/api/invitations/${token}`)
      .send({ name: "New Person", password: NEW })
      .expect(200);
    expect(accepted.body.session.programmes).toMatchObject([{ id: programme.id, roles: ["scientist"] }]);
    const again = await (await on.visitor())
      .post(`/api/invitations/${token}`)
      .send({ name: "X", password: NEW });
    expect(again.body.error.code).toBe("link-used");
  });

  test("never sets the password of an account that exists; its owner joins signed in", async () => {
    const person = await buildPerson(on.deps.db);
    const { programme, token } = await invite(person.email, ["curator"]);
    const visitor = await on.visitor();
    expect((await visitor.get(`/api/invitations/${token}`)).body.link.hasAccount).toBe(true);
    const taken = await visitor.post(`/api/invitations/${token}`).send({ name: "Other", password: NEW });
    expect([taken.status, taken.body.error.code]).toEqual([409, "account-exists"]);
    expect(
      (await visitor.post("/api/session").send({ email: person.email, password: PASSWORD })).status,
    ).toBe(200);

    const stranger = await on.as(await buildPerson(on.deps.db));
    const wrong = await stranger.agent.post(`/api/invitations/${token}/join`);
    expect([wrong.status, wrong.body.error.code]).toEqual([409, "other-account"]);

    const { agent } = await on.as(person);
    const joined = await agent.post(`/api/invitations/${token}/join`).expect(200);
    expect(joined.body.session.programmes).toMatchObject([{ id: programme.id, roles: ["curator"] }]);
  });

  test("can be withdrawn, and then opens nothing", async () => {
    const { agent, programme, invitation, token } = await invite("withdrawn@example.org");
    await agent.delete(`/api/programmes/${programme.id}/invitations/${invitation.id}`).expect(204);
    expect((await (await on.visitor()).get(`/api/invitations/${token}`)).body.error.code).toBe(
      "link-withdrawn",
    );
    const { body } = await agent.get(`/api/programmes/${programme.id}/invitations`);
    expect(body.invitations).toMatchObject([{ email: "withdrawn@example.org", state: "withdrawn" }]);
  });

  test("of another programme cannot be withdrawn or seen", async () => {
    const { invitation } = await invite("elsewhere@example.org");
    const other = await on.asPerson("administrator");
    const path = `/api/programmes/${other.programme.id}/invitations`;
    expect((await other.agent.delete(`${path}/${invitation.id}`)).status).toBe(404);
    expect((await other.agent.get(path)).body.invitations).toEqual([]);
  });

  test("expires", async () => {
    const { token } = await invite("late@example.org");
    const visitor = await on.visitor();
    const late = await at((LIMITS.invitationDays + 1) * 86_400_000, async () => {
      const fresh = await visitor.get(`/api/invitations/${token}`);
      return fresh;
    });
    expect([late.status, late.body.error.code]).toEqual([410, "link-expired"]);
  });

  test("is refused where no mail can be sent, and for someone who is a member", async () => {
    const mute = await startTestApp({ isDemo: false, smtpUrl: null });
    const { agent, programme, person } = await mute.asPerson("administrator");
    const path = `/api/programmes/${programme.id}/invitations`;
    const answer = await agent.post(path).send({ email: "someone@example.org", roles: ["lead"] });
    expect([answer.status, answer.body.error.code]).toEqual([422, "mail-not-set-up"]);

    const { agent: same } = await on.as(person);
    const member = await same.post(path).send({ email: person.email, roles: ["lead"] });
    expect([member.status, member.body.error.code]).toEqual([409, "already-member"]);
  });
});
