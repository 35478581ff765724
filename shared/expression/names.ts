import { COLUMNS, type Column, errorKey, isNumeric } from "../catalogue/columns.ts";

/** What an expression may name: every numeric column and the one-sigma errors beside them, with their units. */
export const NUMERIC_UNITS: ReadonlyMap<string, string> = new Map(
  COLUMNS.filter((c: Column) => isNumeric(c)).flatMap((c: Column): [string, string][] => [
    [c.key, c.unit],
    ...(c.hasError ? [[errorKey(c.key), c.unit] as [string, string]] : []),
  ]),
);

/** Single-letter edits that turn one word into the other. */
const distance = (a: string, b: string): number => {
  let row = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min((row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1, change));
    }
    row = next;
  }
  return row[b.length] ?? 0;
};

const plain = (word: string): string => word.toLowerCase().replaceAll(/[^a-z0-9]/g, "");

/** The word of the list nearest in spelling, or undefined when none is near. */
export const nearest = (word: string, words: Iterable<string>): string | undefined => {
  let best: { word: string; distance: number } | undefined;
  for (const candidate of words) {
    const d = distance(plain(word), plain(candidate));
    if (!best || d < best.distance) best = { word: candidate, distance: d };
  }
  return best && best.distance <= Math.max(1, Math.floor(word.length / 3)) ? best.word : undefined;
};
