import type { Finding } from "#shared/api/extracts.ts";
import { type CsvRecord, CsvSplitter } from "../../formats/csv-splitter.ts";
import type { Sample } from "../sample.ts";
import { ask, examplesOf, isAccepted } from "./finding.ts";
import type { Look } from "./look.ts";

const OTHERS = [",", ";", "\t", "|"] as const;
const WORDS: Readonly<Record<string, string>> = {
  ",": "commas",
  ";": "semicolons",
  "\t": "tabs",
  "|": "bars",
};
const LEAST_ROWS = 3;
const MOST_ROWS = 200;

const widthBy = (delimiter: string, text: string): number =>
  new CsvSplitter(delimiter).push(`${text}\n`)[0]?.cells.length ?? 0;

/** Columns by another delimiter, if every row has as many of them as the line of names; else 0. */
const agreedWidth = (
  delimiter: string,
  { header, delimiter: chosen }: Sample,
  rows: readonly CsvRecord[],
): number => {
  const width = widthBy(delimiter, header.join(chosen));
  return width > 1 && rows.every((row) => widthBy(delimiter, row.text) === width) ? width : 0;
};

/** Two delimiters that part every line alike: then the file does not say which of them is one. */
export const delimiterFindings = ({ sample, plan }: Look): Finding[] => {
  const rows = sample.rows.filter((row) => row.text !== "").slice(0, MOST_ROWS);
  if (sample.format !== "delimited" || rows.length < LEAST_ROWS || isAccepted(plan, "delimiter-doubt"))
    return [];
  const rivals = OTHERS.filter(
    (d) => d !== sample.delimiter && agreedWidth(d, sample, rows) >= sample.header.length,
  );
  const [rival] = rivals;
  if (rival === undefined) return [];
  return [
    ask(
      "delimiter-doubt",
      `Every line can be parted by ${WORDS[sample.delimiter]} as well as by ${WORDS[rival]}.`,
      "Say which of them parts the columns.",
      {
        examples: examplesOf(rows),
        answers: [sample.delimiter, ...rivals].map((d) => ({
          value: `delimiter:${d}`,
          label: `Parted by ${WORDS[d]}`,
        })),
      },
    ),
  ];
};
