import type { EntityManager } from "typeorm";
import { JobRow } from "../database/entities/job.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { writeLine } from "../logbook/service.ts";
import type { Aftermath, JobKind } from "./job-run.ts";
import { askToCancel, endJob, insertJob, jobsOf, type NewJobValues } from "./queries.ts";

export interface NewJob extends NewJobValues {
  kind: JobKind;
}

/** Queues work in the transaction that asks for it: both happen or neither. */
export const enqueueJob = async (tx: EntityManager, job: NewJob): Promise<JobRow> =>
  tx.findOneByOrFail(JobRow, { id: await insertJob(tx, job) });

export const findJobs = (deps: Deps, programmeId: string, isActive: boolean): Promise<JobRow[]> =>
  jobsOf(deps.db.manager, programmeId, isActive);

export const findJob = async (deps: Deps, programmeId: string, id: string): Promise<JobRow> => {
  const job = /^\d{1,19}$/.test(id) ? await deps.db.manager.findOneBy(JobRow, { id, programmeId }) : null;
  if (!job) throw notFound("This job");
  return job;
};

/** The newest job that works on that thing, whatever became of it. */
export const newestJobOf = (
  manager: EntityManager,
  programmeId: string,
  subject: { type: string; id: string },
): Promise<JobRow | null> =>
  manager.findOne(JobRow, {
    where: { programmeId, subjectType: subject.type, subjectId: subject.id },
    order: { id: "DESC" },
  });

/** A job that waits ends at once; one that runs is told, and ends within moments. One that ended stays as it is. */
export const cancelJob = async (
  deps: Deps,
  programmeId: string,
  person: { id: string; name: string },
  id: string,
  aftermathOf: (kind: string) => Aftermath | undefined,
): Promise<JobRow> => {
  await findJob(deps, programmeId, id);
  await inTransaction(deps.db, async (tx) => {
    const job = await tx.findOne(JobRow, { where: { id, programmeId }, lock: { mode: "pessimistic_write" } });
    if (!job || job.cancelRequested || (job.state !== "queued" && job.state !== "running")) return;
    await askToCancel(tx, id);
    if (job.state === "queued") {
      await endJob(tx, id, "cancelled", null);
      await aftermathOf(job.kind)?.(tx, job, null);
    }
    await writeLine(tx, {
      programmeId,
      person,
      action: "job.cancel",
      subject: { type: "job", id, name: job.kind },
      at: deps.now(),
    });
  });
  return findJob(deps, programmeId, id);
};
