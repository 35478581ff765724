import type { z } from "zod";
import type {
  ColumnHealth,
  ExtractPreview,
  Extract as ExtractShape,
  ReadingPlan,
  rowCounts,
} from "#shared/api/extracts.ts";
import type { Extract } from "../database/entities/extract.entity.ts";
import type { JobRow } from "../database/entities/job.entity.ts";
import { presentJob } from "../jobs/present.ts";

const presentRows = (row: Extract): z.infer<typeof rowCounts> | null =>
  row.rowsRead === null
    ? null
    : {
        read: row.rowsRead,
        accepted: row.rowsAccepted ?? 0,
        refused: row.rowsRefused ?? 0,
        skipped: row.rowsSkipped ?? 0,
      };

export const presentExtract = (row: Extract, uploaderName: string, job: JobRow | null): ExtractShape => ({
  id: row.id,
  number: row.number,
  name: row.name,
  origin: row.origin,
  state: row.state,
  isInvented: row.isInvented,
  fileName: row.fileName,
  bytes: Number(row.bytes),
  receivedBytes: Number(row.receivedBytes),
  sha256: row.sha256,
  companion: row.companion && {
    fileName: row.companion.fileName,
    bytes: row.companion.bytes,
    sha256: row.companion.sha256,
  },
  uploadedBy: { id: row.uploadedBy, name: uploaderName },
  createdAt: row.createdAt.toISOString(),
  committedAt: row.committedAt?.toISOString() ?? null,
  edition: row.edition,
  rows: presentRows(row),
  newStars: row.newStars,
  plan: row.plan as ReadingPlan | null,
  job: job && presentJob(job),
  failure:
    row.failureMessage === null
      ? null
      : { message: row.failureMessage, ...(row.failureHint === null ? {} : { hint: row.failureHint }) },
  version: row.version,
});

/** Only an extract whose plan is open shows its preview. */
export const presentPreview = (row: Extract): ExtractPreview | null =>
  row.state === "planning" ? (row.preview as ExtractPreview | null) : null;

/** What the columns of a committed extract hold; empty for extracts that were read before this was kept. */
export const columnHealthOf = (row: Extract): ColumnHealth[] => (row.health as ColumnHealth[] | null) ?? [];
