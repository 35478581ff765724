import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { setTimeout as wait } from "node:timers/promises";
import { afterEach, beforeAll, describe, expect, test } from "vitest";
import { ROOT } from "#scripts/lib/root.ts";
import { createDataSource } from "#server/database/data-source.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { runNextJob } from "#server/jobs/runner.ts";
import { acceptedKey } from "#shared/catalogue/answers.ts";
import { type Agent, startTestApp, type TestApp } from "#tests/support/app.ts";
import { testDatabaseUrl } from "#tests/support/database.ts";
import { DatabaseLine } from "#tests/support/database-line.ts";
import { bringIn, commit, extractsUrl, receive, runJobs } from "#tests/support/extracts.ts";
import { buildProgramme } from "#tests/support/factories.ts";

const ROWS = 60_000;
const LOOK_MS = 20;

let app: TestApp;
const workers: ChildProcess[] = [];
beforeAll(async () => {
  app = await startTestApp({ logLevel: "silent" });
});
afterEach(() => {
  for (const worker of workers.splice(0)) worker.kill("SIGKILL");
});

const HEADER = "source_id,ra,dec,epoch,plx,e_plx,Ks\n";
const rowsOf = (from: number, n: number): string =>
  Array.from(
    { length: n },
    (_, i) =>
      `${from + i},${((i * 97) % 350) + 0.5},${(i % 80) + 0.25},2016,${10 + (i % 50)},${0.1 + (i % 7) / 100},${9.5 + (i % 11) / 10}\n`,
  ).join("");

/** A worker as it runs in an installation: a process of its own. */
const startWorker = (): ChildProcess => {
  const worker = spawn(process.execPath, ["--import", "tsx", "server/worker.ts"], {
    cwd: ROOT,
    stdio: "ignore",
    env: {
      ...process.env,
      TSX_TSCONFIG_PATH: "server/tsconfig.json",
      DATABASE_URL: testDatabaseUrl(),
      SHORTLIGHT_VAR: app.deps.config.folders.var,
      SHORTLIGHT_SESSION_SECRET: "a secret for tests alone, long enough",
      SHORTLIGHT_LOG_LEVEL: "silent",
    },
  });
  workers.push(worker);
  return worker;
};

interface Counts {
  edition: number;
  stars: string;
  entries: string;
  refused: string;
}

const countsOf = async ({ id }: Programme): Promise<Counts> => {
  const [row] = await app.deps.db.query<Counts[]>(
    `SELECT edition, (SELECT COUNT(*) FROM star s WHERE s.programme_id = p.programme_id) AS stars,
       (SELECT COUNT(*) FROM entry e WHERE e.programme_id = p.programme_id) AS entries,
       (SELECT COUNT(*) FROM refused_row r JOIN extract x USING (extract_id) WHERE x.programme_id = p.programme_id) AS refused
     FROM programme p WHERE programme_id = ?`,
    [id],
  );
  if (!row) throw new Error("The programme is gone.");
  return row;
};

/** A programme with a few stars, and a large extract whose import is queued. */
const queued = async () => {
  const programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  const { agent } = await app.asPerson("curator", programme);
  await bringIn(app.deps, agent, programme, `${HEADER}${rowsOf(1, 3)}`);
  const before = await countsOf(programme);
  const received = await receive(
    agent,
    programme,
    `${HEADER}9,101,95,2016,20,0.1,9.5\n${rowsOf(1_000_000, ROWS)}`,
  );
  const { job } = await commit(agent, programme, received, {
    accepted: received.preview.findings.map(acceptedKey),
  });
  return { programme, agent, before, job, extractId: received.extract.id };
};

const until = async (isSo: () => Promise<boolean>): Promise<void> => {
  while (!(await isSo())) await wait(LOOK_MS);
};

const phaseOf = async (jobId: string): Promise<{ phase: string; done: number; state: string }> => {
  const [row] = await app.deps.db.query("SELECT phase, done, state FROM job WHERE job_id = ?", [jobId]);
  return row;
};

