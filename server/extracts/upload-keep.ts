import type { ReadingPlan } from "#shared/api/extracts.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { type AppError, conflict, notFound } from "../errors.ts";
import { knownError } from "../http/known-errors.ts";
import { writeLine } from "../logbook/service.ts";
import type { FileStorage, StorageKey, Written } from "../storage/storage.ts";
import { besideOf } from "./beside.ts";
import { lockExtract } from "./queries.ts";
import { readSample } from "./read-sample.ts";
import { reviewFile } from "./review.ts";
import type { Sample } from "./sample.ts";

interface Person {
  id: string;
  name: string;
}

export const alreadyReceived = (): AppError =>
  conflict("file-already-received", "The file of this extract has arrived already and is not replaced.", {
    hint: "Make a new extract for another file.",
  });

/** The same bytes are not taken twice into one programme. */
export const refuseSameBytes = async (deps: Deps, extract: Extract, written: Written): Promise<void> => {
  const same = await deps.db.manager
    .createQueryBuilder(Extract, "extract")
    .where("extract.programmeId = :programmeId AND extract.sha256 = :sha256", {
      programmeId: extract.programmeId,
      sha256: written.sha256,
    })
    .andWhere("extract.id <> :id AND extract.state <> 'withdrawn'", { id: extract.id })
    .getOne();
  if (!same) return;
  const day = same.createdAt.toISOString().slice(0, 10);
  throw conflict(
    "extract-already-here",
    `This file is already here: extract ${same.number}, “${same.name}”, of ${day}.`,
    {
      hint: "Open that extract; nothing was stored a second time.",
      details: { extractId: same.id, number: same.number },
    },
  );
};

/** What the file of an extract looks like, read as the plan says or as it shows itself. */
export const lookInto = async (
  files: FileStorage,
  extract: Pick<Extract, "originalKey" | "bytes" | "companion" | "fileName">,
  plan?: ReadingPlan,
): Promise<Sample> => {
  const { originalKey, bytes } = extract;
  if (originalKey === null) throw notFound("This file");
  return readSample(files, originalKey, Number(bytes), plan, await besideOf(files, extract));
};

/** The file is whole and new: the extract now waits for its reading plan. */
export const keep = async (
  deps: Deps,
  person: Person,
  extract: Extract,
  key: StorageKey,
  written: Written,
): Promise<void> => {
  const preview = await reviewFile(
    deps,
    extract,
    await lookInto(deps.files, { ...extract, originalKey: key }),
  );
  await inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, extract.programmeId, extract.id);
    if (!row) throw notFound("This extract");
    if (row.state !== "receiving") throw alreadyReceived();
    Object.assign(row, {
      state: "planning",
      originalKey: key,
      sha256: written.sha256,
      receivedBytes: String(written.bytes),
      preview,
      failureMessage: null,
      failureHint: null,
    });
    await tx.save(row);
    await writeLine(tx, {
      programmeId: extract.programmeId,
      person,
      action: "extract.receive",
      subject: { type: "extract", id: extract.id, name: extract.name },
      after: { fileName: extract.fileName, bytes: written.bytes, sha256: written.sha256 },
      at: deps.now(),
    });
  });
};

/** The list of extracts says why a file did not arrive, also to someone who was not looking. */
export const noteFailure = async (deps: Deps, extract: Extract, error: unknown): Promise<void> => {
  const known = knownError(error);
  await deps.db.manager
    .createQueryBuilder()
    .update(Extract)
    .set({
      failureMessage: known?.message ?? "The file could not be stored.",
      failureHint: known?.hint ?? "Send it again.",
    })
    .where({ id: extract.id, state: "receiving" })
    .execute()
    .catch((problem: unknown) =>
      deps.log.warn("extract", "A failed upload was not noted", { error: problem }),
    );
};
