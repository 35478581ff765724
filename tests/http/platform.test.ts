import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import supertest from "supertest";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { createApp } from "#server/app.ts";
import { createLog } from "#server/log.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildPerson, PASSWORD } from "#tests/support/factories.ts";

let on: TestApp;
beforeAll(async () => {
  on = await startTestApp({ isDemo: true, logLevel: "silent" });
});

describe("answers to what cannot be done", () => {
  test("an address of nothing is refused in the common shape", async () => {
    const answer = await supertest(on.app).get("/api/nothing-here");
    expect([answer.status, answer.body.error.code]).toEqual([404, "not-found"]);
    expect(answer.body.error.hint).toBeTruthy();
  });

  test("a body that is no JSON, or too large, is refused with what to do", async () => {
    const { agent } = await on.as(await buildPerson(on.deps.db));
    const patch = (text: string) => agent.patch("/api/me").set("Content-Type", "application/json").send(text);
    const broken = await patch('{"name": ');
    expect([broken.status, broken.body.error.code]).toEqual([400, "unreadable-request"]);
    const large = await patch(JSON.stringify({ name: "x".repeat(2_000_000) }));
    expect([large.status, large.body.error.code]).toEqual([413, "too-large"]);
    expect((await patch("[]")).status).toBe(400);
    expect((await patch('{"isInstallationAdministrator":true}')).status).toBe(400);
  });

  test("an odd address is refused and not a defect", async () => {
    const { agent } = await on.asPerson("lead");
    expect((await agent.get("/api/programmes/%E0%A4%A")).status).toBe(400);
  });

  test("a defect answers without its details and names the request in the log", async () => {
    const lines: string[] = [];
    const log = createLog("error", "test", { write: (line) => void lines.push(line) });
    const { agent: signedIn, session, programme } = { ...(await on.asPerson("lead")) };
    const app = createApp({ ...on.deps, log }).app;
    await on.deps.db.query("RENAME TABLE merit TO merit_away");
    const answer = await supertest(app)
      .get(`/api/programmes/${programme.id}`)
      .set("Cookie", `${session.cookie.name}=${session.cookie.value}`);
    await on.deps.db.query("RENAME TABLE merit_away TO merit");
    expect(answer.status).toBe(500);
    expect(answer.text).not.toMatch(/merit|SELECT|at .*\.ts/);
    const requestId = String(answer.headers["x-request-id"]);
    expect(answer.body.error.hint).toContain(requestId);
    expect(lines.join("")).toContain(requestId);
    expect((await signedIn.get(`/api/programmes/${programme.id}`)).status).toBe(200);
  });
});

describe("headers", () => {
  test("allow no script but our own files, no frame, and do not name the program's parts", async () => {
    const { headers } = await supertest(on.app).get("/api/health").expect(200);
    const policy = String(headers["content-security-policy"]);
    expect(policy).toContain("default-src 'self'");
    expect(policy).toContain("script-src 'self';");
    expect(policy).toContain("style-src 'self';");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/);
    expect(headers["x-powered-by"]).toBeUndefined();
    expect(headers["x-content-type-options"]).toBe("nosniff");
    expect(headers["cache-control"]).toBe("no-store");
  });

  test("behind https the cookie is for https alone", async () => {
    const config = { ...on.deps.config, publicUrl: "https://stars.example", trustedProxies: 1 };
    const { app } = createApp({ ...on.deps, config });
    const answer = await supertest(app).get("/api/session").set("X-Forwarded-Proto", "https");
    expect(String(answer.headers["set-cookie"])).toMatch(/Secure/);
    expect(String(answer.headers["strict-transport-security"])).toMatch(/max-age/);
  });
});

describe("the pages", () => {
  let folder: string;
  let request: ReturnType<typeof supertest>;
  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), "shortlight-client-"));
    mkdirSync(join(folder, "assets"));
    writeFileSync(join(folder, "index.html"), "<!doctype html><title>page</title>");
    writeFileSync(join(folder, "theme.js"), "document");
    writeFileSync(join(folder, "assets", "main-1a2b.js"), "code");
    const config = { ...on.deps.config, folders: { ...on.deps.config.folders, client: folder } };
    request = supertest(createApp({ ...on.deps, config }).app);
  });
  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  test("are the same page at every address of ours, asked for anew each time", async () => {
    for (const path of ["/", "/programmes/3/catalogue", "/invitations/abc"]) {
      const answer = await request.get(path).expect(200);
      expect(answer.text).toContain("<title>page</title>");
      expect(answer.headers["cache-control"]).toBe("no-cache");
    }
  });

  test("bring their files: those with a hash in their name for good, a missing one not as a page", async () => {
    expect((await request.get("/assets/main-1a2b.js")).headers["cache-control"]).toMatch(/immutable/);
    expect((await request.get("/theme.js")).headers["content-type"]).toMatch(/javascript/);
    expect((await request.get("/assets/gone-0000.js")).status).toBe(404);
    expect((await request.get("/../package.json")).status).toBe(404);
    expect((await request.get("/api/nothing")).headers["content-type"]).toMatch(/json/);
  });

  test("that are not built yet say so", async () => {
    const config = {
      ...on.deps.config,
      folders: { ...on.deps.config.folders, client: join(folder, "none") },
    };
    const answer = await supertest(createApp({ ...on.deps, config }).app).get("/");
    expect([answer.status, answer.text]).toEqual([503, expect.stringContaining("npm run build")]);
  });
});

test("no password, token, cookie or search text is in the log", async () => {
  const lines: string[] = [];
  const log = createLog("debug", "test", { write: (line) => void lines.push(line) });
  const deps = { ...on.deps, log };
  const { app } = createApp(deps);
  const person = await buildPerson(deps.db);
  const agent = supertest.agent(app);
  const first = await agent.get("/api/session?q=private-words");
  const csrf = first.body.session.csrfToken as string;
  const post = (path: string, body: object, token = csrf) =>
    agent.post(path).set("X-CSRF-Token", token).send(body);

  await post("/api/password-resets", { email: person.email }).expect(202);
  const [mail] = await deps.db.query<{ body: string }[]>("SELECT body FROM mail WHERE to_address = ?", [
    person.email,
  ]);
  const token = mail?.body.match(/\/([\w-]{43})$/m)?.[1] ?? "";
  expect(token).toHaveLength(43);
  await agent.get(`/password-resets/${token}`);
  await agent.get(`/api/password-resets/${token}`).expect(200);
  await post(`/api/password-resets/${token}`, { password: "tiny-secret" }).expect(400);
  await post("/api/session", { email: person.email, password: "a wrong secret phrase" }).expect(401);
  const signedIn = await post("/api/session", { email: person.email, password: PASSWORD }).expect(200);
  const cookie = decodeURIComponent(String(signedIn.headers["set-cookie"]).split(/[=;]/)[1] ?? "");

  const text = lines.join("");
  expect(text).toContain("POST /api/session");
  for (const secret of [
    PASSWORD,
    "tiny-secret",
    "a wrong secret phrase",
    token,
    csrf,
    cookie.slice(2, 30),
    "private-words",
    deps.config.sessionSecret,
  ])
    expect(text).not.toContain(secret);
});
