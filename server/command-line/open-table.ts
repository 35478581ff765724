import { createReadStream } from "node:fs";
import { open } from "node:fs/promises";
import { resolve } from "node:path";
import { unprocessable } from "../errors.ts";
import { openDelimited } from "../formats/delimited/open-delimited.ts";
import type { TableReader } from "../formats/table.ts";
import { formatOf } from "./format-of.ts";
import type { Dialect } from "./plan-file.ts";
import { systemWords } from "./trouble.ts";

export interface OpenedTable {
  readonly reader: TableReader;
  /** Of its texts; numbers that the format itself reads need none. */
  readonly decimalMark: "." | ",";
}

const FIRST_BYTES = 512;

const readFirst = async (path: string): Promise<Uint8Array> => {
  const file = await open(path);
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(FIRST_BYTES), 0, FIRST_BYTES, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await file.close();
  }
};

const firstBytes = (path: string): Promise<Uint8Array> =>
  readFirst(path).catch((error: unknown) => {
    const why = systemWords(error);
    if (why === undefined) throw error;
    throw unprocessable("no-file", `The file ${path} cannot be read: ${why}.`, {
      hint: "Check its name and from which folder it is named.",
      cause: error,
    });
  });

/** Opens a table by what its bytes say, whatever its name says. */
export const openTable = async (folder: string, name: string, choice: Dialect): Promise<OpenedTable> => {
  const path = resolve(folder, name);
  const source = (): AsyncIterable<Buffer> => createReadStream(path);
  const open = formatOf(await firstBytes(path));
  if (open) return { reader: await open(source()), decimalMark: "." };
  const reader = await openDelimited(source(), choice);
  return { reader, decimalMark: reader.dialect.decimalMark };
};
