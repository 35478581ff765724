import { CsvSplitter } from "./csv-splitter.ts";

const DELIMITERS = [",", ";", "\t", "|"] as const;
export type Delimiter = (typeof DELIMITERS)[number];
export type DecimalMark = "." | ",";

const recordsOf = (text: string, delimiter: Delimiter): string[][] =>
  new CsvSplitter(delimiter).push(text.endsWith("\n") ? text : `${text}\n`).map((r) => r.cells);

/** A delimiter, what the text is between it, and how well it explains the text. */
export interface Parting {
  readonly delimiter: Delimiter;
  readonly rows: string[][];
  readonly score: number;
}

/** How well a delimiter explains the text: columns that the rows agree on with the header. */
const score = (rows: string[][]): number => {
  const width = rows[0]?.length ?? 0;
  if (width < 2) return 0;
  const body = rows.slice(1).filter((cells) => cells.length > 1 || cells[0]?.trim());
  const agreeing = body.filter((cells) => cells.length === width).length;
  return body.length === 0 ? width : (agreeing / body.length) * (1000 + width);
};

/** A comma can only be the decimal mark where it does not part the columns. */
export const decimalMarkOf = (rows: string[][], delimiter: Delimiter): DecimalMark => {
  if (delimiter === ",") return ".";
  let commas = 0;
  let points = 0;
  for (const cells of rows.slice(1))
    for (const cell of cells) {
      if (/^\s*[+-]?\d*,\d+\s*$/.test(cell)) commas++;
      else if (/^\s*[+-]?\d*\.\d+\s*$/.test(cell)) points++;
    }
  return commas > points ? "," : ".";
};

/** What each delimiter makes of whole sampled lines. */
export const partingsOf = (sample: string): Parting[] =>
  DELIMITERS.map((delimiter) => {
    const rows = recordsOf(sample, delimiter);
    return { delimiter, rows, score: score(rows) };
  });

/** Delimiter and decimal mark together, on whole sampled lines. */
export const detectDialect = (sample: string): { delimiter: Delimiter; decimalMark: DecimalMark } => {
  const [first, ...others] = partingsOf(sample);
  if (!first) return { delimiter: ",", decimalMark: "." };
  const { delimiter, rows } = others.reduce((best, next) => (next.score > best.score ? next : best), first);
  return { delimiter, decimalMark: decimalMarkOf(rows, delimiter) };
};
