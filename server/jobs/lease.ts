import type { JobRow } from "../database/entities/job.entity.ts";
import type { Deps } from "../deps.ts";
import { JobCancelled, LeaseLost } from "./job-run.ts";
import { readCancel, renewLease } from "./queries.ts";

const LOOK_MS = 1_000;
const RENEW_EVERY = 5;

/**
 * Keeps the lease while the handler works and looks for a cancel each second. A database that does not answer is
 * not the end: the handler meets that itself, and the lease runs out by the database's own clock.
 */
export const keepLease = (
  deps: Deps,
  job: JobRow,
  owner: string,
  controller: AbortController,
): (() => void) => {
  let ticks = 0;
  let isLooking = false;
  const look = async (): Promise<void> => {
    ticks++;
    const isHeld = ticks % RENEW_EVERY !== 0 || (await renewLease(deps.db.manager, job.id, owner));
    const cancel = isHeld ? await readCancel(deps.db.manager, job.id, owner) : undefined;
    if (cancel === undefined) controller.abort(new LeaseLost());
    else if (cancel) controller.abort(new JobCancelled());
  };
  const timer = setInterval(() => {
    if (isLooking || controller.signal.aborted) return;
    isLooking = true;
    look()
      .catch((error: unknown) => deps.log.warn("job", "The lease could not be looked after", { error }))
      .finally(() => {
        isLooking = false;
      });
  }, LOOK_MS);
  return () => clearInterval(timer);
};
