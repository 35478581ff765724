import type { DataBlock } from "./data-block.ts";
import { brokenMarkup, MOST_CHARACTERS, short, tooLong } from "./faults.ts";
import type { Markup } from "./markup.ts";
import type { TextCells } from "./text-cells.ts";
import type { TextFeed } from "./text-feed.ts";

const SPACE = 32;
/** Signs that XML forbids in any text (XML 1.0, W3C 2008, production 2 "Char"). */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are the forbidden ones
const FORBIDDEN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/;

const pastSpace = (text: string, from: number): number => {
  let at = from;
  while (text.charCodeAt(at) <= SPACE) at++;
  return at;
};

/** Remembers where a sign comes next, so that looking for it in piece after piece of a text goes over the text once. */
class NextSign {
  private text = "";
  private from = 0;
  private next = -1;

  constructor(private readonly sign: string) {}

  /** Whether the sign is from `from` up to `to`; places are asked for in their order. */
  isIn(text: string, from: number, to: number): boolean {
    if (text !== this.text || from < this.from) this.next = -1;
    this.text = text;
    this.from = from;
    if (this.next < from) {
      const next = text.indexOf(this.sign, from);
      this.next = next < 0 ? text.length : next;
    }
    return this.next < to;
  }
}

/**
 * Rows as elements. Rows that hold nothing but plain cells are taken by looking for their tags, which is many times
 * quicker than the parser; a row with anything else (entities, comments, attributes, empty elements with a space) goes
 * through the parser.
 */
export class TabledataBlock implements DataBlock {
  private readonly rowStart: string;
  private readonly rowEnd: string;
  private readonly cellStart: string;
  private readonly cellEnd: string;
  private readonly emptyCell: string;
  /** Whether the parser stands between two rows, so that the quick way may go on. */
  private isBetweenRows = true;
  isDone = false;
  /** The row as the parser sees it. */
  private cell: string | null = null;
  private cellsSeen: string[] = [];
  private cellCount = 0;
  private rowCharacters = 0;
  private oddity = "";
  private isInRow = false;
  private line = 1;
  /** References, and line ends that the parser makes one: neither stands for itself. */
  private readonly references = new NextSign("&");
  private readonly returns = new NextSign("\r");
  /** The text that was looked through for forbidden signs, and its first place that has one or its length. */
  private lookedAt = "";
  private plainUpTo = 0;

  constructor(
    private readonly cells: TextCells,
    prefix: string,
  ) {
    this.rowStart = `<${prefix}TR>`;
    this.rowEnd = `</${prefix}TR>`;
    this.cellStart = `<${prefix}TD>`;
    this.cellEnd = `</${prefix}TD>`;
    this.emptyCell = `<${prefix}TD/>`;
  }

  consume(feed: TextFeed, markup: Markup): boolean {
    const { batch } = this.cells;
    while (!batch.isFull && !this.isDone) {
      if (this.isBetweenRows) {
        const end = this.quickRow(feed);
        if (end === "more") return false;
        if (end === "taken") continue;
        this.isBetweenRows = false;
        this.line = feed.lineAt(pastSpace(feed.text, feed.at));
      }
      if (!markup.step(feed)) return false;
    }
    return true;
  }

  open(name: string, attributes: Readonly<Record<string, string>>): void {
    if (name === "TR" && !this.isInRow) this.beginRow();
    else if (name === "TD" && this.isInRow && this.cell === null) {
      this.cell = "";
      if (attributes.encoding !== undefined) this.oddity = "a cell has an encoding of its own";
    } else throw brokenMarkup(this.line, `the element ${short(name)} stands inside the rows`);
  }

  text(text: string): void {
    if (this.cell === null) {
      if (text.trim() !== "") this.oddity = "there is text between its cells";
      return;
    }
    this.rowCharacters += text.length;
    if (this.rowCharacters > MOST_CHARACTERS) throw tooLong(this.line, "a row");
    this.cell += text;
  }

  close(name: string): void {
    if (name === "TD") {
      if (this.cellCount < this.cells.fields.length) this.cellsSeen.push(this.cell ?? "");
      this.cellCount++;
      this.cell = null;
    } else if (name === "TR") this.endRow();
  }

  finish(): void {
    this.isDone = true;
  }

  private beginRow(): void {
    this.isInRow = true;
    this.cellsSeen = [];
    this.cellCount = 0;
    this.rowCharacters = 0;
    this.oddity = "";
  }

  private endRow(): void {
    this.isInRow = false;
    this.isBetweenRows = true;
    const why = this.oddity || this.readCells();
    if (why === "") this.cells.batch.commit();
    else this.cells.batch.refuse(this.line, this.cellsSeen.join("\t"), why);
  }

  private readCells(): string {
    if (this.cellCount !== this.cells.fields.length) return this.wrongCount(this.cellCount);
    for (const [index, cell] of this.cellsSeen.entries())
      if (!this.cells.put(index, cell)) return this.cells.why;
    return "";
  }

  private wrongCount(count: number): string {
    return `it has ${count} cells where the table has ${this.cells.fields.length} columns`;
  }

  /** Takes the next row where it is plain and whole. */
  private quickRow(feed: TextFeed): "taken" | "more" | "unusual" {
    const { text } = feed;
    const start = pastSpace(text, feed.at);
    if (text.length - start < this.rowEnd.length) return this.moreOrTooLong(feed);
    if (!text.startsWith(this.rowStart, start)) return "unusual";
    const end = text.indexOf(this.rowEnd, start);
    if (end < 0) return this.moreOrTooLong(feed);
    return end < this.plainEnd(text) ? this.quickCells(feed, start, end) : "unusual";
  }

  private moreOrTooLong(feed: TextFeed): "more" {
    if (feed.text.length - feed.at > MOST_CHARACTERS) throw tooLong(feed.lineAt(feed.at), "a row");
    return "more";
  }

  /** Place of the first forbidden sign, looked for once in each text. */
  private plainEnd(text: string): number {
    if (text !== this.lookedAt) {
      const at = text.search(FORBIDDEN);
      this.plainUpTo = at < 0 ? text.length : at;
    }
    this.lookedAt = text;
    return this.plainUpTo;
  }

  private quickCells(feed: TextFeed, start: number, end: number): "taken" | "unusual" {
    const { text } = feed;
    const width = this.cells.fields.length;
    let at = start + this.rowStart.length;
    let count = 0;
    let why = "";
    for (;;) {
      at = pastSpace(text, at);
      if (at === end) break;
      let cell = "";
      if (text.startsWith(this.cellStart, at)) {
        const from = at + this.cellStart.length;
        const to = text.indexOf("<", from);
        if (!text.startsWith(this.cellEnd, to)) return "unusual";
        cell = text.slice(from, to);
        if (this.references.isIn(text, from, to) || this.returns.isIn(text, from, to)) return "unusual";
        at = to + this.cellEnd.length;
      } else if (text.startsWith(this.emptyCell, at)) at += this.emptyCell.length;
      else return "unusual";
      if (count < width && why === "" && !this.cells.put(count, cell)) why = this.cells.why;
      count++;
    }
    feed.at = end + this.rowEnd.length;
    if (count !== width) why = this.wrongCount(count);
    if (why === "") this.cells.batch.commit();
    else this.cells.batch.refuse(feed.lineAt(start), text.slice(start, feed.at), why);
    return "taken";
  }
}
