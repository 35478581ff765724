import { setTimeout as wait } from "node:timers/promises";
import { ConfigError, loadConfig } from "./config.ts";
import { closeDeps, createDeps, type Deps } from "./deps.ts";
import { runNextJob } from "./jobs/runner.ts";
import { createLog } from "./log.ts";

/** Jobs at a time in one worker: a long import does not keep a mail or a table waiting. */
const LOOPS = 2;
const IDLE_MS = 500;
const LONGEST_WAIT_MS = 30_000;
/** A job that does not let go by then is left to its lease. */
const GRACE_MS = 20_000;

const pause = async (ms: number, stopping: AbortSignal): Promise<void> => {
  await wait(ms, undefined, { signal: stopping }).catch(() => undefined);
};

/** Does one job after the other; while the database is away it asks again, ever more rarely. */
const work = async (deps: Deps, stopping: AbortSignal): Promise<void> => {
  let failures = 0;
  while (!stopping.aborted) {
    try {
      const found = await runNextJob(deps, stopping);
      failures = 0;
      if (!found) await pause(IDLE_MS, stopping);
    } catch (error) {
      failures++;
      deps.log.warn("job", "The worker could not take a job and will try again", { failures, error });
      await pause(Math.min(LONGEST_WAIT_MS, 500 * 2 ** failures), stopping);
    }
  }
};

const start = async (): Promise<void> => {
  const config = loadConfig(process.env);
  const log = createLog(config.logLevel, "worker");
  const stopping = new AbortController();
  const stop = (): void => {
    if (stopping.signal.aborted) return;
    stopping.abort();
    setTimeout(() => process.exit(0), GRACE_MS).unref();
  };
  process.once("SIGTERM", stop);
  process.once("SIGINT", stop);

  const deps = await createDeps(config, log);
  log.info("start", "The worker is ready");
  await Promise.all(Array.from({ length: LOOPS }, () => work(deps, stopping.signal)));
  await closeDeps(deps);
};

start().catch((error: unknown) => {
  console.error(error instanceof ConfigError || error instanceof Error ? error.message : String(error));
  process.exit(1);
});
