import { get } from "node:http";
import { afterEach, beforeAll, describe, expect, test } from "vitest";
import { JobRow } from "#server/database/entities/job.entity.ts";
import { AppError } from "#server/errors.ts";
import { HANDLERS } from "#server/jobs/handlers.ts";
import type { Handler, JobKind } from "#server/jobs/job-run.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { enqueueJob } from "#server/jobs/service.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { emptyDatabase } from "#tests/support/database.ts";
import { buildProgramme } from "#tests/support/factories.ts";

let app: TestApp;
const original = { ...HANDLERS };

beforeAll(async () => {
  app = await startTestApp({ logLevel: "silent" });
});
afterEach(async () => {
  Object.assign(HANDLERS, original);
  await emptyDatabase(app.deps.db);
});

const queue = (kind: JobKind, programmeId: string | null = null): Promise<JobRow> =>
  enqueueJob(app.deps.db.manager, { programmeId, personId: null, kind, payload: {}, subject: null });
const reload = (job: JobRow): Promise<JobRow> => app.deps.db.manager.findOneByOrFail(JobRow, { id: job.id });
const handle = (kind: JobKind, handler: Handler): void => {
  HANDLERS[kind] = handler;
};

describe("a job", () => {
  test("is done once, by one of two workers that ask at the same time", async () => {
    let runs = 0;
    handle("send-mail", async () => {
      runs++;
    });
    const job = await queue("send-mail");
    const found = await Promise.all([runNextJob(app.deps), runNextJob(app.deps)]);
    expect(found.filter(Boolean)).toHaveLength(1);
    expect(runs).toBe(1);
    expect(await reload(job)).toMatchObject({ state: "done", attempts: 1, leaseOwner: null });
  });

  test("whose worker died is taken up again once its lease ran out, and not before", async () => {
    handle("send-mail", async () => undefined);
    const job = await queue("send-mail");
    const lease = (interval: string) =>
      app.deps.db.query(
        `UPDATE job SET state = 'running', lease_owner = 'gone', attempts = 1, lease_until = UTC_TIMESTAMP(6) ${interval}`,
      );
    await lease("+ INTERVAL 10 SECOND");
    expect(await runNextJob(app.deps)).toBe(false);
    await lease("- INTERVAL 1 SECOND");
    expect(await runNextJob(app.deps)).toBe(true);
    expect(await reload(job)).toMatchObject({ state: "done", attempts: 2 });
  });

  test("whose worker died five times has failed, with words", async () => {
    const job = await queue("send-mail");
    await app.deps.db.query(
      "UPDATE job SET state = 'running', lease_owner = 'gone', attempts = 5, lease_until = UTC_TIMESTAMP(6) - INTERVAL 1 SECOND",
    );
    expect(await runNextJob(app.deps)).toBe(true);
    const ended = await reload(job);
    expect(ended.state).toBe("failed");
    expect(ended.errorMessage).toContain("5 times");
    expect(ended.errorHint).toBeTruthy();
  });

  test("that fails keeps what happened and what to do, and hides the words of a defect", async () => {
    handle("send-mail", async () => {
      throw new AppError(422, "x", "The file ends in the middle of a line.", { hint: "Send it again." });
    });
    const refused = await queue("send-mail");
    await runNextJob(app.deps);
    expect(await reload(refused)).toMatchObject({
      state: "failed",
      errorMessage: "The file ends in the middle of a line.",
      errorHint: "Send it again.",
    });
    handle("send-mail", async () => {
      throw new TypeError("x is undefined");
    });
    const broken = await queue("send-mail");
    await runNextJob(app.deps);
    expect((await reload(broken)).errorMessage).not.toContain("undefined");
  });

  test("that lost the database goes back to the queue", async () => {
    handle("send-mail", async () => {
      throw Object.assign(new Error("gone"), { code: "PROTOCOL_CONNECTION_LOST" });
    });
    const job = await queue("send-mail");
    await runNextJob(app.deps);
    expect(await reload(job)).toMatchObject({ state: "queued", attempts: 1 });
  });

  test("goes back to the queue, uncounted, when its worker is told to stop", async () => {
    const stopping = new AbortController();
    handle("send-mail", async (run) => {
      stopping.abort();
      await run.progress(1, 2, "Reading rows", "rows");
    });
    const job = await queue("send-mail");
    await runNextJob(app.deps, stopping.signal);
    expect(await reload(job)).toMatchObject({ state: "queued", attempts: 0 });
  });

  test("whose lease another worker took may not make its work visible", async () => {
    handle("send-mail", async (run) => {
      await run.deps.db.query("UPDATE job SET lease_owner = 'another'");
      await run.deps.db.transaction((tx) => run.holdLease(tx));
    });
    const job = await queue("send-mail");
    await runNextJob(app.deps);
    expect(await reload(job)).toMatchObject({ state: "running", leaseOwner: "another" });
  });
});

