/** One header record of 80 characters that holds a keyword and its value. */
export interface Card {
  readonly keyword: string;
  /** The value: without quotes and trailing blanks where it is a text, else as the file spells it. */
  readonly text: string;
  readonly isQuoted: boolean;
  readonly comment: string;
}

export const CARD_LENGTH = 80;
const KEYWORD_LENGTH = 8;

/** Place of the quote that ends a text whose inside begins at `from`; doubled quotes stand for one. −1 without one. */
const closingQuote = (field: string, from: number): number => {
  let at = field.indexOf("'", from);
  while (at >= 0 && field[at + 1] === "'") at = field.indexOf("'", at + 2);
  return at;
};

const commentOf = (rest: string): string => {
  const slash = rest.indexOf("/");
  return slash < 0 ? "" : rest.slice(slash + 1).trim();
};

const readValue = (field: string): Omit<Card, "keyword"> | null => {
  const plain = field.trimStart();
  if (!plain.startsWith("'")) {
    const slash = plain.indexOf("/");
    const text = (slash < 0 ? plain : plain.slice(0, slash)).trim();
    return { text, isQuoted: false, comment: commentOf(plain) };
  }
  const close = closingQuote(plain, 1);
  if (close < 0) return null;
  return {
    text: plain.slice(1, close).replaceAll("''", "'").trimEnd(),
    isQuoted: true,
    comment: commentOf(plain.slice(close + 1)),
  };
};

/** Keywords of more than eight characters: HIERARCH, words, an equals sign, the value. */
const readHierarch = (record: string): Card | null => {
  const equals = record.indexOf("=");
  if (equals < 0) return null;
  const value = readValue(record.slice(equals + 1));
  const keyword = record.slice(KEYWORD_LENGTH, equals).trim().toUpperCase();
  return value && keyword !== "" ? { keyword, ...value } : null;
};

export const keywordOf = (record: string): string => record.slice(0, KEYWORD_LENGTH).trimEnd().toUpperCase();

/** What stands behind the keyword of a record without a value, such as COMMENT. */
export const wordsOf = (record: string): string => record.slice(KEYWORD_LENGTH).trimEnd();

/** A record with a value; null where it cannot be read as one. */
export const readCard = (record: string): Card | null => {
  const keyword = keywordOf(record);
  if (keyword === "HIERARCH") return readHierarch(record);
  if (!/^[A-Z0-9_-]+$/.test(keyword) || record.slice(KEYWORD_LENGTH, KEYWORD_LENGTH + 2).trimEnd() !== "=")
    return null;
  const value = readValue(record.slice(KEYWORD_LENGTH + 2));
  return value && { keyword, ...value };
};

/** A text goes on in the next record when it ends in an ampersand and that record is a CONTINUE. */
export const continueCard = (card: Card, record: string): Card | null => {
  if (!card.isQuoted || !card.text.endsWith("&")) return null;
  const more = readValue(record.slice(KEYWORD_LENGTH));
  if (!more?.isQuoted) return null;
  return {
    ...card,
    text: card.text.slice(0, -1) + more.text,
    comment: [card.comment, more.comment].filter((words) => words !== "").join(" "),
  };
};

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[EeDd][+-]?\d+)?$/;

/** NaN for what is not a plain number; exponents may be written with D. */
export const numberOf = (text: string): number =>
  NUMBER.test(text) ? Number(text.replace(/d/i, "E")) : Number.NaN;

/** All digits of a whole number, however it is spelled; null for what is none. */
export const wholeOf = (text: string): bigint | null => {
  if (/^[+-]?\d{1,40}$/.test(text)) return BigInt(text.replace("+", ""));
  const value = numberOf(text);
  return Number.isInteger(value) && Math.abs(value) < 1e20 ? BigInt(value) : null;
};
