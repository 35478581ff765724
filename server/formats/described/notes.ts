import { isRuleLine } from "./rule.ts";

/** Notes by their signs: `1` for `Note (1):`, `G1` for one that several tables share. */
export type Notes = ReadonlyMap<string, string>;

const NOTE = /^\s*(?:Global\s+)?Notes?\b\s*(?:\(?(G?\d+|[A-Za-z*])\)?)?\s*(?:on\s+\S+\s*)?:\s*(.*)$/i;

/** Longest note that is said again with each of its columns. */
const LONGEST_NOTE = 2000;

export const isNote = (line: string): boolean => NOTE.test(line);

/** The notes from a line on up to a ruled line. `end`: the first line after it, or of no note's. */
export const readNotes = (
  lines: readonly string[],
  from: number,
  isRow: (at: number) => boolean,
): { notes: Map<string, string>; end: number } => {
  const notes = new Map<string, string>();
  let sign = "";
  let at = from;
  for (; at < lines.length; at++) {
    const line = lines[at] ?? "";
    if (isRuleLine(line)) {
      if (!isNote(lines[at + 1] ?? "")) return { notes, end: at + 1 };
      continue;
    }
    const begun = NOTE.exec(line);
    if (begun) {
      sign = begun[1] ?? "";
      notes.set(sign, (begun[2] ?? "").trim());
    } else if (isRow(at)) break;
    else notes.set(sign, `${notes.get(sign) ?? ""} ${line.trim()}`.slice(0, LONGEST_NOTE).trim());
  }
  return { notes, end: at };
};
