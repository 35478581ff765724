import { AppError } from "../errors.ts";
import { peek } from "../formats/delimited/peek.ts";
import type { FileStorage } from "../storage/storage.ts";
import { openExtract, readerOf } from "./open-extract.ts";
import { type Sample, sampleOf } from "./sample.ts";
import { type DialectChoice, sampleDelimited } from "./sample-delimited.ts";
import { refusal, sampleTable } from "./sample-table.ts";

const FIRST_BYTES = 1024;

const isGzip = (head: Uint8Array): boolean => head[0] === 0x1f && head[1] === 0x8b;

const headOf = async (files: FileStorage, key: string): Promise<Uint8Array> => {
  const source = await files.read(key, { start: 0, end: FIRST_BYTES - 1 });
  return (await peek(source, FIRST_BYTES)).head;
};

/** Looks into a file of any format without reading all of it. */
export const readSample = async (
  files: FileStorage,
  key: string,
  bytes: number,
  choice?: DialectChoice,
): Promise<Sample> => {
  const head = bytes === 0 ? new Uint8Array() : await headOf(files, key);
  // Plain text can be looked into at places of one's choice.
  if (!readerOf(head) && !isGzip(head)) return sampleDelimited(files, key, bytes, choice);
  const source = await files.read(key);
  try {
    return await sampleTable(await openExtract(source, choice ?? {}));
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    return sampleOf([], [], { found: [refusal(error)] });
  } finally {
    source.destroy();
  }
};
