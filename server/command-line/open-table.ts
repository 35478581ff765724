import { createReadStream } from "node:fs";
import { open } from "node:fs/promises";
import { basename, resolve } from "node:path";
import { unprocessable } from "../errors.ts";
import { openTable as openBytes, type RecognisedTable } from "../formats/open-table.ts";
import type { Dialect } from "./plan-file.ts";
import { systemWords } from "./trouble.ts";

/** The bytes of a file; one that cannot be opened is said in words. */
export const bytesOf = async (folder: string, name: string): Promise<AsyncIterable<Buffer>> => {
  const path = resolve(folder, name);
  try {
    const file = await open(path);
    const isFolder = (await file.stat()).isDirectory();
    await file.close();
    if (isFolder) throw Object.assign(new Error("a folder"), { code: "EISDIR" });
    return createReadStream(path);
  } catch (error) {
    const why = systemWords(error);
    if (why === undefined) throw error;
    throw unprocessable("no-file", `The file ${path} cannot be read: ${why}.`, {
      hint: "Check its name and from which folder it is named.",
      cause: error,
    });
  }
};

/** Opens a table by what its bytes say, whatever its name says. */
export const openTable = async (
  folder: string,
  name: string,
  { delimiter, decimalMark, encoding }: Dialect,
): Promise<RecognisedTable> =>
  openBytes(await bytesOf(folder, name), { delimiter, decimalMark, encoding, name: basename(name) });
