import { join } from "node:path";
import type { Deps } from "../deps.ts";
import { AppError } from "../errors.ts";
import { enqueueJob, newestJobOf } from "../jobs/service.ts";
import { fileName, keyName, programmeFolder, type ScanKey } from "./key.ts";
import { readerOf } from "./reader.ts";

export interface IndexFile {
  path: string;
  identity: string;
}

/** A build that failed is not asked for again before this long. */
const TRY_AGAIN_MS = 60_000;

const building = (jobId: string): AppError =>
  new AppError(503, "scan-index-building", "The table of this edition and instrument is being prepared.", {
    hint: "It opens by itself as soon as it is ready.",
    details: { jobId },
  });

const failed = (jobId: string, message: string): AppError =>
  new AppError(503, "scan-index-failed", `The table could not be prepared: ${message}`, {
    hint: "It is tried again in a minute. If it stays so, tell whoever runs this installation.",
    details: { jobId },
  });

/** Asks for the index to be built, once, and says that it is on its way. */
const askFor = async (deps: Deps, key: ScanKey): Promise<never> => {
  const subject = { type: "scan-index", id: keyName(key) };
  const newest = await newestJobOf(deps.db.manager, key.programmeId, subject);
  if (newest?.state === "queued" || newest?.state === "running") throw building(newest.id);
  const endedAgo = newest?.finishedAt
    ? deps.now().getTime() - newest.finishedAt.getTime()
    : Number.POSITIVE_INFINITY;
  if (newest?.state === "failed" && endedAgo < TRY_AGAIN_MS)
    throw failed(newest.id, newest.errorMessage ?? "the work stopped.");
  const job = await enqueueJob(deps.db.manager, {
    programmeId: key.programmeId,
    personId: null,
    kind: "build-scan-index",
    payload: {
      edition: key.edition,
      cardVersionId: key.cardVersionId,
      campaignVersionId: key.campaignVersionId,
    },
    subject,
    unit: "stars",
  });
  throw building(job.id);
};

/** The file that answers for that key; where there is none, it is asked for and the caller told to come again. */
export const findIndex = async (deps: Deps, key: ScanKey): Promise<IndexFile> => {
  const path = join(await programmeFolder(deps, key.programmeId), fileName(key));
  const identity = await readerOf(deps).identityOf(path);
  return identity === undefined ? askFor(deps, key) : { path, identity };
};
