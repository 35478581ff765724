import supertest from "supertest";
import type { DataSource } from "typeorm";
import { afterAll, beforeAll, expect, test } from "vitest";
import { createApp } from "#server/app.ts";
import { createDataSource } from "#server/database/data-source.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { testDatabaseUrl } from "#tests/support/database.ts";
import { DatabaseLine } from "#tests/support/database-line.ts";

let on: TestApp;
let line: DatabaseLine;
let db: DataSource;
beforeAll(async () => {
  on = await startTestApp({ logLevel: "silent" });
  const url = new URL(testDatabaseUrl());
  line = new DatabaseLine({ host: url.hostname, port: Number(url.port) });
  await line.mend();
  url.port = String(line.port);
  db = await createDataSource(url.href, 3).initialize();
});
afterAll(async () => {
  await db.destroy();
  await line.cut();
});

test("while the database is away every request says so and what to do; afterwards all goes on by itself", async () => {
  const { session, programme } = await on.asPerson("lead");
  const { app } = createApp({ ...on.deps, db });
  const read = () =>
    supertest(app)
      .get(`/api/programmes/${programme.id}`)
      .set("Cookie", `${session.cookie.name}=${session.cookie.value}`);
  expect((await read()).status).toBe(200);

  await line.cut();
  for (let n = 0; n < 4; n++) {
    const answer = await read();
    expect([answer.status, answer.body.error.code]).toEqual([503, "database-unavailable"]);
    expect(answer.body.error.hint).toMatch(/Try again/);
  }
  expect((await supertest(app).get("/api/health")).status).toBe(503);

  await line.mend();
  expect((await read()).status).toBe(200);
});
