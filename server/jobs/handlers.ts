import { sendMail } from "../mail/send.ts";
import type { Aftermath, Handler, JobKind } from "./job-run.ts";

/** Who does each kind of job. */
export const HANDLERS: Partial<Record<JobKind, Handler>> = {
  "send-mail": sendMail,
};

/** What to put right when a job of that kind will not be done. */
export const AFTERMATHS: Partial<Record<JobKind, Aftermath>> = {};
