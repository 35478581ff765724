import { z } from "zod";
import { id, timestamp } from "./common.ts";

export const JOB_KINDS = [
  "import-extract",
  "withdraw-extract",
  "recompute",
  "build-scan-index",
  "send-mail",
] as const;

/** GET /api/programmes/:p/jobs/:id → { job }; POST …/jobs/:id/cancel → { job }; GET …/jobs?active=true → { jobs }. */
export const job = z.object({
  id,
  kind: z.enum(JOB_KINDS),
  state: z.enum(["queued", "running", "done", "failed", "cancelled"]),
  /** What is being done, in words: "Reading rows", "Deriving quantities", "Finishing". */
  phase: z.string(),
  done: z.number(),
  total: z.number().nullable(),
  unit: z.string(),
  /** Where it belongs, so that a screen can find its job after a reload. */
  subject: z.object({ type: z.string(), id: z.string() }).nullable(),
  error: z.object({ message: z.string(), hint: z.string().optional() }).nullable(),
  cancelRequested: z.boolean(),
  createdAt: timestamp,
  finishedAt: timestamp.nullable(),
});
export type Job = z.infer<typeof job>;

/** GET /api/programmes/:p/events: server-sent events `job` (data: Job) and `changed` (data: { subject: { type, id } }). */
