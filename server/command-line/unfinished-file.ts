import { randomBytes } from "node:crypto";
import { createReadStream, createWriteStream, rmSync, type WriteStream } from "node:fs";
import { rename, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { basename, dirname, join, resolve } from "node:path";
import type { Writable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { unprocessable } from "../errors.ts";
import { systemWords } from "./trouble.ts";

/** Rows gather here until all of them are there; then the header, which counts them, goes before them. */
export interface Draft {
  readonly rows: WriteStream;
  /** Puts the whole file in its place at once, or sends it to the stream. */
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

const SIGNALS = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129 } as const;

/** Removes these files also when the process is told to stop. Answers a function that ends the watch. */
const removeAtStop = (files: readonly string[]): (() => void) => {
  const stops = Object.entries(SIGNALS).map(([signal, code]) => {
    const stop = (): void => {
      for (const file of files) rmSync(file, { force: true });
      process.exit(code);
    };
    process.once(signal, stop);
    return () => process.off(signal, stop);
  });
  return () => {
    for (const end of stops) end();
  };
};

/** In the folder of the file, so that it can be put in its place by a change of name. */
const besides = (path: string): string =>
  join(dirname(path), `.${basename(path)}.${randomBytes(6).toString("hex")}`);

/** Nothing shows at `name`, or on the stream where no file is named, before it is complete. */
export const beginFile = async (folder: string, name: string | undefined, out: Writable): Promise<Draft> => {
  const path = name === undefined ? undefined : resolve(folder, name);
  const stem = besides(path ?? join(tmpdir(), "shortlight"));
  const [body, whole] = [`${stem}.rows`, `${stem}.part`];
  const rows = createWriteStream(body, { flags: "wx", mode: 0o600 });
  const endWatch = removeAtStop([body, whole]);

  const assemble = async (header: string): Promise<void> => {
    await ended(rows);
    const to = path === undefined ? out : createWriteStream(whole, { flags: "wx" });
    to.write(header);
    await pipeline(createReadStream(body), to, { end: to !== out });
    if (path !== undefined) await rename(whole, path);
  };

  const draft: Draft = {
    rows,
    finish: (header) =>
      assemble(header).catch((error: unknown) => {
        throw path === undefined ? error : failed(path, error);
      }),
    async discard() {
      rows.destroy();
      endWatch();
      await rm(body, { force: true });
      await rm(whole, { force: true });
    },
  };
  return new Promise((done, fail) => {
    rows.once("open", () => done(draft));
    rows.once("error", (error) => {
      endWatch();
      fail(failed(path ?? body, error));
    });
  });
};
