/** What stands before the rows of a text table, besides its names: comments, frames and blank lines. */
export interface Preamble {
  /** Comment lines in order, without their marks. */
  readonly comments: readonly string[];
  /** The mark that they begin with; null where there are none. */
  readonly mark: string | null;
  /** Lines up to the first that is none of this. */
  readonly lines: number;
  /** Rows that a comment says the table has. */
  readonly declaredRows: number | null;
  readonly title: string | null;
}

/** Marks of comments, as archives and programs write them. */
const MARKS = ["#", "!", "%", "\\"] as const;

/** Mark of a comment that a line begins with; null for another line. */
export const commentMark = (line: string): string | null => {
  const mark = MARKS.find((m) => line.trimStart().startsWith(m)) ?? null;
  // Copies of a database's own output spell a blank cell as \N.
  return mark === "\\" && /^\s*\\N\b/.test(line) ? null : mark;
};

/** A comment's words. */
export const uncommented = (line: string, mark: string): string => {
  let at = line.indexOf(mark);
  while (line[at] === mark) at++;
  return line.slice(at, at + LONGEST_COMMENT).replace(/^ /, "");
};

/** A line drawn below names or around a table: dashes, equals signs and the crossings of a frame. */
export const isRule = (line: string): boolean => /^[-=\s|+:]+$/.test(line) && /-{3}|==|\|\s*[-=]/.test(line);

/** As a database's own client counts what it printed. */
const COUNTED = /^\s*\((\d{1,12}) rows?\)\s*$/;

/** The count that such a line gives; null for any other. */
export const countIn = (line: string): number | null => {
  const found = COUNTED.exec(line);
  return found ? Number(found[1]) : null;
};

/** Whether a line among the rows is none: drawn, or a count of them. */
export const isNoRow = (line: string): boolean => isRule(line) || countIn(line) !== null;

const ROWS =
  /(?:^|[^\w])(?:n(?:umber)?[ _]?(?:of[ _])?rows?|rows?(?:[ _]?(?:retrieved|returned|count|total|number))?|row[ _]?count|nrows)\s*[:=]\s*(\d{1,3}(?:,\d{3})+|\d{1,12})\b/i;

/** Rows that a comment declares, such as `rows=500000`; null for other words. */
export const declaredIn = (comment: string): number | null => {
  const found = ROWS.exec(comment);
  return found ? Number((found[1] ?? "").replaceAll(",", "")) : null;
};

const TITLE = /^\s*title\s*[:=]\s*(\S.*)$/i;

/** As much of a comment as is looked at. */
const LONGEST_COMMENT = 1000;

const firstOf = <T>(comments: readonly string[], find: (comment: string) => T | null): T | null => {
  for (const comment of comments) {
    const found = find(comment);
    if (found !== null) return found;
  }
  return null;
};

/** Reads the lines of a text's beginning up to the first that belongs to the table itself. */
export const readPreamble = (lines: readonly string[]): Preamble => {
  const comments: string[] = [];
  let mark: string | null = null;
  let at = 0;
  for (; at < lines.length; at++) {
    const line = lines[at] ?? "";
    if (line.trim() === "") continue;
    const own = commentMark(line);
    if (own === null) break;
    mark ??= own;
    comments.push(uncommented(line, own));
  }
  return {
    comments,
    mark,
    lines: at,
    declaredRows: firstOf(comments, declaredIn),
    title: firstOf(comments, (comment) => TITLE.exec(comment)?.[1]?.trim() ?? null),
  };
};
