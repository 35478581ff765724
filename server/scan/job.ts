import { z } from "zod";
import type { JobRun } from "../jobs/job-run.ts";
import { buildScanIndex } from "./build.ts";

const payload = z.object({
  edition: z.int().positive(),
  cardVersionId: z.string().nullable(),
  campaignVersionId: z.string().nullable(),
});

/** Builds the index that a view asked for. */
export const buildScanIndexJob = async (run: JobRun): Promise<void> => {
  const { programmeId } = run.job;
  if (programmeId === null) return;
  const key = payload.parse(run.job.payload);
  await buildScanIndex(run.deps, { programmeId, ...key }, (done, total) =>
    run.progress(done, total, "Preparing the table", "stars"),
  );
};
