import { Findings } from "../findings.ts";
import type { TableFinding } from "../table.ts";
import type { NamesFound } from "./names.ts";
import type { OutsideLines } from "./outside-lines.ts";
import type { TextSource } from "./text-source.ts";
import {
  COMMENT_LINES,
  ENCODING_GUESSED,
  FEWER_ROWS,
  headersRenamed,
  MORE_ROWS,
  NAMES_IN_COMMENT,
  NO_NAMES,
  OPEN_END,
  STRAY_BYTES,
  TWO_READINGS,
  UNITS_LINE,
} from "./words.ts";

/** What the rows of a text showed besides their values. */
export interface RowsRead {
  readonly seen: number;
  readonly outside: OutsideLines;
  /** All rows have been read. */
  readonly isDone: boolean;
  /** The last line has no end. */
  readonly endsOpen: boolean;
}

interface Read {
  readonly source: TextSource;
  readonly found: NamesFound;
  readonly renamed: readonly string[];
  readonly rival: string | null;
  readonly rows: RowsRead;
}

const addNames = ({ found, renamed }: Read, findings: Findings): void => {
  for (const name of renamed) findings.add(headersRenamed(renamed.length), name);
  if (found.stand === "nowhere") findings.add(NO_NAMES);
  if (found.stand === "comment") findings.add(NAMES_IN_COMMENT, found.names.join(" "));
  if (found.units !== null) findings.add(UNITS_LINE, found.units.join(" ").trim());
};

/** Adds what was found elsewhere, its count and examples with it. */
export const addAgain = ({ count, examples, ...words }: TableFinding, findings: Findings): void => {
  findings.add(words, examples[0], count);
  for (const example of examples.slice(1)) findings.add(words, example, 0);
};

/** Adds what differs between the rows that a file declares and those that it has. */
export const addRowCount = (declared: number | null, seen: number, findings: Findings): void => {
  if (declared === null || declared === seen) return;
  const words = `${declared.toLocaleString("en")} declared, ${seen.toLocaleString("en")} found`;
  findings.add(seen < declared ? FEWER_ROWS : MORE_ROWS, words, Math.abs(declared - seen));
};

/** Adds what the bytes of a text left open. */
export const addEncoding = ({ judged, strays, strayExamples }: TextSource, findings: Findings): void => {
  if (judged.isGuess) findings.add(ENCODING_GUESSED);
  if (strays > 0) addAgain({ ...STRAY_BYTES, count: strays, examples: strayExamples }, findings);
};

/** Everything that the reading of a text found. */
export const textFindings = (read: Read): readonly TableFinding[] => {
  const findings = new Findings();
  const { source, rival, rows } = read;
  addNames(read, findings);
  addEncoding(source, findings);
  if (rival !== null) findings.add(TWO_READINGS, rival === "\t" ? "tab" : rival);
  const { comments: count, examples } = rows.outside;
  if (count > 0) addAgain({ ...COMMENT_LINES, count, examples }, findings);
  if (rows.endsOpen) findings.add(OPEN_END);
  if (rows.isDone) addRowCount(rows.outside.declaredRows, rows.seen, findings);
  return findings.list();
};
