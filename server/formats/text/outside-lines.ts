import { countIn, declaredIn, isNoRow, type Preamble, uncommented } from "./preamble.ts";

const MOST_EXAMPLES = 5;
const LONGEST_EXAMPLE = 80;

/** Lines between and after the rows that are no rows: comments, ruled lines and counts. */
export class OutsideLines {
  comments = 0;
  readonly examples: string[] = [];
  declaredRows: number | null;
  private readonly mark: string | null;

  constructor({ mark, declaredRows }: Preamble) {
    this.mark = mark;
    this.declaredRows = declaredRows;
  }

  /** Whether a line that has as many values as a row may still be a comment. */
  get hasMark(): boolean {
    return this.mark !== null;
  }

  /** @param isWide whether the line has as many values as a row; then only the file's own mark makes it a comment */
  take(line: string, isWide: boolean): boolean {
    if (this.mark !== null && line.startsWith(this.mark)) return this.note(line, this.mark);
    if (isWide) return false;
    if (line.startsWith("#")) return this.note(line, "#");
    this.declaredRows ??= countIn(line);
    return isNoRow(line);
  }

  private note(line: string, mark: string): true {
    this.declaredRows ??= declaredIn(uncommented(line, mark));
    this.comments++;
    if (this.examples.length < MOST_EXAMPLES) this.examples.push(line.slice(0, LONGEST_EXAMPLE));
    return true;
  }
}
