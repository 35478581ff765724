import { isAscii } from "node:buffer";
import { TextDecoder } from "node:util";
import { peek } from "../delimited/peek.ts";
import { type JudgedEncoding, judgeEncoding, type TextEncoding } from "./encoding.ts";

/** Bytes by which the encoding and the layout of a text are judged. */
export const HEAD_BYTES = 256 * 1024;
const MOST_STRAYS_SHOWN = 5;
const STRAY_CONTEXT = 20;
/** Pieces of any size come in; smaller ones go out, so that nothing held grows with them. */
const PIECE_BYTES = 256 * 1024;

/** Encodings in which bytes below 128 stand for themselves wherever they occur. */
const ASCII_INSIDE: ReadonlySet<TextEncoding> = new Set<TextEncoding>(["utf-8", "latin1"]);

export interface TextPiece {
  readonly text: string;
  /** Bytes of the source read up to its end. */
  readonly bytes: number;
}

const decoderFor = (encoding: TextEncoding): TextDecoder =>
  new TextDecoder(encoding === "latin1" ? "windows-1252" : encoding);

const countLines = (text: string, to: number): number => {
  let lines = 0;
  for (let at = text.indexOf("\n"); at >= 0 && at < to; at = text.indexOf("\n", at + 1)) lines++;
  return lines;
};

/** Every line ends in a line feed, whatever ended it: CR LF and a lone CR are read as one too. */
const withLineFeeds = (text: string): string => (text.includes("\r") ? text.replace(/\r\n?/g, "\n") : text);

/** The text of a file, decoded piece by piece, with all its line ends made one. */
export class TextSource {
  /** Places whose bytes mean nothing in the encoding. */
  strays = 0;
  /** Line and surroundings of the first of them. */
  readonly strayExamples: string[] = [];
  private lines = 0;
  private heldReturn = false;
  private isClean = true;

  private constructor(
    /** The beginning of the file. */
    readonly head: Uint8Array,
    /** Whether the head is all of the file. */
    readonly isWhole: boolean,
    private readonly bytes: AsyncIterable<Uint8Array>,
    readonly judged: JudgedEncoding,
  ) {}

  /** @param encoding as chosen by a person; judged by the bytes without it */
  static async open(source: AsyncIterable<Uint8Array>, encoding?: TextEncoding): Promise<TextSource> {
    const { head, whole } = await peek(source, HEAD_BYTES);
    const judged = encoding === undefined ? judgeEncoding(head) : { encoding, isGuess: false };
    return new TextSource(head, head.length < HEAD_BYTES, whole, judged);
  }

  get encoding(): TextEncoding {
    return this.judged.encoding;
  }

  /** Whole lines of the beginning, each ending in a line feed but for the last line of a file that is all here. */
  headText(): string {
    const text = withLineFeeds(decoderFor(this.encoding).decode(this.head, { stream: true }));
    return this.isWhole ? text : text.slice(0, text.lastIndexOf("\n") + 1);
  }

  /** All of the text, to be read once. */
  async *pieces(): AsyncGenerator<TextPiece> {
    const decoder = decoderFor(this.encoding);
    let bytes = 0;
    for await (const whole of this.bytes)
      for (let at = 0; at < whole.length; at += PIECE_BYTES) {
        const piece = whole.subarray(at, at + PIECE_BYTES);
        bytes += piece.length;
        const text = this.ended(this.decode(decoder, piece));
        if (text !== "") yield { text, bytes };
      }
    const rest = this.ended(this.checked(decoder.decode()), true);
    if (rest !== "") yield { text: rest, bytes };
  }

  /** Most pieces are plain, and these are several times quicker to decode. */
  private decode(decoder: TextDecoder, piece: Uint8Array): string {
    if (this.isClean && ASCII_INSIDE.has(this.encoding) && isAscii(piece))
      return Buffer.from(piece.buffer, piece.byteOffset, piece.length).toString("latin1");
    this.isClean = (piece.at(-1) ?? 0) < 128;
    return this.checked(decoder.decode(piece, { stream: true }));
  }

  /** A return at the end of a piece waits for what follows: a line feed would belong to it. */
  private ended(text: string, isLast = false): string {
    let own = this.heldReturn ? `\r${text}` : text;
    this.heldReturn = !isLast && own.endsWith("\r");
    if (this.heldReturn) own = own.slice(0, -1);
    own = withLineFeeds(own);
    this.lines += countLines(own, own.length);
    return own;
  }

  private checked(text: string): string {
    for (let at = text.indexOf("\ufffd"); at >= 0; at = text.indexOf("\ufffd", at + 1)) {
      this.strays++;
      if (this.strayExamples.length >= MOST_STRAYS_SHOWN) continue;
      const line = this.lines + 1 + countLines(withLineFeeds(text.slice(0, at)), at);
      const around = text.slice(Math.max(0, at - STRAY_CONTEXT), at + STRAY_CONTEXT).replace(/\s+/g, " ");
      this.strayExamples.push(`line ${line}: ${around}`);
    }
    return text;
  }
}
