import { isRuleLine } from "./rule.ts";

/** What a description says of the work and of its files. */
export interface About {
  readonly title: string | null;
  readonly description: string | null;
  readonly sources: readonly string[];
  readonly files: readonly FileSummary[];
}

export interface FileSummary {
  readonly name: string;
  /** Characters of the longest line. */
  readonly length: number;
  readonly records: number | null;
  readonly title: string;
}

const LONGEST_ABSTRACT = 4000;
const SECTIONS =
  /^(Title|Authors|Author|Table|Abstract|Description|Keywords|ADC_Keywords|References?)\s*:\s*(.*)$/i;
const FILE = /^\s*(\S+)\s+(\d+)\s+(\d+|\.)\s+(\S.*)?$/;

/** The words of each part that a line `Title: …` begins. */
const sectionsOf = (lines: readonly string[]): ReadonlyMap<string, string> => {
  const sections = new Map<string, string>();
  let name = "";
  for (const line of lines) {
    const begun = SECTIONS.exec(line);
    if (begun) {
      name = (begun[1] ?? "").toLowerCase();
      sections.set(name, (begun[2] ?? "").trim());
    } else if (isRuleLine(line) || /^\S[^:]*:\s*$/.test(line)) name = "";
    else if (name !== "")
      sections.set(name, `${sections.get(name)} ${line.trim()}`.slice(0, LONGEST_ABSTRACT).trim());
  }
  return sections;
};

const readSummary = (lines: readonly string[]): FileSummary[] => {
  const at = lines.findIndex((line) => /^\s*File Summary\s*:/i.test(line));
  if (at < 0) return [];
  const files: FileSummary[] = [];
  let rules = 0;
  for (const line of lines.slice(at + 1)) {
    if (isRuleLine(line)) {
      if (++rules === 3) break;
      continue;
    }
    const [, name = "", length = "", records = "", title = ""] = FILE.exec(line) ?? [];
    if (rules === 2 && name !== "")
      files.push({ name, length: Number(length), records: records === "." ? null : Number(records), title });
  }
  return files;
};

/** A code of the catalogue and short words in the first line of a description of its own, with the title below. */
const firstLine = (lines: readonly string[]): { code: string; title: string } | null => {
  const parts = /^([IVX]+\/\d+\w*|[BJ]\/\S+)\s+(\S.*)$/.exec(lines[0] ?? "");
  return parts ? { code: parts[1] ?? "", title: (parts[2] ?? "").replace(/\s+/g, " ").trim() } : null;
};

/** Reads what stands before the first byte-by-byte description. */
export const readAbout = (lines: readonly string[]): About => {
  const sections = sectionsOf(lines);
  const first = firstLine(lines);
  return {
    title: sections.get("title") || first?.title || null,
    description: sections.get("table") || sections.get("abstract") || sections.get("description") || null,
    sources: [first?.code, sections.get("authors"), sections.get("author"), sections.get("reference")].filter(
      (words): words is string => words !== undefined && words !== "",
    ),
    files: readSummary(lines),
  };
};
