import type { ColumnType } from "../table.ts";
import { isRule } from "../text/preamble.ts";
import type { Field } from "./cutter.ts";

/** Names, types, units and null marks of columns between bars, each on a line of its own. */
export interface BarHeader {
  readonly fields: readonly Field[];
  readonly columns: readonly { name: string; type: ColumnType; unit: string; nullMark: string | null }[];
  /** Lines up to the first row. */
  readonly lines: number;
}

const TYPES: readonly (readonly [RegExp, ColumnType])[] = [
  [/^(?:d|do|dou|doub|doubl|double)$/i, "float64"],
  [/^(?:f|fl|flo|floa|float|r|re|rea|real)$/i, "float64"],
  // Identifiers of 19 digits are declared as either.
  [/^(?:i|in|int|l|lo|lon|long)$/i, "int64"],
];

const typeOf = (word: string): ColumnType => TYPES.find(([spelling]) => spelling.test(word))?.[1] ?? "text";

const isBarLine = (line: string): boolean => line.startsWith("|");

const contentOf = (lines: readonly string[]): number =>
  lines.findIndex((line) => line.trim() !== "" && !line.startsWith("\\"));

const isTypes = (line: string): boolean =>
  /^(?:\|\s*(?:char|date|int|long|double|float|real)\s*)+\|\s*$/.test(line);

/** Whether names stand between bars and the rows below them do not. */
export const isBarred = (head: string): boolean => {
  const lines = head.split("\n", 400);
  const first = contentOf(lines);
  if (first < 0 || !isBarLine(lines[first] ?? "") || !/\|.*\|\s*$/.test(lines[first] ?? "")) return false;
  const below = lines.slice(first).find((line) => line.trim() !== "" && !isBarLine(line));
  if (below === undefined) return isTypes(lines[first + 1] ?? "");
  return !below.includes("|") && !isRule(below);
};

const fieldsOf = (line: string): Field[] => {
  const bars = Array.from(line.matchAll(/\|/g), (bar) => bar.index);
  return bars.slice(0, -1).map((bar, at) => ({ from: bar + 1, to: bars[at + 1] ?? bar + 1 }));
};

const cells = (line: string | undefined, fields: readonly Field[]): string[] =>
  fields.map(({ from, to }) => (line ?? "").slice(from, to).trim());

/** Reads the lines in bars above the rows of a text for which `isBarred` holds. */
export const readBarHeader = (head: string): BarHeader => {
  const lines = head.split("\n");
  const first = contentOf(lines);
  let end = first;
  while (isBarLine(lines[end] ?? "")) end++;
  const fields = fieldsOf(lines[first] ?? "");
  const [names, types, units, nulls] = [0, 1, 2, 3].map((at) =>
    cells(first + at < end ? lines[first + at] : undefined, fields),
  );
  const unitIn = (text: string): string => (/^-*$/.test(text) ? "" : text);
  const columns = fields.map((_, at) => ({
    name: names?.[at] ?? "",
    type: typeOf((types?.[at] ?? "").replace(/^-\s*/, "")),
    unit: unitIn(units?.[at] ?? ""),
    nullMark: nulls?.[at] || null,
  }));
  return { fields, columns, lines: end };
};
