import type { IncomingMessage } from "node:http";
import type { Readable } from "node:stream";
import type { Extract } from "../database/entities/extract.entity.ts";
import type { Deps } from "../deps.ts";
import { AppError, notFound, unprocessable } from "../errors.ts";
import type { Written } from "../storage/storage.ts";
import { FileTooLargeError } from "../storage/storage-errors.ts";
import { findExtractRow } from "./queries.ts";
import { announcedBytes, bodyOf } from "./upload-body.ts";
import { alreadyReceived, keep, noteFailure, refuseSameBytes } from "./upload-keep.ts";
import { growingKey } from "./upload-pieces.ts";

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

const refuseWrongLength = (extract: Extract, written: Written): void => {
  if (written.bytes === Number(extract.bytes)) return;
  throw unprocessable(
    "upload-incomplete",
    `${number(written.bytes)} bytes arrived and ${number(extract.bytes)} were announced, so the file is not whole. Nothing of it was kept.`,
    { hint: "Send the file again." },
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
    await deps.files.remove(growingKey(extract));
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
  const limitBytes = deps.config.uploadBytes;
  // Said before the first byte is read; a body that announces less than it sends is stopped at the limit.
  if (announcedBytes(req) > limitBytes) throw new FileTooLargeError(limitBytes);
  await storeOriginal(deps, programmeId, person, id, bodyOf(req, connectionLost()));
};
