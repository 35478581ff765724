import type { IncomingMessage } from "node:http";
import type { Readable } from "node:stream";
import { LIMITS } from "#shared/limits.ts";
import type { Companion, Extract } from "../database/entities/extract.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError, conflict, notFound } from "../errors.ts";
import { writeLine } from "../logbook/service.ts";
import { FileTooLargeError } from "../storage/storage-errors.ts";
import { findExtractRow, lockExtract } from "./queries.ts";
import { reviewFile } from "./review.ts";
import { announcedBytes, bodyOf } from "./upload-body.ts";
import { lookInto } from "./upload-keep.ts";

interface Person {
  id: string;
  name: string;
}

const refuseUnlessOpen = (row: Extract): void => {
  if (row.state === "receiving" || row.state === "planning") return;
  throw conflict("plan-closed", `The reading plan is closed: this extract is ${row.state}.`, {
    hint: "Make a new extract to read the file otherwise.",
  });
};

const cutOff = (): AppError =>
  new AppError(400, "upload-cut-off", "The connection ended before the description had arrived.", {
    hint: "Send it again.",
  });

/** What the file looks like beside the description, and no plan any more: its columns may be others now. */
const readAgain = async (
  deps: Deps,
  row: Extract,
  companion: Companion | null,
): Promise<Partial<Extract>> => {
  if (row.state !== "planning") return { companion };
  const sample = await lookInto(deps.files, { ...row, companion });
  return { companion, plan: null, preview: await reviewFile(deps, row, sample) };
};

const inLogbook = (companion: Companion | null): unknown =>
  companion && { fileName: companion.fileName, bytes: companion.bytes, sha256: companion.sha256 };

/** Puts another description, or none, in the place of what there was; the file of that is removed. */
const replaceCompanion = async (
  deps: Deps,
  person: Person,
  seen: Extract,
  companion: Companion | null,
): Promise<void> => {
  const changes = await readAgain(deps, seen, companion);
  const old = await inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, seen.programmeId, seen.id);
    if (!row) throw notFound("This extract");
    refuseUnlessOpen(row);
    if (row.state !== seen.state)
      throw conflict("stale-version", "The table of this extract arrived meanwhile.", {
        hint: "Look at it, then do it again.",
      });
    const before = row.companion;
    await tx.save(Object.assign(row, changes));
    await writeLine(tx, {
      programmeId: row.programmeId,
      person,
      action: "extract.describe",
      subject: { type: "extract", id: row.id, name: row.name },
      before: inLogbook(before),
      after: inLogbook(companion),
      at: deps.now(),
    });
    return before;
  });
  if (old) await deps.files.remove(old.key);
};

/** Takes the file that describes the table of an extract (a ReadMe); another one takes its place. */
export const receiveCompanion = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  fileName: string,
  req: IncomingMessage,
): Promise<void> => {
  const extract = await findExtractRow(deps.db.manager, programmeId, id);
  if (!extract) throw notFound("This extract");
  refuseUnlessOpen(extract);
  const limitBytes = LIMITS.companionBytes;
  if (announcedBytes(req) > limitBytes) throw new FileTooLargeError(limitBytes);
  const key = `programmes/${programmeId}/extracts/${id}/companion-${crypto.randomUUID()}`;
  try {
    const written = await deps.files.write(key, bodyOf(req, cutOff()), { limitBytes });
    await replaceCompanion(deps, person, extract, { key, fileName, ...written });
  } catch (error) {
    await deps.files.remove(key);
    throw error;
  }
};

/** Leaves out a description that does not belong to the table. */
export const removeCompanion = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
): Promise<void> => {
  const extract = await findExtractRow(deps.db.manager, programmeId, id);
  if (!extract?.companion) throw notFound("This file");
  refuseUnlessOpen(extract);
  await replaceCompanion(deps, person, extract, null);
};

export const openCompanion = async (
  deps: Deps,
  programmeId: string,
  id: string,
): Promise<{ companion: Companion; stream: Readable }> => {
  const row = await findExtractRow(deps.db.manager, programmeId, id);
  if (!row?.companion) throw notFound("This file");
  return { companion: row.companion, stream: await deps.files.read(row.companion.key) };
};
