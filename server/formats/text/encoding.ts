import { detectEncoding, type Encoding } from "../encoding.ts";

export type TextEncoding = Encoding | "utf-16be";

export interface JudgedEncoding {
  readonly encoding: TextEncoding;
  /** Neither a mark nor valid UTF-8 said so. */
  readonly isGuess: boolean;
}

/** Pairs of bytes by which text of two bytes a letter is told. */
const PAIRS = 2_000;
/** Share of Latin letters, digits and signs that even a table with foreign names has. */
const ZERO_SHARE = 0.4;
const STRAY_SHARE = 0.02;

/** UTF-16 without its mark: of most letters one byte is zero, always the same of the two. */
const wideEncoding = (start: Uint8Array): TextEncoding | null => {
  const pairs = Math.min(start.length >> 1, PAIRS);
  if (pairs < 2) return null;
  let [even, odd] = [0, 0];
  for (let i = 0; i < pairs; i++) {
    if (start[2 * i] === 0) even++;
    if (start[2 * i + 1] === 0) odd++;
  }
  if (odd > pairs * ZERO_SHARE && even < pairs * STRAY_SHARE) return "utf-16le";
  if (even > pairs * ZERO_SHARE && odd < pairs * STRAY_SHARE) return "utf-16be";
  return null;
};

/** Letters of several bytes that UTF-8 allows, and places that it does not. */
const countUtf8 = (start: Uint8Array): { letters: number; strays: number } => {
  const text = new TextDecoder("utf-8").decode(start, { stream: true });
  let [letters, strays] = [0, 0];
  for (const letter of text) {
    if (letter === "\ufffd") strays++;
    else if (letter > "\u007f") letters++;
  }
  return { letters, strays };
};

/**
 * Encoding of a text by its mark, else by its bytes. A few stray bytes do not make a text of UTF-8 letters one of
 * single bytes.
 */
export const judgeEncoding = (start: Uint8Array): JudgedEncoding => {
  const found = detectEncoding(start);
  if (found.isUnreadable) return { encoding: "utf-16be", isGuess: false };
  if (found.encoding === "utf-16le") return found;
  const wide = wideEncoding(start);
  if (wide) return { encoding: wide, isGuess: false };
  if (!found.isGuess) return found;
  const { letters, strays } = countUtf8(start);
  return letters > strays ? { encoding: "utf-8", isGuess: false } : found;
};
