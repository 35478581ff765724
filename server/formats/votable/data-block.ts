import type { Markup, MarkupEvents } from "./markup.ts";
import type { TextFeed } from "./text-feed.ts";

/** The element that holds the rows: it takes its text from the feed itself, and markup only where there is some. */
export interface DataBlock extends MarkupEvents {
  /**
   * Reads until its batch is full, its element is closed or more text is needed.
   *
   * @returns false where more text is needed
   */
  consume(feed: TextFeed, markup: Markup): boolean;
  /** The element is closed; rows may still be waiting for a batch. */
  finish(): void;
  /** Its element is closed and all its rows are given out. */
  readonly isDone: boolean;
}
