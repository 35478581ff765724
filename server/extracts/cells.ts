import type { ColumnCard, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";
import { isBlankWord, isSexagesimal, parseNumber, parseSexagesimal } from "../formats/numbers.ts";

/** A number in the canonical unit; NaN for a blank; null for a text that is no number. */
export type NumberReader = (text: string) => number | null;

const HOURS_TO_DEGREES = 15;

const isBlank = (card: ColumnCard): ((text: string) => boolean) => {
  const marks = new Set(card.blankMarks);
  return marks.size === 0 ? isBlankWord : (text) => isBlankWord(text) || marks.has(text);
};

/** The unit that the plan says a column has. For right ascension the curator's answer counts before the card. */
export const unitOf = (card: ColumnCard, plan: ReadingPlan): string => {
  if (card.means !== "ra" || plan.raUnit === null) return card.unit;
  return plan.raUnit === "hour" ? "hourangle" : "deg";
};

/** How the cells of that column become numbers: marks for "no value" go before any conversion. */
export const numberReader = (card: ColumnCard, plan: ReadingPlan): NumberReader => {
  const meaning = findMeaning(card.means);
  const blank = isBlank(card);
  const { factor, offset } = conversionTo(meaning?.unit ?? "", unitOf(card, plan)) ?? {
    factor: 1,
    offset: 0,
  };
  const isAngle = card.means === "ra" || card.means === "dec";
  // Hours, minutes and seconds are hours of right ascension, whatever the head of the column says of its decimals.
  const sexagesimalFactor = card.means === "ra" ? HOURS_TO_DEGREES : 1;
  return (raw) => {
    const text = raw.trim();
    if (blank(text)) return Number.NaN;
    const value = parseNumber(text, plan.decimalMark);
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
