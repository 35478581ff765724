import { SaxesParser } from "saxes";
import { brokenMarkup, MOST_CHARACTERS, short, tooLong, unreadable } from "./faults.ts";
import type { TextFeed } from "./text-feed.ts";

const DEEPEST = 64;

/** What the markup says, by local names: prefixes and namespaces are left out. */
export interface MarkupEvents {
  open(name: string, attributes: Readonly<Record<string, string>>, prefix: string): void;
  text(text: string): void;
  close(name: string): void;
}

const refuseEntities = (doctype: string): void => {
  if (!/<!\s*ENTITY/i.test(doctype)) return;
  throw unreadable(
    "votable-entities",
    "The file declares entities of its own, by which a small file can grow without end; such files are not read.",
    "Get the table without a DOCTYPE, or save it again with a program that writes VOTables.",
  );
};

/**
 * Follows the markup of a document, a tag at a time, within limits of depth and length. Entities other than the five of
 * XML are errors, and nothing outside the file is ever looked up.
 */
export class Markup {
  private readonly parser = new SaxesParser({ xmlns: false, position: true });
  private depth = 0;
  /** Characters since the last tag, which the parser may be holding. */
  private held = 0;
  /** The place in the feed that the parser is being given, and its own line there. */
  private feed: TextFeed | null = null;
  private parserLine = 0;

  constructor(private readonly events: MarkupEvents) {
    this.parser.on("error", (error) => {
      throw brokenMarkup(this.line(), short(error.message.replace(/^[^ ]*\d+:\d+: /, "").replace(/\.$/, "")));
    });
    this.parser.on("doctype", refuseEntities);
    this.parser.on("opentag", (tag) => this.opened(tag.name, tag.attributes));
    this.parser.on("closetag", (tag) => this.closed(tag.name));
    this.parser.on("text", (text) => this.events.text(text));
    this.parser.on("cdata", (text) => this.events.text(text));
  }

  /** Reads up to the end of the next tag, or what there is of it; false where the feed has nothing left. */
  step(feed: TextFeed): boolean {
    if (feed.at >= feed.text.length) return false;
    const end = feed.text.indexOf(">", feed.at);
    const to = end < 0 ? feed.text.length : end + 1;
    this.feed = feed;
    this.parserLine = this.parser.line;
    this.held += to - feed.at;
    if (this.held > MOST_CHARACTERS) throw tooLong(this.line(), "a text or tag");
    this.parser.write(feed.text.slice(feed.at, to));
    feed.at = to;
    return true;
  }

  private line(): number {
    return this.feed ? this.feed.lineAt(this.feed.at) + this.parser.line - this.parserLine : 1;
  }

  private opened(tag: string, attributes: Readonly<Record<string, string>>): void {
    this.held = 0;
    this.depth++;
    if (this.depth > DEEPEST) throw brokenMarkup(this.line(), `its elements lie more than ${DEEPEST} deep`);
    const colon = tag.lastIndexOf(":");
    this.events.open(tag.slice(colon + 1), attributes, tag.slice(0, colon + 1));
  }

  private closed(tag: string): void {
    this.held = 0;
    this.depth--;
    this.events.close(tag.slice(tag.lastIndexOf(":") + 1));
  }
}
