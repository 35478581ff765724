/** What the beginning of an explanation says by its signs, and the words after them. */
export interface Explanation {
  readonly words: string;
  /** Least and greatest value, as written, such as `[0/360]`; empty without them. */
  readonly limits: string;
  /** The column may be blank. */
  readonly isNullable: boolean;
  /** Text that stands for a blank; null where there is none. */
  readonly nullMark: string | null;
}

const NOTE_MARK = /^\*\s*/;
const LIMITS = /^[\][][^\][]*[\][]\s*/;
const NULL_MARK = /^\?(?:=(\S*))?(?:\s+|$)|^\?(?=[^\s=])/;
const ORDER = /^[+-]=?\s+/;

/**
 * Parts an explanation of a byte-by-byte description: `*` for a note, `[min/max]`, `?` or `?=mark`, `+` or `-` for an
 * order, then words (CDS, Standards for Documentation of Astronomical Catalogues 2.0, 2000, section 3.2.3).
 */
export const readExplanation = (text: string): Explanation => {
  let words = text.trim().replace(NOTE_MARK, "");
  const limits = (LIMITS.exec(words)?.[0] ?? "").trim();
  words = words.replace(LIMITS, "");
  const mark = NULL_MARK.exec(words);
  words = words.replace(NULL_MARK, "").replace(ORDER, "");
  return { words: words.trim(), limits, isNullable: mark !== null, nullMark: mark?.[1] || null };
};