const stateOf = async (agent: Agent, programme: Programme, id: string) =>
  (await agent.get(`${extractsUrl(programme)}/${id}`).expect(200)).body.extract;

const expireLease = (jobId: string): Promise<unknown> =>
  app.deps.db.query(
    "UPDATE job SET lease_until = UTC_TIMESTAMP(6) - INTERVAL 1 SECOND, run_at = UTC_TIMESTAMP(6) WHERE job_id = ?",
    [jobId],
  );

/** Ends the worker's process in the middle of that phase, with no chance to tidy up. */
const killIn = async (phase: string, jobId: string): Promise<void> => {
  const worker = startWorker();
  await until(async () => {
    const now = await phaseOf(jobId);
    if (now.state === "done") throw new Error("The job was done before it could be stopped.");
    return now.phase === phase && now.done > 0;
  });
  worker.kill("SIGKILL");
  await once(worker, "exit");
};

describe("an import whose process is killed", () => {
  test.each(["Reading rows", "Deriving"])(
    "while %s leaves the catalogue as it was, and another worker brings it to its end",
    async (phase) => {
      const { programme, agent, before, job, extractId } = await queued();
      await killIn(phase, job.id);
      expect((await countsOf(programme)).edition).toBe(before.edition);
      await expireLease(job.id);
      await runJobs(app.deps);
      expect(await stateOf(agent, programme, extractId)).toMatchObject({
        state: "committed",
        newStars: ROWS,
        rows: { read: ROWS + 1, accepted: ROWS, refused: 1, skipped: 0 },
      });
      expect(await countsOf(programme)).toEqual({
        edition: before.edition + 1,
        stars: String(ROWS + 3),
        entries: String(ROWS + 3),
        refused: "1",
      });
    },
  );

  test("and is cancelled then is gone without a trace", async () => {
    const { programme, agent, before, job, extractId } = await queued();
    await killIn("Reading rows", job.id);
    await agent
      .post(`/api/programmes/${programme.id}/jobs/${job.id}/cancel`)
      .expect((r) => expect(r.status).toBeLessThan(300));
    await expireLease(job.id);
    await runJobs(app.deps);
    expect(await stateOf(agent, programme, extractId)).toMatchObject({ state: "planning", failure: null });
    expect(await countsOf(programme)).toEqual(before);
  });
});

test("an import that loses its database is taken up again, and comes out the same", async () => {
  const { programme, agent, before, job, extractId } = await queued();
  const url = new URL(testDatabaseUrl());
  const line = new DatabaseLine({ host: url.hostname, port: Number(url.port) });
  await line.mend();
  url.port = String(line.port);
  const db = await createDataSource(url.href, 4).initialize();
  const attempt = runNextJob({ ...app.deps, db }).catch(() => undefined);
  await until(async () => {
    const now = await phaseOf(job.id);
    return now.phase === "Reading rows" && now.done > 0;
  });
  await line.cut();
  await attempt;
  expect((await countsOf(programme)).edition).toBe(before.edition);
  await expireLease(job.id);
  await runJobs(app.deps);
  await db.destroy().catch(() => undefined);
  expect(await stateOf(agent, programme, extractId)).toMatchObject({ state: "committed", newStars: ROWS });
  expect((await countsOf(programme)).entries).toBe(String(ROWS + 3));
});

test("a cancel in the middle of a file leaves nothing behind", async () => {
  const { programme, agent, before, job } = await queued();
  const attempt = runNextJob(app.deps);
  await until(async () => (await phaseOf(job.id)).phase === "Reading rows");
  await agent
    .post(`/api/programmes/${programme.id}/jobs/${job.id}/cancel`)
    .expect((r) => expect(r.status).toBeLessThan(300));
  await attempt;
  expect((await phaseOf(job.id)).state).toBe("cancelled");
  expect(await countsOf(programme)).toEqual(before);
});
