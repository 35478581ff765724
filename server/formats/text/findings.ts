import type { TableFinding } from "../table.ts";
import { Findings } from "../votable/findings.ts";
import type { NamesFound } from "./names.ts";
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
  readonly declaredRows: number | null;
  readonly comments: number;
  readonly commentExamples: readonly string[];
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

/** Adds what differs between the rows that a file declares and those that it has. */
export const addRowCount = (declared: number | null, seen: number, findings: Findings): void => {
  if (declared === null || declared === seen) return;
  const words = `${declared.toLocaleString("en")} declared, ${seen.toLocaleString("en")} found`;
  findings.add(seen < declared ? FEWER_ROWS : MORE_ROWS, words, Math.abs(declared - seen));
};

/** Adds what the bytes of a text left open. */
export const addEncoding = ({ judged, strays, strayExamples }: TextSource, findings: Findings): void => {
  if (judged.isGuess) findings.add(ENCODING_GUESSED);
  strayExamples.forEach((example, at) => {
    findings.add(STRAY_BYTES, example, at === 0 ? strays - strayExamples.length + 1 : 1);
  });
};

/** Everything that the reading of a text found. */
export const textFindings = (read: Read): readonly TableFinding[] => {
  const findings = new Findings();
  const { source, rival, rows } = read;
  addNames(read, findings);
  addEncoding(source, findings);
  if (rival !== null) findings.add(TWO_READINGS, rival === "\t" ? "tab" : rival);
  if (rows.comments > 0) {
    findings.add(COMMENT_LINES, rows.commentExamples[0], rows.comments);
    for (const example of rows.commentExamples.slice(1)) findings.add(COMMENT_LINES, example, 0);
  }
  if (rows.endsOpen) findings.add(OPEN_END);
  if (rows.isDone) addRowCount(rows.declaredRows, rows.seen, findings);
  return findings.list();
};
