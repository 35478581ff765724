import type { Deps } from "#server/deps.ts";
import { runNextJob } from "#server/jobs/runner.ts";

/** Does what a worker would until its queue has nothing to do now; answers how many jobs that were. */
export const runJobs = async (deps: Deps): Promise<number> => {
  const never = new AbortController().signal;
  let jobs = 0;
  while (await runNextJob(deps, never)) jobs++;
  return jobs;
};
