import type { IncomingMessage } from "node:http";
import { PassThrough, type Readable } from "node:stream";
import { Extract } from "../database/entities/extract.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError, conflict, notFound, unprocessable } from "../errors.ts";
import { knownError } from "../http/known-errors.ts";
import { writeLine } from "../logbook/service.ts";
import type { Written } from "../storage/storage.ts";
import { FileTooLargeError } from "../storage/storage-errors.ts";
import { previewOf } from "./preview.ts";
import { findExtractRow, lockExtract } from "./queries.ts";
import { readSample } from "./read-sample.ts";

interface Person {
  id: string;
  name: string;
}

const number = (n: number | string): string => Number(n).toLocaleString("en");

const connectionLost = (): AppError =>
  new AppError(
    400,
    "upload-cut-off",
    "The connection ended before the whole file had arrived. Nothing of it was kept.",
    {
      hint: "Send the file again.",
    },
  );

/**
 * The body as a stream of its own: when its reader fails, what is still on the way is thrown away, so that the
 * refusal can be answered on a connection that is still whole.
 */
const bodyOf = (req: IncomingMessage): PassThrough => {
  const through = new PassThrough();
  req.pipe(through);
  req.once("error", () => through.destroy(connectionLost()));
  req.once("close", () => {
    if (!req.complete) through.destroy(connectionLost());
  });
  through.once("close", () => {
    req.unpipe(through);
    req.resume();
  });
  return through;
};

const alreadyReceived = (): AppError =>
  conflict("file-already-received", "The file of this extract has arrived already and is not replaced.", {
    hint: "Make a new extract for another file.",
  });

const refuseWrongLength = (extract: Extract, written: Written): void => {
  if (written.bytes === Number(extract.bytes)) return;
  throw unprocessable(
    "upload-incomplete",
    `${number(written.bytes)} bytes arrived and ${number(extract.bytes)} were announced, so the file is not whole. Nothing of it was kept.`,
    { hint: "Send the file again." },
  );
};

const refuseSameBytes = async (deps: Deps, extract: Extract, written: Written): Promise<void> => {
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

const keep = async (
  deps: Deps,
  person: Person,
  extract: Extract,
  key: string,
  written: Written,
): Promise<void> => {
  const sample = await readSample(deps.files, key, written.bytes);
  const preview = await previewOf(sample);
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
const noteFailure = async (deps: Deps, extract: Extract, error: unknown): Promise<void> => {
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

/** Takes the file from a stream. It is kept whole, with its hash, or not at all. */
export const storeOriginal = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  body: Readable,
): Promise<void> => {
  const extract = await findExtractRow(deps.db.manager, programmeId, id);
  if (!extract) throw notFound("This extract");
  if (extract.state !== "receiving") throw alreadyReceived();
  const key = `programmes/${programmeId}/extracts/${id}/original-${crypto.randomUUID()}`;
  try {
    const written = await deps.files.write(key, body, { limitBytes: deps.config.uploadBytes });
    refuseWrongLength(extract, written);
    await refuseSameBytes(deps, extract, written);
    await keep(deps, person, extract, key, written);
  } catch (error) {
    await deps.files.remove(key);
    await noteFailure(deps, extract, error);
    throw error;
  }
};

/** Takes the file from a request's body. */
export const receiveOriginal = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  req: IncomingMessage,
): Promise<void> => {
  if (req.readableEnded)
    throw new AppError(415, "not-a-stream", "The file came as JSON and was not taken.", {
      hint: "Send it as application/octet-stream.",
    });
  const limitBytes = deps.config.uploadBytes;
  // Said before the first byte is read; a body that announces less than it sends is stopped at the limit.
  if (Number(req.headers["content-length"] ?? 0) > limitBytes) throw new FileTooLargeError(limitBytes);
  await storeOriginal(deps, programmeId, person, id, bodyOf(req));
};
