import type { Job } from "#shared/api/jobs.ts";

const WHAT: Readonly<Record<Job["kind"], string>> = {
  "import-extract": "Import of an extract",
  "withdraw-extract": "Withdrawal of an extract",
  recompute: "Recompute of the catalogue",
  "build-scan-index": "Preparing the table",
  "send-mail": "Sending a mail",
};

export const jobTitle = ({ kind }: Pick<Job, "kind">): string => WHAT[kind];

/** What goes on in it now, in words. */
export const jobPhase = ({ state, phase, cancelRequested }: Job): string => {
  if (cancelRequested && (state === "queued" || state === "running")) return "Stopping";
  if (state === "queued") return "Waiting for its turn";
  return phase || "Running";
};
