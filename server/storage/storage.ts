import type { Readable } from "node:stream";

/** Keys are lower-case words with digits, dots and dashes, joined by slashes: `programmes/12/extracts/7/original`. */
export type StorageKey = string;

export interface WriteOptions {
  /** More bytes than this are refused, and nothing is kept. */
  limitBytes?: number;
  signal?: AbortSignal;
}

export interface Written {
  bytes: number;
  /** Lower-case hexadecimal, of exactly the bytes kept. */
  sha256: string;
}

/** Both ends included, as in HTTP. */
export interface ByteRange {
  start: number;
  end?: number;
}

/**
 * Where originals and exports are kept. Small on purpose, so that a folder and an object store can both do it: files
 * complete or absent, no folders, no rewrites; what arrives in pieces grows at its end alone.
 */
export interface FileStorage {
  /** Streams the source in; the file appears under its key once all of it is safely down, and not before. */
  write(key: StorageKey, source: Readable, options?: WriteOptions): Promise<Written>;
  /**
   * Puts bytes behind the first `offset` of a file that grows; what stood there is cut off, so that a piece of which the
   * outcome is not known may be put again. Answers the new length once it is safely down. One writer at a time: whoever
   * calls holds a lock.
   */
  append(key: StorageKey, offset: number, source: Readable): Promise<number>;
  /** Refuses with `not-found` before the first byte when there is no such file. */
  read(key: StorageKey, range?: ByteRange): Promise<Readable>;
  /** Null when there is no such file. */
  stat(key: StorageKey): Promise<{ bytes: number; modifiedAt: Date } | null>;
  /** Removing what is not there is fine. */
  remove(key: StorageKey): Promise<void>;
}
