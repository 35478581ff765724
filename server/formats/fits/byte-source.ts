import type { DataSum } from "./data-sum.ts";

const NOTHING = new Uint8Array(0);

/** The bytes of a file in order, taken in sizes of the reader's own choice. Holds one piece of the source at a time. */
export class ByteSource {
  /** Bytes taken so far. */
  position = 0;
  /** Adds up all bytes that are taken while it is set. */
  sum: DataSum | null = null;
  private readonly pieces: AsyncIterator<Uint8Array>;
  private piece: Uint8Array = NOTHING;
  private at = 0;

  constructor(source: AsyncIterable<Uint8Array>) {
    this.pieces = source[Symbol.asyncIterator]();
  }

  /** Fills the target as far as the source reaches; says how many bytes there were. */
  async fill(target: Uint8Array): Promise<number> {
    let filled = 0;
    while (filled < target.length && (await this.hasMore())) {
      const size = Math.min(target.length - filled, this.piece.length - this.at);
      target.set(this.piece.subarray(this.at, this.at + size), filled);
      filled += size;
      this.advance(size);
    }
    return filled;
  }

  /** Passes over as many bytes, as far as the source reaches; says how many there were. */
  async skip(count: number): Promise<number> {
    let skipped = 0;
    while (skipped < count && (await this.hasMore())) {
      const size = Math.min(count - skipped, this.piece.length - this.at);
      skipped += size;
      this.advance(size);
    }
    return skipped;
  }

  /** Lets the source go, wherever it is. */
  async close(): Promise<void> {
    this.piece = NOTHING;
    this.at = 0;
    await this.pieces.return?.();
  }

  private advance(size: number): void {
    this.sum?.add(this.piece.subarray(this.at, this.at + size));
    this.at += size;
    this.position += size;
  }

  private async hasMore(): Promise<boolean> {
    while (this.at >= this.piece.length) {
      const next = await this.pieces.next();
      if (next.done) return false;
      this.piece = next.value;
      this.at = 0;
    }
    return true;
  }
}
