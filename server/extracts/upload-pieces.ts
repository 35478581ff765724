import { createHash } from "node:crypto";
import type { IncomingMessage } from "node:http";
import { LIMITS } from "#shared/limits.ts";
import { Extract } from "../database/entities/extract.entity.ts";
import { inTransaction } from "../database/transaction.ts";
import type { Deps } from "../deps.ts";
import { AppError, conflict, notFound, unprocessable } from "../errors.ts";
import type { ByteRange, FileStorage, StorageKey, Written } from "../storage/storage.ts";
import { FileTooLargeError } from "../storage/storage-errors.ts";
import { findExtractRow, lockExtract } from "./queries.ts";
import { announcedBytes, bodyOf } from "./upload-body.ts";
import { alreadyReceived, keep, noteFailure, refuseSameBytes } from "./upload-keep.ts";

interface Person {
  id: string;
  name: string;
}

type Named = Pick<Extract, "id" | "programmeId">;

const folderOf = ({ programmeId, id }: Named): string => `programmes/${programmeId}/extracts/${id}`;

/** Where a file grows until it is whole; it then stays there as the original. */
export const growingKey = (extract: Named): StorageKey => `${folderOf(extract)}/original-of-pieces`;

const pieceLost = (): AppError =>
  new AppError(
    400,
    "piece-cut-off",
    "The connection ended in the middle of a piece. What came before is kept.",
    {
      hint: "Go on from there.",
    },
  );

const pieceTooLarge = (): AppError =>
  new AppError(
    413,
    "piece-too-large",
    `A piece may have at most ${LIMITS.pieceBytes / 1024 ** 2} MiB. Nothing of it was kept.`,
    { hint: "Send smaller pieces." },
  );

const wrongOffset = (receivedBytes: number): AppError =>
  conflict("upload-offset", `${receivedBytes.toLocaleString("en")} bytes of this file have arrived.`, {
    hint: "Go on from there.",
    details: { receivedBytes },
  });

const otherFile = (): AppError =>
  conflict(
    "other-file",
    "This is another file: its beginning differs from what has arrived. Nothing was changed.",
    { hint: "Choose the file that was begun, or bring this one as a new extract." },
  );

const tooMuch = (extract: Extract): AppError =>
  unprocessable(
    "upload-too-long",
    `More bytes came than the ${Number(extract.bytes).toLocaleString("en")} that were announced. The last piece was not kept.`,
    { hint: "Choose the file that was announced, or bring this one as a new extract." },
  );

const hashOf = async (files: FileStorage, key: StorageKey, range?: ByteRange): Promise<Written> => {
  const hash = createHash("sha256");
  let bytes = 0;
  for await (const chunk of await files.read(key, range)) {
    hash.update(chunk as Buffer);
    bytes += (chunk as Buffer).length;
  }
  return { bytes, sha256: hash.digest("hex") };
};

interface Piece {
  offset: number;
  /** Where it waits until it is its turn. */
  aside: StorageKey;
  written: Written;
}

/** A piece that came before, sent again: the same bytes change nothing, others are of another file. */
const refuseOther = async (deps: Deps, row: Extract, { offset, written }: Piece): Promise<void> => {
  if (written.bytes === 0) return;
  const range = { start: offset, end: offset + written.bytes - 1 };
  const before = await hashOf(deps.files, growingKey(row), range);
  if (before.sha256 !== written.sha256) throw otherFile();
};

/** Puts a whole piece at the end; the lock on the extract lets one in at a time. Answers what has arrived by now. */
const takePiece = (deps: Deps, extract: Extract, piece: Piece): Promise<number> =>
  inTransaction(deps.db, async (tx) => {
    const row = await lockExtract(tx, extract.programmeId, extract.id);
    if (!row) throw notFound("This extract");
    if (row.state !== "receiving") throw alreadyReceived();
    const key = growingKey(row);
    const stored = (await deps.files.stat(key))?.bytes ?? 0;
    const received = Math.min(Number(row.receivedBytes), stored);
    const end = piece.offset + piece.written.bytes;
    if (end > Number(row.bytes)) throw tooMuch(row);
    if (piece.offset < received && end <= received) {
      await refuseOther(deps, row, piece);
      return received;
    }
    if (piece.offset !== received) throw wrongOffset(received);
    const now = await deps.files.append(key, piece.offset, await deps.files.read(piece.aside));
    await tx.save(
      Object.assign(row, { receivedBytes: String(now), failureMessage: null, failureHint: null }),
    );
    return now;
  });

const forget = async (deps: Deps, extract: Extract): Promise<void> => {
  await deps.db.manager.update(Extract, { id: extract.id, state: "receiving" }, { receivedBytes: "0" });
  await deps.files.remove(growingKey(extract));
};

/** All bytes are here. Where the end fails for another reason than the bytes themselves, they stay for another try. */
const finish = async (deps: Deps, person: Person, extract: Extract): Promise<void> => {
  try {
    const written = await hashOf(deps.files, growingKey(extract));
    await refuseSameBytes(deps, extract, written);
    await keep(deps, person, extract, growingKey(extract), written);
  } catch (error) {
    const code = error instanceof AppError ? error.code : "";
    if (code === "extract-already-here") await forget(deps, extract);
    if (code !== "file-already-received") await noteFailure(deps, extract, error);
    throw error;
  }
};

const writeAside = async (deps: Deps, aside: StorageKey, req: IncomingMessage): Promise<Written> => {
  if (announcedBytes(req) > LIMITS.pieceBytes) throw pieceTooLarge();
  try {
    return await deps.files.write(aside, bodyOf(req, pieceLost()), { limitBytes: LIMITS.pieceBytes });
  } catch (error) {
    throw error instanceof FileTooLargeError ? pieceTooLarge() : error;
  }
};

/**
 * Takes one piece of a file from a request's body. A piece counts once it is whole; the last one makes the file whole, and
 * so does an empty one behind it.
 */
export const receivePiece = async (
  deps: Deps,
  programmeId: string,
  person: Person,
  id: string,
  offset: number,
  req: IncomingMessage,
): Promise<void> => {
  const extract = await findExtractRow(deps.db.manager, programmeId, id);
  if (!extract) throw notFound("This extract");
  if (extract.state !== "receiving") throw alreadyReceived();
  if (Number(extract.bytes) > deps.config.uploadBytes) throw new FileTooLargeError(deps.config.uploadBytes);
  const aside = `${folderOf(extract)}/piece-${crypto.randomUUID()}`;
  try {
    const written = await writeAside(deps, aside, req);
    const received = await takePiece(deps, extract, { offset, aside, written });
    if (received === Number(extract.bytes)) await finish(deps, person, extract);
  } finally {
    await deps.files.remove(aside);
  }
};
