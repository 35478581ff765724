import type { Finding } from "#shared/api/extracts.ts";
import { isSexagesimal } from "../../formats/numbers.ts";
import { examplesAt, type FindingCode, note, stop } from "./finding.ts";
import { columnOf, type Look, rowsWhere, textAt, type UsedColumn } from "./look.ts";

const shownRows = (look: Look, u: UsedColumn, rows: readonly number[]) => ({
  column: u.card.header,
  count: rows.length,
  examples: examplesAt(u.shown, look.lines, rows),
});

/** Fewer rows than this tell nothing about their column. */
const LEAST_ROWS = 10;

/** Positions that no place of the sky has: a few are held back, most of a column is another column. */
const outside = (
  look: Look,
  u: UsedColumn | undefined,
  code: FindingCode,
  is: (value: number) => boolean,
  where: string,
): Finding[] => {
  if (!u) return [];
  const rows = rowsWhere(u, is);
  if (rows.length === 0) return [];
  const { length } = u.given;
  if (length >= LEAST_ROWS && rows.length > length / 2)
    return [
      stop(
        code,
        `${rows.length} of ${length} values looked at in “${u.card.header}” lie ${where}. It is probably another quantity, or in another unit.`,
        "Choose another column or another unit.",
        shownRows(look, u, rows),
      ),
    ];
  return [
    note(
      code,
      `${rows.length} of ${length} values looked at in “${u.card.header}” lie ${where}. Such rows will be refused.`,
      "Look at the rows; mend the file if they matter.",
      shownRows(look, u, rows),
    ),
  ];
};

const MIXED =
  /^[+-]?\d{1,3}\s*:\s*\d{1,2}\s*:\s*[\d.]+\s*[a-z"′″']$|^[+-]?\d{1,3}\s*[hd°]\s*\d{1,2}\s*[:\s]\s*[\d.]+$/i;
const SIXTY = /(?:^|[:\shmd°'′])60(?:\.0*)?\s*[s"″]?$|[:\shd°]60[:\sm'′]/;
const MINUS_ZERO = /^[-\u2212\u2013]0+[\s:d°]/;

const spelling = (
  look: Look,
  u: UsedColumn,
  code: FindingCode,
  is: (text: string) => boolean,
  words: (count: number) => string,
  hint: string,
): Finding[] => {
  const rows = u.given.filter((row) => is(textAt(u, row)));
  return rows.length > 0 ? [note(code, words(rows.length), hint, shownRows(look, u, rows))] : [];
};

const spellings = (look: Look, u: UsedColumn): Finding[] => [
  ...spelling(
    look,
    u,
    "minus-zero",
    (text) => MINUS_ZERO.test(text) && isSexagesimal(text),
    (count) =>
      `${count} values looked at in “${u.card.header}” begin with −00. They keep their sign and lie south of the equator.`,
    "Nothing needs to be done.",
  ),
  ...spelling(
    look,
    u,
    "seconds-carried",
    (text) => isSexagesimal(text) && SIXTY.test(text),
    (count) =>
      `${count} values looked at in “${u.card.header}” have 60 seconds or minutes, which are carried over.`,
    "Nothing needs to be done.",
  ),
  ...spelling(
    look,
    u,
    "mixed-marks",
    (text) => MIXED.test(text),
    (count) =>
      `${count} values looked at in “${u.card.header}” mix colons or blanks with letters. A last letter behind colons does not change what the parts are.`,
    "Look whether the values read are right.",
  ),
];

/** Where stars are said to stand. */
export const positionFindings = (look: Look): Finding[] => {
  const [ra, dec] = [columnOf(look, "ra"), columnOf(look, "dec")];
  return [
    ...outside(look, ra, "ra-out-of-range", (v) => v < 0 || v >= 360, "outside 0° to 360°"),
    ...outside(look, dec, "dec-beyond-pole", (v) => Math.abs(v) > 90, "beyond a pole"),
    ...[ra, dec].flatMap((u) => (u ? spellings(look, u) : [])),
  ];
};
