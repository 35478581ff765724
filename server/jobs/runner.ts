import { randomUUID } from "node:crypto";
import type { EntityManager } from "typeorm";
import { JobRow } from "../database/entities/job.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";
import { knownError } from "../http/known-errors.ts";
import { AFTERMATHS, CLEANERS, HANDLERS } from "./handlers.ts";
import {
  CATALOGUE_KINDS,
  type Failure,
  JobCancelled,
  type JobKind,
  type JobRun,
  LeaseLost,
  WorkerStopping,
} from "./job-run.ts";
import { keepLease } from "./lease.ts";
import {
  endJob,
  isLeaseHeld,
  isProgrammeBusy,
  lockNextJob,
  type Progress,
  requeue,
  takeLease,
  writeProgress,
} from "./queries.ts";

const MOST_ATTEMPTS = 5;
const WRITE_MS = 500;
const RETRY_SECONDS = 5;

const gaveUp = (): AppError =>
  new AppError(
    500,
    "gave-up",
    `The work was begun ${MOST_ATTEMPTS} times and each time its worker stopped before the end. Nothing has changed.`,
    { hint: "Tell whoever runs this installation to look at the worker's log, then begin it again." },
  );
const OUR_FAULT: Failure = {
  message: "The work stopped on a fault of the program. Nothing has changed.",
  hint: "Begin it again. If it stops once more, tell whoever runs this installation; the worker's log says where.",
};

interface Claim {
  job: JobRow;
  owner: string;
}

const settle = async (
  tx: EntityManager,
  job: JobRow,
  state: "failed" | "cancelled",
  failure: Failure | null,
): Promise<void> => {
  await endJob(tx, job.id, state, failure);
  await AFTERMATHS[job.kind as JobKind]?.(tx, job, failure);
};

/** Takes the next job; null when there is nothing to do now. */
const claim = (deps: Deps): Promise<Claim | null> =>
  inTransaction(
    deps.db,
    async (tx) => {
      const job = await lockNextJob(tx);
      if (!job) return null;
      if (CATALOGUE_KINDS.includes(job.kind as JobKind) && (await isProgrammeBusy(tx, job))) return null;
      const owner = randomUUID();
      await takeLease(tx, job.id, owner);
      return { job: await tx.findOneByOrFail(JobRow, { id: job.id }), owner };
    },
    "READ COMMITTED",
  );

const startRun = (deps: Deps, { job, owner }: Claim, controller: AbortController): JobRun => {
  let writtenAt = 0;
  let phase = "";
  const write = async (p: Progress): Promise<void> => {
    writtenAt = Date.now();
    phase = p.phase;
    if (!(await writeProgress(deps.db.manager, job.id, owner, p))) controller.abort(new LeaseLost());
  };
  return {
    deps,
    job,
    signal: controller.signal,
    progress: async (done, total, phaseNow, unit) => {
      controller.signal.throwIfAborted();
      if (phaseNow !== phase || Date.now() - writtenAt >= WRITE_MS)
        await write({ done, total, phase: phaseNow, unit });
      controller.signal.throwIfAborted();
    },
    holdLease: async (tx) => {
      if (!(await isLeaseHeld(tx, job.id, owner))) throw new LeaseLost();
    },
  };
};

/** What a failed attempt leads to: another attempt, or the end with words for the person who asked for it. */
const afterFailure = async (deps: Deps, { job, owner }: Claim, error: unknown): Promise<void> => {
  if (error instanceof LeaseLost) return;
  if (error instanceof WorkerStopping) return requeue(deps.db.manager, job.id, owner, 0, false);
  const known = knownError(error);
  if (known?.code === "database-unavailable" && job.attempts < MOST_ATTEMPTS) {
    deps.log.warn("job", "A job lost the database and will be tried again", { job: job.id, error });
    return requeue(deps.db.manager, job.id, owner, RETRY_SECONDS, true);
  }
  const isCancel = error instanceof JobCancelled;
  if (!isCancel) deps.log.error("job", "A job failed", { job: job.id, kind: job.kind, error });
  const failure = isCancel ? null : known ? { message: known.message, hint: known.hint } : OUR_FAULT;
  await inTransaction(deps.db, async (tx) => {
    if (await isLeaseHeld(tx, job.id, owner))
      await settle(tx, job, isCancel ? "cancelled" : "failed", failure);
  });
};

/**
 * Puts an end to a job that was tried too often. What its attempts left goes first, while the lease still keeps
 * other jobs out of the programme.
 */
const giveUp = async (deps: Deps, job: JobRow): Promise<never> => {
  await CLEANERS[job.kind as JobKind]?.({ deps, job }).catch((error: unknown) =>
    deps.log.warn("job", "What a job left is not removed yet", { job: job.id, error }),
  );
  throw gaveUp();
};

const attempt = async (deps: Deps, claimed: Claim, stopping?: AbortSignal): Promise<void> => {
  const { job, owner } = claimed;
  const controller = new AbortController();
  const onStop = (): void => controller.abort(new WorkerStopping());
  stopping?.addEventListener("abort", onStop, { once: true });
  if (job.cancelRequested) controller.abort(new JobCancelled());
  const letGo = keepLease(deps, job, owner, controller);
  try {
    if (job.attempts > MOST_ATTEMPTS) await giveUp(deps, job);
    await HANDLERS[job.kind as JobKind](startRun(deps, claimed, controller));
    await inTransaction(deps.db, async (tx) => {
      if (await isLeaseHeld(tx, job.id, owner)) await endJob(tx, job.id, "done", null);
    });
  } catch (error) {
    // A stream that was torn down reports its own error: the reason why it was is the one that counts.
    await afterFailure(deps, claimed, controller.signal.aborted ? controller.signal.reason : error);
  } finally {
    letGo();
    stopping?.removeEventListener("abort", onStop);
  }
};

/** Runs the next job there is; false when there was none to run now. `stopping` sends the job back to the queue. */
export const runNextJob = async (deps: Deps, stopping?: AbortSignal): Promise<boolean> => {
  const claimed = await claim(deps);
  if (!claimed) return false;
  await attempt(deps, claimed, stopping);
  return true;
};
