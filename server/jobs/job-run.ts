import type { EntityManager } from "typeorm";
import type { z } from "zod";
import type { JOB_KINDS, job } from "#shared/api/jobs.ts";
import type { JobRow } from "../database/entities/job.entity.ts";
import type { Deps } from "../deps.ts";

export type JobKind = (typeof JOB_KINDS)[number];
export type Job = z.infer<typeof job>;

/** Someone asked for the job to stop; what it had prepared is cleaned up by its handler. */
export class JobCancelled extends Error {
  constructor() {
    super("The job was cancelled.");
    this.name = "JobCancelled";
  }
}

/** Another worker holds the job now, because this one's lease ran out: nothing more may be written for it. */
export class LeaseLost extends Error {
  constructor() {
    super("The lease on the job was lost.");
    this.name = "LeaseLost";
  }
}

/** The worker was told to stop; the job goes back to the queue. */
export class WorkerStopping extends Error {
  constructor() {
    super("The worker is stopping.");
    this.name = "WorkerStopping";
  }
}

/** One attempt at a job, as its handler sees it. */
export interface JobRun {
  deps: Deps;
  job: JobRow;
  /** Aborted with `JobCancelled`, `LeaseLost` or `WorkerStopping` as its reason. */
  signal: AbortSignal;
  /** Writes progress at most twice a second (at once when the phase changes); throws the signal's reason. */
  progress(done: number, total: number | null, phase: string, unit: string): Promise<void>;
  /** Call it in the transaction that makes the work visible: refuses when the lease is no longer held. */
  holdLease(tx: EntityManager): Promise<void>;
}

export interface Failure {
  message: string;
  hint?: string;
}

export type Handler = (run: JobRun) => Promise<void>;
/** What a job that will not be done leaves to put right in its subject, in the transaction that ends it. */
export type Aftermath = (tx: EntityManager, job: JobRow, failure: Failure | null) => Promise<void>;

/** Removes what attempts at a job left behind that nobody sees yet. */
export type Cleaner = (of: Pick<JobRun, "deps" | "job">) => Promise<void>;

/** Jobs that make catalogue editions: one at a time in a programme. */
export const CATALOGUE_KINDS: readonly JobKind[] = ["import-extract", "withdraw-extract", "recompute"];
