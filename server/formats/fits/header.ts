import type { ByteSource } from "./byte-source.ts";
import { CARD_LENGTH, type Card, continueCard, keywordOf, numberOf, readCard, wordsOf } from "./card.ts";
import { badHeader, counted, cutOff, notFits, quoted, tooLarge } from "./errors.ts";

/** Headers and data both fill whole blocks. */
export const BLOCK_LENGTH = 2880;

/** 999 columns with ten keywords each, and as much again in comments. */
const MOST_BLOCKS = 1000;

/** A header is ASCII; one that runs on into numbers for want of its END shows by its bytes. */
const MOST_STRANGE_BYTES = BLOCK_LENGTH / 10;

/** Keywords of one header, and what it says without keywords. */
export class FitsHeader {
  readonly comments: string[] = [];
  readonly history: string[] = [];
  /** Records that are neither a value nor a comment. */
  readonly unreadable: string[] = [];
  private readonly cards = new Map<string, Card>();
  /** The card that a CONTINUE would continue. */
  private open: Card | null = null;

  /** False at the record that ends the header. */
  add(record: string): boolean {
    const keyword = keywordOf(record);
    if (keyword === "END" && wordsOf(record) === "") return false;
    if (keyword === "CONTINUE") this.continue(record);
    else if (keyword === "COMMENT") this.comments.push(wordsOf(record));
    else if (keyword === "HISTORY") this.history.push(wordsOf(record));
    else if (keyword !== "") this.addCard(record);
    return true;
  }

  /** The value as a text; null where it is missing or empty. */
  text(keyword: string): string | null {
    return this.cards.get(keyword)?.text.trim() || null;
  }

  comment(keyword: string): string {
    return this.cards.get(keyword)?.comment ?? "";
  }

  /** NaN where the number is missing or unreadable. */
  number(keyword: string): number {
    return numberOf(this.text(keyword) ?? "");
  }

  isTrue(keyword: string): boolean {
    return this.text(keyword) === "T";
  }

  /** A count on which the table's shape depends. */
  count(keyword: string, otherwise?: number): number {
    const text = this.text(keyword);
    if (text === null && otherwise !== undefined) return otherwise;
    const value = this.number(keyword);
    if (Number.isSafeInteger(value) && value >= 0) return value;
    const what = text === null ? "is missing" : `is ${quoted(text)}, which is no count`;
    throw badHeader(`The keyword ${keyword} of a header ${what}, so the size of its data is not known.`);
  }

  private addCard(record: string): void {
    const card = readCard(record);
    this.open = null;
    if (!card) {
      this.unreadable.push(record.trimEnd());
      return;
    }
    // The first of two equal keywords counts; only that one may be continued.
    if (this.cards.has(card.keyword)) return;
    this.cards.set(card.keyword, card);
    this.open = card;
  }

  private continue(record: string): void {
    const card = this.open && continueCard(this.open, record);
    if (!card) {
      this.unreadable.push(record.trimEnd());
      return;
    }
    this.cards.set(card.keyword, card);
    this.open = card;
  }
}

const strangeBytes = (block: Uint8Array): number => {
  let strange = 0;
  for (const byte of block) if (byte < 32 || byte > 126) strange++;
  return strange;
};

/** False once the block held the END. */
const addBlock = (header: FitsHeader, block: Uint8Array): boolean => {
  const strange = strangeBytes(block);
  if (strange > MOST_STRANGE_BYTES)
    throw badHeader("A header has no END before its data begins, or holds bytes that are no text.");
  // Latin letters are not allowed, but where they are, one byte must stay one place of the record.
  const text = Buffer.from(block.buffer, block.byteOffset, block.length).toString("latin1");
  for (let at = 0; at < BLOCK_LENGTH; at += CARD_LENGTH) {
    const record = text.slice(at, at + CARD_LENGTH);
    if (!header.add(strange > 0 ? Buffer.from(record, "latin1").toString("utf8") : record)) return false;
  }
  return true;
};

const checkBeginning = (block: Uint8Array, first: "SIMPLE" | "XTENSION"): void => {
  const begins = Buffer.from(block.subarray(0, first.length)).toString("latin1");
  if (first === "SIMPLE") {
    if (begins !== first) throw notFits();
  } else if (!first.startsWith(begins))
    throw badHeader(`A header begins with ${quoted(begins)} where ${first} belongs.`);
};

/**
 * The header that begins here; null where the file ends instead.
 *
 * @param first - The keyword that it must begin with.
 */
export const readHeader = async (
  source: ByteSource,
  first: "SIMPLE" | "XTENSION",
): Promise<FitsHeader | null> => {
  const header = new FitsHeader();
  const block = new Uint8Array(BLOCK_LENGTH);
  for (let blocks = 0; blocks < MOST_BLOCKS; blocks++) {
    const filled = await source.fill(block);
    if (blocks === 0) {
      if (filled === 0) return null;
      checkBeginning(block.subarray(0, filled), first);
    }
    if (filled < BLOCK_LENGTH) throw cutOff("a header does not reach its END");
    if (!addBlock(header, block)) return header;
  }
  throw tooLarge(
    `A header has no END in ${counted((MOST_BLOCKS * BLOCK_LENGTH) / CARD_LENGTH)} records, the most that are read.`,
  );
};
