import { Findings } from "../findings.ts";
import type { OpenTable, RowBatch, TableReader } from "../table.ts";
import { type ChosenTable, VotableDocument } from "./document.ts";
import { endsInMiddle, notVotable, short, unreadable } from "./faults.ts";
import { Markup } from "./markup.ts";
import { TextFeed } from "./text-feed.ts";
import { AFTER_END, FEWER_ROWS, MORE_ROWS, STRAY_BYTES } from "./words.ts";

/** Characters that may stand before the data: several times what thousands of described columns take. */
const LONGEST_HEAD = 20_000_000;
const LONGEST_SERVICE_WORDS = 300;

/** A document being read: the text, the markup in it, and what it says. */
class Reading {
  readonly findings = new Findings();
  readonly document: VotableDocument;
  private readonly markup: Markup;

  constructor(private readonly feed: TextFeed) {
    this.document = new VotableDocument(feed.encoding, this.findings);
    this.markup = new Markup(this.document);
  }

  /** Reads up to the rows of the first table that has some. */
  async head(): Promise<ChosenTable> {
    await this.pastBlanks();
    while (!this.document.chosen) {
      if (this.document.isClosed) return this.withoutData();
      if (!(await this.step())) throw this.cutOff("before the rows of a table begin");
      if (this.feed.used > LONGEST_HEAD) throw notVotable("it goes on and on without the rows of a table");
    }
    return this.document.chosen;
  }

  async *batches({ header, batch }: ChosenTable): AsyncGenerator<RowBatch> {
    try {
      while (!this.document.isClosed) {
        if (!(await this.step()))
          throw this.cutOff(`after ${batch.seen.toLocaleString("en")} rows, and the VOTable is not closed`);
        if (batch.isFull) yield batch.take(this.feed.bytes);
      }
      if (!batch.isEmpty) yield batch.take(this.feed.bytes);
      await this.tail();
      this.compareRows(header.declaredRows, batch.seen);
      this.tellStrays();
    } finally {
      await this.feed.close();
    }
  }

  /** One tag, or rows until a batch is full; false where the file has no more. */
  private async step(): Promise<boolean> {
    const { block } = this.document;
    const isEnough = block ? block.consume(this.feed, this.markup) : this.markup.step(this.feed);
    if (block?.isDone) this.document.block = null;
    return isEnough || (await this.feed.more());
  }

  /** An XML declaration must be first, but blank lines before it are common and harmless. */
  private async pastBlanks(): Promise<void> {
    do {
      while (this.feed.text.charCodeAt(this.feed.at) <= 32) this.feed.at++;
    } while (this.feed.at >= this.feed.text.length && (await this.feed.more()));
    if (this.feed.at >= this.feed.text.length) throw notVotable("it is empty");
    if (this.feed.text[this.feed.at] !== "<") throw notVotable("it does not begin with markup");
  }

  private cutOff(where: string): Error {
    return endsInMiddle(this.feed.lineAt(this.feed.text.length), where);
  }

  private withoutData(): ChosenTable {
    const { serviceError } = this.document;
    if (serviceError !== null)
      throw unreadable(
        "votable-service-error",
        `The service answered with an error and no table: ${short(serviceError, LONGEST_SERVICE_WORDS) || "it does not say which"}.`,
        "Change the query by what the service says, and bring the answer that holds a table.",
      );
    this.document.chooseEmpty();
    if (this.document.chosen) return this.document.chosen;
    throw unreadable(
      "votable-no-table",
      "The VOTable holds no table: there is no TABLE with columns in it.",
      "Check that the query or download asked for a table and not for something else.",
    );
  }

  /** Reads what follows the document, which should be nothing. */
  private async tail(): Promise<void> {
    do {
      const rest = this.feed.text.slice(this.feed.at).trim();
      this.feed.at = this.feed.text.length;
      if (rest === "") continue;
      this.findings.add(AFTER_END, short(rest));
      return;
    } while (await this.feed.more());
  }

  private compareRows(declared: number | null, seen: number): void {
    if (declared === null || declared === seen) return;
    const words = `${declared.toLocaleString("en")} declared, ${seen.toLocaleString("en")} found`;
    this.findings.add(seen < declared ? FEWER_ROWS : MORE_ROWS, words, Math.abs(declared - seen));
  }

  private tellStrays(): void {
    const { strays, firstStrayLine } = this.feed;
    if (strays > 0) this.findings.add(STRAY_BYTES, `the first on line ${firstStrayLine}`, strays);
  }
}

/**
 * Opens a VOTable (IVOA REC 1.0 to 1.5) whose rows are TABLEDATA, BINARY or BINARY2. The first table with data is read.
 *
 * @throws AppError where it is no VOTable, ends or breaks in the middle, or keeps its rows where they cannot be read
 */
export const openVotable: OpenTable = async (source): Promise<TableReader> => {
  const feed = await TextFeed.open(source);
  try {
    const reading = new Reading(feed);
    const chosen = await reading.head();
    return {
      header: chosen.header,
      batches: reading.batches(chosen),
      findings: () => reading.findings.list(),
    };
  } catch (error) {
    await feed.close();
    throw error;
  }
};
