import { randomBytes } from "node:crypto";
import { createReadStream, createWriteStream, type WriteStream } from "node:fs";
import { mkdtemp, rename, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { basename, dirname, join, resolve } from "node:path";
import type { Writable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { unprocessable } from "../errors.ts";
import { systemWords } from "./trouble.ts";

/** Rows gather here until all of them are there; then the header, which counts them, goes before them. */
export interface Draft {
  readonly rows: WriteStream;
  /** Puts the whole file in its place at once. */
  finish(header: string): Promise<void>;
  /** Removes what is left; harmless after the end. */
  discard(): Promise<void>;
}

const failed = (path: string, error: unknown): unknown => {
  const isFolderMissing = error instanceof Error && "code" in error && error.code === "ENOENT";
  const why = isFolderMissing ? "its folder does not exist" : systemWords(error);
  return why === undefined
    ? error
    : unprocessable("not-written", `The file ${path} cannot be written: ${why}.`, {
        hint: "Name another place with --out.",
        cause: error,
      });
};

const ended = (stream: WriteStream): Promise<void> =>
  new Promise((done, fail) => {
    stream.once("error", fail);
    stream.end(() => done());
  });

const sendRows = async (path: string, to: Writable, end: boolean): Promise<void> =>
  pipeline(createReadStream(path), to, { end });

const draftBesides = (path: string): Draft => {
  const stem = join(dirname(path), `.${basename(path)}.${randomBytes(6).toString("hex")}`);
  const [body, whole] = [`${stem}.rows`, `${stem}.part`];
  const rows = createWriteStream(body, { flags: "wx" });
  return {
    rows,
    async finish(header) {
      try {
        await ended(rows);
        const file = createWriteStream(whole, { flags: "wx" });
        file.write(header);
        await sendRows(body, file, true);
        await rename(whole, path);
      } catch (error) {
        throw failed(path, error);
      }
    },
    async discard() {
      rows.destroy();
      await rm(body, { force: true });
      await rm(whole, { force: true });
    },
  };
};

const draftForStream = async (out: Writable): Promise<Draft> => {
  const folder = await mkdtemp(join(tmpdir(), "shortlight-"));
  const body = join(folder, "rows");
  const rows = createWriteStream(body);
  return {
    rows,
    async finish(header) {
      await ended(rows);
      out.write(header);
      await sendRows(body, out, false);
    },
    async discard() {
      rows.destroy();
      await rm(folder, { recursive: true, force: true });
    },
  };
};

/** Nothing shows at `name`, or on the stream where no file is named, before it is complete. */
export const beginFile = async (folder: string, name: string | undefined, out: Writable): Promise<Draft> => {
  if (name === undefined) return draftForStream(out);
  const path = resolve(folder, name);
  const draft = draftBesides(path);
  return new Promise((done, fail) => {
    draft.rows.once("open", () => done(draft));
    draft.rows.once("error", (error) => fail(failed(path, error)));
  });
};
