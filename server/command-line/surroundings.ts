import type { Writable } from "node:stream";

/** Where a command runs: the folder that its file names start from, and where it writes. */
export interface Surroundings {
  readonly folder: string;
  readonly out: Writable;
  readonly err: Writable;
}

/** Writes, and waits until the other side has taken it. Rejects when nobody reads any more. */
export const write = (to: Writable, text: string): Promise<void> =>
  new Promise((resolve, reject) => {
    to.write(text, (error) => (error ? reject(error) : resolve()));
  });
