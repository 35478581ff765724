import type { JobRow } from "../database/entities/job.entity.ts";
import type { Job, JobKind } from "./job-run.ts";

export const presentJob = (row: JobRow): Job => ({
  id: row.id,
  kind: row.kind as JobKind,
  state: row.state,
  phase: row.phase,
  done: row.done,
  total: row.total,
  unit: row.unit,
  subject:
    row.subjectType !== null && row.subjectId !== null ? { type: row.subjectType, id: row.subjectId } : null,
  error:
    row.errorMessage === null
      ? null
      : { message: row.errorMessage, ...(row.errorHint === null ? {} : { hint: row.errorHint }) },
  cancelRequested: row.cancelRequested,
  createdAt: row.createdAt.toISOString(),
  finishedAt: row.finishedAt?.toISOString() ?? null,
});