test("catalogue jobs run one at a time in a programme, and side by side in two", async () => {
  const [one, other] = [await buildProgramme(app.deps.db), await buildProgramme(app.deps.db)];
  let running = 0;
  let most = 0;
  const release: (() => void)[] = [];
  handle("recompute", async () => {
    most = Math.max(most, ++running);
    await new Promise<void>((resolve) => release.push(resolve));
    running--;
  });
  await queue("recompute", one.id);
  await queue("recompute", one.id);
  await queue("recompute", other.id);
  const first = runNextJob(app.deps);
  await expect.poll(() => running, { timeout: 10_000 }).toBe(1);
  const second = runNextJob(app.deps);
  await expect.poll(() => running, { timeout: 10_000 }).toBe(2);
  expect(await runNextJob(app.deps)).toBe(false);
  for (const go of release.splice(0)) go();
  await Promise.all([first, second]);
  const third = runNextJob(app.deps);
  await expect.poll(() => release.length, { timeout: 10_000 }).toBe(1);
  release[0]?.();
  expect(await third).toBe(true);
  expect(most).toBe(2);
});

describe("cancelling", () => {
  test("ends a waiting job at once and a running one within moments", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const url = `/api/programmes/${programme.id}/jobs`;
    const waiting = await queue("recompute", programme.id);
    const answer = await agent.post(`${url}/${waiting.id}/cancel`).expect(200);
    expect(answer.body.job).toMatchObject({ state: "cancelled", cancelRequested: true });

    handle("recompute", async (run) => {
      for (;;) {
        await run.progress(1, 10, "Deriving", "stars");
        await new Promise((resolve) => setTimeout(resolve, 20));
      }
    });
    const job = await queue("recompute", programme.id);
    const run = runNextJob(app.deps);
    await expect.poll(async () => (await reload(job)).phase).toBe("Deriving");
    await agent.post(`${url}/${job.id}/cancel`).expect(200);
    await run;
    expect(await reload(job)).toMatchObject({ state: "cancelled", errorMessage: null });
    const active = await agent.get(`${url}?active=true`).expect(200);
    expect(active.body.jobs).toEqual([]);
  });

  test("of another programme's job answers as if there were none", async () => {
    const { agent, programme } = await app.asPerson("curator");
    const other = await buildProgramme(app.deps.db);
    const job = await queue("recompute", other.id);
    await agent.get(`/api/programmes/${programme.id}/jobs/${job.id}`).expect(404);
    await agent.post(`/api/programmes/${programme.id}/jobs/${job.id}/cancel`).expect(404);
    expect((await reload(job)).state).toBe("queued");
  });
});

test("events tell of a job as it goes", async () => {
  const { programme, session } = await app.asPerson("reviewer");
  const address = await app.listen();
  handle("recompute", async (run) => run.progress(5, 10, "Deriving", "stars"));
  const seen = await new Promise<string>((resolve, reject) => {
    const request = get(
      `${address}/api/programmes/${programme.id}/events`,
      { headers: { Cookie: `${session.cookie.name}=${session.cookie.value}` } },
      (response) => {
        let text = "";
        expect(response.headers["content-type"]).toBe("text/event-stream");
        queue("recompute", programme.id)
          .then(() => runNextJob(app.deps))
          .catch(reject);
        response.on("data", (chunk: Buffer) => {
          text += chunk.toString();
          if (!text.includes('"state":"done"')) return;
          request.destroy();
          resolve(text);
        });
      },
    );
    request.on("error", () => undefined);
  });
  expect(seen).toContain("event: job");
  expect(seen).toContain('"phase":"Deriving"');
});
