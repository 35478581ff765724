import { createHash, randomUUID } from "node:crypto";
import { createReadStream, createWriteStream } from "node:fs";
import { type FileHandle, mkdir, open, readdir, rename, rm, stat, truncate } from "node:fs/promises";
import { dirname, join } from "node:path";
import { type Readable, Transform } from "node:stream";
import { pipeline } from "node:stream/promises";
import { notFound } from "../errors.ts";
import type { ByteRange, FileStorage, StorageKey, WriteOptions, Written } from "./storage.ts";
import { FileTooLargeError, storageError } from "./storage-errors.ts";

/** A segment never begins with a dot, so no key can climb out of the folder or reach what is being written. */
const KEY = /^[a-z0-9][a-z0-9._-]{0,127}(\/[a-z0-9][a-z0-9._-]{0,127}){0,15}$/;
const ASIDE = ".incoming";
/** What a killed process left half-written is removed after this long. */
const STALE_MS = 24 * 3600 * 1000;

const isMissing = (error: unknown): boolean =>
  error instanceof Error && "code" in error && (error.code === "ENOENT" || error.code === "ENOTDIR");

const syncFolder = async (folder: string): Promise<void> => {
  const handle = await open(folder, "r");
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
};

/** Passes the bytes through, counting and hashing them, and fails past the limit. */
const meter = (limitBytes: number) => {
  const hash = createHash("sha256");
  let bytes = 0;
  const through = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      bytes += chunk.length;
      if (bytes > limitBytes) return done(new FileTooLargeError(limitBytes));
      hash.update(chunk);
      done(null, chunk);
    },
  });
  return { through, written: (): Written => ({ bytes, sha256: hash.digest("hex") }) };
};

/** Files in one folder: written aside, forced to disk, then renamed into place. */
export class FolderStorage implements FileStorage {
  private swept: Promise<void> | undefined;

  constructor(private readonly root: string) {}

  async write(key: StorageKey, source: Readable, options: WriteOptions = {}): Promise<Written> {
    const target = this.path(key);
    const aside = join(this.root, ASIDE, randomUUID());
    try {
      await mkdir(dirname(aside), { recursive: true });
      await mkdir(dirname(target), { recursive: true });
      this.swept ??= this.sweep();
      await this.swept;
      const written = await this.writeAside(aside, source, options);
      await rename(aside, target);
      await syncFolder(dirname(target));
      return written;
    } catch (error) {
      await rm(aside, { force: true });
      throw storageError(error);
    }
  }

  async append(key: StorageKey, offset: number, source: Readable): Promise<number> {
    const target = this.path(key);
    try {
      await mkdir(dirname(target), { recursive: true });
      if (offset > 0) {
        if ((await stat(target)).size < offset) throw new Error(`${key} has fewer than ${offset} bytes.`);
        await truncate(target, offset);
      }
      // `flush` forces the bytes to disk before the stream says it is closed.
      const file = createWriteStream(target, {
        flags: offset === 0 ? "w" : "r+",
        start: offset,
        mode: 0o600,
        flush: true,
      });
      await pipeline(source, file);
      if (offset === 0) await syncFolder(dirname(target));
      return offset + file.bytesWritten;
    } catch (error) {
      throw storageError(error);
    }
  }

  async read(key: StorageKey, range?: ByteRange): Promise<Readable> {
    let handle: FileHandle;
    try {
      handle = await open(this.path(key), "r");
    } catch (error) {
      throw isMissing(error) ? notFound("This file") : error;
    }
    return createReadStream("", { fd: handle, start: range?.start, end: range?.end, autoClose: true });
  }

  async stat(key: StorageKey): Promise<{ bytes: number; modifiedAt: Date } | null> {
    try {
      const found = await stat(this.path(key));
      return found.isFile() ? { bytes: found.size, modifiedAt: found.mtime } : null;
    } catch (error) {
      if (isMissing(error)) return null;
      throw error;
    }
  }

  async remove(key: StorageKey): Promise<void> {
    await rm(this.path(key), { force: true });
  }

  private path(key: StorageKey): string {
    if (!KEY.test(key)) throw new Error(`Not a storage key: ${JSON.stringify(key)}`);
    return join(this.root, ...key.split("/"));
  }

  private async writeAside(aside: string, source: Readable, options: WriteOptions): Promise<Written> {
    const { through, written } = meter(options.limitBytes ?? Number.POSITIVE_INFINITY);
    // `flush` forces the bytes to disk before the stream says it is closed.
    const file = createWriteStream(aside, { flags: "wx", mode: 0o600, flush: true });
    await pipeline(source, through, file, { signal: options.signal });
    return written();
  }

  private async sweep(): Promise<void> {
    const folder = join(this.root, ASIDE);
    for (const name of await readdir(folder)) {
      const path = join(folder, name);
      const found = await stat(path).catch(() => null);
      if (found && Date.now() - found.mtimeMs > STALE_MS) await rm(path, { force: true });
    }
  }
}
