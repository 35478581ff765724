import { CsvSplitter } from "./csv-splitter.ts";

const DELIMITERS = [",", ";", "\t", "|"] as const;
export type Delimiter = (typeof DELIMITERS)[number];
export type DecimalMark = "." | ",";

const recordsOf = (text: string, delimiter: Delimiter): string[][] =>
  new CsvSplitter(delimiter).push(text.endsWith("\n") ? text : `${text}\n`).map((r) => r.cells);

/** How well a delimiter explains the text: columns that the rows agree on with the header. */
const score = (rows: string[][]): number => {
  const width = rows[0]?.length ?? 0;
  if (width < 2) return 0;
  const body = rows.slice(1).filter((cells) => cells.length > 1 || cells[0]?.trim());
  const agreeing = body.filter((cells) => cells.length === width).length;
  return body.length === 0 ? width : (agreeing / body.length) * (1000 + width);
};

/** A comma can only be the decimal mark where it does not part the columns. */
const decimalMarkOf = (rows: string[][], delimiter: Delimiter): DecimalMark => {
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

/** Delimiter and decimal mark together, on whole sampled lines. */
export const detectDialect = (sample: string): { delimiter: Delimiter; decimalMark: DecimalMark } => {
  let best: { delimiter: Delimiter; rows: string[][]; score: number } | undefined;
  for (const delimiter of DELIMITERS) {
    const rows = recordsOf(sample, delimiter);
    const value = score(rows);
    if (!best || value > best.score) best = { delimiter, rows, score: value };
  }
  const { delimiter, rows } = best ?? { delimiter: "," as const, rows: [] };
  return { delimiter, decimalMark: decimalMarkOf(rows, delimiter) };
};
