/** The beginning of a source, and the whole of it again from there. */
export interface Peeked {
  /** As many bytes as were asked for, fewer where the source is shorter. */
  readonly head: Uint8Array;
  /** To be read once. */
  readonly whole: AsyncIterable<Uint8Array>;
}

/** Reads the first bytes of a source without taking them from it. */
export const peek = async (source: AsyncIterable<Uint8Array>, bytes: number): Promise<Peeked> => {
  const pieces: Uint8Array[] = [];
  const rest = source[Symbol.asyncIterator]();
  let held = 0;
  while (held < bytes) {
    const next = await rest.next();
    if (next.done) break;
    pieces.push(next.value);
    held += next.value.length;
  }

  async function* whole(): AsyncGenerator<Uint8Array> {
    try {
      yield* pieces.splice(0);
      for (;;) {
        const next = await rest.next();
        if (next.done) return;
        yield next.value;
      }
    } finally {
      await rest.return?.();
    }
  }

  return { head: Buffer.concat(pieces).subarray(0, bytes), whole: whole() };
};
