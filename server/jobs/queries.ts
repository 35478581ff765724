import type { EntityManager } from "typeorm";
import { JobRow } from "../database/entities/job.entity.ts";
import { CATALOGUE_KINDS } from "./job-run.ts";

/** All times of jobs are the database's: workers on several machines need no common clock. */
const NOW = "UTC_TIMESTAMP(6)";
const LEASE_SECONDS = 30;
export const LEASE_UNTIL = `${NOW} + INTERVAL ${LEASE_SECONDS} SECOND`;

const NOT_BLOCKED = `NOT (j.kind IN (?) AND EXISTS (
  SELECT 1 FROM job b WHERE b.programme_id = j.programme_id AND b.job_id <> j.job_id
    AND b.kind IN (?) AND b.state = 'running'))`;

const lockFirst = async (tx: EntityManager, condition: string): Promise<string | undefined> => {
  const [row] = await tx.query<{ id: string }[]>(
    `SELECT j.job_id AS id FROM job j WHERE ${condition} AND ${NOT_BLOCKED}
     ORDER BY j.job_id LIMIT 1 FOR UPDATE SKIP LOCKED`,
    [CATALOGUE_KINDS, CATALOGUE_KINDS],
  );
  return row?.id;
};

/** Locks a job whose worker died, else the oldest that waits. */
export const lockNextJob = async (tx: EntityManager): Promise<JobRow | null> => {
  const id =
    (await lockFirst(tx, `j.state = 'running' AND j.lease_until < ${NOW}`)) ??
    (await lockFirst(tx, `j.state = 'queued' AND j.run_at <= ${NOW}`));
  return id === undefined ? null : tx.findOneBy(JobRow, { id });
};

/** Whether another catalogue job of the programme runs; the programme's row is locked so that only one may ask. */
export const isProgrammeBusy = async (tx: EntityManager, job: JobRow): Promise<boolean> => {
  await tx.query("SELECT programme_id FROM programme WHERE programme_id = ? FOR UPDATE", [job.programmeId]);
  const [row] = await tx.query<{ n: string }[]>(
    "SELECT COUNT(*) AS n FROM job WHERE programme_id = ? AND job_id <> ? AND kind IN (?) AND state = 'running'",
    [job.programmeId, job.id, CATALOGUE_KINDS],
  );
  return Number(row?.n) > 0;
};

export const takeLease = async (tx: EntityManager, id: string, owner: string): Promise<void> => {
  await tx.query(
    `UPDATE job SET state = 'running', lease_owner = ?, lease_until = ${LEASE_UNTIL}, attempts = attempts + 1,
       changed_at = ${NOW} WHERE job_id = ?`,
    [owner, id],
  );
};

interface Affected {
  affectedRows: number;
}

const held = "WHERE job_id = ? AND lease_owner = ? AND state = 'running'";

/** False when the lease is not this owner's any more. */
export const renewLease = async (manager: EntityManager, id: string, owner: string): Promise<boolean> => {
  const result = await manager.query<Affected>(`UPDATE job SET lease_until = ${LEASE_UNTIL} ${held}`, [
    id,
    owner,
  ]);
  return result.affectedRows > 0;
};

/** Whether a cancel was asked for; undefined when the lease is not this owner's any more. */
export const readCancel = async (
  manager: EntityManager,
  id: string,
  owner: string,
): Promise<boolean | undefined> => {
  const [row] = await manager.query<{ cancel: number }[]>(
    `SELECT cancel_requested AS cancel FROM job ${held}`,
    [id, owner],
  );
  return row && Boolean(row.cancel);
};

export const isLeaseHeld = async (tx: EntityManager, id: string, owner: string): Promise<boolean> => {
  const rows = await tx.query<unknown[]>(`SELECT job_id FROM job ${held} FOR UPDATE`, [id, owner]);
  return rows.length > 0;
};

export interface Progress {
  done: number;
  total: number | null;
  phase: string;
  unit: string;
}

export const writeProgress = async (
  manager: EntityManager,
  id: string,
  owner: string,
  p: Progress,
): Promise<boolean> => {
  const result = await manager.query<Affected>(
    `UPDATE job SET done = ?, total = ?, phase = ?, unit = ?, lease_until = ${LEASE_UNTIL}, changed_at = ${NOW} ${held}`,
    [p.done, p.total, p.phase, p.unit, id, owner],
  );
  return result.affectedRows > 0;
};

/** Back to the queue: the next attempt begins after that many seconds. */
export const requeue = async (
  manager: EntityManager,
  id: string,
  owner: string,
  seconds: number,
  isCounted: boolean,
): Promise<void> => {
  await manager.query(
    `UPDATE job SET state = 'queued', lease_owner = NULL, lease_until = NULL, changed_at = ${NOW},
       run_at = ${NOW} + INTERVAL ? SECOND, attempts = attempts - ? ${held}`,
    [seconds, isCounted ? 0 : 1, id, owner],
  );
};

export const endJob = async (
  tx: EntityManager,
  id: string,
  state: "done" | "failed" | "cancelled",
  failure: { message: string; hint?: string } | null,
): Promise<void> => {
  await tx.query(
    `UPDATE job SET state = ?, error_message = ?, error_hint = ?, lease_owner = NULL, lease_until = NULL,
       changed_at = ${NOW}, finished_at = ${NOW} WHERE job_id = ?`,
    [state, failure?.message ?? null, failure?.hint ?? null, id],
  );
};

export const askToCancel = async (tx: EntityManager, id: string): Promise<void> => {
  await tx.query(`UPDATE job SET cancel_requested = 1, changed_at = ${NOW} WHERE job_id = ?`, [id]);
};

export interface NewJobValues {
  programmeId: string | null;
  personId: string | null;
  kind: string;
  payload: Record<string, unknown>;
  subject: { type: string; id: string } | null;
  total?: number | null;
  unit?: string;
}

export const insertJob = async (tx: EntityManager, job: NewJobValues): Promise<string> => {
  const result = await tx.query<{ insertId: number | string }>(
    `INSERT INTO job (programme_id, person_id, kind, state, payload, subject_type, subject_id, total, unit,
       run_at, created_at, changed_at)
     VALUES (?, ?, ?, 'queued', ?, ?, ?, ?, ?, ${NOW}, ${NOW}, ${NOW})`,
    [
      job.programmeId,
      job.personId,
      job.kind,
      JSON.stringify(job.payload),
      job.subject?.type ?? null,
      job.subject?.id ?? null,
      job.total ?? null,
      job.unit ?? "",
    ],
  );
  return String(result.insertId);
};

const PAGE = 50;

export const jobsOf = (manager: EntityManager, programmeId: string, isActive: boolean): Promise<JobRow[]> => {
  const query = manager
    .createQueryBuilder(JobRow, "job")
    .where("job.programmeId = :programmeId", { programmeId });
  if (isActive) query.andWhere("job.state IN ('queued', 'running')");
  return query.orderBy("job.id", "DESC").limit(PAGE).getMany();
};

/** Jobs that changed in the last seconds: a little overlap, as a change shows only once it is committed. */
export const recentlyChanged = (
  manager: EntityManager,
  programmeId: string,
  seconds: number,
): Promise<JobRow[]> =>
  manager
    .createQueryBuilder(JobRow, "job")
    .where("job.programmeId = :programmeId", { programmeId })
    .andWhere(`job.changedAt >= ${NOW} - INTERVAL :seconds SECOND`, { seconds })
    .orderBy("job.id", "ASC")
    .limit(PAGE)
    .getMany();
