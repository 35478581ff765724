import { isBlankWord, parseNumber } from "../numbers.ts";
import type { DescribedField } from "./field.ts";

/** Whether the places of a description count characters or the bytes of UTF-8. */
export type Counting = "characters" | "bytes";

/** Letters that take more than one byte. */
export const isWide = (line: string): boolean => /[^\0-\x7f]/.test(line);

/** The text of each field in a line. */
export const cellsOf = (line: string, fields: readonly DescribedField[], counting: Counting): string[] => {
  if (counting === "characters" || !isWide(line))
    return fields.map(({ from, to }) => line.slice(from, to).trim());
  const bytes = Buffer.from(line, "utf8");
  return fields.map(({ from, to }) => bytes.toString("utf8", from, Math.min(to, bytes.length)).trim());
};

/** Length of a line without the blanks at its end, as the places are counted. */
export const lengthOf = (line: string, counting: Counting): number => {
  const own = line.trimEnd();
  return counting === "bytes" && isWide(own) ? Buffer.byteLength(own, "utf8") : own.length;
};

/** Signs that may stand between described columns; any other would be a part of a value that the places cut off. */
const BETWEEN = new Set([" ", "\t", "|", ",", ";", ":", "&", "/", '"', "'"]);

/** Where a line has a part of a value between two columns, from 0; −1 where it has none. */
export const strayBetween = (line: string, fields: readonly DescribedField[], counting: Counting): number => {
  const text = counting === "bytes" && isWide(line) ? Buffer.from(line, "utf8").toString("latin1") : line;
  let at = 0;
  for (const { from, to } of fields) {
    for (; at < from && at < text.length; at++) if (!BETWEEN.has(text[at] ?? " ")) return at;
    at = to;
  }
  return -1;
};

/** Whether a line may be a row: nothing beyond the columns or between them, and a number wherever one is wanted. */
export const fits = (line: string, fields: readonly DescribedField[], counting: Counting): boolean => {
  const last = fields.at(-1)?.to ?? 0;
  if (lengthOf(line, counting) > last || strayBetween(line, fields, counting) >= 0) return false;
  let numbers = 0;
  return (
    cellsOf(line, fields, counting).every((text, at) => {
      const field = fields[at];
      if (text.includes("\ufffd")) return false;
      if (!field || field.type === "text" || text === field.nullMark || isBlankWord(text)) return true;
      numbers++;
      return !Number.isNaN(parseNumber(text, "."));
    }) && numbers > 0
  );
};

/** How the places are counted, by the lines in which it makes a difference; characters where they leave it open. */
export const judgeCounting = (lines: readonly string[], fields: readonly DescribedField[]): Counting => {
  const telling = lines.filter(isWide);
  const by = (counting: Counting): number => telling.filter((line) => fits(line, fields, counting)).length;
  return by("bytes") > by("characters") ? "bytes" : "characters";
};
