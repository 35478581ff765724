import { isDescriptionHead, readDescriptions } from "./description.ts";
import type { DescribedField } from "./field.ts";
import { isNote } from "./notes.ts";
import { isRuleLine } from "./rule.ts";

/** Longer than any description that was repeated between rows. */
const MOST_LINES = 2000;
/** Ruled lines before and after the heads of the columns, and after the columns. */
const RULES = 3;

/** Passes over a description that stands again between the rows, as in tables that were put together from pages. */
export class RepeatedDescription {
  private held: string[] | null = null;
  private rules = 0;
  private isNoted = false;

  constructor(private readonly fields: readonly DescribedField[]) {}

  /** `row`: the line is none of a description; `other`: the description is that of another table. */
  take(line: string): "row" | "description" | "other" {
    if (this.held === null) {
      if (!isDescriptionHead(line)) return "row";
      this.held = [line];
      this.rules = 0;
      this.isNoted = false;
      return "description";
    }
    if (this.isRowAfter(line)) return this.finish();
    this.held.push(line);
    if (isNote(line)) this.isNoted = true;
    if (isRuleLine(line)) {
      this.rules++;
      if (this.rules > RULES) this.isNoted = false;
    }
    return this.held.length > MOST_LINES ? "other" : "description";
  }

  private isRowAfter(line: string): boolean {
    return this.rules >= RULES && !this.isNoted && !isRuleLine(line) && !isNote(line) && line.trim() !== "";
  }

  private finish(): "row" | "other" {
    const [again] = readDescriptions(this.held ?? []);
    this.held = null;
    const isSame =
      again?.fields.length === this.fields.length &&
      again.fields.every(({ label, from, to }, at) => {
        const own = this.fields[at];
        return own?.label === label && own.from === from && own.to === to;
      });
    return isSame ? "row" : "other";
  }
}
