import { createHash } from "node:crypto";
import { join } from "node:path";
import { Programme } from "../database/entities/programme.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";

/** What one scan index is about: an edition, alone or as one instrument sees it in one campaign. */
export interface ScanKey {
  programmeId: string;
  edition: number;
  cardVersionId: string | null;
  campaignVersionId: string | null;
}

/** Raised whenever the content of the files changes, so that older ones are made anew. */
const LAYOUT = 1;

/** Short name of the key within its programme: edition, card and campaign. */
export const keyName = (key: ScanKey): string =>
  `${key.edition}-${key.cardVersionId ?? 0}-${key.campaignVersionId ?? 0}`;

/**
 * Folder of the programme's files. Its name holds when the programme was made, so that files which outlive a
 * database are never taken for those of a new programme with the same number.
 */
export const programmeFolder = async (deps: Deps, programmeId: string): Promise<string> => {
  const programme = await deps.db.manager.findOneBy(Programme, { id: programmeId });
  if (!programme) throw notFound("This programme");
  const made = createHash("sha256").update(programme.createdAt.toISOString()).digest("hex").slice(0, 8);
  return join(deps.config.folders.scan, `${programmeId}-${made}`);
};

export const fileName = (key: ScanKey): string => `${keyName(key)}.v${LAYOUT}.duckdb`;

/** Edition of a file by its name; undefined for what is not one of ours. */
export const editionOfFile = (name: string): number | undefined => {
  const match = /^(\d+)-\d+-\d+\.v\d+\.duckdb/.exec(name);
  return match ? Number(match[1]) : undefined;
};
