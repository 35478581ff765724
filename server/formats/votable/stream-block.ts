import { Base64Decoder } from "./base64.ts";
import type { BinaryRows } from "./binary-rows.ts";
import type { DataBlock } from "./data-block.ts";
import { brokenMarkup, short } from "./faults.ts";
import type { Markup } from "./markup.ts";
import type { TextFeed } from "./text-feed.ts";

const AMPERSAND = "&";

/** Characters decoded at a time, so that the bytes waiting stay few. */
const PIECE = 65_536;

/**
 * Rows as base64. The text goes to the decoder as it comes and never becomes one text of the parser; only a stream with
 * comments, sections or references inside does, up to the parser's limit.
 */
export class StreamBlock implements DataBlock {
  isDone = false;
  private readonly decoder = new Base64Decoder();
  /** Whether the parser reads the text of this stream. */
  private isParsed = false;
  private isClosed = false;
  private line: () => number = () => 1;

  /** @param rows where they go; null for the stream of a table that is not read */
  constructor(private readonly rows: BinaryRows | null) {}

  consume(feed: TextFeed, markup: Markup): boolean {
    this.line = () => feed.lineAt(feed.at);
    for (;;) {
      if (this.rows?.read()) return true;
      if (this.isClosed) return this.end();
      if (this.isParsed) {
        if (!markup.step(feed)) return false;
      } else if (!this.takeText(feed)) return false;
    }
  }

  open(name: string): void {
    throw brokenMarkup(this.line(), `the element ${short(name)} stands inside the encoded rows`);
  }

  text(text: string): void {
    for (let from = 0; from < text.length; from += PIECE) {
      this.decode(text, from, Math.min(text.length, from + PIECE), this.line);
      this.rows?.read();
    }
  }

  close(): void {
    // The stream has no elements inside: finish() is told of its own end.
  }

  finish(): void {
    this.isClosed = true;
  }

  private end(): true {
    this.isDone = true;
    if (!this.decoder.isWhole)
      throw brokenMarkup(this.line(), "its base64 text ends inside a group of signs");
    this.rows?.finish();
    return true;
  }

  /** Decodes what there is up to the next markup; false where there is nothing. */
  private takeText(feed: TextFeed): boolean {
    if (feed.at >= feed.text.length) return false;
    const limit = Math.min(feed.text.length, feed.at + PIECE);
    const piece = feed.text.slice(feed.at, limit);
    const tag = piece.indexOf("<");
    const to = tag < 0 ? limit : feed.at + tag;
    if (piece.includes(AMPERSAND)) this.isParsed = true;
    else {
      this.decode(feed.text, feed.at, to, (at) => feed.lineAt(at));
      feed.at = to;
      if (tag >= 0) this.isParsed = true;
    }
    return true;
  }

  private decode(text: string, from: number, to: number, lineAt: (at: number) => number): void {
    if (!this.rows) return;
    this.rows.makeRoom(to - from);
    this.rows.end = this.decoder.decode(text, from, to, this.rows.bytes, this.rows.end);
    if (this.decoder.stoppedAt < 0) return;
    const sign = JSON.stringify(text[this.decoder.stoppedAt]);
    throw brokenMarkup(lineAt(this.decoder.stoppedAt), `the sign ${sign} does not belong into base64`);
  }
}
