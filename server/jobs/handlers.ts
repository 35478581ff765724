import { removePrepared } from "../catalogue/edition.ts";
import { recompute } from "../catalogue/recompute.ts";
import { afterImport, cleanImport, importExtract, withdraw } from "../extracts/import.ts";
import { sendMail } from "../mail/send.ts";
import { buildScanIndexJob } from "../scan/job.ts";
import type { Aftermath, Cleaner, Handler, JobKind } from "./job-run.ts";

/** Who does each kind of job. */
export const HANDLERS: Record<JobKind, Handler> = {
  "import-extract": importExtract,
  "withdraw-extract": withdraw,
  recompute,
  "build-scan-index": buildScanIndexJob,
  "send-mail": sendMail,
};

/** What to put right when a job of that kind will not be done. */
export const AFTERMATHS: Partial<Record<JobKind, Aftermath>> = { "import-extract": afterImport };

/** What is removed before a job is given up whose workers died. */
export const CLEANERS: Partial<Record<JobKind, Cleaner>> = {
  "import-extract": cleanImport,
  "withdraw-extract": removePrepared,
  recompute: removePrepared,
};
