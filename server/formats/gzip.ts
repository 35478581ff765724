import { Readable } from "node:stream";
import { createGunzip } from "node:zlib";
import { AppError, unprocessable } from "../errors.ts";

export interface GzipLimits {
  /** Bytes that may come out. */
  readonly bytes: number;
  /** Bytes that may come out for each that goes in, beyond the first `ratioFrom`. */
  readonly ratio: number;
  readonly ratioFrom: number;
}

/**
 * A table of 10 million rows and 40 columns has some 5 GB as text. Text tables shrink to a third or a tenth, and ones of
 * blanks to a hundredth; only files made to fill a disk come near the thousandfold that the format allows. Common
 * practice, no source.
 */
const LIMITS: GzipLimits = { bytes: 16 * 1024 ** 3, ratio: 300, ratioFrom: 64 * 1024 ** 2 };

const GET_AGAIN = "Get the file again and bring it as a new extract.";

/** Whether bytes begin as a gzip file does (RFC 1952). */
export const isGzip = (head: Uint8Array): boolean => head[0] === 0x1f && head[1] === 0x8b;

const inWords = (error: unknown): unknown => {
  if (error instanceof AppError || !(error instanceof Error)) return error;
  const code = "code" in error ? String(error.code) : "";
  if (code === "Z_BUF_ERROR")
    return unprocessable(
      "file-cut-off",
      "The file ends in the middle: its gzip stream is not complete. It was probably cut off on its way.",
      { hint: GET_AGAIN, cause: error },
    );
  if (!code.startsWith("Z_")) return error;
  return unprocessable("gzip-broken", `The gzip file is damaged: ${error.message}.`, {
    hint: GET_AGAIN,
    cause: error,
  });
};

const gigabytes = (bytes: number): string =>
  bytes >= 1024 ** 3 ? `${Math.round(bytes / 1024 ** 3)} GB` : `${Math.round(bytes / 1024 ** 2)} MB`;

const tooMuch = (limits: GzipLimits): AppError =>
  unprocessable(
    "gzip-too-large",
    `The gzip file holds more than ${gigabytes(limits.bytes)}, the most that is read.`,
    {
      hint: "Save the rows or columns that you need as a table of their own, and bring that.",
    },
  );

const tooDense = (limits: GzipLimits): AppError =>
  unprocessable(
    "gzip-too-dense",
    `The gzip file grows to more than ${limits.ratio} times its size, which tables do not; it was stopped there.`,
    { hint: "If it is a table all the same, unpack it and bring it as it is." },
  );

const goesOn = (): AppError =>
  unprocessable(
    "gzip-broken",
    "The gzip file is damaged: after its end something follows that is not packed, so a part of it may be lost.",
    { hint: GET_AGAIN },
  );

/** What comes out of a gzip file, of one member or of several. */
export class Gunzip implements AsyncIterable<Uint8Array> {
  /** Bytes of the packed file taken so far. */
  packed = 0;
  /** Bytes of it up to the last that is not zero; zeros may fill a file up. */
  private filled = 0;
  private unpacked = 0;
  private readonly pieces: AsyncIterator<Uint8Array>;

  constructor(
    source: AsyncIterable<Uint8Array>,
    private readonly limits: GzipLimits = LIMITS,
  ) {
    this.pieces = source[Symbol.asyncIterator]();
  }

  /** To be read once. */
  async *[Symbol.asyncIterator](): AsyncGenerator<Uint8Array> {
    const input = Readable.from(this.rest());
    const output = createGunzip();
    input.on("error", (error) => output.destroy(error));
    input.pipe(output);
    try {
      for await (const piece of output as AsyncIterable<Buffer>) {
        this.check(piece.length);
        yield piece;
      }
      // The stream ends before a zero byte, whatever follows it.
      for await (const _ of this.rest());
      if (this.filled > output.bytesWritten) throw goesOn();
    } catch (error) {
      throw inWords(error);
    } finally {
      output.destroy();
      input.destroy();
      await this.pieces.return?.();
    }
  }

  private check(bytes: number): void {
    this.unpacked += bytes;
    if (this.unpacked > this.limits.bytes) throw tooMuch(this.limits);
    const most = this.limits.ratioFrom + this.packed * this.limits.ratio;
    if (this.unpacked > most) throw tooDense(this.limits);
  }

  private async *rest(): AsyncGenerator<Uint8Array> {
    for (;;) {
      const { done, value } = await this.pieces.next();
      if (done) return;
      let filled = value.length;
      while (filled > 0 && value[filled - 1] === 0) filled--;
      if (filled > 0) this.filled = this.packed + filled;
      this.packed += value.length;
      yield value;
    }
  }
}
