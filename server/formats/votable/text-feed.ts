import { isAscii } from "node:buffer";
import { TextDecoder } from "node:util";
import { DECLARATION_BYTES, xmlEncoding } from "./xml-encoding.ts";

/** Bytes decoded at a time, however large the pieces are that come in. */
const PIECE_BYTES = 65_536;

/** Encodings in which bytes below 128 stand for themselves wherever they occur. */
const ASCII_INSIDE = new Set(["utf-8", "windows-1252"]);

const countLines = (text: string, to: number): number => {
  let lines = 0;
  for (let at = text.indexOf("\n"); at >= 0 && at < to; at = text.indexOf("\n", at + 1)) lines++;
  return lines;
};

/** Bytes in pieces of any size, given out in pieces of at most PIECE_BYTES. */
class ByteFeed {
  /** Bytes given out so far. */
  given = 0;
  private piece: Uint8Array = new Uint8Array(0);
  private at = 0;
  private readonly source: AsyncIterator<Uint8Array>;

  constructor(source: AsyncIterable<Uint8Array>) {
    this.source = source[Symbol.asyncIterator]();
  }

  /** The beginning, which stays to be given out. */
  async peek(least: number): Promise<Uint8Array> {
    const pieces: Uint8Array[] = [];
    let length = 0;
    while (length < least) {
      const { done, value } = await this.source.next();
      if (done) break;
      pieces.push(value);
      length += value.length;
    }
    this.piece = pieces.length === 1 && pieces[0] ? pieces[0] : Buffer.concat(pieces);
    return this.piece;
  }

  async next(): Promise<Uint8Array | null> {
    while (this.at >= this.piece.length) {
      const { done, value } = await this.source.next();
      if (done) return null;
      this.piece = value;
      this.at = 0;
    }
    const piece = this.piece.subarray(this.at, this.at + PIECE_BYTES);
    this.at += piece.length;
    this.given += piece.length;
    return piece;
  }

  async close(): Promise<void> {
    await this.source.return?.();
  }
}

/** The text of a file, piece by piece: `text` from `at` on is what has not been used yet. */
export class TextFeed {
  text = "";
  at = 0;
  /** Places whose bytes mean nothing in the encoding, and the line of the first. */
  strays = 0;
  firstStrayLine = 0;
  /** Characters used and dropped. */
  private dropped = 0;
  private line = 1;
  private isEnded = false;
  private isClean = true;
  private readonly decoder: TextDecoder;

  private constructor(
    private readonly source: ByteFeed,
    readonly encoding: string,
  ) {
    this.decoder = new TextDecoder(encoding);
  }

  static async open(source: AsyncIterable<Uint8Array>): Promise<TextFeed> {
    const bytes = new ByteFeed(source);
    const start = await bytes.peek(DECLARATION_BYTES);
    return new TextFeed(bytes, xmlEncoding(start));
  }

  /** Bytes of the file read so far. */
  get bytes(): number {
    return this.source.given;
  }

  /** Characters of the file used so far. */
  get used(): number {
    return this.dropped + this.at;
  }

  /** Line of the file, from 1, at a place of `text`. */
  lineAt(at: number): number {
    return this.line + countLines(this.text, at);
  }

  /**
   * Drops what has been used and adds more; false where the file has no more. The more is waiting, the more is added,
   * so that looking for the end of something long does not take a time that grows with its square.
   */
  async more(): Promise<boolean> {
    this.line += countLines(this.text, this.at);
    this.dropped += this.at;
    this.text = this.text.slice(this.at);
    this.at = 0;
    const waiting = this.text.length;
    while (!this.isEnded && this.text.length <= waiting * 1.25) this.text += await this.nextText();
    return this.text.length > waiting;
  }

  close(): Promise<void> {
    return this.source.close();
  }

  private async nextText(): Promise<string> {
    const piece = await this.source.next();
    if (!piece) {
      this.isEnded = true;
      return this.checked(this.decoder.decode());
    }
    // Most pieces are plain, and these are several times quicker to decode.
    if (this.isClean && ASCII_INSIDE.has(this.encoding) && isAscii(piece))
      return Buffer.from(piece.buffer, piece.byteOffset, piece.length).toString("latin1");
    this.isClean = (piece.at(-1) ?? 0) < 128;
    return this.checked(this.decoder.decode(piece, { stream: true }));
  }

  private checked(text: string): string {
    const first = text.indexOf("\ufffd");
    if (first < 0) return text;
    if (this.strays === 0)
      this.firstStrayLine = this.line + countLines(this.text, this.text.length) + countLines(text, first);
    this.strays += text.split("\ufffd").length - 1;
    return text;
  }
}
