import type { ColumnCard, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { type Conversion, conversionTo } from "#shared/units/units.ts";
import { isBlankWord, isSexagesimal, parseNumber, parseSexagesimal } from "../formats/numbers.ts";

/** A number in the canonical unit; NaN for a blank; null for a text that is no number. */
export type NumberReader = (text: string) => number | null;

const HOURS_TO_DEGREES = 15;

/** Numbers with a limit, a footnote or an error behind them: `<0.5`, `~7`, `12.3a`, `1.2±0.1`. */
const MARKED =
  /^[<>~≤≥≈≲≳]?\s*[+-]?(?:\d+[.,]?\d*|[.,]\d+)(?:e[+-]?\d+)?\s*(?:(?:±|\+\/?-)\s*[\d.,]+|[a-z*†‡:?]{0,3})$/i;

/** Whether the text holds a number together with something that a number cannot keep. */
export const isMarkedNumber = (text: string): boolean => MARKED.test(text.trim());

/** The plan's decimal mark; formats that write numbers by their own rules have a point. */
export const decimalMarkOf = (plan: ReadingPlan): "." | "," =>
  plan.format === "delimited" || plan.format === "fixed-width" ? plan.decimalMark : ".";

/** Marks that are numbers stand for that number however it is written: -999 is -999.0 too. */
export const markValues = (card: ColumnCard, plan: ReadingPlan): readonly number[] =>
  card.blankMarks
    .map((mark) => parseNumber(mark.trim(), decimalMarkOf(plan)))
    .filter((value) => !Number.isNaN(value));

const isBlank = (card: ColumnCard): ((text: string) => boolean) => {
  const marks = new Set(card.blankMarks);
  return marks.size === 0 ? isBlankWord : (text) => isBlankWord(text) || marks.has(text);
};

/** The unit that the plan says a column has. For right ascension the curator's answer counts before the card. */
export const unitOf = (card: ColumnCard, plan: ReadingPlan): string => {
  if (card.means !== "ra" || plan.raUnit === null) return card.unit;
  return plan.raUnit === "hour" ? "hourangle" : "deg";
};

/** From the column's unit to the canonical one. */
export const conversionOf = (card: ColumnCard, plan: ReadingPlan): Conversion =>
  conversionTo(findMeaning(card.means)?.unit ?? "", unitOf(card, plan)) ?? { factor: 1, offset: 0 };

/** How the cells of that column become numbers: marks for "no value" go before any conversion. */
export const numberReader = (card: ColumnCard, plan: ReadingPlan): NumberReader => {
  const blank = isBlank(card);
  const marks = markValues(card, plan);
  const decimalMark = decimalMarkOf(plan);
  const { factor, offset } = conversionOf(card, plan);
  const isAngle = card.means === "ra" || card.means === "dec";
  // Hours, minutes and seconds are hours of right ascension, whatever the head of the column says of its decimals.
  const sexagesimalFactor = card.means === "ra" && plan.frame !== "galactic" ? HOURS_TO_DEGREES : 1;
  return (raw) => {
    const text = raw.trim();
    if (blank(text)) return Number.NaN;
    const value = parseNumber(text, decimalMark);
    if (marks.includes(value)) return Number.NaN;
    if (!Number.isNaN(value)) return Number.isFinite(value) ? value * factor + offset : null;
    if (!isAngle || !isSexagesimal(text)) return null;
    const angle = parseSexagesimal(text);
    return Number.isNaN(angle) ? null : angle * sexagesimalFactor;
  };
};

/** Text as it stands, without the blanks around it; null for a blank. */
export const textReader = (card: ColumnCard): ((text: string) => string | null) => {
  const blank = isBlank(card);
  return (raw) => {
    const text = raw.trim();
    return blank(text) ? null : text;
  };
};
