import { setTimeout as wait } from "node:timers/promises";
import { afterAll } from "vitest";
import { runNextJob } from "#server/jobs/runner.ts";
import { startTestApp, type TestApp } from "./app.ts";

/** How often the worker looks for something to do. */
const IDLE_MS = 100;

const toStop: (() => Promise<void>)[] = [];
afterAll(async () => {
  for (const stop of toStop.splice(0)) await stop();
});

const work = async ({ deps }: TestApp, stopping: AbortSignal): Promise<void> => {
  while (!stopping.aborted) {
    if (!(await runNextJob(deps, stopping)))
      await wait(IDLE_MS, undefined, { signal: stopping }).catch(() => undefined);
  }
};

export interface LiveApp extends TestApp {
  url: string;
}

/** The application as people meet it: it listens, and a worker does what is queued. */
export const startLiveApp = async (): Promise<LiveApp> => {
  const app = await startTestApp();
  const url = await app.listen();
  const stopping = new AbortController();
  const worker = work(app, stopping.signal);
  toStop.push(async () => {
    stopping.abort();
    await worker;
  });
  return { ...app, url };
};
