import { count } from "#shared/format/numbers.ts";
import { LIMITS } from "#shared/limits.ts";

const linesOf = (text: string): string[] => text.split(/\r\n|\n|\r/).filter((line) => line.trim() !== "");

/** Rows below the line of names. */
export const pastedRows = (text: string): number => Math.max(0, linesOf(text).length - 1);

/** What is wrong with pasted text before it is sent. */
export const pastedRefusal = (text: string): string | undefined => {
  const rows = pastedRows(text);
  if (linesOf(text).length === 0) return "Paste the rows first, the names of the columns in the first line.";
  if (rows === 0)
    return "There is one line. The first line names the columns; put at least one star below it.";
  if (rows > LIMITS.pastedRows)
    return `These are ${count(rows)} rows; ${count(LIMITS.pastedRows)} may be pasted. Bring them as a file.`;
  return undefined;
};

/** Pasted text as a file: kept exactly as it was pasted. */
export const pastedFile = (text: string): File => new File([text], "pasted.txt", { type: "text/plain" });
