import type { Finding } from "#shared/api/extracts.ts";
import { examplesAt, stop } from "./finding.ts";
import { columnOf, type Look, textAt } from "./look.ts";

const SPREADSHEET = /^[+-]?\d[.,]?\d*e\+\d+$/i;
const ROUNDED = /^\d{12,15}0{4,}$/;
/** Largest whole number up to which double precision holds every one. */
const EXACT = 2 ** 53;

const percent = (part: number, whole: number): string => `${Math.round((part / whole) * 1000) / 10} %`;

/** Identifiers that lost digits: in a spreadsheet, or in a column of floating-point numbers. */
export const identifierFindings = (look: Look): Finding[] => {
  const source = columnOf(look, "source_id");
  if (!source || source.given.length === 0) return [];
  const { card, shown, given } = source;
  const isFloat = shown.column.type.startsWith("float");
  const isLost = (row: number): boolean => {
    const text = textAt(source, row);
    return SPREADSHEET.test(text) || ROUNDED.test(text) || (isFloat && Number(text) > EXACT);
  };
  const lost = given.filter(isLost);
  const isDamaged =
    given.some((row) => SPREADSHEET.test(textAt(source, row))) || lost.length > given.length / 2;
  if (!isDamaged) return [];
  return [
    stop(
      "damaged-identifiers",
      isFloat
        ? `These identifiers are kept as ${shown.column.type}, which holds 15 digits at most, and ${percent(lost.length, given.length)} of them are longer. They cannot be repaired.`
        : `These identifiers have been through a spreadsheet, which keeps 15 digits at most: ${percent(lost.length, given.length)} of them have lost the rest. They cannot be repaired.`,
      isFloat
        ? "Write the table again with the identifiers as text or whole numbers of 64 bits."
        : "Bring the file from before the spreadsheet.",
      { column: card.header, count: lost.length, examples: examplesAt(shown, look.lines, lost) },
    ),
  ];
};
