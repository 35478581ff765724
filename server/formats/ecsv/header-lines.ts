import { badHeader } from "./errors.ts";

/** The comment lines before the line of names, and all that follows them. */
export interface HeaderLines {
  readonly lines: readonly string[];
  readonly bytes: number;
  /** To be read once. */
  readonly body: AsyncIterable<Uint8Array>;
}

/** Room for some thousand columns with long descriptions; a header beyond it would fill the memory. */
const MOST_BYTES = 2 * 1024 * 1024;

const HASH = 35;
const NEWLINE = 10;
const BOM = Buffer.from([0xef, 0xbb, 0xbf]);

/** Whether a file begins as this format does; a mark of the encoding may stand before. */
export const isEcsv = (head: Uint8Array): boolean =>
  /^(\ufeff)?# ?%ECSV\b/.test(textOf(head.subarray(0, 64)));

const textOf = (bytes: Uint8Array): string => new TextDecoder("utf-8", { ignoreBOM: true }).decode(bytes);

/** Place after the last whole comment or blank line from there on. */
const endOfComments = (bytes: Buffer, from: number): { end: number; isOver: boolean } => {
  let at = from;
  for (;;) {
    const newline = bytes.indexOf(NEWLINE, at);
    const first = bytes[at];
    const isBlank = first === NEWLINE || (first === 13 && bytes[at + 1] === NEWLINE);
    if (first !== undefined && first !== HASH && !isBlank && first !== 13) return { end: at, isOver: true };
    if (newline < 0) return { end: at, isOver: false };
    at = newline + 1;
  }
};

/** Reads up to the line of names. */
export const readHeaderLines = async (source: AsyncIterable<Uint8Array>): Promise<HeaderLines> => {
  const pieces = source[Symbol.asyncIterator]();
  let held: Buffer = Buffer.alloc(0);
  let end = -1;
  for (;;) {
    const next = await pieces.next();
    if (next.done) break;
    held = Buffer.concat([held, next.value]);
    if (held.length < BOM.length) continue;
    if (end < 0) end = held.subarray(0, BOM.length).equals(BOM) ? BOM.length : 0;
    const found = endOfComments(held, end);
    end = found.end;
    if (found.isOver) break;
    if (held.length > MOST_BYTES)
      throw badHeader(`The header does not end within ${MOST_BYTES / 1024 ** 2} MB.`);
  }
  const head = held.subarray(0, Math.max(0, end));
  const rest = held.subarray(head.length);

  async function* body(): AsyncGenerator<Uint8Array> {
    try {
      if (rest.length > 0) yield rest;
      for (;;) {
        const next = await pieces.next();
        if (next.done) return;
        yield next.value;
      }
    } finally {
      await pieces.return?.();
    }
  }

  const text = textOf(head).replace(/^\ufeff/, "");
  return { lines: text.split(/\r?\n/).slice(0, -1), bytes: head.length, body: body() };
};
